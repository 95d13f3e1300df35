import { randomUUID } from 'node:crypto'
import { beforeAll, describe, expect, inject, it } from 'vitest'
import { insertAccount } from '~~/server/database/queries/accounts'
import type { ProjectDetail, ProjectPerson, ProjectRole, ProjectSummary } from '#shared/schemas/api'
import { newAccount, newProject, onDatabase, signIn, signInAs, type Api } from './support'

const url = inject('url')
const databaseUrl = inject('databaseUrl')

let engineer: Api
let project: ProjectDetail
let engineerId: string

beforeAll(async () => {
  engineer = await signInAs(url, 'engineer')
  project = await newProject(engineer)
  engineerId = project.people[0]!.id
})

const put = <T = ProjectPerson>(api: Api, email: string, role: ProjectRole) =>
  api.call<T>('POST', `/api/projects/${project.id}/people`, { email, role })
const remove = (api: Api, accountId: string) => api.delete(`/api/projects/${project.id}/people/${accountId}`)
const peopleOf = async () => (await engineer.get<ProjectDetail>(`/api/projects/${project.id}`)).body.people

describe('the people of a project', () => {
  it('grow by an account of the practice, which then sees the project; another role replaces the first', async () => {
    const { id, email, password } = await newAccount(databaseUrl, 'architect')
    const person = await signIn(url, email, password)
    expect((await person.get(`/api/projects/${project.id}`)).status).toBe(404)
    const added = await put(engineer, ` ${email.toUpperCase()} `, 'architect')
    expect(added.status).toBe(201)
    expect(added.body).toEqual({ id, name: 'Test account', email, role: 'architect' })
    expect((await person.get<ProjectSummary[]>('/api/projects')).body.map(line => [line.id, line.role])).toEqual([[project.id, 'architect']])
    expect((await put(engineer, email, 'checker')).status).toBe(200)
    expect((await peopleOf()).filter(one => one.id === id).map(({ role }) => role)).toEqual(['checker'])
    expect((await remove(engineer, id)).status).toBe(204)
    expect((await person.get(`/api/projects/${project.id}`)).status).toBe(404)
    expect((await remove(engineer, id)).status).toBe(404)
    const acts = await onDatabase(databaseUrl, db => db.selectFrom('activity').select(['action', 'subject'])
      .where('project_id', '=', project.id).where('action', 'like', 'person.%').orderBy('id').execute())
    expect(acts).toEqual([
      { action: 'person.added', subject: { accountId: id, role: 'architect' } },
      { action: 'person.role-changed', subject: { accountId: id, role: 'checker', before: 'architect' } },
      { action: 'person.removed', subject: { accountId: id, role: 'checker' } },
    ])
  })

  it('are of the practice: an account that is missing and one of another practice are answered alike', async () => {
    const foreign = `test-${randomUUID()}@other.example`
    await onDatabase(databaseUrl, async (db) => {
      const { id } = await db.insertInto('practices').values({ name: 'Other office (invented)' }).returning('id').executeTakeFirstOrThrow()
      await insertAccount(db, { practiceId: id, name: 'Test account', email: foreign, passwordHash: 'none', role: 'engineer' })
    })
    for (const email of [foreign, `test-${randomUUID()}@demo.example`]) {
      const answer = await put<{ data: { code: string, message: string, path: string } }>(engineer, email, 'architect')
      expect(answer.status).toBe(404)
      expect(answer.body.data).toMatchObject({ code: 'not-found', path: 'email' })
      expect(answer.body.data.message).toContain('npm run account')
    }
    const malformed = await put<{ data: unknown }>(engineer, 'nobody', 'architect')
    expect([malformed.status, malformed.body.data]).toEqual([400, expect.objectContaining({ path: 'email' })])
  })

  it('keep an engineer', async () => {
    for (const answer of [await remove(engineer, engineerId), await engineer.post(`/api/projects/${project.id}/people`, { email: 'engineer@demo.example', role: 'checker' })]) {
      expect(answer.status).toBe(422)
      expect(answer.body.data.code).toBe('last-engineer')
    }
    expect((await peopleOf()).map(({ id, role }) => [id, role])).toEqual([[engineerId, 'engineer']])
  })

  it('keep an engineer where two remove one another at the same time', async () => {
    const { id, email, password } = await newAccount(databaseUrl, 'engineer')
    await put(engineer, email, 'engineer')
    const second = await signIn(url, email, password)
    const statuses = (await Promise.all([remove(engineer, id), remove(second, engineerId)])).map(({ status }) => status)
    expect(statuses.filter(status => status === 204)).toHaveLength(1)
    const left = await onDatabase(databaseUrl, db => db.selectFrom('project_members').select('account_id')
      .where('project_id', '=', project.id).execute())
    expect(left).toHaveLength(1)
    project = await newProject(engineer)
  })

  it('may be chosen by the practice administrator, who does not come on the project by that', async () => {
    const administrator = await signInAs(url, null)
    const { id, email } = await newAccount(databaseUrl, 'checker')
    expect((await put(administrator, email, 'checker')).status).toBe(201)
    expect((await put(administrator, 'administrator@demo.example', 'engineer')).status).toBe(403)
    expect((await administrator.get(`/api/projects/${project.id}`)).status).toBe(404)
    expect((await remove(administrator, id)).status).toBe(204)
  })

  it('may not be chosen by the administrator of another practice', async () => {
    const { id, email, password } = await newAccount(databaseUrl, null)
    await onDatabase(databaseUrl, async (db) => {
      const other = await db.insertInto('practices').values({ name: 'Third office (invented)' }).returning('id').executeTakeFirstOrThrow()
      await db.updateTable('accounts').set({ is_administrator: true, practice_id: other.id }).where('id', '=', id).execute()
    })
    const administrator = await signIn(url, email, password)
    expect((await put(administrator, email, 'engineer')).status).toBe(404)
    expect((await remove(administrator, engineerId)).status).toBe(404)
  })
})
