import type { PlateRecord } from '#shared/schemas/api'
import { PlateSchema, type Plate } from '#shared/schemas/plate'

export type SavingState = 'saved' | 'unsaved' | 'saving' | 'offline' | 'conflict' | 'refused'

const PAUSE_MS = 900
const FIRST_RETRY_MS = 2_000
const LONGEST_RETRY_MS = 30_000

interface Draft { version: number, document: Plate }

/**
 * Saves the open plate by itself. Offline the changes stay in this browser and are sent later; a
 * version that someone else has saved meanwhile is never written over without a choice.
 */
export function usePlateSaving() {
  const store = usePlateStore()
  const state = ref<SavingState>('saved')
  /** What the server said against it. */
  const sentence = ref<string | null>(null)
  const theirs = shallowRef<PlateRecord | null>(null)
  let timer: ReturnType<typeof setTimeout> | undefined
  let retryAfter = FIRST_RETRY_MS
  let sending: Promise<void> | null = null

  const session = useSessionStore()
  /** Of the account too: who signs in next in this browser does not find another's changes. */
  const keyOf = (id: string) => `baywright-plate-${session.account?.id ?? ''}-${id}`
  const key = () => keyOf(store.record?.id ?? '')

  function keepDraft() {
    if (!store.record || !store.document) return
    try {
      const draft: Draft = { version: store.record.version, document: store.document }
      localStorage.setItem(key(), JSON.stringify(draft))
    } catch {
      // A browser without room for the draft still has the document on the screen and tries to send it.
    }
  }

  function dropDraft() {
    localStorage.removeItem(key())
  }

  function later(ms: number) {
    clearTimeout(timer)
    timer = setTimeout(() => void send(), ms)
  }

  /** Sends what has changed; where a save is under way, waits for it and sends the rest. */
  async function send(): Promise<void> {
    clearTimeout(timer)
    while (sending) await sending
    const { record, document } = store
    if (!record || !document || state.value === 'conflict' || !store.isChanged) return
    state.value = 'saving'
    sending = put(record, document)
    store.pendingSave = sending
    await sending
  }

  async function put(record: Omit<PlateRecord, 'document'>, document: Plate) {
    try {
      const answer = await $fetch<PlateRecord>(`/api/plates/${record.id}`, {
        method: 'PUT', body: { version: record.version, document },
      })
      const { document: _, ...version } = answer
      if (store.record?.id !== record.id) return localStorage.removeItem(keyOf(record.id))
      store.noteSaved(version, document)
      retryAfter = FIRST_RETRY_MS
      sentence.value = null
      if (store.isChanged) later(PAUSE_MS)
      else dropDraft()
      state.value = store.isChanged ? 'unsaved' : 'saved'
    } catch (error) {
      await refused(error, record.id)
    } finally {
      sending = null
    }
  }

  async function refused(error: unknown, id: string) {
    const status = apiStatus(error)
    sentence.value = apiSentence(error)
    if (status === 409) {
      theirs.value = currentOf(error) ?? await $fetch<PlateRecord>(`/api/plates/${id}`).catch(() => null)
      if (!theirs.value) return offline()
      state.value = 'conflict'
      store.announce('Someone else has saved this plate meanwhile. Choose which version goes on.')
      return
    }
    if (status === null || status >= 500 || status === 429) return offline()
    state.value = 'refused'
  }

  function offline() {
    state.value = 'offline'
    later(retryAfter)
    retryAfter = Math.min(retryAfter * 2, LONGEST_RETRY_MS)
  }

  function keepMine() {
    if (!theirs.value || !store.record) return
    const { document: _, ...version } = theirs.value
    store.record = version
    theirs.value = null
    state.value = 'unsaved'
    void send()
  }

  function takeTheirs() {
    if (!theirs.value) return
    store.takeOver(theirs.value)
    theirs.value = null
    state.value = 'saved'
    dropDraft()
  }

  /** Changes left over from an earlier visit come back, as a step that can be undone. */
  function bringDraftBack() {
    const draft = readDraft(localStorage.getItem(key()))
    if (!draft || !store.record) return
    store.restore(draft.document)
    if (!store.isChanged) return dropDraft()
    if (draft.version === store.record.version) return later(PAUSE_MS)
    void $fetch<PlateRecord>(`/api/plates/${store.record.id}`).then((current) => {
      theirs.value = current
      state.value = 'conflict'
    })
  }

  function flush() {
    if (store.isChanged && store.record && store.document && state.value !== 'conflict') {
      void fetch(`/api/plates/${store.record.id}`, {
        method: 'PUT', keepalive: true, headers: { 'content-type': 'application/json' },
        body: JSON.stringify({ version: store.record.version, document: store.document }),
      })
    }
  }

  watch(() => store.document, () => {
    if (!store.isChanged || store.rights === 'none') return
    keepDraft()
    if (state.value === 'conflict') return
    state.value = 'unsaved'
    later(PAUSE_MS)
  })
  useEventListener('online', () => void send())
  useEventListener('pagehide', flush)
  onMounted(bringDraftBack)
  onBeforeUnmount(() => {
    clearTimeout(timer)
    void send()
  })

  return { state, sentence, theirs, keepMine, takeTheirs, saveNow: send }
}

function currentOf(error: unknown): PlateRecord | null {
  const body = (error as { data?: { data?: { current?: PlateRecord } } }).data
  return body?.data?.current ?? null
}

function readDraft(text: string | null): Draft | null {
  if (!text) return null
  try {
    const draft = JSON.parse(text) as Draft
    const parsed = PlateSchema.safeParse(draft.document)
    return parsed.success && typeof draft.version === 'number' ? { version: draft.version, document: parsed.data } : null
  } catch {
    return null
  }
}
