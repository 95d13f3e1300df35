/** Questions about a ranked study, with a database, a web process and a worker of their own. */
import { setTimeout as wait } from 'node:timers/promises'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import type { PriceOfRepetition, Robustness, WhyNot } from '#shared/engine/search'
import { parseQuestionName, questionName, type AnswerRecord } from '#shared/schemas/answers'
import type { SchemePage, SchemeRow } from '#shared/schemas/api'
import { cloneDatabase, startWeb, startWorker, type OwnProcess } from '../stack'
import { awaitStudy, drawnGrid, hasEnded, newProjectWithPlate, newStudy, onDatabase, signInAs, type Api } from './support'

const stack = inject('stack')

let database: Awaited<ReturnType<typeof cloneDatabase>>
let web: OwnProcess & { url: string }
let worker: OwnProcess
let engineer: Api
let projectId: string
let plateId: string
let study: string
let rows: SchemeRow[]

beforeAll(async () => {
  database = await cloneDatabase(stack)
  web = await startWeb(stack, database.databaseUrl)
  worker = await startWorker(stack, database.databaseUrl)
  engineer = await signInAs(web.url, 'engineer')
  const made = await newProjectWithPlate(engineer)
  projectId = made.projectId
  plateId = made.plate.id
  study = (await newStudy(engineer, projectId, plateId, drawnGrid)).id
  expect((await awaitStudy(engineer, study, hasEnded)).state).toBe('finished')
  rows = (await engineer.get<SchemePage>(`/api/studies/${study}/schemes?limit=200`)).body.rows
})

afterAll(async () => {
  await worker.stop()
  await web.stop()
  await database.drop()
})

const whyNot = <T = WhyNot>(question: unknown) => engineer.post<T>(`/api/studies/${study}/why-not`, question)
const ask = <R>(question: unknown, id = study) => engineer.post<AnswerRecord<R>>(`/api/studies/${id}/answers`, question)

async function answerTo<R>(question: string): Promise<AnswerRecord<R>> {
  for (let tries = 0; tries < 600; tries++) {
    const { body } = await engineer.get<AnswerRecord<R>[]>(`/api/studies/${study}/answers?question=${encodeURIComponent(question)}`)
    if (body[0]?.state === 'finished' || body[0]?.state === 'failed') return body[0]
    await wait(100)
  }
  throw new Error(`${question} is not answered`)
}

function inside(answer: WhyNot) {
  if (answer.kind !== 'inside') throw new Error(answer.detail)
  return answer
}

describe('why not', () => {
  it('gives the schemes of an arrangement with what beats them, as the ranked table has it', async () => {
    for (const row of rows.filter(({ depthCap }) => depthCap === null)) {
      const { status, body } = await whyNot({ number: row.number })
      expect(status).toBe(200)
      const [answered] = inside(body).arrangements
      expect(answered).toMatchObject({ number: row.number, rejected: null, baysX: [9000, 9000], baysY: [7500] })
      const scheme = answered!.schemes.find(({ key }) => key === row.key)
      expect(scheme?.massPerArea).toBeCloseTo(row.massPerArea, 9)
      const better = rows.filter(other => other.mass <= row.mass && other.depth <= row.depth && other.key !== row.key)
      expect(scheme?.beatenBy.map(({ key }) => key)).toEqual(better.slice(0, 3).map(({ key }) => key))
      for (const by of scheme?.beatenBy ?? []) {
        const other = rows.find(({ key }) => key === by.key)!
        expect(by.lighter).toBeCloseTo(row.massPerArea - other.massPerArea, 9)
        expect(by.shallower).toBeCloseTo(row.depth - other.depth, 9)
      }
    }
  })

  it('gives the first reason in figures: in one panel the slab spans from primary to primary, 7.5 m apart', async () => {
    const { body } = await whyNot({ primaryDirection: 'x', divisions: 1, baysX: [9000, 9000] })
    const { matching, arrangements } = inside(body)
    expect(matching).toBe(1)
    expect(arrangements[0]).toMatchObject({ schemes: [], rejected: { rejection: 'slab-span' } })
    expect(arrangements[0]?.rejected?.detail).toBe('The slab spans 7.50 m; its limit is 3.60 m.')
  })

  it('names the beam that is too deep under a depth limit', async () => {
    const capped = await newStudy(engineer, projectId, plateId, { ...drawnGrid, depthCap: 250 })
    await awaitStudy(engineer, capped.id, hasEnded)
    const { body } = await engineer.post<WhyNot>(`/api/studies/${capped.id}/why-not`, { primaryDirection: 'x', divisions: 3 })
    expect(inside(body).arrangements[0]?.rejected).toMatchObject({ rejection: 'depth-cap', place: expect.stringMatching(/^[AB12] \/ [AB12]–[AB12]/) })
  })

  it('says which limit leaves out what is not in the range', async () => {
    expect((await whyNot({ baysX: [6000, 6000, 6000] })).body).toMatchObject({ kind: 'outside', path: 'range.x' })
    expect((await whyNot({ divisions: 7 })).body).toMatchObject({ kind: 'outside', path: 'range.divisions' })
    expect((await whyNot({ number: 11 })).body).toMatchObject({ kind: 'outside', path: 'number' })
  })

  it.each([
    { question: {}, path: '' },
    { question: { number: 0 }, path: 'number' },
    { question: { number: 1, divisions: 2 }, path: 'number' },
    { question: { baysX: [] }, path: 'baysX' },
    { question: { baysY: [9000.5] }, path: 'baysY[0]' },
    { question: { primaryDirection: 'z' }, path: 'primaryDirection' },
    { question: { weather: 'fair' }, path: 'weather' },
  ])('refuses $question at $path', async ({ question, path }) => {
    const { status, body } = await whyNot<{ data: { code: string, path: string } }>(question)
    expect(status).toBe(400)
    expect(body.data).toMatchObject({ code: 'malformed', path })
  })
})

