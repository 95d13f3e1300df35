import { randomUUID } from 'node:crypto'
import { readdirSync } from 'node:fs'
import { beforeAll, describe, expect, inject, it } from 'vitest'
import { PROJECT_ROLES, type ProjectRole, type SchemePage } from '#shared/schemas/api'
import { may, mayCreateProjects, type ProjectAction } from '#shared/utils/permissions'
import { apiOf, demoOffice, drawnGrid, join, newAccount, newProjectWithPlate, onDatabase, signIn, signInAs, smallPlate, type Api } from './support'

const url = inject('url')
const databaseUrl = inject('databaseUrl')

interface Row {
  /** File under server/api. */
  file: string
  /** Address, with what stands in the project under test filled in. */
  path: (ids: Ids) => string
  body?: (ids: Ids) => unknown
  /** What is needed; null = no project, only a session. */
  actions: ProjectAction[] | null
  /** A body that a narrower right does not cover is refused all the same. */
  narrow?: ProjectAction[]
}
interface Ids { project: string, plate: string, study: string, key: string, mark: string, person: string }

/** Every route of the API has a line; a new route without one fails the first test. */
const ROUTES: Row[] = [
  { file: 'session.get', path: () => '/api/session', actions: null },
  { file: 'projects/index.get', path: () => '/api/projects', actions: null },
  { file: 'projects/index.post', path: () => '/api/projects', body: () => ({ number: randomUUID().slice(0, 12), name: 'Test (invented)' }), actions: null },
  { file: 'projects/[id]/index.get', path: ids => `/api/projects/${ids.project}`, actions: ['project.read'] },
  { file: 'projects/[id]/plates.post', path: ids => `/api/projects/${ids.project}/plates`, body: () => ({ document: smallPlate() }), actions: ['plate.create'] },
  { file: 'projects/[id]/basis.get', path: ids => `/api/projects/${ids.project}/basis`, actions: ['project.read'] },
  { file: 'projects/[id]/basis.put', path: ids => `/api/projects/${ids.project}/basis`, body: () => ({ version: 999 }), actions: ['basis.edit', 'basis.edit-allowances'] },
  {
    file: 'projects/[id]/studies.post', path: ids => `/api/projects/${ids.project}/studies`,
    body: ids => ({ plateId: ids.plate, range: drawnGrid }), actions: ['study.run'],
  },
  {
    file: 'projects/[id]/people/index.post', path: ids => `/api/projects/${ids.project}/people`,
    body: () => ({ email: 'checker@demo.example', role: 'checker' }), actions: ['people.edit'],
  },
  // The engineer is the only one of the project, so that nobody is removed here.
  { file: 'projects/[id]/people/[accountId].delete', path: ids => `/api/projects/${ids.project}/people/${ids.person}`, actions: ['people.edit'] },
  { file: 'plates/[id]/index.get', path: ids => `/api/plates/${ids.plate}`, actions: ['project.read'] },
  { file: 'plates/[id]/index.put', path: ids => `/api/plates/${ids.plate}`, body: () => ({ version: 999 }), actions: ['plate.edit', 'plate.edit-constraints'] },
  { file: 'plates/[id]/versions/index.get', path: ids => `/api/plates/${ids.plate}/versions`, actions: ['project.read'] },
  { file: 'plates/[id]/versions/[version].get', path: ids => `/api/plates/${ids.plate}/versions/1`, actions: ['project.read'] },
  { file: 'studies/[id]/index.get', path: ids => `/api/studies/${ids.study}`, actions: ['project.read'] },
  { file: 'studies/[id]/cancel.post', path: ids => `/api/studies/${ids.study}/cancel`, actions: ['study.cancel'] },
  { file: 'studies/[id]/events.get', path: ids => `/api/studies/${ids.study}/events`, actions: ['project.read'] },
  { file: 'studies/[id]/points.get', path: ids => `/api/studies/${ids.study}/points`, actions: ['project.read'] },
  { file: 'studies/[id]/schemes/index.get', path: ids => `/api/studies/${ids.study}/schemes`, actions: ['project.read'] },
  { file: 'studies/[id]/schemes/[key]/index.get', path: ids => `/api/studies/${ids.study}/schemes/${encodeURIComponent(ids.key)}`, actions: ['project.read'] },
  {
    file: 'studies/[id]/schemes/[key]/members/[mark].get', actions: ['project.read'],
    path: ids => `/api/studies/${ids.study}/schemes/${encodeURIComponent(ids.key)}/members/${encodeURIComponent(ids.mark)}`,
  },
  { file: 'studies/[id]/why-not.post', path: ids => `/api/studies/${ids.study}/why-not`, body: () => ({ number: 1 }), actions: ['project.read'] },
  {
    file: 'studies/[id]/answers/index.post', path: ids => `/api/studies/${ids.study}/answers`,
    body: () => ({ kind: 'robustness' }), actions: ['project.read'],
  },
  { file: 'studies/[id]/answers/index.get', path: ids => `/api/studies/${ids.study}/answers`, actions: ['project.read'] },
  { file: 'verification.get', path: () => '/api/verification', actions: null },
]

