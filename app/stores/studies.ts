import type { SchemePoints, StudyProgress, StudyRecord } from '#shared/schemas/api'
import type { Range } from '#shared/schemas/range'

type Fetcher = typeof $fetch

/** The study that is open, and the ranges that are being set up, by project. */
export const useStudiesStore = defineStore('studies', () => {
  const current = ref<StudyRecord | null>(null)
  const drafts = ref<Record<string, { plateId: string, range: Range }>>({})

  async function load(id: string, fetcher: Fetcher = $fetch as Fetcher): Promise<StudyRecord> {
    const record = await fetcher<StudyRecord>(`/api/studies/${id}`)
    current.value = record
    return record
  }

  /** The open study, asked for again only where another one is open or it has not ended. */
  async function open(id: string, fetcher: Fetcher = $fetch as Fetcher): Promise<StudyRecord> {
    if (current.value?.id === id && current.value.state === 'finished') return current.value
    return await load(id, fetcher)
  }

  async function run(projectId: string, plateId: string, range: Range): Promise<StudyRecord> {
    const record = await $fetch<StudyRecord>(`/api/projects/${projectId}/studies`, { method: 'POST', body: { plateId, range } })
    current.value = record
    forgetDraft(projectId)
    return record
  }

  async function cancel(id: string): Promise<void> {
    current.value = await $fetch<StudyRecord>(`/api/studies/${id}/cancel`, { method: 'POST' })
  }

  async function points(id: string, fetcher: Fetcher = $fetch as Fetcher): Promise<SchemePoints> {
    return await fetcher<SchemePoints>(`/api/studies/${id}/points`)
  }

  function setDraft(projectId: string, draft: { plateId: string, range: Range }) {
    drafts.value = { ...drafts.value, [projectId]: draft }
  }

  function forgetDraft(projectId: string) {
    drafts.value = Object.fromEntries(Object.entries(drafts.value).filter(([id]) => id !== projectId))
  }

  /** Takes a progress report into the open study. */
  function report(id: string, progress: StudyProgress) {
    const study = current.value
    if (study?.id !== id) return
    current.value = { ...study, state: progress.state, counts: progress.counts, progress }
  }

  return { current, drafts, load, open, run, cancel, points, setDraft, forgetDraft, report }
})
