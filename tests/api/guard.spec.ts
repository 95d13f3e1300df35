import { describe, expect, inject, it } from 'vitest'

const url = inject('url')
const { host } = new URL(url)

function signIn(headers: Record<string, string>) {
  return fetch(`${url}/api/session`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', ...headers },
    body: JSON.stringify({ email: 'nobody@demo.example', password: 'not the password' }),
  })
}

async function policyOf(path: string) {
  const answer = await fetch(`${url}${path}`)
  return { policy: answer.headers.get('content-security-policy') ?? '', html: await answer.text(), answer }
}

describe('a request from a page of another site', () => {
  it.each([
    ['by Sec-Fetch-Site', { 'sec-fetch-site': 'cross-site' }],
    ['by Sec-Fetch-Site of a neighbour', { 'sec-fetch-site': 'same-site' }],
    ['by Origin', { origin: 'http://elsewhere.example' }],
    ['by Origin of another port', { origin: 'http://127.0.0.1:1' }],
    ['by an Origin that is hidden', { origin: 'null' }],
  ])('is refused with 403 when it changes something, seen %s', async (_, headers) => {
    const answer = await signIn(headers)
    expect(answer.status).toBe(403)
    expect((await answer.json()).data.code).toBe('foreign-origin')
  })

  it.each([
    ['from our own page', { 'sec-fetch-site': 'same-origin' }],
    ['from our own origin', { origin: `http://${host}` }],
    ['from a program that is no browser', {}],
  ])('is let through to the check of the password %s', async (_, headers) => {
    expect((await signIn(headers)).status).toBe(401)
  })
})

describe('the answers', () => {
  it('carry a content security policy whose nonce is new each time and stands on each script and style', async () => {
    const [first, second] = await Promise.all([policyOf('/sign-in'), policyOf('/sign-in')])
    const nonce = /script-src 'self' 'nonce-([^']+)'/.exec(first.policy)?.[1]
    expect(nonce).toBeTruthy()
    expect(second.policy).not.toContain(nonce)
    expect(/script-src ([^;]+)/.exec(first.policy)?.[1]).not.toContain('unsafe')
    const tags = first.html.match(/<(?:script|style)[^>]*>/g) ?? []
    expect(tags.length).toBeGreaterThan(2)
    expect(tags.filter(tag => !tag.includes(`nonce="${nonce}"`))).toEqual([])
  })

  it('say nothing of what made them, and may be neither framed, sniffed nor cached as data', async () => {
    const { answer } = await policyOf('/sign-in')
    expect(answer.headers.get('x-powered-by')).toBeNull()
    expect(answer.headers.get('x-frame-options')).toBe('DENY')
    expect(answer.headers.get('x-content-type-options')).toBe('nosniff')
    expect((await fetch(`${url}/api/session`)).headers.get('cache-control')).toBe('no-store')
  })

  it('are JSON also below /api where there is no such route', async () => {
    const answer = await fetch(`${url}/api/nothing-here`)
    expect(answer.headers.get('content-type')).toContain('application/json')
    expect([401, 404]).toContain(answer.status)
  })

  it('tell that web server and database are there', async () => {
    const answer = await fetch(`${url}/api/health`)
    expect([answer.status, await answer.json()]).toEqual([200, { status: 'ok' }])
  })
})
