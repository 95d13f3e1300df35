/**
 * The worker process: takes jobs off the queue and works them off in threads. Any number of these on
 * any number of machines share one database.
 */
import { availableParallelism } from 'node:os'
import pino from 'pino'
import type PgBoss from 'pg-boss'
import { EngineError } from '#shared/engine/errors'
import { databaseUrl, openClient } from '~~/server/database/client'
import { failStudy, findProgress } from '~~/server/database/queries/studies'
import { CANCEL_CHANNEL, LOST_QUEUE, STUDY_QUEUE, WORK_CHANNEL, openBoss, type StudyJob } from '~~/server/database/queue'
import { examinePart } from './jobs/examine-part'
import { IncompleteStudyError, finishStudy } from './jobs/finish-study'
import { giveUpStudy } from './jobs/give-up-study'
import { planStudy } from './jobs/plan-study'
import type { Worker } from './jobs/worker'
import { listenFor } from './listening'
import { openThreads } from './threadPool'

/** ms after which the queue is looked at without a word; words are quicker, this is for those missed. */
const LOOK_AFTER_MS = 1_000

const log = pino({ name: 'worker', level: process.env.BAYWRIGHT_LOG_LEVEL ?? 'info' })
const url = databaseUrl(process.env)
const threads = Math.max(1, Number(process.env.BAYWRIGHT_WORKER_THREADS) || availableParallelism())
const client = openClient(url, {
  max: threads + 4, name: 'baywright worker',
  onConnectionLost: error => log.warn({ error: error.message }, 'a database connection was lost'),
})
const pool = openThreads(threads)
const worker: Worker = { db: client.db, log, search: pool.search, isEnded: pool.isStopped }
const boss = openBoss(client.pool)
boss.on('error', error => log.warn({ error: String(error) }, 'the queue could not be looked after'))

let isStopping = false
let wake = () => {}
let wasCalled = false

function call(): void {
  wasCalled = true
  wake()
}

/** Resolves at the next word of work, or after a second. */
async function nextCall(): Promise<void> {
  if (!wasCalled && !isStopping) {
    await new Promise<void>((resolve) => {
      const timer = setTimeout(resolve, LOOK_AFTER_MS)
      wake = () => {
        clearTimeout(timer)
        resolve()
      }
    })
  }
  wasCalled = false
}

/** A word of cancelling; without a payload words may have been missed, so what runs is looked up. */
async function hearCancel(studyId: string | undefined): Promise<void> {
  if (studyId) return pool.stopStudy(studyId)
  for (const running of pool.studiesUnderWay()) {
    const progress = await findProgress(client.db, running).catch(() => undefined)
    if (progress && progress.state !== 'running') pool.stopStudy(running)
  }
}

async function work({ data }: PgBoss.Job<StudyJob>): Promise<void> {
  if (data.kind === 'plan') await planStudy(worker, data.studyId)
  else if (data.kind === 'part') await examinePart(worker, data.studyId, data.number)
  else await finishStudy(worker, data.studyId)
}

/** An error that comes back however often the job is tried ends its study; others are tried again. */
async function workOff(queue: string, job: PgBoss.Job<StudyJob>): Promise<void> {
  try {
    if (queue === LOST_QUEUE) await giveUpStudy(worker, job.data)
    else await work(job)
    await boss.complete(queue, job.id)
  } catch (error) {
    const { message } = error instanceof Error ? error : new Error(String(error))
    log.error({ job: job.data, error: message }, 'a job failed')
    const isFinal = error instanceof IncompleteStudyError || error instanceof EngineError
    try {
      if (isFinal) await failStudy(client.db, job.data.studyId, `The study could not be brought to its end. ${message}`)
      await (isFinal ? boss.complete(queue, job.id) : boss.fail(queue, job.id, { message }))
    } catch (unsaid) {
      // The database is away: the job expires and is taken again.
      log.warn({ job: job.data, error: String(unsaid) }, 'a job could not be given back')
    }
  }
}

async function fetchJob(): Promise<{ queue: string, job: PgBoss.Job<StudyJob> } | undefined> {
  for (const queue of [STUDY_QUEUE, LOST_QUEUE]) {
    const [job] = await boss.fetch<StudyJob>(queue)
    if (job) return { queue, job }
  }
  return undefined
}

/** One job more than threads: while one is stored, the next is examined. */
async function takeJobs(): Promise<void> {
  const running = new Set<Promise<void>>()
  while (!isStopping) {
    if (running.size > threads) {
      await Promise.race(running)
      continue
    }
    const fetched = await fetchJob()
    if (!fetched) {
      await nextCall()
      continue
    }
    const job = workOff(fetched.queue, fetched.job).finally(() => running.delete(job))
    running.add(job)
  }
  await Promise.all(running)
}

/** Begins nothing new, ends what is begun (a part takes a fraction of a second), and gives everything back. */
function stop(): void {
  isStopping = true
  wake()
}

process.once('SIGTERM', stop)
process.once('SIGINT', stop)
process.once('disconnect', stop)

await boss.start()
const listening = listenFor(url, {
  [WORK_CHANNEL]: call,
  [CANCEL_CHANNEL]: payload => void hearCancel(payload),
})
log.info({ threads }, 'worker takes jobs')
process.send?.('ready')
await takeJobs()
await listening.stop()
await boss.stop({ graceful: false })
await pool.close()
await client.close()
log.info('worker ended')
// pg-boss leaves a timer behind that would hold the process for seconds.
process.exit()
