/** Programs that come from Debian's packages. */
import { existsSync } from 'node:fs'
import { join } from 'node:path'
import { logFile } from './places.mjs'
import { lastLines, run } from './run.mjs'
import { say, SetupError } from './words.mjs'

/** Whether a program of that name stands in the search path. */
export function isInPath(program) {
  return (process.env.PATH ?? '').split(':').some(folder => folder !== '' && existsSync(join(folder, program)))
}

/** What stands before a command that changes the machine: nothing for root, sudo where it asks for no password. */
async function privilege() {
  if (process.getuid() === 0) return []
  if (isInPath('sudo') && (await run('sudo', ['-n', 'true'], { quiet: true })).code === 0) return ['sudo', '-n']
  return undefined
}

/**
 * Installs Debian packages; the package lists are fetched first when they do not know the packages.
 * @param {string[]} packages names
 * @param {string} purpose what is missing, as the subject of the sentence of a failure
 * @throws {SetupError} when there is no apt-get, no right to use it, or it fails
 */
export async function installPackages(packages, purpose) {
  const byHand = `apt-get install ${packages.join(' ')}`
  if (!isInPath('apt-get')) {
    throw new SetupError(`${purpose} is missing and this system has no apt-get; install it with the system's own package manager and run the command again.`)
  }
  const prefix = await privilege()
  if (prefix === undefined) {
    throw new SetupError(`${purpose} is missing and this account may not install packages; run "sudo ${byHand}" once and then the command again.`)
  }
  say(`Installing ${packages.join(', ')} from Debian's packages …`)
  const apt = async (args, log) => {
    const [program, ...rest] = [...prefix, 'env', 'DEBIAN_FRONTEND=noninteractive', 'apt-get', '-y', '-q', '-o', 'DPkg::Lock::Timeout=300', ...args]
    return (await run(program, rest, { log })).code
  }
  const log = logFile('apt')
  const install = ['install', '--no-install-recommends', ...packages]
  let code = await apt(install, log)
  if (code !== 0 && await apt(['update'], logFile('apt-update')) === 0) code = await apt(install, log)
  if (code !== 0) {
    throw new SetupError(`${purpose} is missing and "${byHand}" failed; run it by hand as root, mend what it says, and run the command again. Its last lines were:\n${lastLines(log)}`)
  }
}
