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
import { ANSWER_QUEUE, CANCEL_CHANNEL, LOST_QUEUE, STUDY_QUEUE, WORK_CHANNEL, openBoss, type Job } from '~~/server/database/queue'
import { openBell } from './bell'
import { answerQuestion, giveUpAnswer } from './jobs/answer-question'
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
const worker: Worker = { db: client.db, log, search: pool.search, answer: pool.answer, isEnded: pool.isStopped }
const boss = openBoss(client.pool)
boss.on('error', error => log.warn({ error: String(error) }, 'the queue could not be looked after'))

let isStopping = false
/** Studies and answers are waited for apart. */
const studyBell = openBell()
const answerBell = openBell()

function call(): void {
  studyBell.ring()
  answerBell.ring()
}

/** A word of cancelling; without a payload words may have been missed, so what runs is looked up. */
async function hearCancel(studyId: string | undefined): Promise<void> {
  if (studyId) return pool.stopStudy(studyId)
  for (const running of pool.studiesUnderWay()) {
    const progress = await findProgress(client.db, running).catch(() => undefined)
    if (progress && progress.state !== 'running') pool.stopStudy(running)
  }
}

async function work({ data }: PgBoss.Job<Job>): Promise<void> {
  if (data.kind === 'plan') await planStudy(worker, data.studyId)
  else if (data.kind === 'part') await examinePart(worker, data.studyId, data.number)
  else if (data.kind === 'answer') await answerQuestion(worker, data)
  else await finishStudy(worker, data.studyId)
}

async function giveUp({ data }: PgBoss.Job<Job>): Promise<void> {
  if (data.kind === 'answer') await giveUpAnswer(worker, data)
  else await giveUpStudy(worker, data)
}

/** An error that comes back however often the job is tried ends its study; others are tried again. */
async function workOff(queue: string, job: PgBoss.Job<Job>): Promise<void> {
  try {
    if (queue === LOST_QUEUE) await giveUp(job)
    else await work(job)
    await boss.complete(queue, job.id)
  } catch (error) {
    const { message } = error instanceof Error ? error : new Error(String(error))
    log.error({ job: job.data, error: message }, 'a job failed')
    const isFinal = job.data.kind !== 'answer' && (error instanceof IncompleteStudyError || error instanceof EngineError)
    try {
      if (isFinal) await failStudy(client.db, job.data.studyId, `The study could not be brought to its end. ${message}`)
      await (isFinal ? boss.complete(queue, job.id) : boss.fail(queue, job.id, { message }))
    } catch (unsaid) {
      // The database is away: the job expires and is taken again.
      log.warn({ job: job.data, error: String(unsaid) }, 'a job could not be given back')
    }
  }
}

async function fetchJob(): Promise<{ queue: string, job: PgBoss.Job<Job> } | undefined> {
  for (const queue of [STUDY_QUEUE, LOST_QUEUE]) {
    const [job] = await boss.fetch<Job>(queue)
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
      await studyBell.next(LOOK_AFTER_MS)
      continue
    }
    const job = workOff(fetched.queue, fetched.job).finally(() => running.delete(job))
    running.add(job)
  }
  await Promise.all(running)
}

/** One question after the other. */
async function takeQuestions(): Promise<void> {
  while (!isStopping) {
    const [job] = await boss.fetch<Job>(ANSWER_QUEUE)
    if (job) await workOff(ANSWER_QUEUE, job)
    else await answerBell.next(LOOK_AFTER_MS)
  }
}

/** Begins nothing new, ends what is begun (a part takes a fraction of a second), and gives everything back; an answer is left to another worker. */
function stop(): void {
  isStopping = true
  pool.stopAnswers()
  call()
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
await Promise.all([takeJobs(), takeQuestions()])
await listening.stop()
await boss.stop({ graceful: false })
await pool.close()
await client.close()
log.info('worker ended')
// pg-boss leaves a timer behind that would hold the process for seconds.
process.exit()
