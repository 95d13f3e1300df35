/** Real worker processes that are killed, added and stopped in mid-study, on a database of their own. */
import { setTimeout as wait } from 'node:timers/promises'
import { afterAll, afterEach, beforeAll, describe, expect, inject, it } from 'vitest'
import pg from 'pg'
import { JOB_ATTEMPTS, LOST_QUEUE, STUDY_QUEUE, openBoss } from '~~/server/database/queue'
import type { SchemePage, StudyRecord } from '#shared/schemas/api'
import type { Range } from '#shared/schemas/range'
import { cloneDatabase, startWeb, startWorker } from '../stack'
import { awaitStudy, drawnGrid, hasEnded, newProjectWithPlate, newStudy, readEvents, signInAs, smallPlate, type Api } from './support'

const stack = inject('stack')

let database: { databaseUrl: string, drop: () => Promise<void> }
let stopWeb: () => Promise<void>
let stops: (() => Promise<void>)[] = []
let engineer: Api

beforeAll(async () => {
  database = await cloneDatabase(stack)
  const web = await startWeb(stack, database.databaseUrl)
  stopWeb = web.stop
  engineer = await signInAs(web.url, 'engineer')
})

afterEach(async () => {
  const left = await query<{ id: string }>(`select id from studies where state in ('queued', 'running')`)
  for (const { id } of left) await engineer.post(`/api/studies/${id}/cancel`)
  await Promise.all(stops.map(stop => stop()))
  stops = []
})

afterAll(async () => {
  await stopWeb()
  await database.drop()
})

async function worker() {
  const started = await startWorker(stack, database.databaseUrl)
  stops.push(started.stop)
  return started
}

/** A plate on which bays may vary both ways. */
const free = (width: number, depth: number) => smallPlate({
  gridX: [{ label: '1', at: 0 }, { label: '2', at: width }],
  gridY: [{ label: 'A', at: 0 }, { label: 'B', at: depth }],
  outline: [[0, 0], [width, 0], [width, depth], [0, depth]],
})
const threeMetres = { kind: 'module' as const, module: 3000, min: 6000, max: 9000 }
const free3: Range = { ...drawnGrid, x: threeMetres, y: threeMetres }

/** 24 m of 6 and 9 m is 6666, 996, 969 or 699, 15 m is 96 or 69: counted by hand. */
const SOME = { plate: free(24_000, 15_000), range: { ...free3, divisions: [2, 3] }, total: 4 * 2 * 2 * 2 }
/** 54 m has 65 orders of 6 and 9 m (below); 36 m is six 6 (1), three 6 and two 9 (10) or four 9 (1). */
const SOME_SECONDS = { plate: free(54_000, 36_000), range: { ...free3, divisions: [3] }, total: 65 * 12 * 2 }
/** Nobody waits for its end. 54 m has 1 + 28 + 35 + 1 orders of 6 and 9 m, 48 m has 1 + 21 + 15. */
const MINUTES = { plate: free(54_000, 48_000), range: free3, total: 65 * 37 * 2 * 5 }

async function start(what: typeof SOME): Promise<StudyRecord> {
  const made = await newProjectWithPlate(engineer, what.plate)
  const study = await newStudy(engineer, made.projectId, made.plate.id, what.range)
  expect(study.total).toBe(what.total)
  return study
}

async function ranking(studyId: string) {
  const { body } = await engineer.get<SchemePage>(`/api/studies/${studyId}/schemes?limit=200`)
  return body
}

const isUnderWay = (study: StudyRecord) => study.state === 'running' && study.progress.examined > 0

