/**
 * Global set-up of the projects `server` and `e2e`: a private cluster, a migrated template with the demo in it,
 * one database cloned from it, web server and worker of the last build. `npm test` builds first; a run of these
 * projects by hand takes the build that is there.
 */
import { existsSync, mkdtempSync, chmodSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type { TestProject } from 'vitest/node'
import { ensureChromium } from '../server/ops/setup/chromium.mjs'
import { prepareTables } from '../server/ops/setup/database.mjs'
import { outputDir } from '../server/ops/setup/places.mjs'
import { startDatabase } from '../server/ops/setup/stack.mjs'
import { cloneDatabase, startWeb, startWorker } from './stack'
import type { StackAddress } from './stack'

declare module 'vitest' {
  export interface ProvidedContext {
    /** Address of the web server. */
    url: string
    /** Database of the running web server and worker. */
    databaseUrl: string
    stack: StackAddress
    chromium: string
  }
}

async function makeTemplate(url: string, adminUrl: string) {
  const { default: pg } = await import('pg')
  await prepareTables(outputDir, { url, demo: true })
  const admin = new pg.Client({ connectionString: adminUrl })
  await admin.connect()
  await admin.query('alter database baywright with is_template true allow_connections false')
  await admin.end()
}

export default async function setup(project: TestProject) {
  if (!existsSync(join(outputDir, 'server/index.mjs'))) throw new Error('There is no build yet: run `npm run build` first.')
  const dataDir = mkdtempSync(join(tmpdir(), 'baywright-test-'))
  // The cluster runs as another account when root runs the tests.
  chmodSync(dataDir, 0o755)
  const stops: (() => Promise<void>)[] = [async () => rmSync(dataDir, { recursive: true, force: true })]
  const teardown = async () => {
    for (const stop of stops.reverse()) await stop()
  }
  try {
    const database = await startDatabase(dataDir, { durable: false })
    stops.push(database.stop)
    await makeTemplate(database.databaseUrl, database.adminUrl)
    const stack: StackAddress = {
      outputDir,
      adminUrl: database.adminUrl,
      applicationUrl: database.databaseUrl,
      templateDatabase: 'baywright',
      sessionPassword: database.keys.session,
    }
    const clone = await cloneDatabase(stack)
    const web = await startWeb(stack, clone.databaseUrl)
    stops.push(web.stop)
    const worker = await startWorker(stack, clone.databaseUrl)
    stops.push(worker.stop)
    project.provide('stack', stack)
    project.provide('url', web.url)
    project.provide('databaseUrl', clone.databaseUrl)
    if (project.name === 'e2e') project.provide('chromium', await ensureChromium())
  } catch (error) {
    await teardown()
    throw error
  }
  return teardown
}
