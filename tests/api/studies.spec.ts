import { beforeAll, describe, expect, inject, it } from 'vitest'
import { examineRange, prepareStudy, rankRows, schemeDetail } from '#shared/engine/search'
import type { ProjectSummary, SchemeDetail, SchemePage, SchemePoints, SchemeRow, StudyRecord } from '#shared/schemas/api'
import type { StudyInput } from '#shared/schemas/study'
import {
  awaitStudy, demoOffice, drawnGrid, hasEnded, newProject, newProjectWithPlate, newStudy, onDatabase, readEvents, signInAs, smallPlate,
  type Api,
} from './support'

const url = inject('url')
const databaseUrl = inject('databaseUrl')
let engineer: Api

beforeAll(async () => {
  engineer = await signInAs(url, 'engineer')
})

/** The engine by itself, in one piece: what the queue's result must equal. */
function byEngine({ plate, basis, range }: StudyInput) {
  const prepared = prepareStudy({ plate, basis, range })
  const part = examineRange(prepared, 0, prepared.total)
  return { prepared, counts: part.counts, rows: rankRows(part) }
}

/** A result as it looks after a way through JSON. */
const asJson = <T>(value: T) => JSON.parse(JSON.stringify(value)) as T

describe('a study that goes through queue and worker', () => {
  let study: StudyRecord
  let expected: ReturnType<typeof byEngine>

  beforeAll(async () => {
    const { projectId, plate } = await newProjectWithPlate(engineer)
    const started = await newStudy(engineer, projectId, plate.id, drawnGrid)
    expect(started).toMatchObject({ number: 1, total: 10, plateVersion: 1, basisVersion: 1, startedBy: 'Demo engineer' })
    study = await awaitStudy(engineer, started.id, hasEnded)
    expected = byEngine(study)
  })

  it('examines every arrangement and says how many were left out and why', () => {
    expect(study.state).toBe('finished')
    expect(study.counts).toEqual({ ...expected.counts, range: 10 })
    expect(study.progress).toMatchObject({ examined: 10, total: 10, secondsLeft: 0, failure: null })
    const rejected = Object.values(study.counts?.rejected ?? {}).reduce((sum, count) => sum + count, 0)
    expect(study.counts?.examined).toBe((study.counts?.feasible ?? 0) + rejected)
  })

  it('ranks as the engine does in one piece', async () => {
    const { body } = await engineer.get<SchemePage>(`/api/studies/${study.id}/schemes?limit=200`)
    expect(body.total).toBe(expected.rows.length)
    expect(body.rows).toEqual(asJson(expected.rows))
    expect(study.lightest).toEqual({ massPerArea: expected.rows[0]!.massPerArea, depth: expected.rows[0]!.depth })
    expect(study.progress.best?.number).toBe(expected.rows[0]!.number)
  })

  it('opens a scheme as the engine builds it', async () => {
    const row = expected.rows[0]!
    const { body } = await engineer.get<SchemeDetail>(`/api/studies/${study.id}/schemes/${encodeURIComponent(row.key)}`)
    expect(body).toMatchObject(asJson(schemeDetail(expected.prepared, row.key)))
    expect(body).toMatchObject({ studyId: study.id, projectId: study.projectId, studyNumber: 1, rank: 1, total: 10, plateVersion: 1 })
    expect(body.members.length).toBeGreaterThan(0)
    expect(body.residual).toBeLessThan(1e-9)
  })

  it('gives the calculation sheet of a beam', async () => {
    const row = expected.rows[0]!
    const { body } = await engineer.get<SchemeDetail>(`/api/studies/${study.id}/schemes/${encodeURIComponent(row.key)}`)
    const beam = body.members.find(({ kind }) => kind === 'edge')!
    const sheet = await engineer.get<Record<string, unknown>>(`/api/studies/${study.id}/schemes/${encodeURIComponent(row.key)}/members/${encodeURIComponent(beam.mark)}`)
    expect(sheet.status).toBe(200)
    expect(JSON.stringify(sheet.body)).toContain(beam.section)
    expect((await engineer.get(`/api/studies/${study.id}/schemes/${encodeURIComponent(row.key)}/members/ZZ99`)).status).toBe(404)
  })

  it('gives the chart in columns', async () => {
    const { body } = await engineer.get<SchemePoints>(`/api/studies/${study.id}/points`)
    expect(body.key).toEqual(expected.rows.map(({ key }) => key))
    expect(body.massPerArea).toEqual(expected.rows.map(({ massPerArea }) => massPerArea))
    expect(body.depth).toEqual(expected.rows.map(({ depth }) => depth))
    expect(body.onTradeOffLine).toEqual(expected.rows.map(({ onTradeOffLine }) => onTradeOffLine))
    expect(body.onTradeOffLine).toContain(true)
  })

  it('keeps its inputs when plate and basis move on, and says that they did', async () => {
    await engineer.put(`/api/plates/${study.plateId}`, { version: 1, document: smallPlate({ storeys: 7 }) })
    const { body } = await engineer.get<StudyRecord>(`/api/studies/${study.id}`)
    expect(body.plate.storeys).toBe(4)
    expect(body.stale).toEqual({ plate: 2, basis: null })
    await onDatabase(databaseUrl, db => expect(
      db.updateTable('studies').set({ inputs: '{}' }).where('id', '=', study.id).execute(),
    ).rejects.toThrow('never change'))
  })

  it('shows in the list of projects', async () => {
    const { body } = await engineer.get<ProjectSummary[]>('/api/projects')
    expect(body.find(({ id }) => id === study.projectId)).toMatchObject({ state: 'study 1 finished', lightest: study.lightest })
  })

  it('is not changed by a cancel that comes too late', async () => {
    const { body } = await engineer.post<StudyRecord>(`/api/studies/${study.id}/cancel`)
    expect(body.state).toBe('finished')
  })
})

