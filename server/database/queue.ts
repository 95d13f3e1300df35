/**
 * The durable queue (pg-boss on our own PostgreSQL): what the jobs are called, how they are sent.
 * A job carries the study's id and the number of its part or the name of a question, nothing else.
 */
import { CompiledQuery, sql } from 'kysely'
import type pg from 'pg'
import PgBoss from 'pg-boss'
import type { Db } from './client'

export type StudyJob
  = { kind: 'plan', studyId: string }
    | { kind: 'part', studyId: string, number: number }
    | { kind: 'finish', studyId: string }

export interface AnswerJob { kind: 'answer', studyId: string, question: string }
export type Job = StudyJob | AnswerJob

export const STUDY_QUEUE = 'study-work'
/** Questions about ranked studies: they take seconds, so that parts of studies do not stand behind them. */
export const ANSWER_QUEUE = 'study-answers'
/** Where a job goes that has used up its attempts. */
export const LOST_QUEUE = 'study-work-lost'
/** Notification channels. */
export const WORK_CHANNEL = 'baywright_work'
export const CANCEL_CHANNEL = 'baywright_cancel'
export const PROGRESS_CHANNEL = 'baywright_progress'

/** s after which a job whose worker was lost is given to another; a part is 50–200 ms of work. */
export const JOB_EXPIRES_S = 14
/** The same for an answer, which is one piece of work. */
export const ANSWER_EXPIRES_S = 300
/** Attempts of one job before its study is given up. */
export const JOB_ATTEMPTS = 3

const SCHEMA = 'pgboss'
/** s before a finished job leaves the queue's table. */
const ARCHIVE_AFTER_S = 300

type Executor = PgBoss.Db

/** pg-boss on a connection or transaction of ours, so that a job is sent with the rows it is about or not at all. */
function executorOf(db: Db): Executor {
  return {
    executeSql: async (text, values) => {
      const { rows } = await db.executeQuery(CompiledQuery.raw(text, values ?? []))
      return { rows: rows as unknown[] }
    },
  }
}

/** Makes or updates the queue's own tables; repeated calls change nothing. */
export async function prepareQueues(url: string): Promise<void> {
  const boss = new PgBoss({ connectionString: url, schema: SCHEMA, max: 1, supervise: false, schedule: false })
  const faults: Error[] = []
  boss.on('error', error => faults.push(error))
  await boss.start()
  try {
    const limits = { retryLimit: JOB_ATTEMPTS - 1, retryDelay: 0, retryBackoff: false, expireInSeconds: JOB_EXPIRES_S }
    await boss.createQueue(LOST_QUEUE, { name: LOST_QUEUE, ...limits })
    await boss.createQueue(STUDY_QUEUE, { name: STUDY_QUEUE, ...limits, deadLetter: LOST_QUEUE })
    await boss.updateQueue(STUDY_QUEUE, { name: STUDY_QUEUE, ...limits, deadLetter: LOST_QUEUE })
    const answers = { name: ANSWER_QUEUE, ...limits, expireInSeconds: ANSWER_EXPIRES_S, deadLetter: LOST_QUEUE }
    await boss.createQueue(ANSWER_QUEUE, answers)
    await boss.updateQueue(ANSWER_QUEUE, answers)
  } finally {
    await boss.stop({ graceful: false })
  }
  if (faults[0]) throw faults[0]
}

/** The worker's end: fetches, completes, and watches over lost jobs. */
export function openBoss(pool: pg.Pool): PgBoss {
  const db: Executor = { executeSql: (text, values) => pool.query(text, values) }
  return new PgBoss({
    db, schema: SCHEMA, schedule: false, migrate: false,
    maintenanceIntervalSeconds: 1, archiveCompletedAfterSeconds: ARCHIVE_AFTER_S, deleteAfterHours: 24,
  })
}

/**
 * Part k of every study goes before part k + 1 of any: a small study behind a big one is not kept
 * waiting. Cutting and ranking go first, since others wait for them.
 */
function priorityOf(job: StudyJob): number {
  if (job.kind === 'finish') return 2
  return job.kind === 'plan' ? 1 : -job.number
}

/** Sends the jobs in the transaction `db`; workers are woken when it is committed. */
export async function sendJobs(db: Db, jobs: readonly StudyJob[]): Promise<void> {
  const executor = executorOf(db)
  const sender = new PgBoss({ db: executor, schema: SCHEMA, supervise: false, schedule: false, migrate: false })
  const batch = 1_000
  for (let from = 0; from < jobs.length; from += batch) {
    await sender.insert(jobs.slice(from, from + batch).map(job => ({
      name: STUDY_QUEUE,
      data: job,
      priority: priorityOf(job),
      retryLimit: JOB_ATTEMPTS - 1,
      expireInSeconds: JOB_EXPIRES_S,
      deadLetter: LOST_QUEUE,
    })), { db: executor })
  }
  await notify(db, WORK_CHANNEL, '')
}

/** Sends a question in the transaction `db`; workers are woken when it is committed. */
export async function sendAnswerJob(db: Db, job: AnswerJob): Promise<void> {
  const executor = executorOf(db)
  const sender = new PgBoss({ db: executor, schema: SCHEMA, supervise: false, schedule: false, migrate: false })
  await sender.insert([{
    name: ANSWER_QUEUE, data: job, retryLimit: JOB_ATTEMPTS - 1, expireInSeconds: ANSWER_EXPIRES_S, deadLetter: LOST_QUEUE,
  }], { db: executor })
  await notify(db, WORK_CHANNEL, '')
}

/** Takes the jobs of a study that nobody has begun out of the queue. */
export async function dropJobs(db: Db, studyId: string): Promise<void> {
  await sql`
    delete from ${sql.table(`${SCHEMA}.job`)}
    where name = ${STUDY_QUEUE} and state < 'active' and data ->> 'studyId' = ${studyId}`.execute(db)
}

/** A notification to every process that listens; sent when the transaction is committed. */
export async function notify(db: Db, channel: string, payload: string): Promise<void> {
  await sql`select pg_notify(${channel}, ${payload})`.execute(db)
}
