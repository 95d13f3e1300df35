/** The PostgreSQL server's programs: where they are, and how they get there. */
import { existsSync, mkdirSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { installPackages } from './debian.mjs'
import { SetupError } from './words.mjs'

const oldestMajor = 14

/** Folders that may hold the programs, best first; BAYWRIGHT_PG_BIN_DIRS replaces the search. */
function candidateFolders() {
  const named = process.env.BAYWRIGHT_PG_BIN_DIRS
  if (named !== undefined) return named.split(':').filter(folder => folder !== '')
  const debian = '/usr/lib/postgresql'
  const majors = existsSync(debian) ? readdirSync(debian).map(Number).filter(major => major >= oldestMajor) : []
  return [
    ...majors.sort((a, b) => b - a).map(major => join(debian, String(major), 'bin')),
    ...(process.env.PATH ?? '').split(':').filter(folder => folder !== ''),
  ]
}

function findServer() {
  return candidateFolders().find(folder => existsSync(join(folder, 'initdb')) && existsSync(join(folder, 'postgres')))
}

/**
 * Debian starts a public cluster with the server's installation; Baywright wants a private one only. The setting
 * that keeps it from being made belongs to root; with sudo the public cluster is made and does no harm.
 */
async function installServer() {
  const purpose = 'The PostgreSQL server'
  if (process.getuid() !== 0) return installPackages(['postgresql'], purpose)
  const settings = '/etc/postgresql-common/createcluster.d/baywright.conf'
  await installPackages(['postgresql-common'], purpose)
  mkdirSync(dirname(settings), { recursive: true })
  writeFileSync(settings, 'create_main_cluster = false\n')
  try {
    await installPackages(['postgresql'], purpose)
  } finally {
    rmSync(settings, { force: true })
  }
}

/**
 * Folder of `initdb` and `postgres`; installs the server when it is missing.
 * @throws {SetupError} when no server is to be had
 */
export async function ensureServer() {
  const found = findServer()
  if (found) return found
  await installServer()
  const installed = findServer()
  if (installed) return installed
  throw new SetupError(`no PostgreSQL server (version ${oldestMajor} or later) was found after its installation; `
    + 'set BAYWRIGHT_PG_BIN_DIRS to the folder that holds initdb and postgres.')
}
