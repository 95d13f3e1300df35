import { fileURLToPath } from 'node:url'
import { Piscina } from 'piscina'
import { EngineError } from '#shared/engine/errors'
import type { AnswerTask, EngineAnswer } from './threads/answer'
import type { SearchAnswer, SearchRefusal, SearchTask } from './threads/search'

export interface ThreadPool {
  search: (task: Omit<SearchTask, 'stop'>) => Promise<SearchAnswer>
  answer: (task: AnswerTask) => Promise<EngineAnswer>
  /** Ends the answer under way; it rejects. */
  stopAnswers: () => void
  /** Stops the parts of a study that are under way, and those of it that are asked for later. */
  stopStudy: (studyId: string) => void
  studiesUnderWay: () => string[]
  isStopped: (studyId: string) => boolean
  close: () => Promise<void>
}

/** Studies whose end is remembered, so that a part that was fetched before it is not begun. */
const MOST_REMEMBERED = 1_000
/** ms that the thread of answers is kept with nothing to do. */
const ANSWERS_IDLE_MS = 10_000

/** An answer, or the engine's refusal thrown as the error that it was. */
function unwrapped<Answer extends object>(answer: Answer | SearchRefusal): Answer {
  if (!('refusal' in answer)) return answer
  const { code, message, path } = answer.refusal
  throw new EngineError(code, message, path)
}

/** Worker threads with the engine in them; each running part has a flag that stops it. */
export function openThreads(threads: number): ThreadPool {
  const pool = new Piscina<SearchTask, SearchAnswer | SearchRefusal>({
    filename: fileURLToPath(new URL('./threads/search.mjs', import.meta.url)),
    minThreads: threads,
    maxThreads: threads,
  })
  // One thread beside the others, only while there is a question: an answer takes seconds, and no part waits behind it.
  const answers = new Piscina<AnswerTask, EngineAnswer | SearchRefusal>({
    filename: fileURLToPath(new URL('./threads/answer.mjs', import.meta.url)),
    minThreads: 0,
    maxThreads: 1,
    idleTimeout: ANSWERS_IDLE_MS,
  })
  const closing = new AbortController()
  const flags = new Map<string, Set<SharedArrayBuffer>>()
  const stopped = new Set<string>()

  return {
    search: async (task) => {
      const stop = new SharedArrayBuffer(Int32Array.BYTES_PER_ELEMENT)
      const underWay = flags.get(task.studyId) ?? new Set()
      flags.set(task.studyId, underWay.add(stop))
      if (stopped.has(task.studyId)) Atomics.store(new Int32Array(stop), 0, 1)
      try {
        return unwrapped(await pool.run({ ...task, stop }))
      } finally {
        underWay.delete(stop)
        if (underWay.size === 0) flags.delete(task.studyId)
      }
    },
    answer: async task => unwrapped(await answers.run(task, { signal: closing.signal })),
    stopAnswers: () => closing.abort(),
    stopStudy: (studyId) => {
      stopped.add(studyId)
      for (const oldest of stopped) {
        if (stopped.size <= MOST_REMEMBERED) break
        stopped.delete(oldest)
      }
      for (const flag of flags.get(studyId) ?? []) Atomics.store(new Int32Array(flag), 0, 1)
    },
    studiesUnderWay: () => [...flags.keys()],
    isStopped: studyId => stopped.has(studyId),
    close: async () => {
      await Promise.all([pool.close(), answers.destroy()])
    },
  }
}
