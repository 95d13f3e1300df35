/** Child programs of the set-up: never synchronous, so that a signal to the starter reaches them. */
import { spawn } from 'node:child_process'
import { createWriteStream, readFileSync } from 'node:fs'
import { root } from './places.mjs'

const running = new Set()

/**
 * Runs a program to its end.
 * @param {string} command program
 * @param {string[]} args its arguments
 * @param {{ cwd?: string, env?: NodeJS.ProcessEnv, log?: string, uid?: number, gid?: number, quiet?: boolean }} options
 *   `log`: file that takes all output; without it the output goes to standard error, or is kept when `quiet`
 * @returns {Promise<{ code: number, output: string }>} code 127 when the program is missing; output only when `quiet`
 */
export function run(command, args, options = {}) {
  const { cwd = root, env = process.env, log, uid, gid, quiet = false } = options
  const captures = Boolean(log) || quiet
  return new Promise((done) => {
    const child = spawn(command, args, {
      cwd, env, uid, gid, detached: true,
      stdio: ['ignore', captures ? 'pipe' : process.stderr, captures ? 'pipe' : process.stderr],
    })
    const file = log ? createWriteStream(log) : undefined
    let output = ''
    const take = (chunk) => {
      if (quiet) output += chunk
      file?.write(chunk)
    }
    child.stdout?.on('data', take)
    child.stderr?.on('data', take)
    running.add(child)
    const finish = (code) => {
      running.delete(child)
      if (file) file.end(() => done({ code, output }))
      else done({ code, output })
    }
    child.on('error', error => finish(error.code === 'ENOENT' ? 127 : 126))
    child.on('close', (code, signal) => finish(signal ? 128 : code ?? 1))
  })
}

/** Ends every program that `run` still waits for, with all it has started. */
export function endRunning() {
  for (const child of running) {
    try {
      process.kill(-child.pid, 'SIGTERM')
    } catch {
      // It has ended in the meantime.
    }
  }
}

/** The last lines of a log, indented, to stand under the sentence of a failure. */
export function lastLines(log, count = 15) {
  try {
    const lines = readFileSync(log, 'utf8').trimEnd().split('\n').slice(-count)
    return lines.map(line => `  ${line}`).join('\n')
  } catch {
    return ''
  }
}
