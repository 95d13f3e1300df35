/** A session that has ended is noticed at the first call that is refused for it, whichever page made it. */
export default defineNuxtPlugin(() => {
  const session = useSessionStore()
  globalThis.$fetch = $fetch.create({
    onResponseError({ response }) {
      if (response.status === 401 && session.account) session.hasEnded = true
    },
  }) as typeof $fetch
})
