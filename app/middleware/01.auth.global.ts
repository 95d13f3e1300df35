const OPEN_PATHS = new Set(['/sign-in'])

/** Everything but the sign-in needs a session; the way back is kept in the address. */
export default defineNuxtRouteMiddleware(async (to) => {
  const session = useSessionStore()
  try {
    await session.load(useRequestFetch() as typeof $fetch)
  } catch (error) {
    return abortNavigation(createError({ statusCode: apiStatus(error) ?? 503, message: apiSentence(error), fatal: true }))
  }
  if (session.account) return OPEN_PATHS.has(to.path) ? navigateTo(returnPath(to.query.to)) : undefined
  if (OPEN_PATHS.has(to.path)) return
  return navigateTo({ path: '/sign-in', query: to.fullPath === '/' ? {} : { to: to.fullPath } })
})
