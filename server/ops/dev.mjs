/** `npm run dev`: database, Nuxt's development server and a worker that is bundled anew and started again at each change. */
import { spawn } from 'node:child_process'
import { join } from 'node:path'
import { bundleOptions, bundleWorkers } from './bundle.mjs'
import { keepUp } from './setup/children.mjs'
import { prepareTables } from './setup/database.mjs'
import { takeDataFolder } from './setup/lock.mjs'
import { ensurePackages } from './setup/packages.mjs'
import { cacheDir, dataDir, logFile, root } from './setup/places.mjs'
import { demandPort, wantedPort } from './setup/ports.mjs'
import { endRunning } from './setup/run.mjs'
import { processEnvironment, startDatabase } from './setup/stack.mjs'
import { explain, say } from './setup/words.mjs'

const stops = []
let isStopping = false

async function stop(code) {
  if (isStopping) return
  isStopping = true
  endRunning()
  for (const end of stops.reverse()) await end()
  process.exit(code)
}

/** Nuxt's server with all that it starts itself ends as one group. */
function startNuxt(port, env) {
  const child = spawn(process.execPath, ['node_modules/nuxt/bin/nuxt.mjs', 'dev', '--port', String(port), '--host', '127.0.0.1'], {
    cwd: root, env, detached: true, stdio: ['ignore', 'inherit', 'inherit'],
  })
  child.on('exit', () => stop(1))
  return async () => {
    const ended = new Promise(done => child.once('exit', done))
    try {
      process.kill(-child.pid, 'SIGTERM')
      await ended
    } catch {
      // It has ended in the meantime.
    }
  }
}

async function watchWorker(output, env) {
  const { context } = await import('esbuild')
  let worker
  const restart = {
    name: 'restart',
    setup(build) {
      build.onEnd(async ({ errors }) => {
        if (errors.length > 0 || isStopping) return
        await worker?.stop()
        worker = keepUp({
          name: 'worker', args: ['--enable-source-maps', join(output, 'workers/main.mjs')], env,
          onGivenUp: () => say(`The worker fell again and again; it starts again at the next change. See ${logFile('worker')}.`),
        })
      })
    },
  }
  const watching = await context({ ...bundleOptions(join(output, 'workers')), plugins: [restart] })
  await watching.watch()
  return async () => {
    await watching.dispose()
    await worker?.stop()
  }
}

async function start() {
  const port = wantedPort()
  takeDataFolder(dataDir, `http://127.0.0.1:${port}`)
  await demandPort(port)
  await ensurePackages()
  const demo = process.env.BAYWRIGHT_DEMO !== 'off'
  const output = join(cacheDir, 'dev')
  const database = await startDatabase(dataDir)
  stops.push(database.stop)
  await bundleWorkers(join(output, 'workers'))
  const { demoAccounts } = await prepareTables(output, { url: database.databaseUrl, demo })
  const env = { ...processEnvironment({ ...database, port, demo }), NODE_ENV: 'development' }
  stops.push(await watchWorker(output, env))
  stops.push(startNuxt(port, env))
  for (const { email, password, role } of demoAccounts) say(`  ${email}   ${password}   ${role}`)
}

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => stop(0))
try {
  await start()
} catch (error) {
  const code = explain(error)
  await stop(code)
}
