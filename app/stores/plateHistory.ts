import { emptyHistory, record, stepBack, stepForward, type HistoryEntry } from '~/utils/plate/history'

/** Undo and redo of the open plate. Selection and zoom are no history; loading is never recorded. */
export const usePlateHistoryStore = defineStore('plateHistory', () => {
  const history = shallowRef(emptyHistory)

  const undoLabel = computed(() => history.value.done.at(-1)?.label ?? null)
  const redoLabel = computed(() => history.value.undone.at(-1)?.label ?? null)

  function add(entry: HistoryEntry) {
    history.value = record(history.value, entry)
  }

  function takeBack(): HistoryEntry | null {
    const step = stepBack(history.value)
    if (step) history.value = step.history
    return step?.entry ?? null
  }

  function takeForward(): HistoryEntry | null {
    const step = stepForward(history.value)
    if (step) history.value = step.history
    return step?.entry ?? null
  }

  function clear() {
    history.value = emptyHistory
  }

  return { undoLabel, redoLabel, add, takeBack, takeForward, clear }
})
