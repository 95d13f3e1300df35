import type { StudyProgress, StudyState } from '#shared/schemas/api'

const ENDED: readonly StudyState[] = ['finished', 'cancelled', 'failed']

/** How often the counts are read out, ms. */
const ANNOUNCE_MS = 5000

export function hasEnded(state: StudyState): boolean {
  return ENDED.includes(state)
}

/**
 * Live progress of a study. The stream begins with a snapshot, so a page that is loaded again or was
 * offline shows what is true now; the browser itself reconnects until the study has ended.
 */
export function useStudyProgress(studyId: MaybeRefOrGetter<string>, take: (progress: StudyProgress) => void) {
  const isConnected = ref(true)
  let stream: EventSource | null = null

  function close() {
    stream?.close()
    stream = null
  }

  function listen() {
    close()
    if (typeof EventSource === 'undefined') return
    stream = new EventSource(`/api/studies/${toValue(studyId)}/events`)
    stream.addEventListener('open', () => {
      isConnected.value = true
    })
    stream.addEventListener('error', () => {
      isConnected.value = false
    })
    stream.addEventListener('progress', (event) => {
      isConnected.value = true
      const progress = JSON.parse(event.data) as StudyProgress
      take(progress)
      if (hasEnded(progress.state)) close()
    })
  }

  onBeforeUnmount(close)
  return { isConnected: readonly(isConnected), listen, close }
}

/** A text for a live region that changes at most every five seconds, and at once when `isLast`. */
export function useAnnouncement(text: () => string, isLast: () => boolean) {
  const spoken = ref('')
  let last = 0
  watch([text, isLast], ([now, ended]) => {
    const time = Date.now()
    if (!ended && time - last < ANNOUNCE_MS) return
    last = time
    spoken.value = now
  })
  return readonly(spoken)
}
