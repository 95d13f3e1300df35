/** Undo and redo as inverse patches, one entry per gesture. */
import type { PlatePatch } from './steps'

export interface HistoryEntry {
  /** Reads after "Undo": "move of line D". */
  label: string
  patch: PlatePatch
  inverse: PlatePatch
}

export interface History {
  done: readonly HistoryEntry[]
  undone: readonly HistoryEntry[]
}

/** Steps kept; an entry holds only the fields that changed, shared with the documents beside it. */
export const HISTORY_LIMIT = 500

export const emptyHistory: History = { done: [], undone: [] }

export function record(history: History, entry: HistoryEntry): History {
  const done = [...history.done, entry]
  return { done: done.length > HISTORY_LIMIT ? done.slice(-HISTORY_LIMIT) : done, undone: [] }
}

/** The entry to take back, with the history after it; null where there is none. */
export function stepBack(history: History): { entry: HistoryEntry, history: History } | null {
  const entry = history.done.at(-1)
  if (!entry) return null
  return { entry, history: { done: history.done.slice(0, -1), undone: [...history.undone, entry] } }
}

/** The entry to do again, with the history after it; null where there is none. */
export function stepForward(history: History): { entry: HistoryEntry, history: History } | null {
  const entry = history.undone.at(-1)
  if (!entry) return null
  return { entry, history: { done: [...history.done, entry], undone: history.undone.slice(0, -1) } }
}
