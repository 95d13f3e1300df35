/** Screens of a project stand on the project: it is read before the header is drawn. */
export default defineNuxtRouteMiddleware(async (to) => {
  const id = to.params.id
  if (!to.path.startsWith('/projects/') || typeof id !== 'string') return
  const projects = useProjectsStore()
  try {
    await projects.open(id, useRequestFetch() as typeof $fetch)
  } catch (error) {
    const status = apiStatus(error) ?? 503
    if (status === 401) {
      useSessionStore().forget()
      return navigateTo({ path: '/sign-in', query: { to: to.fullPath } })
    }
    return abortNavigation(createError({ statusCode: status, message: apiSentence(error), fatal: true }))
  }
})
