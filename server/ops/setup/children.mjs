/** The long-running processes: started, started again when they fall, ended together. */
import { spawn } from 'node:child_process'
import { closeSync, openSync } from 'node:fs'
import { setTimeout as wait } from 'node:timers/promises'
import { logFile, root } from './places.mjs'
import { say } from './words.mjs'

const restartAfter = 1_000
const killAfter = 8_000
/** So many falls, each within `shortLife` of its start, and the process is not started again. */
const mostFalls = 5
const shortLife = 5_000

/**
 * Keeps one process up. It runs detached (Ctrl-C in a terminal must reach the starter only) with an IPC channel:
 * the process ends itself on `disconnect`, so that a killed starter leaves none behind.
 * @param {{ name: string, args: string[], env: NodeJS.ProcessEnv, onGivenUp: (name: string) => void }} wish
 */
export function keepUp({ name, args, env, onGivenUp }) {
  let child
  let isStopping = false
  let falls = 0
  const start = () => {
    const started = Date.now()
    const output = openSync(logFile(name), 'a')
    child = spawn(process.execPath, args, { cwd: root, env, detached: true, stdio: ['ignore', output, output, 'ipc'] })
    closeSync(output)
    child.on('error', () => {})
    child.once('exit', async (code, signal) => {
      if (isStopping) return
      falls = Date.now() - started < shortLife ? falls + 1 : 1
      if (falls >= mostFalls) return onGivenUp(name)
      say(`The ${name} process ended (${signal ?? `code ${code}`}); it is started again.`)
      await wait(restartAfter)
      if (!isStopping) start()
    })
  }
  const stop = async () => {
    isStopping = true
    if (!child || child.exitCode !== null || child.signalCode !== null) return
    const ended = new Promise(done => child.once('exit', done))
    child.kill('SIGTERM')
    const timer = setTimeout(() => child.kill('SIGKILL'), killAfter)
    await ended
    clearTimeout(timer)
  }
  start()
  return { stop, pid: () => child?.pid }
}
