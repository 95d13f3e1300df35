/** `npm start`: installs, builds and starts all that is needed, and stops it on Ctrl-C. Nothing but Node.js is taken for granted. */
import { join } from 'node:path'
import { ensureBuild } from './build.mjs'
import { keepUp } from './setup/children.mjs'
import { prepareTables } from './setup/database.mjs'
import { takeDataFolder } from './setup/lock.mjs'
import { ensurePackages } from './setup/packages.mjs'
import { dataDir, logFile, outputDir } from './setup/places.mjs'
import { demandPort, wantedPort } from './setup/ports.mjs'
import { endRunning, lastLines } from './setup/run.mjs'
import { processEnvironment, startDatabase, waitUntilHealthy } from './setup/stack.mjs'
import { explain, say, SetupError } from './setup/words.mjs'

const started = []
let isStopping = false

async function stop(code) {
  if (isStopping) return
  isStopping = true
  endRunning()
  // Those started last end first: the database outlives what uses it.
  const [database, ...processes] = started
  await Promise.all(processes.map(part => part.stop()))
  await database?.stop()
  process.exit(code)
}

function stopOnSignals() {
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
    process.on(signal, () => {
      if (!isStopping) say('\nStopping …')
      stop(0)
    })
  }
  // npm that is killed outright sends no signal: this process is then handed to another parent.
  const parent = process.ppid
  setInterval(() => {
    if (process.ppid !== parent) stop(0)
  }, 1_000).unref()
}

function announce({ address, tables, seconds }) {
  const lines = [``, `Baywright is running at ${address}   (ready after ${seconds} s; Ctrl-C stops it)`]
  if (tables.demoAccounts.length > 0) {
    lines.push('', 'Demo accounts (invented; BAYWRIGHT_DEMO=off starts without them):')
    const width = Math.max(...tables.demoAccounts.map(({ email }) => email.length))
    for (const { email, password, role } of tables.demoAccounts) {
      lines.push(`  ${email.padEnd(width)}   ${password}   ${role}`)
    }
  } else if (!tables.hasAccounts) {
    lines.push('', 'Nobody may sign in yet. Add the first account with:',
      '  npm run account -- --email name@practice.example --name "First Last" --practice "Practice" --role engineer --administrator')
  }
  process.stdout.write(`${lines.join('\n')}\n\n`)
}

async function start() {
  const began = Date.now()
  const demo = process.env.BAYWRIGHT_DEMO !== 'off'
  const port = wantedPort()
  const address = `http://127.0.0.1:${port}`
  takeDataFolder(dataDir, address)
  await demandPort(port)
  await ensurePackages()
  await ensureBuild()
  const database = await startDatabase(dataDir)
  started.push(database)
  const tables = await prepareTables(outputDir, { url: database.databaseUrl, demo })
  const env = processEnvironment({ ...database, port, demo })
  const giveUp = (name) => {
    say(`\nBaywright: the ${name} process fell again and again; its last lines were:\n${lastLines(logFile(name))}`)
    stop(1)
  }
  for (const [name, script] of [['web', 'server/index.mjs'], ['worker', 'workers/main.mjs']]) {
    started.push(keepUp({ name, args: ['--enable-source-maps', join(outputDir, script)], env, onGivenUp: giveUp }))
  }
  await waitUntilHealthy(address)
  announce({ address, tables, seconds: ((Date.now() - began) / 1000).toFixed(1) })
}

stopOnSignals()
try {
  await start()
} catch (error) {
  if (!isStopping) {
    const code = explain(error)
    await stop(error instanceof SetupError ? 1 : code)
  }
}
