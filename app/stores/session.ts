import type { SessionAccount } from '#shared/schemas/api'

/** Who is signed in. The cookie is sealed and out of reach of scripts: the server says who it is. */
export const useSessionStore = defineStore('session', () => {
  const account = ref<SessionAccount | null>(null)
  const isKnown = ref(false)
  /** A call was refused although somebody is signed in here: the session has ended elsewhere. */
  const hasEnded = ref(false)

  /** Asks the server once per page load. */
  async function load(fetcher: typeof $fetch = $fetch as typeof $fetch) {
    if (isKnown.value) return
    try {
      account.value = await fetcher<SessionAccount>('/api/session')
    } catch (error) {
      if (apiStatus(error) !== 401) throw error
      account.value = null
    }
    isKnown.value = true
  }

  async function signIn(email: string, password: string) {
    account.value = await $fetch<SessionAccount>('/api/session', { method: 'POST', body: { email, password } })
    isKnown.value = true
    hasEnded.value = false
  }

  /** Whether the browser has a session of this account again, begun in another tab. */
  async function resume() {
    const now = await $fetch<SessionAccount>('/api/session').catch(() => null)
    if (!now) return
    hasEnded.value = false
    // Another account may see other projects, so nothing of the page is kept.
    if (now.id !== account.value?.id) reloadNuxtApp({ path: '/projects' })
  }

  async function signOut() {
    await $fetch('/api/session', { method: 'DELETE' })
    forget()
  }

  /** After a 401 in mid-work: the session has ended elsewhere. */
  function forget() {
    account.value = null
    isKnown.value = true
    hasEnded.value = false
    useProjectsStore().forget()
  }

  return { account, isKnown, hasEnded, load, resume, signIn, signOut, forget }
})