/** Open to everyone, for a reason: signing in and out, and the launcher's question whether the server is up. */
const OPEN_ROUTES = ['session.post', 'session.delete', 'health.get', '[...]']

const methodOf = (row: Row) => row.file.split('.').at(-1)?.toUpperCase() ?? ''

/** Status alone: the body of an event stream is not waited for. */
async function statusOf(api: Api, row: Row, ids: Ids): Promise<number> {
  const answer = await fetch(`${url}${row.path(ids)}`, {
    method: methodOf(row),
    headers: { ...(api.cookie ? { cookie: api.cookie } : {}), ...(row.body ? { 'content-type': 'application/json' } : {}) },
    ...(row.body ? { body: JSON.stringify(row.body(ids)) } : {}),
  })
  await answer.body?.cancel()
  return answer.status
}

let ids: Ids
const people = new Map<ProjectRole, Api>()
let stranger: Api

beforeAll(async () => {
  for (const role of PROJECT_ROLES) people.set(role, await signInAs(url, role))
  const engineer = people.get('engineer')!
  const office = await demoOffice(engineer)
  const study = office.studies[0]!.id
  const { body } = await engineer.get<SchemePage>(`/api/studies/${study}/schemes`)
  const key = body.rows[0]!.key
  const scheme = await engineer.get<{ members: { mark: string }[] }>(`/api/studies/${study}/schemes/${encodeURIComponent(key)}`)
  ids = { project: office.id, plate: office.plates[0]!.id, study, key, mark: scheme.body.members[0]!.mark, person: office.people.find(({ role }) => role === 'engineer')!.id }
  const { email, password } = await newAccount(databaseUrl, 'engineer')
  stranger = await signIn(url, email, password)
})

describe('every route', () => {
  it('has a line in the matrix', () => {
    const files = readdirSync('server/api', { recursive: true, encoding: 'utf8' })
      .filter(name => name.endsWith('.ts')).map(name => name.replace(/\.ts$/, '')).sort()
    expect(files).toEqual([...ROUTES.map(({ file }) => file), ...OPEN_ROUTES].sort())
  })

  it.each(ROUTES)('$file answers 401 to who is not signed in', async (row) => {
    expect(await statusOf(apiOf(url), row, ids)).toBe(401)
  })

  it.each(ROUTES.filter(({ actions }) => actions))('$file answers 404 to who is not on the project', async (row) => {
    expect(await statusOf(stranger, row, ids)).toBe(404)
  })

  it.each(ROUTES.filter(({ path, actions }) => actions && path({ ...emptyIds }).includes('none')))('$file answers 404 where there is no such thing', async (row) => {
    const missing = { project: randomUUID(), plate: randomUUID(), study: randomUUID(), key: 'none', mark: 'none', person: randomUUID() }
    expect(await statusOf(people.get('engineer')!, row, missing)).toBe(404)
    expect(await statusOf(people.get('engineer')!, row, emptyIds)).toBe(404)
  })

  const cases = ROUTES.flatMap(row => row.actions ? PROJECT_ROLES.map(role => ({ ...row, role, actions: row.actions ?? [] })) : [])
  it.each(cases)('$file lets the $role do what the table of permissions says', async ({ role, ...row }) => {
    const isAllowed = row.actions.some(action => may(role, action))
    const status = await statusOf(people.get(role)!, row, ids)
    if (isAllowed) expect(status).not.toBe(403)
    else expect(status).toBe(403)
    expect(status).not.toBe(401)
    expect(status).not.toBe(404)
    expect(status).toBeLessThan(500)
  })
})

