import type { H3Event } from 'h3'
import type { ApiErrorBody } from '#shared/schemas/api'

const HEADERS = {
  'x-content-type-options': 'nosniff',
  'x-frame-options': 'DENY',
  'referrer-policy': 'same-origin',
  'permissions-policy': 'camera=(), geolocation=(), microphone=(), payment=()',
  'cross-origin-opener-policy': 'same-origin',
  'cross-origin-resource-policy': 'same-origin',
}

const SAFE_METHODS = new Set(['GET', 'HEAD', 'OPTIONS'])

/** Whether the page that sends the request stands on another origin than this server. */
function isForeign(event: H3Event): boolean {
  const site = getRequestHeader(event, 'sec-fetch-site')
  if (site !== undefined) return site !== 'same-origin' && site !== 'none'
  const origin = getRequestHeader(event, 'origin')
  if (origin === undefined) return false
  try {
    return new URL(origin).host !== getRequestHeader(event, 'host')
  } catch {
    return true
  }
}

/** Security headers on every answer; unsafe methods only from our own pages or from programs that are no browser. */
export default defineEventHandler((event) => {
  setResponseHeaders(event, HEADERS)
  if (event.path.startsWith('/api/')) setResponseHeader(event, 'cache-control', 'no-store')
  if (SAFE_METHODS.has(event.method) || !isForeign(event)) return
  const data: ApiErrorBody = {
    code: 'foreign-origin',
    message: 'This request came from a page of another site and was refused. Open Baywright itself and do it there.',
  }
  throw createError({ statusCode: 403, statusMessage: 'Forbidden', message: data.message, data })
})
