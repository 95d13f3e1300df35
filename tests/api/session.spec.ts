import { sql } from 'kysely'
import { describe, expect, inject, it } from 'vitest'
import { endSessions } from '~~/server/database/queries/accounts'
import { demoAccounts } from '~~/server/database/demo'
import type { SessionAccount } from '#shared/schemas/api'
import { apiOf, newAccount, onDatabase, signIn, signInAs } from './support'

const url = inject('url')
const databaseUrl = inject('databaseUrl')
const nobody = apiOf(url)

describe('signing in', () => {
  it('answers who is signed in and seals the session in a cookie that scripts cannot read', async () => {
    const { email, password } = demoAccounts[0]!
    const answer = await nobody.post<SessionAccount>('/api/session', { email: email.toUpperCase(), password })
    expect(answer.status).toBe(200)
    expect(answer.body).toMatchObject({ name: 'Demo engineer', email, initials: 'DE', role: 'engineer', isAdministrator: false })
    const [cookie] = answer.headers.getSetCookie()
    expect(cookie).toMatch(/HttpOnly/i)
    expect(cookie).toMatch(/SameSite=Lax/i)
    expect(cookie).toMatch(/Secure/i)
    expect(JSON.stringify(answer.body)).not.toContain('scrypt')
  })

  it('lets every demo account in', async () => {
    for (const { email, password, name } of demoAccounts) {
      const api = await signIn(url, email, password)
      expect((await api.get<SessionAccount>('/api/session')).body.name).toBe(name)
    }
  })

  it('answers a wrong password and an unknown account alike', async () => {
    const { email } = await newAccount(databaseUrl, 'engineer')
    const wrong = await nobody.post('/api/session', { email, password: 'not the password' })
    const unknown = await nobody.post('/api/session', { email: 'nobody@demo.example', password: 'not the password' })
    expect(wrong.status).toBe(401)
    expect(wrong.body.data.code).toBe('wrong-credentials')
    expect(unknown.status).toBe(401)
    expect(unknown.body.data).toEqual(wrong.body.data)
  })

  it.each([
    ['no e-mail', { password: 'x' }, 'email'],
    ['no address in the e-mail', { email: 'engineer', password: 'x' }, 'email'],
    ['an empty password', { email: 'a@b.example', password: '' }, 'password'],
    ['a field that is not known', { email: 'a@b.example', password: 'x', remember: true }, 'remember'],
    ['no JSON', '{"email":', ''],
    ['a NUL in a text', '{"email":"a@b.example","password":"x\\u0000"}', ''],
  ])('answers %s with 400 and the path', async (_, body, path) => {
    const answer = await nobody.post('/api/session', body)
    expect(answer.status).toBe(400)
    expect(answer.body.data).toMatchObject({ code: 'malformed', path })
  })

  it('refuses a document over the size limit', async () => {
    const answer = await nobody.post('/api/session', JSON.stringify({ email: 'a@b.example', password: 'x'.repeat(4_100_000) }))
    expect(answer.status).toBe(400)
    expect(answer.body.data.message).toContain('4 MB')
  })

  it('stops the ninth failed try, even with the right password, and lets other accounts in', async () => {
    const { email, password } = await newAccount(databaseUrl, 'engineer')
    for (let i = 0; i < 8; i++) {
      expect((await nobody.post('/api/session', { email, password: 'wrong' })).status).toBe(401)
    }
    const ninth = await nobody.post('/api/session', { email, password })
    expect(ninth.status).toBe(429)
    expect(ninth.body.data.code).toBe('too-many-tries')
    expect((await signInAs(url, 'engineer')).cookie).toContain('baywright')
  })

  it('counts tries that run side by side', async () => {
    const { email } = await newAccount(databaseUrl, 'engineer')
    const answers = await Promise.all(Array.from({ length: 12 }, () => nobody.post('/api/session', { email, password: 'wrong' })))
    expect(answers.filter(({ status }) => status === 401)).toHaveLength(8)
    expect(answers.filter(({ status }) => status === 429)).toHaveLength(4)
  })
})

describe('a session', () => {
  it('ends with the sign-out', async () => {
    const { email, password } = await newAccount(databaseUrl, 'engineer')
    const api = await signIn(url, email, password)
    const out = await api.delete('/api/session')
    expect(out.status).toBe(204)
    expect(out.headers.getSetCookie()[0]).toMatch(/^baywright=;/)
    expect((await nobody.delete('/api/session')).status).toBe(204)
  })

  it('is dead at its next request once the account\'s sessions were ended', async () => {
    const { id, email, password } = await newAccount(databaseUrl, 'engineer')
    const api = await signIn(url, email, password)
    expect((await api.get('/api/projects')).status).toBe(200)
    await onDatabase(databaseUrl, db => endSessions(db, id))
    const after = await api.get('/api/projects')
    expect(after.status).toBe(401)
    expect(after.body.data.code).toBe('not-signed-in')
  })

  it('is dead at its next request once the account was deactivated', async () => {
    const { id, email, password } = await newAccount(databaseUrl, 'engineer')
    const api = await signIn(url, email, password)
    await onDatabase(databaseUrl, db => sql`update accounts set deactivated_at = now() where id = ${id}`.execute(db))
    expect((await api.get('/api/projects')).status).toBe(401)
    expect((await nobody.post('/api/session', { email, password })).status).toBe(401)
  })

  it('cannot be forged', async () => {
    const api = await signInAs(url, 'engineer')
    const cookie = api.cookie ?? ''
    const forged = `${cookie.slice(0, -8)}AAAAAAAA`
    expect((await apiOf(url, forged).get('/api/projects')).status).toBe(401)
  })

  it('does not carry over to requests from another site', async () => {
    const { cookie } = await signInAs(url, 'engineer')
    const answer = await fetch(`${url}/api/projects`, {
      method: 'POST', body: '{}', headers: { 'cookie': cookie ?? '', 'origin': 'https://elsewhere.example', 'content-type': 'application/json' },
    })
    expect(answer.status).toBe(403)
  })
})