describe('pages of the ranked table', () => {
  let studyId: string
  let all: SchemeRow[]

  beforeAll(async () => {
    studyId = (await demoOffice(engineer)).studies[0]!.id
    all = (await engineer.get<SchemePage>(`/api/studies/${studyId}/schemes?limit=200`)).body.rows
  })

  it.each(['mass', 'depth', 'pieces', 'distinctSections'] as const)('by %s, both ways, give every scheme once', async (sort) => {
    for (const order of ['asc', 'desc'] as const) {
      const seen: SchemeRow[] = []
      let next: string | null = ''
      while (next !== null) {
        const after: string = next === '' ? '' : `&after=${next}`
        const { body }: { body: SchemePage } = await engineer.get<SchemePage>(`/api/studies/${studyId}/schemes?sort=${sort}&order=${order}&limit=3${after}`)
        expect(body.total).toBe(all.length)
        expect(body.rows.length).toBeLessThanOrEqual(3)
        seen.push(...body.rows)
        next = body.next
      }
      expect(new Set(seen.map(({ key }) => key))).toEqual(new Set(all.map(({ key }) => key)))
      expect(seen).toHaveLength(all.length)
      const sign = order === 'asc' ? 1 : -1
      const inOrder = [...all].sort((a, b) => sign * (a[sort] - b[sort] || a.rank - b.rank))
      expect(seen.map(({ key }) => key)).toEqual(inOrder.map(({ key }) => key))
    }
  })

  it('can be narrowed', async () => {
    const middle = [...all].sort((a, b) => a.depth - b.depth)[Math.floor(all.length / 2)]!.depth
    const ask = async (query: string) => (await engineer.get<SchemePage>(`/api/studies/${studyId}/schemes?limit=200&${query}`)).body
    expect((await ask(`depthAtMost=${middle}`)).rows).toEqual(all.filter(({ depth }) => depth <= middle))
    expect((await ask('direction=x')).rows).toEqual(all.filter(({ primaryDirection }) => primaryDirection === 'x'))
    expect((await ask('divisions=2,3')).rows).toEqual(all.filter(({ divisions }) => divisions === 2 || divisions === 3))
    const line = await ask('tradeOff=true')
    expect(line.rows).toEqual(all.filter(({ onTradeOffLine }) => onTradeOffLine))
    expect(line.total).toBe(line.rows.length)
  })

  it.each([
    ['sort=colour', 'sort'], ['limit=201', 'limit'], ['limit=0', 'limit'], ['limit=many', 'limit'], ['divisions=2;drop', 'divisions'],
    ['after=nonsense', 'after'], ['after=WzEsOTAwNzE5OTI1NDc0MDk5MV0', 'after'], ['depthAtMost=NaN', 'depthAtMost'], ['colour=red', 'colour'], ['tradeOff=yes', 'tradeOff'],
  ])('refuse %s with 400', async (query, path) => {
    const answer = await engineer.get(`/api/studies/${studyId}/schemes?${query}`)
    expect(answer.status).toBe(400)
    expect(answer.body.data).toMatchObject({ code: 'malformed', path })
  })

  it('answer 404 to a scheme that is not kept', async () => {
    for (const key of ['999999', 'x', '%00', '../1']) {
      expect((await engineer.get(`/api/studies/${studyId}/schemes/${encodeURIComponent(key)}`)).status).toBe(404)
    }
    expect((await engineer.get(`/api/studies/${studyId}/schemes/%00`)).status).toBe(404)
  })
})