const emptyIds: Ids = { project: 'none', plate: 'none', study: 'none', key: 'none', mark: 'none', person: 'none' }

describe('making a project', () => {
  it.each(PROJECT_ROLES)('is the right of engineers: %s', async (role) => {
    const answer = await people.get(role)!.post('/api/projects', { number: randomUUID().slice(0, 12), name: 'Test (invented)' })
    expect(answer.status).toBe(mayCreateProjects(role) ? 201 : 403)
  })

  it('is no right of an administrator as such', async () => {
    const administrator = await signInAs(url, null)
    expect((await administrator.post('/api/projects', { number: 'A1', name: 'Test' })).status).toBe(403)
    expect((await administrator.get<unknown[]>('/api/projects')).body).toEqual([])
  })

  it('refuses a number that the practice has already', async () => {
    const answer = await people.get('engineer')!.post('/api/projects', { number: '2417', name: 'Again' })
    expect(answer.status).toBe(400)
    expect(answer.body.data).toMatchObject({ code: 'malformed', path: 'number' })
  })
})

describe('a right that covers a part', () => {
  it('lets the architect move keep-clear zones and pins, and nothing else of a plate', async () => {
    const { projectId, plate } = await newProjectWithPlate(people.get('engineer')!)
    await join(databaseUrl, projectId, 'architect')
    const architect = people.get('architect')!
    const zone = { name: 'Foyer', x: 1000, y: 1000, width: 2000, height: 2000 }
    const pinned = plate.document.gridX.map(line => ({ ...line, pinned: true }))
    const allowed = await architect.put(`/api/plates/${plate.id}`, { version: 1, document: { ...plate.document, keepClear: [zone], gridX: pinned } })
    expect(allowed.status).toBe(200)
    const refused = await architect.put(`/api/plates/${plate.id}`, { version: 2, document: { ...plate.document, storeys: 9 } })
    expect(refused.status).toBe(403)
    expect(refused.body.data.code).toBe('not-allowed')
  })

  it('lets the cost planner set the allowances, and nothing else of a basis', async () => {
    const { projectId } = await newProjectWithPlate(people.get('engineer')!)
    await join(databaseUrl, projectId, 'cost-planner')
    const planner = people.get('cost-planner')!
    const { body } = await planner.get<{ version: number, document: Record<string, unknown> }>(`/api/projects/${projectId}/basis`)
    const allowed = await planner.put(`/api/projects/${projectId}/basis`, { version: body.version, document: { ...body.document, connectionAllowance: 0.08 } })
    expect(allowed.status).toBe(200)
    const refused = await planner.put(`/api/projects/${projectId}/basis`, {
      version: body.version + 1, document: { ...body.document, combination: '6.10ab' },
    })
    expect(refused.status).toBe(403)
  })

  it('leaves a line in the activity log, which cannot be changed', async () => {
    const { projectId } = await newProjectWithPlate(people.get('engineer')!)
    await onDatabase(databaseUrl, async (db) => {
      const actions = await db.selectFrom('activity').select('action').where('project_id', '=', projectId).orderBy('id').execute()
      expect(actions.map(({ action }) => action)).toEqual(['project.created', 'plate.created', 'basis.saved'])
      await expect(db.updateTable('activity').set({ action: 'nothing' }).where('project_id', '=', projectId).execute()).rejects.toThrow('append-only')
      await expect(db.deleteFrom('activity').where('project_id', '=', projectId).execute()).rejects.toThrow('append-only')
    })
  })
})

describe('an address that is none', () => {
  it('answers 404 in the one shape', async () => {
    const answer = await people.get('engineer')!.get('/api/nothing/here')
    expect(answer.status).toBe(404)
    expect(answer.body.data.code).toBe('not-found')
    expect((await people.get('engineer')!.call('DELETE', '/api/projects')).status).toBe(404)
  })
})