describe('a question for the workers', () => {
  it('is kept once, however often it is asked, and answered once', async () => {
    const first = await Promise.all([1, 2, 3, 4].map(() => ask({ kind: 'robustness' })))
    expect(first.map(({ status }) => status).filter(status => status !== 200 && status !== 202)).toEqual([])
    const answer = await answerTo<Robustness>('robustness')
    const again = await ask<Robustness>({ kind: 'robustness' })
    expect(again.status).toBe(200)
    expect(again.body).toEqual(answer)
    await onDatabase(database.databaseUrl, async (db) => {
      const kept = await db.selectFrom('answers').select('question').where('study_id', '=', study).where('question', '=', 'robustness').execute()
      expect(kept).toHaveLength(1)
    })
    expect(worker.output().split('question answered').length - 1).toBe(1)
  })

  it('tells which schemes stay in front, with the ranking itself as the first case', async () => {
    await ask({ kind: 'robustness' })
    const { state, result, failure } = await answerTo<Robustness>('robustness')
    expect([state, failure]).toEqual(['finished', null])
    const [searched, ...others] = result!.cases
    expect(others.map(({ name }) => name)).toEqual(['imposed-load', 'depth-cap'])
    expect(searched!.entries[0]).toMatchObject({ key: rows[0]!.key, isInFront: true })
    for (const entry of searched!.entries) {
      const row = rows.find(({ key }) => key === entry.key)!
      expect(entry.massPerArea).toBeCloseTo(row.massPerArea, 9)
      expect(entry.isInFront).toBe(row.massPerArea === rows[0]!.massPerArea || row.massPerArea < rows[0]!.massPerArea * 1.03)
    }
    const loaded = others[0]!.entries[0]!
    expect(loaded.massPerArea).toBeGreaterThanOrEqual(rows[0]!.massPerArea)
  })

  it('gives the price of repetition from two sections to eight, never heavier with more', async () => {
    const { key, massPerArea } = rows[0]!
    expect((await ask({ kind: 'repetition', key })).body.question).toBe(`repetition/plate/${key}`)
    const { state, result } = await answerTo<PriceOfRepetition>(`repetition/plate/${key}`)
    expect(state).toBe('finished')
    expect(result!.steps.map(({ most }) => most)).toEqual([2, 3, 4, 5, 6, 7, 8])
    expect(result!.free.massPerArea).toBeCloseTo(massPerArea, 9)
    const masses = result!.steps.map(({ found }) => found?.massPerArea ?? Infinity)
    expect(masses).toEqual([...masses].sort((a, b) => b - a))
    for (const { most, found, status, gap } of result!.steps) {
      if (!found) continue
      expect(found.distinctSections).toBeLessThanOrEqual(most)
      expect(found.massPerArea).toBeGreaterThan(massPerArea - 1e-6)
      if (status === 'optimal') expect(gap).toBe(0)
    }
  })

  it('is refused for a scheme that the study does not keep', async () => {
    const answer = await ask<{ data: unknown }>({ kind: 'repetition', key: '999999' })
    expect(answer.status).toBe(404)
    expect((await engineer.get<AnswerRecord[]>(`/api/studies/${study}/answers?question=repetition/plate/999999`)).body).toEqual([])
    expect((await ask({ kind: 'weather' })).status).toBe(400)
  })

  it('that failed is asked anew', async () => {
    const name = `repetition/kind/${rows[0]!.key}`
    await onDatabase(database.databaseUrl, async (db) => {
      const { id } = await db.selectFrom('accounts').select('id').executeTakeFirstOrThrow()
      await db.insertInto('answers').values({ study_id: study, question: name, state: 'failed', failure: 'The lights went out.', asked_by: id }).execute()
    })
    expect((await answerTo(name)).failure).toBe('The lights went out.')
    expect((await ask({ kind: 'repetition', key: rows[0]!.key, scope: 'kind' })).status).toBe(202)
    expect(await answerTo<PriceOfRepetition>(name)).toMatchObject({ state: 'finished', failure: null, result: { scope: 'kind' } })
  })
})

describe('the name of a question', () => {
  it('leads back to the question', () => {
    const question = { kind: 'repetition' as const, key: '35222-533.1', scope: 'kind' as const }
    expect(questionName(question)).toBe('repetition/kind/35222-533.1')
    expect(parseQuestionName('repetition/kind/35222-533.1')).toEqual(question)
    expect(parseQuestionName('robustness')).toEqual({ kind: 'robustness' })
    expect(['weather', 'repetition', 'repetition/kind', 'robustness/plate', 'repetition/kind/7/8'].map(parseQuestionName)).toEqual([null, null, null, null, null])
  })
})

describe('a study without a ranking', () => {
  it('answers nothing, while it waits and after it was cancelled', async () => {
    await worker.stop()
    const { id } = await newStudy(engineer, projectId, plateId, drawnGrid)
    for (const word of ['not there yet', 'ended without a ranking']) {
      const asked = await engineer.post(`/api/studies/${id}/answers`, { kind: 'robustness' })
      expect([asked.status, asked.body.data.code]).toEqual([503, 'not-ready'])
      expect(asked.body.data.message).toContain(word)
      expect((await engineer.post(`/api/studies/${id}/why-not`, { number: 1 })).body.data.message).toContain(word)
      await engineer.post(`/api/studies/${id}/cancel`)
    }
  })
})
