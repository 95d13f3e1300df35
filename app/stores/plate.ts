import type { PlateRecord } from '#shared/schemas/api'
import type { Plate } from '#shared/schemas/plate'
import type { Axis } from '~/utils/plate/outline'
import { forbiddenBy, type PlateRights } from '~/utils/plate/rights'
import { keptSelection, selectionName, type Selection } from '~/utils/plate/selection'
import {
  applyPatch, changesNothing, isRefusal, patchBetween, type Outcome, type PlatePatch,
} from '~/utils/plate/steps'

export type PlateTool = 'select' | 'line' | 'void' | 'column' | 'keepClear' | 'zones' | 'load' | 'measure'

/**
 * The plate that is open. Every change is an intent that gives a step; one private `apply` carries
 * steps, undo, redo and reloads out.
 */
export const usePlateStore = defineStore('plate', () => {
  const history = usePlateHistoryStore()
  const record = shallowRef<Omit<PlateRecord, 'document'> | null>(null)
  const document = shallowRef<Plate | null>(null)
  /** The document as the server has it. */
  const saved = shallowRef<Plate | null>(null)
  const selection = shallowRef<Selection | null>(null)
  const tool = ref<PlateTool>('select')
  /** Planning module that positions snap to, mm. */
  const module = ref(750)
  /** What the reader's role may change on the plate. */
  const rights = ref<PlateRights>('none')
  /** What happens to the bays after one that is given another length. */
  const rest = ref<'shift' | 'keep'>('shift')
  /** Direction of new grid lines: across x (numbers) or across y (letters). */
  const lineAxis = ref<Axis>('x')
  const announcement = ref('')
  /** Why the last intent was refused, until the next one. */
  const refusal = ref<string | null>(null)

  /** The last save that was sent: a plate opened again waits for it, so that it reads what was saved. */
  const pendingSave = shallowRef<Promise<void> | null>(null)

  const isChanged = computed(() => document.value !== saved.value)

  function announce(words: string) {
    announcement.value = words
  }

  function apply(patch: PlatePatch): PlatePatch {
    if (!document.value) return {}
    const { plate, inverse } = applyPatch(document.value, patch)
    document.value = plate
    selection.value = keptSelection(plate, selection.value)
    return inverse
  }

  function load(loaded: PlateRecord) {
    const { document: plate, ...rest } = loaded
    if (record.value?.id !== rest.id) {
      selection.value = null
      tool.value = 'select'
    }
    record.value = rest
    document.value = plate
    saved.value = plate
    selection.value = keptSelection(plate, selection.value)
    history.clear()
  }

  function refuse(sentence: string): string {
    refusal.value = sentence
    announce(sentence)
    return sentence
  }

  /** Carries an intent out as one step of undo; gives the sentence back where it is refused. */
  function run(intent: (plate: Plate) => Outcome): string | null {
    if (!document.value) return 'The plate is not loaded yet.'
    const outcome = intent(document.value)
    if (isRefusal(outcome)) return refuse(outcome.refusal)
    if (changesNothing(document.value, outcome.patch)) return null
    const forbidden = forbiddenBy(rights.value, document.value, outcome.patch)
    if (forbidden) return refuse(forbidden)
    refusal.value = null
    const inverse = apply(outcome.patch)
    history.add({ label: outcome.label, patch: outcome.patch, inverse })
    announce(`Done: ${outcome.label}.`)
    return null
  }

  /** Whether the reader's role may carry the intent out. */
  function allows(intent: (plate: Plate) => Outcome): boolean {
    if (!document.value || rights.value === 'none') return false
    const outcome = intent(document.value)
    return !isRefusal(outcome) && forbiddenBy(rights.value, document.value, outcome.patch) === null
  }

  function undo() {
    const entry = rights.value === 'none' ? null : history.takeBack()
    if (!entry) return
    apply(entry.inverse)
    announce(`Taken back: ${entry.label}.`)
  }

  function redo() {
    const entry = rights.value === 'none' ? null : history.takeForward()
    if (!entry) return
    apply(entry.patch)
    announce(`Done again: ${entry.label}.`)
  }

  function select(next: Selection | null) {
    refusal.value = null
    selection.value = document.value ? keptSelection(document.value, next) : null
    if (selection.value && document.value) announce(`${selectionName(document.value, selection.value)} selected.`)
  }

  /** The server has taken the document up as this version. */
  function noteSaved(version: Omit<PlateRecord, 'document'>, sent: Plate) {
    record.value = version
    if (document.value === sent || (document.value && JSON.stringify(document.value) === JSON.stringify(sent))) {
      saved.value = document.value
    } else {
      saved.value = sent
    }
  }

  /** Takes another person's version over, as one step that undo takes back. */
  function takeOver(theirs: PlateRecord) {
    if (!document.value) return
    const patch = patchBetween(document.value, theirs.document)
    const inverse = apply(patch)
    history.add({ label: `take-over of version ${theirs.version}`, patch, inverse })
    const { document: _, ...rest } = theirs
    record.value = rest
    saved.value = document.value
    announce(`Version ${theirs.version} of ${theirs.savedBy} taken over.`)
  }

  /** Changes that were kept in this browser and not sent, put back as one step. */
  function restore(draft: Plate) {
    if (!document.value) return
    const patch = patchBetween(document.value, draft)
    if (Object.keys(patch).length === 0) return
    const inverse = apply(patch)
    history.add({ label: 'changes kept in this browser', patch, inverse })
  }

  return {
    record, document, saved, selection, tool, module, rest, lineAxis, rights, announcement, refusal, pendingSave, isChanged,
    announce, load, run, allows, undo, redo, select, noteSaved, takeOver, restore,
  }
})
