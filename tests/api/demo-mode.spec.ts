import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { prepareTables } from '../../server/ops/setup/database.mjs'
import { cloneDatabase, startWeb } from '../stack'

const stack = inject('stack')
let clone: Awaited<ReturnType<typeof cloneDatabase>>
let web: Awaited<ReturnType<typeof startWeb>>

beforeAll(async () => {
  clone = await cloneDatabase(stack)
  web = await startWeb(stack, clone.databaseUrl)
})

afterAll(async () => {
  await web.stop()
  await clone.drop()
})

function request(path: string, method: string, cookie?: string) {
  const body = method === 'POST' ? JSON.stringify({ email: 'engineer@demo.example', password: 'demo-2417-wharf' }) : undefined
  return fetch(`${web.url}${path}`, { method, body, headers: { 'content-type': 'application/json', ...(cookie ? { cookie } : {}) } })
}

describe('the demo accounts', () => {
  it('sign in while demo mode is on', async () => {
    expect((await request('/api/session', 'POST')).status).toBe(200)
  })

  it('neither sign in nor stay signed in once the application starts without demo mode', async () => {
    const cookie = (await request('/api/session', 'POST')).headers.getSetCookie().map(line => line.split(';')[0]).join('; ')
    expect((await request('/api/projects', 'GET', cookie)).status).toBe(200)

    const tables = await prepareTables(stack.outputDir, { url: clone.databaseUrl, demo: false })
    expect(tables.demoAccounts).toEqual([])
    expect(tables.hasAccounts).toBe(false)
    expect((await request('/api/projects', 'GET', cookie)).status).toBe(401)
    expect((await request('/api/session', 'POST')).status).toBe(401)
  })

  it('sign in again when demo mode is on again', async () => {
    await prepareTables(stack.outputDir, { url: clone.databaseUrl, demo: true })
    expect((await request('/api/session', 'POST')).status).toBe(200)
  })
})
