/** What the API tests share: a client with a session, invented projects, studies awaited. */
import { randomUUID } from 'node:crypto'
import { setTimeout as wait } from 'node:timers/promises'
import { openClient, type Db } from '~~/server/database/client'
import { demoAccounts } from '~~/server/database/demo'
import { hashPasswordPlain } from '~~/server/database/passwords'
import { insertAccount } from '~~/server/database/queries/accounts'
import { addMember } from '~~/server/database/queries/projects'
import type {
  ApiErrorBody, BasisRecord, PlateRecord, ProjectDetail, ProjectRole, ProjectSummary, StudyProgress, StudyRecord,
} from '#shared/schemas/api'
import { PlateSchema, type PlateInput } from '#shared/schemas/plate'
import type { Range } from '#shared/schemas/range'

export interface Answer<T> { status: number, body: T, headers: Headers }
export interface Refused { statusCode: number, message: string, data: ApiErrorBody & Record<string, unknown> }

export type Api = ReturnType<typeof apiOf>

/** Calls of one person; without a cookie, of nobody. */
export function apiOf(url: string, cookie?: string) {
  async function call<T = Refused>(method: string, path: string, body?: unknown): Promise<Answer<T>> {
    const response = await fetch(`${url}${path}`, {
      method,
      headers: {
        ...(cookie === undefined ? {} : { cookie }),
        ...(body === undefined ? {} : { 'content-type': 'application/json' }),
      },
      ...(body === undefined ? {} : { body: typeof body === 'string' ? body : JSON.stringify(body) }),
    })
    const text = await response.text()
    return { status: response.status, body: (text === '' ? null : JSON.parse(text)) as T, headers: response.headers }
  }
  return {
    url,
    cookie,
    call,
    get: <T = Refused>(path: string) => call<T>('GET', path),
    post: <T = Refused>(path: string, body?: unknown) => call<T>('POST', path, body),
    put: <T = Refused>(path: string, body: unknown) => call<T>('PUT', path, body),
    delete: <T = Refused>(path: string) => call<T>('DELETE', path),
  }
}

/** The cookie that a sign-in sets. */
export async function signIn(url: string, email: string, password: string): Promise<Api> {
  const answer = await apiOf(url).post('/api/session', { email, password })
  if (answer.status !== 200) throw new Error(`sign-in of ${email}: ${answer.status} ${JSON.stringify(answer.body)}`)
  return apiOf(url, answer.headers.getSetCookie().map(line => line.split(';')[0]).join('; '))
}

/** A demo account, signed in. */
export function signInAs(url: string, role: ProjectRole | null): Promise<Api> {
  const account = demoAccounts.find(({ projectRole }) => projectRole === role)
  if (!account) throw new Error(`no demo account for ${role}`)
  return signIn(url, account.email, account.password)
}

/** Runs `task` on the database itself. */
export async function onDatabase<T>(databaseUrl: string, task: (db: Db) => Promise<T>): Promise<T> {
  const { db, close } = openClient(databaseUrl, { max: 3, name: 'baywright test' })
  try {
    return await task(db)
  } finally {
    await close()
  }
}

/** A new account of the demo practice; its e-mail and password. */
export async function newAccount(databaseUrl: string, role: ProjectRole | null): Promise<{ id: string, email: string, password: string }> {
  const password = randomUUID()
  const email = `test-${randomUUID()}@demo.example`
  const id = await onDatabase(databaseUrl, async (db) => {
    const practice = await db.selectFrom('practices').select('id').executeTakeFirstOrThrow()
    return await insertAccount(db, {
      practiceId: practice.id, name: 'Test account', email, passwordHash: await hashPasswordPlain(password), role,
    })
  })
  return { id, email, password }
}

/** Puts a demo account on a project. */
export async function join(databaseUrl: string, projectId: string, role: ProjectRole): Promise<void> {
  const { email } = demoAccounts.find(account => account.projectRole === role) ?? { email: '' }
  await onDatabase(databaseUrl, async (db) => {
    const { id } = await db.selectFrom('accounts').select('id').where('email', '=', email).executeTakeFirstOrThrow()
    await addMember(db, projectId, id, role)
  })
}

