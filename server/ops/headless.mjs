/**
 * `npm run --silent headless -- <sections|members|study>`: the engine without server and database.
 * Bundles the command when its sources have changed and runs it; only its answer goes to standard output.
 */
import { spawn } from 'node:child_process'
import { createHash } from 'node:crypto'
import { existsSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { bundleOptions } from './bundle.mjs'
import { cacheDir, root } from './setup/places.mjs'
import { explain, SetupError } from './setup/words.mjs'

const folder = join(cacheDir, 'headless')
const bundle = join(folder, 'headless.mjs')
const record = join(folder, 'sources.json')

function hashOf(paths) {
  const hash = createHash('sha256')
  for (const path of paths) {
    const file = join(root, path)
    hash.update(path).update('\0').update(existsSync(file) ? readFileSync(file) : 'missing').update('\0')
  }
  return hash.digest('hex')
}

/** Whether the bundle was made from the files as they are now. */
function isCurrent() {
  if (!existsSync(bundle) || !existsSync(record)) return false
  const { sources, hash } = JSON.parse(readFileSync(record, 'utf8'))
  return hashOf(sources) === hash
}

/** Bundles beside its place and moves it there, so that two commands at once do not read half a file. */
async function makeBundle() {
  if (!existsSync(join(root, 'node_modules/esbuild'))) {
    throw new SetupError('the npm packages are missing; run "npm ci" first.')
  }
  const { build } = await import('esbuild')
  const staging = join(folder, `staging-${process.pid}`)
  mkdirSync(staging, { recursive: true })
  try {
    const options = bundleOptions(staging, [{ in: join(root, 'workers/headless.ts'), out: 'headless' }])
    const { metafile } = await build({ ...options, sourcemap: 'inline', metafile: true, logLevel: 'silent' })
    const sources = [...Object.keys(metafile.inputs).sort(), 'package-lock.json']
    writeFileSync(join(staging, 'sources.json'), JSON.stringify({ sources, hash: hashOf(sources) }))
    renameSync(join(staging, 'headless.mjs'), bundle)
    renameSync(join(staging, 'sources.json'), record)
  } finally {
    rmSync(staging, { recursive: true, force: true })
  }
}

try {
  if (!isCurrent()) await makeBundle()
  const child = spawn(process.execPath, ['--enable-source-maps', bundle, ...process.argv.slice(2)], { stdio: 'inherit' })
  for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => child.kill(signal))
  child.on('exit', (code, signal) => process.exit(signal ? 130 : code ?? 1))
} catch (error) {
  process.exitCode = explain(error)
}
