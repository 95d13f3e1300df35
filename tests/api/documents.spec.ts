import { beforeAll, describe, expect, inject, it } from 'vitest'
import type { BasisRecord, PlateRecord, PlateVersionSummary, ProjectDetail, ProjectSummary } from '#shared/schemas/api'
import { newProject, newProjectWithPlate, signInAs, smallPlate, type Api } from './support'

const url = inject('url')
let engineer: Api

beforeAll(async () => {
  engineer = await signInAs(url, 'engineer')
})

describe('a floor plate', () => {
  it('is kept as it was sent, with its defaults, in version 1', async () => {
    const { id } = await newProject(engineer)
    const made = await engineer.post<PlateRecord>(`/api/projects/${id}/plates`, { document: smallPlate() })
    expect(made.status).toBe(201)
    const read = await engineer.get<PlateRecord>(`/api/plates/${made.body.id}`)
    expect(read.body).toEqual(made.body)
    expect(read.body).toMatchObject({ version: 1, savedBy: 'Demo engineer', projectId: id, document: smallPlate() })
  })

  it('shows in its project with its gross area', async () => {
    const { projectId } = await newProjectWithPlate(engineer)
    const { body } = await engineer.get<ProjectDetail>(`/api/projects/${projectId}`)
    expect(body).toMatchObject({ role: 'engineer', basisVersion: 1, studies: [] })
    expect(body.plates).toMatchObject([{ name: 'Test floor', version: 1, area: 135 }])
    const { body: projects } = await engineer.get<ProjectSummary[]>('/api/projects')
    expect(projects.find(project => project.id === projectId)).toMatchObject({
      outline: smallPlate().outline, floorArea: 135, state: 'no study yet', lightest: null,
    })
  })

  it('keeps every version', async () => {
    const { plate } = await newProjectWithPlate(engineer)
    const moved = smallPlate({ gridX: [{ label: '1', at: 0 }, { label: '2', at: 8000 }, { label: '3', at: 18_000 }] })
    const saved = await engineer.put<PlateRecord>(`/api/plates/${plate.id}`, { version: 1, document: moved })
    expect(saved.body).toMatchObject({ version: 2, document: moved })
    const { body: versions } = await engineer.get<PlateVersionSummary[]>(`/api/plates/${plate.id}/versions`)
    expect(versions.map(({ version }) => version)).toEqual([2, 1])
    expect((await engineer.get<PlateRecord>(`/api/plates/${plate.id}/versions/1`)).body.document).toEqual(smallPlate())
    expect((await engineer.get(`/api/plates/${plate.id}/versions/3`)).status).toBe(404)
    expect((await engineer.get(`/api/plates/${plate.id}/versions/1e0`)).status).toBe(404)
  })

  it('answers 409 to a stale version with the one in place, who saved it and when', async () => {
    const { plate } = await newProjectWithPlate(engineer)
    await engineer.put(`/api/plates/${plate.id}`, { version: 1, document: smallPlate({ storeys: 5 }) })
    const stale = await engineer.put(`/api/plates/${plate.id}`, { version: 1, document: smallPlate({ storeys: 6 }) })
    expect(stale.status).toBe(409)
    expect(stale.body.data).toMatchObject({ code: 'stale-version', path: 'version' })
    expect(stale.body.data.message).toContain('Demo engineer')
    expect(stale.body.data.current).toMatchObject({ version: 2, savedBy: 'Demo engineer', document: { storeys: 5 } })
    expect((await engineer.get<PlateRecord>(`/api/plates/${plate.id}`)).body.document.storeys).toBe(5)
  })

  it('lets one of ten saves at once through and loses none of the others silently', async () => {
    const { plate } = await newProjectWithPlate(engineer)
    const answers = await Promise.all(Array.from({ length: 10 }, (_, i) =>
      engineer.put(`/api/plates/${plate.id}`, { version: 1, document: smallPlate({ storeys: i + 1 }) })))
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1)
    expect(answers.filter(({ status }) => status === 409)).toHaveLength(9)
    expect((await engineer.get<unknown[]>(`/api/plates/${plate.id}/versions`)).body).toHaveLength(2)
  })

  it.each([
    ['a span that is text', { gridX: [{ label: '1', at: '0' }, { label: '2', at: 9000 }] }, 'document.gridX[0].at'],
    ['half a millimetre', { gridX: [{ label: '1', at: 0.5 }, { label: '2', at: 9000 }] }, 'document.gridX[0].at'],
    ['a negative load', { floorLoad: { permanent: -1, variable: 3, category: 'B' } }, 'document.floorLoad.permanent'],
    ['a zone of no area', { zones: [{ name: 'Z', x: 0, y: 0, width: 0, height: 9, permanent: 1, variable: 1, category: 'B' }] }, 'document.zones[0].width'],
    ['a field that is not known', { colour: 'red' }, 'document.colour'],
    ['no grid', { gridY: [] }, 'document.gridY'],
  ])('refuses %s with 400 and its path', async (_, change, path) => {
    const { id } = await newProject(engineer)
    const answer = await engineer.post(`/api/projects/${id}/plates`, { document: { ...smallPlate(), ...change } })
    expect(answer.status).toBe(400)
    expect(answer.body.data).toMatchObject({ code: 'malformed', path })
    expect(answer.body.data.message.length).toBeGreaterThan(path.length)
    expect((await engineer.get<ProjectDetail>(`/api/projects/${id}`)).body.plates).toEqual([])
  })
})

describe('a basis of design', () => {
  it('is the default in version 0 until it is saved', async () => {
    const { id } = await newProject(engineer)
    const { body } = await engineer.get<BasisRecord>(`/api/projects/${id}/basis`)
    expect(body).toMatchObject({ version: 0, savedAt: null, savedBy: null, document: { combination: '6.10', limits: { variable: 360, total: 200 } } })
    const saved = await engineer.put<BasisRecord>(`/api/projects/${id}/basis`, { version: 0, document: { ...body.document, nationalChoice: 'EN' } })
    expect(saved.body).toMatchObject({ version: 1, savedBy: 'Demo engineer', document: { nationalChoice: 'EN' } })
  })

  it('answers 409 to a stale version with the one in force', async () => {
    const { id } = await newProject(engineer)
    const { body } = await engineer.get<BasisRecord>(`/api/projects/${id}/basis`)
    const wish = { version: 0, document: body.document }
    const answers = await Promise.all([1, 2, 3].map(() => engineer.put(`/api/projects/${id}/basis`, wish)))
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409])
    const stale = answers.find(({ status }) => status === 409)
    expect(stale?.body.data).toMatchObject({ code: 'stale-version', current: { version: 1 } })
  })

  it.each([
    ['a grade that does not exist', { primary: { grade: 'S999', families: ['UB'] } }, 'document.primary.grade'],
    ['no family', { column: { grade: 'S355', families: [] } }, 'document.column.families'],
    ['a family twice', { column: { grade: 'S355', families: ['UC', 'UC'] } }, 'document.column.families'],
    ['an override that is not known', { overrides: { gammaX: 1 } }, 'document.overrides.gammaX'],
  ])('refuses %s with 400 and its path', async (_, change, path) => {
    const { id } = await newProject(engineer)
    const { body } = await engineer.get<BasisRecord>(`/api/projects/${id}/basis`)
    const answer = await engineer.put(`/api/projects/${id}/basis`, { version: 0, document: { ...body.document, ...change } })
    expect(answer.status).toBe(400)
    expect(answer.body.data).toMatchObject({ code: 'malformed', path })
  })
})