/** Two bays of 9 × 7.5 m; `change` replaces top-level fields. */
export function smallPlate(change: Partial<PlateInput> = {}) {
  return PlateSchema.parse({
    format: 'baywright-plate', version: 1, name: 'Test floor',
    gridX: [{ label: '1', at: 0 }, { label: '2', at: 9000 }, { label: '3', at: 18_000 }],
    gridY: [{ label: 'A', at: 0 }, { label: 'B', at: 7500 }],
    outline: [[0, 0], [18_000, 0], [18_000, 7500], [0, 7500]],
    slab: { system: 'deck', depth: 130, weight: 2.75, maxSpan: 3600 },
    floorLoad: { permanent: 3.6, variable: 3.5, category: 'B' },
    storeys: 4, storeyHeight: 4000,
    ...change,
  } satisfies PlateInput)
}

export const drawnGrid: Range = {
  x: { kind: 'fixed' }, y: { kind: 'fixed' }, primaryDirections: ['x', 'y'], divisions: [1, 2, 3, 4, 5],
  depthCap: null, maxDistinctSections: null,
}

/** A project of the demo engineer, empty. */
export async function newProject(engineer: Api): Promise<ProjectDetail> {
  const { body } = await engineer.post<ProjectDetail>('/api/projects', {
    number: `T${randomUUID().slice(0, 8)}`, name: 'Test project (invented)',
  })
  return body
}

/** A project with a plate and a saved basis. */
export async function newProjectWithPlate(engineer: Api, plate = smallPlate()): Promise<{ projectId: string, plate: PlateRecord }> {
  const { id: projectId } = await newProject(engineer)
  const made = await engineer.post<PlateRecord>(`/api/projects/${projectId}/plates`, { document: plate })
  const basis = await engineer.get<BasisRecord>(`/api/projects/${projectId}/basis`)
  await engineer.put(`/api/projects/${projectId}/basis`, { version: 0, document: basis.body.document })
  return { projectId, plate: made.body }
}

/** Starts a study and returns its record. */
export async function newStudy(engineer: Api, projectId: string, plateId: string, range: Range): Promise<StudyRecord> {
  const answer = await engineer.post<StudyRecord>(`/api/projects/${projectId}/studies`, { plateId, range })
  if (answer.status !== 201) throw new Error(`study refused: ${answer.status} ${JSON.stringify(answer.body)}`)
  return answer.body
}

/** Polls a study until `isThere` says so. */
export async function awaitStudy(api: Api, id: string, isThere: (study: StudyRecord) => boolean, seconds = 60): Promise<StudyRecord> {
  const end = Date.now() + seconds * 1000
  for (;;) {
    const { body } = await api.get<StudyRecord>(`/api/studies/${id}`)
    if (isThere(body)) return body
    if (Date.now() > end) throw new Error(`study ${id} is still ${JSON.stringify(body.progress)}`)
    await wait(50)
  }
}

export const hasEnded = ({ state }: Pick<StudyProgress, 'state'>) => state === 'finished' || state === 'cancelled' || state === 'failed'

/** The demo's office project and its finished study. */
export async function demoOffice(api: Api): Promise<ProjectDetail> {
  const { body } = await api.get<ProjectSummary[]>('/api/projects')
  const office = body.find(({ number }) => number === '2417')
  if (!office) throw new Error('the demo office is missing')
  return (await api.get<ProjectDetail>(`/api/projects/${office.id}`)).body
}

export interface Told { at: number, event: string, progress: StudyProgress }

/** Reads a study's event stream to its end, or for `ms`. */
export async function readEvents(api: Api, studyId: string, ms = 60_000): Promise<Told[]> {
  const response = await fetch(`${api.url}/api/studies/${studyId}/events`, {
    headers: { cookie: api.cookie ?? '', accept: 'text/event-stream' }, signal: AbortSignal.timeout(ms),
  })
  const told: Told[] = []
  const decoder = new TextDecoder()
  let text = ''
  for await (const chunk of response.body ?? []) {
    text += decoder.decode(chunk as Uint8Array, { stream: true })
    const blocks = text.split('\n\n')
    text = blocks.pop() ?? ''
    for (const block of blocks) {
      const field = (name: string) => block.split('\n').find(line => line.startsWith(`${name}: `))?.slice(name.length + 2) ?? ''
      if (field('event') === 'progress') {
        told.push({ at: Date.now(), event: 'progress', progress: JSON.parse(field('data')) as StudyProgress })
      }
    }
  }
  return told
}