describe('workers', () => {
  it('give the same result whatever their number', async () => {
    await worker()
    const alone = await awaitStudy(engineer, (await start(SOME)).id, hasEnded, 120)
    await worker()
    const together = await awaitStudy(engineer, (await start(SOME)).id, hasEnded, 120)
    expect(alone.state).toBe('finished')
    expect(together.counts).toEqual(alone.counts)
    expect(alone.counts?.examined).toBe(alone.total)
    expect(await ranking(together.id)).toEqual(await ranking(alone.id))
  })

  it('tell how far they are at most five times a second, rising, with the best so far', async () => {
    await worker()
    await worker()
    const study = await start(SOME_SECONDS)
    const told = await readEvents(engineer, study.id)
    const seconds = (told.at(-1)!.at - told[0]!.at) / 1000
    // The snapshot, the start and the end come besides.
    expect(told.length).toBeLessThanOrEqual(seconds * 5 + 4)
    const progress = told.map(one => one.progress)
    expect(progress.at(-1)).toMatchObject({ state: 'finished', examined: study.total })
    expect(progress.map(({ examined }) => examined)).toEqual(progress.map(({ examined }) => examined).sort((a, b) => a - b))
    const best = progress.flatMap(one => one.best ? [one.best.massPerArea] : [])
    best.forEach((mass, i) => expect(mass).toBeLessThanOrEqual((best[i - 1] ?? Infinity) * (1 + 1e-9)))
    const curve = progress.at(-1)!.history.map(({ massPerArea }) => massPerArea)
    expect(curve).toEqual([...curve].sort((a, b) => b - a))
    expect(curve.at(-1)).toBeCloseTo(best.at(-1)!, 9)
  })

  it('bring a study to its end after one of them was killed in mid-study', async () => {
    const first = await worker()
    const study = await start(SOME_SECONDS)
    const before = await awaitStudy(engineer, study.id, isUnderWay)
    process.kill(first.pid, 'SIGKILL')
    const killed = Date.now()
    await worker()
    const after = await awaitStudy(engineer, study.id, hasEnded, 180)
    expect(before.progress.examined).toBeLessThan(before.total)
    expect(after.state).toBe('finished')
    expect(after.counts?.examined).toBe(after.total)
    const retaken = await retakenAt(killed)
    expect(retaken).not.toBeNull()
    // Some 12 s on a quiet machine; the bound only tells a lost job from a slow one.
    expect(retaken! - killed).toBeLessThan(60_000)
  })

  it('go on after every connection to the database was cut', async () => {
    const { child } = await worker()
    const study = await start(SOME_SECONDS)
    await awaitStudy(engineer, study.id, isUnderWay)
    const cut = await query('select pg_terminate_backend(pid) from pg_stat_activity where datname = current_database() and pid <> pg_backend_pid()')
    expect(cut.length).toBeGreaterThan(3)
    const ended = await awaitStudy(engineer, study.id, hasEnded, 120)
    expect(ended.state).toBe('finished')
    expect(ended.counts?.examined).toBe(study.total)
    expect(child.exitCode).toBeNull()
    expect((await readEvents(engineer, study.id)).at(-1)?.progress.state).toBe('finished')
  })

  it('stop soon after a cancel', async () => {
    await worker()
    const study = await start(MINUTES)
    await awaitStudy(engineer, study.id, isUnderWay)
    const listening = readEvents(engineer, study.id)
    await wait(300)
    const asked = Date.now()
    const { body } = await engineer.post<StudyRecord>(`/api/studies/${study.id}/cancel`)
    expect(body.state).toBe('cancelled')
    const told = await listening
    expect(told.at(-1)?.progress.state).toBe('cancelled')
    // Some 0.2 s on a quiet machine; the study itself would go on for minutes.
    expect(told.at(-1)!.at - asked).toBeLessThan(10_000)
    await wait(1000)
    expect(await waitingJobs(study.id)).toBe(0)
    const { body: later } = await engineer.get<StudyRecord>(`/api/studies/${study.id}`)
    expect(later).toMatchObject({ state: 'cancelled', progress: { examined: told.at(-1)!.progress.examined } })
  })

  it('cancel a study that nobody has begun', async () => {
    const study = await start(SOME)
    expect((await engineer.post<StudyRecord>(`/api/studies/${study.id}/cancel`)).body.state).toBe('cancelled')
    await worker()
    await wait(1500)
    expect((await engineer.get<StudyRecord>(`/api/studies/${study.id}`)).body).toMatchObject({ state: 'cancelled', progress: { examined: 0 } })
  })

  it('give a study up, with a sentence, whose job used up its attempts', async () => {
    const study = await start(SOME)
    await useUpAttempts()
    await worker()
    const ended = await awaitStudy(engineer, study.id, hasEnded)
    expect(ended.state).toBe('failed')
    expect(ended.progress.failure).toContain(`${JOB_ATTEMPTS} times`)
  })

  it('end a small study that was started behind a big one before it', async () => {
    await worker()
    const big = await start(MINUTES)
    await awaitStudy(engineer, big.id, isUnderWay)
    const made = await newProjectWithPlate(engineer)
    const small = await newStudy(engineer, made.projectId, made.plate.id, drawnGrid)
    await awaitStudy(engineer, small.id, hasEnded)
    expect((await engineer.get<StudyRecord>(`/api/studies/${big.id}`)).body.state).toBe('running')
  })

  it('end by themselves on SIGTERM and lose nothing', async () => {
    const first = await worker()
    const study = await start(MINUTES)
    await awaitStudy(engineer, study.id, isUnderWay)
    // Whoever does not end within 8 s is killed, and has no exit code then.
    await first.stop()
    expect(first.child.exitCode).toBe(0)
    const { body: stopped } = await engineer.get<StudyRecord>(`/api/studies/${study.id}`)
    await worker()
    const resumed = await awaitStudy(engineer, study.id, ({ progress }) => progress.examined > stopped.progress.examined)
    expect(resumed.state).toBe('running')
    // Nothing was left to expire: the queue would have had to wait for it.
    expect(await query(`select 1 from pgboss.job where retry_count > 0 and data ->> 'studyId' = '${study.id}'`)).toEqual([])
  })
})

async function query<T extends pg.QueryResultRow>(text: string): Promise<T[]> {
  const client = new pg.Client({ connectionString: database.databaseUrl })
  await client.connect()
  try {
    return (await client.query<T>(text)).rows
  } finally {
    await client.end()
  }
}

/** Jobs of a study that are not done. Those of earlier tests may still wait for their expiry. */
async function waitingJobs(studyId: string): Promise<number> {
  const [row] = await query<{ count: string }>(`select count(*) from pgboss.job where state < 'completed' and name = '${STUDY_QUEUE}' and data ->> 'studyId' = '${studyId}'`)
  return Number(row?.count)
}

/** When a lost job was begun again, ms since 1970. */
async function retakenAt(after: number): Promise<number | null> {
  const rows = await query<{ started_on: Date }>(`select started_on from pgboss.job where retry_count > 0 and name = '${STUDY_QUEUE}'`)
  const times = rows.map(({ started_on }) => started_on.getTime()).filter(time => time > after)
  return times.length > 0 ? Math.max(...times) : null
}

/** What a job meets that kills every worker which takes it. */
async function useUpAttempts(): Promise<void> {
  const pool = new pg.Pool({ connectionString: database.databaseUrl, max: 1 })
  const boss = openBoss(pool)
  for (let attempt = 0; attempt < JOB_ATTEMPTS; attempt++) {
    const [job] = await boss.fetch(STUDY_QUEUE)
    expect(job).toBeDefined()
    await boss.fail(STUDY_QUEUE, job!.id, { message: 'killed' })
  }
  expect(await boss.fetch(STUDY_QUEUE)).toEqual([])
  expect(await query(`select 1 from pgboss.job where name = '${LOST_QUEUE}'`)).toHaveLength(1)
  await pool.end()
}
