import type { SchemeDetail, SchemePage, SchemeRow } from '#shared/schemas/api'
import type { Direction } from '#shared/schemas/study'

type Fetcher = typeof $fetch

export type SchemeSort = 'mass' | 'depth' | 'pieces' | 'distinctSections'
export type SchemeView = 'engineer' | 'architect' | 'cost-planner'

export interface SchemeQuery {
  sort: SchemeSort
  order: 'asc' | 'desc'
  /** Structural depth at most, of the deepest beam where slabs differ; mm, null = any. */
  depthAtMost: number | null
  direction: Direction | 'any'
  divisions: number | 'any'
  tradeOffOnly: boolean
}

export const PAGE_LENGTH = 50

export function openQuery(): SchemeQuery {
  return { sort: 'mass', order: 'asc', depthAtMost: null, direction: 'any', divisions: 'any', tradeOffOnly: false }
}

/** Ranked rows of the open study, as far as they have been asked for, and the scheme that is open. */
export const useSchemesStore = defineStore('schemes', () => {
  const studyId = ref<string | null>(null)
  const query = ref<SchemeQuery>(openQuery())
  const rows = ref<SchemeRow[]>([])
  const total = ref(0)
  const next = ref<string | null>(null)
  const selected = ref<string | null>(null)
  const detail = shallowRef<SchemeDetail | null>(null)
  /** Mark of the member that is selected in the open scheme. */
  const member = ref<string | null>(null)
  let asked = 0

  /** `slabDepth`: what the asked depth counts above the deepest beam, mm. */
  function parameters(slabDepth: number, after: string | null) {
    const { sort, order, depthAtMost, direction, divisions, tradeOffOnly } = query.value
    return {
      sort, order, limit: PAGE_LENGTH,
      ...(depthAtMost === null ? {} : { depthAtMost: Math.max(0, depthAtMost - slabDepth) }),
      ...(direction === 'any' ? {} : { direction }),
      ...(divisions === 'any' ? {} : { divisions: String(divisions) }),
      ...(tradeOffOnly ? { tradeOff: 'true' } : {}),
      ...(after === null ? {} : { after }),
    }
  }

  /** Another study starts with its own question and selection. */
  function enter(id: string) {
    if (studyId.value === id) return
    studyId.value = id
    query.value = openQuery()
    rows.value = []
    total.value = 0
    next.value = null
    selected.value = null
  }

  async function page(slabDepth: number, after: string | null, fetcher: Fetcher): Promise<void> {
    const id = studyId.value
    if (id === null) return
    asked += 1
    const turn = asked
    const answer = await fetcher<SchemePage>(`/api/studies/${id}/schemes`, { query: parameters(slabDepth, after) })
    // An older question that is answered late must not overwrite the newer one.
    if (turn !== asked || studyId.value !== id) return
    rows.value = after === null ? answer.rows : [...rows.value, ...answer.rows]
    total.value = answer.total
    next.value = answer.next
  }

  async function first(slabDepth: number, fetcher: Fetcher = $fetch as Fetcher) {
    await page(slabDepth, null, fetcher)
  }

  async function more(slabDepth: number) {
    if (next.value !== null) await page(slabDepth, next.value, $fetch as Fetcher)
  }

  async function open(id: string, key: string, fetcher: Fetcher = $fetch as Fetcher): Promise<SchemeDetail> {
    if (detail.value?.studyId === id && detail.value.key === key) return detail.value
    const answer = await fetcher<SchemeDetail>(`/api/studies/${id}/schemes/${encodeURIComponent(key)}`)
    detail.value = answer
    member.value = null
    return answer
  }

  return { studyId, query, rows, total, next, selected, detail, member, enter, first, more, open }
})
