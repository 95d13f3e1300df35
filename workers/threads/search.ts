/** What runs in a worker thread: the engine on one stretch of a range. Knows neither queue nor database. */
import { EngineError, type EngineErrorCode } from '#shared/engine/errors'
import { compareRows, examineRange, prepareStudy, type PreparedStudy, type StudyPart } from '#shared/engine/search'
import type { SchemeRow } from '#shared/schemas/api'
import type { StudyCounts, StudyInput } from '#shared/schemas/study'

export interface SearchTask {
  studyId: string
  inputs: StudyInput
  /** Arrangements from (from 0) and to (exclusive). */
  from: number
  to: number
  /** ms after which the thread hands in what it has; null = to the end. */
  budgetMs: number | null
  /** One Int32: anything but 0 stops the thread at its next arrangement. */
  stop: SharedArrayBuffer
}

export interface SearchAnswer {
  examined: number
  ms: number
  counts: StudyCounts
  /** The first of the part's schemes in their order. */
  best: SchemeRow | null
  /** The engine's part as JSON: made here, so that the main thread only passes it on. */
  result: string
}

/** Studies kept ready in a thread. */
const MOST_KEPT = 4
const kept = new Map<string, PreparedStudy>()

function prepared(studyId: string, inputs: StudyInput): PreparedStudy {
  const study = kept.get(studyId) ?? prepareStudy(inputs)
  kept.delete(studyId)
  kept.set(studyId, study)
  for (const oldest of kept.keys()) {
    if (kept.size <= MOST_KEPT) break
    kept.delete(oldest)
  }
  return study
}

/** The first row in the order of schemes. */
function firstOf(rows: StudyPart['rows']): SchemeRow | null {
  return rows.reduce<SchemeRow | null>((first, row) => first === null || compareRows(row, first) < 0 ? row : first, null)
}

/** An error loses its class on the way between threads; what the engine refuses is therefore an answer. */
export interface SearchRefusal { refusal: { code: EngineErrorCode, message: string, path: string } }

export default function search(task: SearchTask): SearchAnswer | SearchRefusal {
  try {
    return examine(task)
  } catch (error) {
    if (!(error instanceof EngineError)) throw error
    const { code, message, path } = error
    return { refusal: { code, message, path } }
  }
}

function examine(task: SearchTask): SearchAnswer {
  const study = prepared(task.studyId, task.inputs)
  const flag = new Int32Array(task.stop)
  const began = performance.now()
  const isOver = () => task.budgetMs !== null && performance.now() - began > task.budgetMs
  const part = examineRange(study, task.from, task.to, { shouldStop: () => Atomics.load(flag, 0) !== 0 || isOver() })
  return {
    examined: part.examined,
    ms: performance.now() - began,
    counts: part.counts,
    best: firstOf(part.rows),
    result: JSON.stringify(part),
  }
}
