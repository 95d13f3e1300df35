import { fileURLToPath } from 'node:url'
import { Piscina } from 'piscina'
import { EngineError } from '#shared/engine/errors'
import type { SearchAnswer, SearchRefusal, SearchTask } from './threads/search'

export interface ThreadPool {
  search: (task: Omit<SearchTask, 'stop'>) => Promise<SearchAnswer>
  /** Stops the parts of a study that are under way, and those of it that are asked for later. */
  stopStudy: (studyId: string) => void
  studiesUnderWay: () => string[]
  isStopped: (studyId: string) => boolean
  close: () => Promise<void>
}

/** Studies whose end is remembered, so that a part that was fetched before it is not begun. */
const MOST_REMEMBERED = 1_000

/** Worker threads with the engine in them; each running part has a flag that stops it. */
export function openThreads(threads: number): ThreadPool {
  const pool = new Piscina<SearchTask, SearchAnswer | SearchRefusal>({
    filename: fileURLToPath(new URL('./threads/search.mjs', import.meta.url)),
    minThreads: threads,
    maxThreads: threads,
  })
  const flags = new Map<string, Set<SharedArrayBuffer>>()
  const stopped = new Set<string>()

  return {
    search: async (task) => {
      const stop = new SharedArrayBuffer(Int32Array.BYTES_PER_ELEMENT)
      const underWay = flags.get(task.studyId) ?? new Set()
      flags.set(task.studyId, underWay.add(stop))
      if (stopped.has(task.studyId)) Atomics.store(new Int32Array(stop), 0, 1)
      try {
        const answer = await pool.run({ ...task, stop })
        if (!('refusal' in answer)) return answer
        const { code, message, path } = answer.refusal
        throw new EngineError(code, message, path)
      } finally {
        underWay.delete(stop)
        if (underWay.size === 0) flags.delete(task.studyId)
      }
    },
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
    close: () => pool.close(),
  }
}