describe('the demo', () => {
  it('has a finished study that equals the engine\'s', async () => {
    const office = await demoOffice(engineer)
    const { body: study } = await engineer.get<StudyRecord>(`/api/studies/${office.studies[0]!.id}`)
    const expected = byEngine(study)
    expect(study.state).toBe('finished')
    expect(study.counts).toEqual({ ...expected.counts, range: study.total })
    const { body } = await engineer.get<SchemePage>(`/api/studies/${study.id}/schemes?limit=200`)
    expect(body.rows).toEqual(asJson(expected.rows.slice(0, 200)))
    expect(office.people.map(({ role }) => role).sort()).toEqual(['architect', 'checker', 'cost-planner', 'engineer'])
  })
})

describe('a study that cannot be framed', () => {
  it('is refused before the basis was chosen', async () => {
    const { id } = await newProject(engineer)
    const { body: plate } = await engineer.post<{ id: string }>(`/api/projects/${id}/plates`, { document: smallPlate() })
    const answer = await engineer.post(`/api/projects/${id}/studies`, { plateId: plate.id, range: drawnGrid })
    expect(answer.status).toBe(422)
    expect(answer.body.data).toMatchObject({ code: 'cannot-be-framed', path: 'basis.nationalChoice' })
  })

  it.each([
    ['an outline that is not orthogonal', smallPlate({ outline: [[0, 0], [18_000, 0], [18_000, 7500], [500, 7400]] }), drawnGrid, 'plate.outline'],
    ['a void beyond the outline', smallPlate({ voids: [{ name: 'Stair', x: 17_000, y: 0, width: 3000, height: 3000 }] }), drawnGrid, 'plate.voids[0]'],
    ['a construction stage without the slab\'s weight', smallPlate({ slab: { system: 'deck', depth: 130, maxSpan: 3600 } }), drawnGrid, 'plate.slab.weight'],
    ['a range that no bay fits', smallPlate(), { ...drawnGrid, x: { kind: 'module' as const, module: 2500, min: 5200, max: 7000 } }, 'range'],
    [
      'a range of too many arrangements',
      smallPlate({
        gridX: [{ label: '1', at: 0 }, { label: '2', at: 90_000 }], outline: [[0, 0], [90_000, 0], [90_000, 7500], [0, 7500]],
      }),
      { ...drawnGrid, x: { kind: 'module' as const, module: 300, min: 3000, max: 9000 } }, 'range',
    ],
  ])('is refused for %s with 422, a sentence and the path', async (_, document, range, path) => {
    const { projectId, plate } = await newProjectWithPlate(engineer, document)
    const answer = await engineer.post(`/api/projects/${projectId}/studies`, { plateId: plate.id, range })
    expect(answer.status).toBe(422)
    expect(answer.body.data.code).toBe('cannot-be-framed')
    expect(answer.body.data.path).toContain(path)
    expect(answer.body.data.message).toMatch(/^[A-Z].{15,}\.$/)
  })

  it('is refused with 400 where the range is none', async () => {
    const { projectId, plate } = await newProjectWithPlate(engineer)
    const answer = await engineer.post(`/api/projects/${projectId}/studies`, { plateId: plate.id, range: { ...drawnGrid, divisions: [0] } })
    expect(answer.status).toBe(400)
    expect(answer.body.data).toMatchObject({ code: 'malformed', path: 'range.divisions[0]' })
  })

  it('is refused with the plate of another project', async () => {
    const { plate } = await newProjectWithPlate(engineer)
    const { projectId } = await newProjectWithPlate(engineer)
    const answer = await engineer.post(`/api/projects/${projectId}/studies`, { plateId: plate.id, range: drawnGrid })
    expect(answer.status).toBe(404)
    expect(answer.body.data).toMatchObject({ code: 'not-found', path: 'plateId' })
  })
})

describe('the event stream', () => {
  it('begins with the state as it is and ends with a finished study', async () => {
    const { id } = (await demoOffice(engineer)).studies[0]!
    const told = await readEvents(engineer, id)
    expect(told).toHaveLength(1)
    expect(told[0]!.progress.state).toBe('finished')
  })

  it('follows a study to its end', async () => {
    const { projectId, plate } = await newProjectWithPlate(engineer)
    const study = await newStudy(engineer, projectId, plate.id, drawnGrid)
    const told = await readEvents(engineer, study.id)
    expect(told.at(-1)?.progress).toMatchObject({ state: 'finished', examined: 10, total: 10 })
    const examined = told.map(({ progress }) => progress.examined)
    expect(examined).toEqual([...examined].sort((a, b) => a - b))
  })
})
