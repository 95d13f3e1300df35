/** What every job of a worker works with. */
import type { Logger } from 'pino'
import type { Db } from '~~/server/database/client'
import type { AnswerTask, EngineAnswer } from '../threads/answer'
import type { SearchAnswer, SearchTask } from '../threads/search'

export interface Worker {
  db: Db
  log: Logger
  /** Runs the engine in a thread. Rejects where the thread died. */
  search: (task: Omit<SearchTask, 'stop'>) => Promise<SearchAnswer>
  /** Asks the engine in a thread of its own. Rejects where the thread died or was stopped. */
  answer: (task: AnswerTask) => Promise<EngineAnswer>
  /** Whether the study was ended from outside while this worker had a part of it. */
  isEnded: (studyId: string) => boolean
}
