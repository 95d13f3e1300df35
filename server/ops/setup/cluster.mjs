/** A private PostgreSQL cluster on loopback: made once, started, adopted when it still runs, stopped. */
import { spawn } from 'node:child_process'
import { randomBytes } from 'node:crypto'
import {
  chownSync, closeSync, existsSync, mkdirSync, openSync, readFileSync, renameSync, rmSync, statSync, writeFileSync,
} from 'node:fs'
import { createServer } from 'node:net'
import { dirname, join } from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { demandRoom } from './disk.mjs'
import { logFile } from './places.mjs'
import { lastLines, run } from './run.mjs'
import { SetupError } from './words.mjs'

/** Settings of a cluster that serves one application on one machine; `durable: false` is for tests only. */
function settings(port, durable) {
  const values = {
    listen_addresses: '127.0.0.1',
    port,
    // A socket's path may have 107 bytes: a clone deep in the tree would not start.
    unix_socket_directories: '',
    max_connections: 100,
    shared_buffers: '128MB',
    password_encryption: 'scram-sha-256',
    ...(durable ? {} : { fsync: 'off', synchronous_commit: 'off', full_page_writes: 'off' }),
  }
  return Object.entries(values).flatMap(([name, value]) => ['-c', `${name}=${value}`])
}

/** A port of loopback that nothing listens on at this moment. */
export function freePort() {
  return new Promise((done, fail) => {
    const server = createServer()
    server.once('error', fail)
    server.listen(0, '127.0.0.1', () => {
      const { port } = server.address()
      server.close(() => done(port))
    })
  })
}

async function systemUser() {
  const [uid, gid] = await Promise.all(['-u', '-g'].map(flag => run('id', [flag, 'postgres'], { quiet: true })))
  const home = await run('getent', ['passwd', 'postgres'], { quiet: true })
  if (uid.code !== 0 || gid.code !== 0) {
    throw new SetupError('PostgreSQL refuses to run as root and there is no account "postgres" to run it as; '
      + 'create one with "adduser --system --group postgres", or run the command as an ordinary user.')
  }
  return { uid: Number(uid.output), gid: Number(gid.output), home: home.output.split(':')[5] || '/var/lib/postgresql' }
}

/**
 * Where the cluster lives and as whom it runs. As root it is the account postgres; where that account cannot
 * reach the folder (a clone under /root), the cluster stands in the account's home under a name of its own.
 */
async function chooseHome(wanted, name) {
  if (process.getuid() !== 0) {
    if (existsSync(wanted) && statSync(wanted).uid !== process.getuid()) {
      throw new SetupError(`${wanted} belongs to another account (made by root?); run the command as that account, or remove the folder and its data with it.`)
    }
    return { path: wanted }
  }
  const user = await systemUser()
  const parent = dirname(wanted)
  mkdirSync(parent, { recursive: true })
  const reach = await run('test', ['-x', parent], { quiet: true, uid: user.uid, gid: user.gid, cwd: '/' })
  const path = reach.code === 0 ? wanted : join(user.home, `baywright-${name}`)
  return { path, uid: user.uid, gid: user.gid }
}

async function initialise(bin, home, password) {
  demandRoom(home.path, 300, 'the database')
  // Made beside its place and moved there when it is whole: a start that is killed leaves no half of a cluster.
  const staging = `${home.path}.new`
  rmSync(staging, { recursive: true, force: true })
  mkdirSync(staging, { recursive: true, mode: 0o700 })
  if (home.uid !== undefined) chownSync(staging, home.uid, home.gid)
  const passwordFile = `${staging}-${randomBytes(6).toString('hex')}`
  writeFileSync(passwordFile, password, { mode: 0o600 })
  if (home.uid !== undefined) chownSync(passwordFile, home.uid, home.gid)
  const log = logFile('initdb')
  try {
    const { code } = await run(join(bin, 'initdb'), [
      '--pgdata', staging, '--username', 'postgres', '--pwfile', passwordFile, '--auth', 'scram-sha-256',
      '--encoding', 'UTF8', '--locale', 'C.UTF-8', '--no-instructions',
    ], { log, uid: home.uid, gid: home.gid, cwd: '/' })
    if (code !== 0) {
      throw new SetupError(`the database could not be made in ${home.path}; mend what its last lines say and run the command again:\n${lastLines(log)}`)
    }
    renameSync(staging, home.path)
  } finally {
    rmSync(passwordFile, { force: true })
  }
}

/** Whether that process is a live PostgreSQL: one that has ended and waits for its parent is not. */
function isPostgres(pid) {
  try {
    const [, name, state] = /\((.*)\) (\S)/.exec(readFileSync(`/proc/${pid}/stat`, 'utf8')) ?? []
    return name === 'postgres' && state !== 'Z'
  } catch {
    return false
  }
}

/** The server that runs on this cluster, from its postmaster.pid: line 1 process, line 4 port, line 8 state. */
function runningServer(path) {
  try {
    const lines = readFileSync(join(path, 'postmaster.pid'), 'utf8').split('\n')
    const pid = Number(lines[0])
    if (!isPostgres(pid)) return undefined
    return { pid, port: Number(lines[3]), isReady: lines[7]?.trim() === 'ready' }
  } catch {
    return undefined
  }
}

async function waitUntilReady(path, child, log) {
  let hasEnded = false
  child?.once('exit', () => {
    hasEnded = true
  })
  for (let round = 0; round < 600 && !hasEnded; round += 1) {
    const server = runningServer(path)
    if (server?.isReady) return server
    await wait(100)
  }
  throw new SetupError(`the database did not start; mend what its last lines say and run the command again:\n${lastLines(log)}`)
}

async function startServer(bin, home, durable, log) {
  const port = await freePort()
  const output = openSync(log, 'a')
  const child = spawn(join(bin, 'postgres'), ['-D', home.path, ...settings(port, durable)], {
    cwd: home.path, uid: home.uid, gid: home.gid, detached: true, stdio: ['ignore', output, output],
  })
  child.on('error', () => {})
  child.unref()
  closeSync(output)
  return waitUntilReady(home.path, child, log)
}

/** Ends the server by SIGINT (fast: open transactions are rolled back) and waits until it has gone, 10 s at most. */
async function stopServer(pid) {
  try {
    process.kill(pid, 'SIGINT')
    for (let round = 0; round < 200 && isPostgres(pid); round += 1) await wait(50)
  } catch {
    // It has ended in the meantime.
  }
}

/**
 * Starts the cluster, which is made first when the folder is empty; a server that still runs on it is adopted.
 * @param {{ bin: string, path: string, name: string, password: string, durable?: boolean }} wish `bin`: folder of the
 *   server's programs; `path`: folder of the cluster; `name`: names the cluster where `path` cannot be reached
 * @returns {Promise<{ port: number, path: string, isNew: boolean, stop: () => Promise<void> }>}
 */
export async function startCluster({ bin, path, name, password, durable = true }) {
  const home = await chooseHome(path, name)
  const log = logFile('postgres')
  let isNew = false
  let server = runningServer(home.path)
  if (server && !server.isReady) server = await waitUntilReady(home.path, undefined, log)
  if (!server) {
    if (!existsSync(join(home.path, 'PG_VERSION'))) {
      await initialise(bin, home, password)
      isNew = true
    }
    server = await startServer(bin, home, durable, log)
  }
  const { pid, port } = server
  return { port, path: home.path, isNew, stop: () => stopServer(pid) }
}
