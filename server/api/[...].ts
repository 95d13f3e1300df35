import type { ApiErrorBody } from '#shared/schemas/api'

/** An address below /api that no route has: an answer in JSON, never a page. */
export default defineEventHandler((event) => {
  const data: ApiErrorBody = { code: 'not-found', message: `There is no ${event.method} ${event.path.split('?')[0]}.` }
  throw createError({ statusCode: 404, statusMessage: 'Not Found', message: data.message, data })
})
