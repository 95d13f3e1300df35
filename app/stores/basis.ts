import type { ChoiceCode } from '#shared/engine/actions'
import type { BasisRecord } from '#shared/schemas/api'
import type { Basis } from '#shared/schemas/basis'
import { defaultsFor, differences, withChoice } from '~/utils/basis/document'

/**
 * The basis of design of the open project: the version in force and a draft beside it. The draft
 * outlives the page, so that looking at a plate in between loses nothing.
 */
export const useBasisStore = defineStore('basis', () => {
  const record = ref<BasisRecord | null>(null)
  /** Null until a national choice is made on a project without a basis. */
  const draft = ref<Basis | null>(null)
  /** Another person's newer version, met while keeping the draft. */
  const conflict = ref<BasisRecord | null>(null)
  const failure = ref<string | null>(null)
  const isSaving = ref(false)
  /** The session ended while the draft was open. */
  const isSignedOut = ref(false)

  const changes = computed(() => {
    if (!record.value || !draft.value || record.value.version === 0) return []
    return differences(record.value.document, draft.value)
  })
  const isDirty = computed(() => record.value?.version === 0 ? draft.value !== null : changes.value.length > 0)

  function accept(next: BasisRecord) {
    record.value = next
    draft.value = next.version === 0 ? null : structuredClone(toRaw(next.document))
    conflict.value = null
    failure.value = null
  }

  async function open(projectId: string, fetcher: typeof $fetch = $fetch as typeof $fetch) {
    const next = await fetcher<BasisRecord>(`/api/projects/${projectId}/basis`)
    if (record.value?.projectId !== projectId || !isDirty.value) accept(next)
    else if (next.version !== record.value.version) conflict.value = next
  }

  function choose(code: ChoiceCode) {
    draft.value = draft.value ? withChoice(draft.value, code) : defaultsFor(code)
  }

  function change(next: Basis) {
    draft.value = next
  }

  function discard() {
    if (record.value) accept(record.value)
  }

  async function save() {
    if (!record.value || !draft.value || isSaving.value) return
    const { projectId, version } = record.value
    isSaving.value = true
    failure.value = null
    isSignedOut.value = false
    try {
      accept(await $fetch<BasisRecord>(`/api/projects/${projectId}/basis`, { method: 'PUT', body: { version, document: draft.value } }))
      await useProjectsStore().refresh(projectId)
    } catch (error) {
      if (apiStatus(error) === 409) await meetNewer(projectId)
      else failure.value = apiSentence(error)
      isSignedOut.value = apiStatus(error) === 401
    } finally {
      isSaving.value = false
    }
  }

  async function meetNewer(projectId: string) {
    try {
      conflict.value = await $fetch<BasisRecord>(`/api/projects/${projectId}/basis`)
    } catch (error) {
      failure.value = apiSentence(error)
    }
  }

  /** The draft as the version after the newer one. */
  async function keepMine() {
    if (!conflict.value) return
    const mine = draft.value
    record.value = conflict.value
    draft.value = mine
    conflict.value = null
    await save()
  }

  function takeTheirs() {
    if (conflict.value) accept(conflict.value)
  }

  return { record, draft, conflict, failure, isSaving, isSignedOut, changes, isDirty, open, choose, change, discard, save, keepMine, takeTheirs }
})
