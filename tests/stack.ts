/** Databases and processes of their own for tests that kill, restart or count them. */
import { spawn } from 'node:child_process'
import type { ChildProcess } from 'node:child_process'
import { randomBytes } from 'node:crypto'
import { join } from 'node:path'
import pg from 'pg'
import { freePort } from '../server/ops/setup/cluster.mjs'
import { waitUntilHealthy } from '../server/ops/setup/stack.mjs'

/** What a test needs to start more of the application; `inject('stack')` gives it. */
export interface StackAddress {
  outputDir: string
  /** Superuser's address of the cluster. */
  adminUrl: string
  /** The application role's address of the template. */
  applicationUrl: string
  templateDatabase: string
  sessionPassword: string
}

export interface OwnProcess {
  pid: number
  child: ChildProcess
  /** All that it has written, both streams. */
  output: () => string
  /** SIGTERM, and SIGKILL after 8 s; resolves when it has ended. */
  stop: () => Promise<void>
}

async function asSuperuser(stack: StackAddress, statement: string) {
  const client = new pg.Client({ connectionString: stack.adminUrl })
  await client.connect()
  try {
    await client.query(statement)
  } finally {
    await client.end()
  }
}

/** A database of one's own, migrated and with the demo in it; drop it when the test ends. */
export async function cloneDatabase(stack: StackAddress) {
  const name = `test_${randomBytes(6).toString('hex')}`
  await asSuperuser(stack, `create database ${name} template ${stack.templateDatabase} owner baywright`)
  const url = new URL(stack.applicationUrl)
  url.pathname = `/${name}`
  return { databaseUrl: url.href, drop: () => asSuperuser(stack, `drop database if exists ${name} with (force)`) }
}

function startProcess(stack: StackAddress, script: string, env: NodeJS.ProcessEnv): OwnProcess {
  const child = spawn(process.execPath, ['--enable-source-maps', join(stack.outputDir, script)], {
    env: {
      ...process.env,
      NODE_ENV: 'production',
      NUXT_SESSION_PASSWORD: stack.sessionPassword,
      NITRO_SHUTDOWN_TIMEOUT: '3000',
      BAYWRIGHT_DEMO: 'on',
      ...env,
    },
    stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
  })
  let text = ''
  for (const stream of [child.stdout, child.stderr]) {
    stream?.on('data', (chunk: Buffer) => {
      text += chunk.toString()
    })
  }
  const stop = async () => {
    if (child.exitCode !== null || child.signalCode !== null) return
    const ended = new Promise<void>(done => child.once('exit', () => done()))
    child.kill('SIGTERM')
    const timer = setTimeout(() => child.kill('SIGKILL'), 8_000)
    await ended
    clearTimeout(timer)
  }
  return { pid: child.pid ?? 0, child, output: () => text, stop }
}

/** A web server on that database; resolves when its health route answers. */
export async function startWeb(stack: StackAddress, databaseUrl: string, port?: number) {
  const chosen = port ?? await freePort()
  const url = `http://127.0.0.1:${chosen}`
  const web = startProcess(stack, 'server/index.mjs', {
    DATABASE_URL: databaseUrl, HOST: '127.0.0.1', PORT: String(chosen), BAYWRIGHT_URL: url,
  })
  try {
    await waitUntilHealthy(url, 30)
  } catch (error) {
    await web.stop()
    throw new Error(`The web server did not start:\n${web.output()}`, { cause: error })
  }
  return { ...web, url }
}

/** A worker on that database; resolves when it says that it takes jobs. */
export async function startWorker(stack: StackAddress, databaseUrl: string) {
  const worker = startProcess(stack, 'workers/main.mjs', { DATABASE_URL: databaseUrl })
  await new Promise<void>((done, fail) => {
    worker.child.once('message', () => done())
    worker.child.once('exit', code => fail(new Error(`The worker ended (code ${code}):\n${worker.output()}`)))
  })
  return worker
}
