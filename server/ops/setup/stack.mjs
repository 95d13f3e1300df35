/** The running application: cluster, tables, web server, worker. Used by `npm start`, `npm run dev` and the tests. */
import { join } from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { startCluster } from './cluster.mjs'
import { applicationUrl, ensureRoleAndDatabase, superuserUrl } from './database.mjs'
import { logFile } from './places.mjs'
import { ensureServer } from './postgres-server.mjs'
import { lastLines } from './run.mjs'
import { secrets } from './secrets.mjs'
import { SetupError } from './words.mjs'

/**
 * Starts the private cluster of a data folder with the application's role and database.
 * @returns {Promise<{ port: number, databaseUrl: string, adminUrl: string, keys: ReturnType<typeof secrets>, stop: () => Promise<void> }>}
 */
export async function startDatabase(dataDir, { durable = true } = {}) {
  const bin = await ensureServer()
  const keys = secrets(dataDir)
  const cluster = await startCluster({ bin, path: join(dataDir, 'postgres'), name: keys.id, password: keys.superuser, durable })
  try {
    await ensureRoleAndDatabase(cluster.port, keys)
  } catch (error) {
    await cluster.stop()
    throw error
  }
  return {
    port: cluster.port,
    databaseUrl: applicationUrl(cluster.port, keys.application),
    adminUrl: superuserUrl(cluster.port, keys.superuser),
    keys,
    stop: cluster.stop,
  }
}

/** Environment of the web server and the worker. */
export function processEnvironment({ databaseUrl, keys, port, demo }) {
  return {
    ...process.env,
    NODE_ENV: 'production',
    HOST: '127.0.0.1',
    PORT: String(port),
    DATABASE_URL: databaseUrl,
    NUXT_SESSION_PASSWORD: keys.session,
    NITRO_SHUTDOWN_TIMEOUT: '3000',
    BAYWRIGHT_DEMO: demo ? 'on' : 'off',
    BAYWRIGHT_URL: process.env.BAYWRIGHT_URL ?? `http://127.0.0.1:${port}`,
  }
}

/**
 * Waits until the health route answers 200.
 * @param {string} address of the web server
 * @param {number} seconds longest wait
 */
export async function waitUntilHealthy(address, seconds = 60) {
  const end = Date.now() + seconds * 1000
  while (Date.now() < end) {
    try {
      const answer = await fetch(`${address}/api/health`)
      if (answer.ok) return
    } catch {
      // It does not listen yet.
    }
    await wait(50)
  }
  throw new SetupError(`the web server did not answer within ${seconds} s; mend what its last lines say and run the command again:\n${lastLines(logFile('web'))}`)
}
