import { spawn } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { createServer } from 'node:net'
import type { AddressInfo, Server } from 'node:net'
import { tmpdir } from 'node:os'
import { join, resolve } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { ensureChromium } from '../../../server/ops/setup/chromium.mjs'
import { freePort } from '../../../server/ops/setup/cluster.mjs'
import { installPackages } from '../../../server/ops/setup/debian.mjs'
import { demandRoom } from '../../../server/ops/setup/disk.mjs'
import { holder, takeDataFolder } from '../../../server/ops/setup/lock.mjs'
import { demandPort, wantedPort } from '../../../server/ops/setup/ports.mjs'
import { secrets } from '../../../server/ops/setup/secrets.mjs'
import { SetupError } from '../../../server/ops/setup/words.mjs'

const root = resolve(import.meta.dirname, '../../..')
let dataDir: string
let held: Server | undefined

beforeEach(() => {
  dataDir = mkdtempSync(join(tmpdir(), 'baywright-unit-'))
})

afterEach(async () => {
  await new Promise<void>(done => held ? held.close(() => done()) : done())
  held = undefined
  rmSync(dataDir, { recursive: true, force: true })
})

function hold(): Promise<number> {
  const server = createServer()
  held = server
  return new Promise(done => server.listen(0, '127.0.0.1', () => done((server.address() as AddressInfo).port)))
}

function start(env: Record<string, string>): Promise<{ code: number | null, output: string }> {
  return new Promise((done) => {
    const child = spawn(process.execPath, [join(root, 'server/ops/start.mjs')], {
      env: { ...process.env, BAYWRIGHT_DATA_DIR: dataDir, ...env },
    })
    let output = ''
    child.stdout.on('data', chunk => output += String(chunk))
    child.stderr.on('data', chunk => output += String(chunk))
    child.on('close', code => done({ code, output: output.trim() }))
  })
}

describe('the port of the web server', () => {
  it('is BAYWRIGHT_PORT before PORT before 3000', () => {
    expect(wantedPort({ BAYWRIGHT_PORT: '4001', PORT: '4002' })).toBe(4001)
    expect(wantedPort({ PORT: '4002' })).toBe(4002)
    expect(wantedPort({})).toBe(3000)
  })

  it.each(['', '0', '65536', '3000.5', 'http'])('is refused when it is "%s"', (text) => {
    expect(() => wantedPort({ PORT: text })).toThrow(SetupError)
  })

  it('is demanded without a word when it is free', async () => {
    await expect(demandPort(await freePort())).resolves.toBeUndefined()
  })

  it('stops the start with one sentence and code 1 when it is taken', async () => {
    const port = await hold()
    const { code, output } = await start({ BAYWRIGHT_PORT: String(port) })
    expect(code).toBe(1)
    expect(output.split('\n')).toHaveLength(1)
    expect(output).toContain(`port ${port} is taken by another program`)
    expect(output).toContain('choose another port')
  })
})

describe('the data folder', () => {
  it('belongs to one starter at a time', async () => {
    writeFileSync(join(dataDir, 'starter.json'), JSON.stringify({ pid: process.pid, address: 'http://127.0.0.1:3000' }))
    const { code, output } = await start({ BAYWRIGHT_PORT: String(await freePort()) })
    expect(code).toBe(1)
    expect(output).toContain(`already runs from this folder (process ${process.pid}, http://127.0.0.1:3000)`)
  })

  it('is free again when its starter has ended', async () => {
    const child = spawn(process.execPath, ['-e', ''])
    await new Promise(done => child.on('exit', done))
    writeFileSync(join(dataDir, 'starter.json'), JSON.stringify({ pid: child.pid }))
    expect(holder(dataDir)).toBeUndefined()
    expect(() => takeDataFolder(dataDir, 'http://127.0.0.1:3000')).not.toThrow()
  })

  it('keeps the secrets that were made first, each of them different and long', () => {
    const made = secrets(dataDir)
    expect(secrets(dataDir)).toEqual(made)
    expect(new Set([made.superuser, made.application, made.session]).size).toBe(3)
    expect(made.session.length).toBeGreaterThanOrEqual(32)
  })
})

describe('what cannot be had', () => {
  it('names the free room and what it is needed for', () => {
    expect(() => demandRoom(dataDir, 1e12, 'the database')).toThrow(/only \d+ MB are free .* are needed for the database; free some space/)
    expect(() => demandRoom(join(dataDir, 'not/yet/there'), 0, 'the database')).not.toThrow()
  })

  it('says so where there is no apt-get', async () => {
    const path = process.env.PATH
    process.env.PATH = dataDir
    try {
      await expect(installPackages(['postgresql'], 'The PostgreSQL server')).rejects.toThrow(/The PostgreSQL server is missing and this system has no apt-get/)
    } finally {
      process.env.PATH = path
    }
  })

  it('says so where BAYWRIGHT_CHROMIUM names no browser', async () => {
    const named = process.env.BAYWRIGHT_CHROMIUM
    process.env.BAYWRIGHT_CHROMIUM = join(dataDir, 'chromium')
    try {
      await expect(ensureChromium()).rejects.toThrow(/where there is no browser; correct it or unset it/)
    } finally {
      if (named === undefined) delete process.env.BAYWRIGHT_CHROMIUM
      else process.env.BAYWRIGHT_CHROMIUM = named
    }
  })
})
