/** The npm packages, installed from the lock when it has changed since the last installation. */
import { createHash } from 'node:crypto'
import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { demandRoom } from './disk.mjs'
import { logFile, root } from './places.mjs'
import { lastLines, run } from './run.mjs'
import { say, SetupError } from './words.mjs'

const mark = join(root, 'node_modules/.baywright-lock')

function lockHash() {
  return createHash('sha256').update(readFileSync(join(root, 'package-lock.json'))).digest('hex')
}

/** Whether node_modules belongs to this lock: by our own mark, or by npm's copy of the lock where npm was run by hand. */
function isInstalled(hash) {
  if (existsSync(mark) && readFileSync(mark, 'utf8') === hash) return true
  const installed = join(root, 'node_modules/.package-lock.json')
  if (!existsSync(installed)) return false
  const packagesOf = file => JSON.parse(readFileSync(file, 'utf8')).packages
  const wanted = packagesOf(join(root, 'package-lock.json'))
  const present = packagesOf(installed)
  return Object.entries(wanted).every(([path, entry]) =>
    path === '' || entry.optional || entry.peer || present[path]?.version === entry.version)
}

/** Refuses an unsuited Node.js by one sentence instead of a crash in a package. */
export function demandNode() {
  const [major, minor] = process.versions.node.split('.').map(Number)
  if (major !== 20 || minor < 19) {
    throw new SetupError(`Node.js ${process.versions.node} is running, and Node.js 20.19 or a later 20 is needed; switch to it and run the command again.`)
  }
}

async function install(hash) {
  demandRoom(root, 1500, 'the npm packages')
  say('Installing the npm packages from the lock …')
  const log = logFile('npm')
  // With NODE_ENV=production npm would leave out what the build needs.
  const { code } = await run('npm', ['ci', '--include=dev', '--no-audit', '--no-fund'], { log })
  if (code !== 0) {
    throw new SetupError(`the npm packages could not be installed; check that the npm registry can be reached, and run the command again. npm said:\n${lastLines(log)}`)
  }
  writeFileSync(mark, hash)
}

/** Nuxt's generated types and lint configuration: npm makes them after an installation, and they may be deleted. */
async function ensurePrepared() {
  if (['tsconfig.app.json', 'eslint.config.mjs'].every(name => existsSync(join(root, '.nuxt', name)))) return
  const log = logFile('prepare')
  const env = { ...process.env, BAYWRIGHT_BUILD_DIR: '' }
  const { code } = await run(process.execPath, ['node_modules/nuxt/bin/nuxt.mjs', 'prepare'], { log, env })
  if (code !== 0) throw new SetupError(`the sources could not be prepared; the last lines were:\n${lastLines(log)}`)
}

/** Makes node_modules what package-lock.json says, and .nuxt what the sources say. */
export async function ensurePackages() {
  demandNode()
  const hash = lockHash()
  if (!isInstalled(hash)) await install(hash)
  else if (!existsSync(mark) || readFileSync(mark, 'utf8') !== hash) writeFileSync(mark, hash)
  await ensurePrepared()
}
