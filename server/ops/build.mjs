/** `npm run build`: builds the web server and the worker bundles when the sources are newer than the last build. */
import { createHash } from 'node:crypto'
import { existsSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs'
import { join, relative } from 'node:path'
import { pathToFileURL } from 'node:url'
import { bundleWorkers } from './bundle.mjs'
import { demandRoom } from './setup/disk.mjs'
import { logFile, outputDir, root } from './setup/places.mjs'
import { ensurePackages } from './setup/packages.mjs'
import { endRunning, lastLines, run } from './setup/run.mjs'
import { explain, say, SetupError } from './setup/words.mjs'

const sources = ['app', 'server', 'shared', 'workers', 'public', 'nuxt.config.ts', 'tailwind.config.ts', 'package-lock.json']

/** The launcher itself is no part of what it builds, but for the bundler. */
const leftOut = /^server\/ops\/(?!bundle\.mjs)./

function* filesBelow(path) {
  if (!existsSync(path) || leftOut.test(relative(root, path))) return
  if (!statSync(path).isDirectory()) {
    yield path
    return
  }
  for (const name of readdirSync(path).sort()) yield* filesBelow(join(path, name))
}

function sourcesHash() {
  const hash = createHash('sha256')
  for (const source of sources) {
    for (const file of filesBelow(join(root, source))) {
      hash.update(`${relative(root, file)}\0`).update(readFileSync(file)).update('\0')
    }
  }
  return hash.digest('hex')
}

/**
 * Builds when the sources differ from those of the last build in that folder.
 * @returns {Promise<boolean>} whether a build was needed
 */
export async function ensureBuild(output = outputDir) {
  const mark = join(output, 'sources.sha256')
  const hash = sourcesHash()
  if (existsSync(mark) && readFileSync(mark, 'utf8') === hash) return false
  demandRoom(output, 300, 'the build')
  say('Building …')
  const log = logFile('build')
  const { code } = await run(process.execPath, ['node_modules/nuxt/bin/nuxt.mjs', 'build'], {
    log, env: { ...process.env, NODE_ENV: 'production', BAYWRIGHT_OUTPUT_DIR: output },
  })
  if (code !== 0) throw new SetupError(`the build failed; its last lines were:\n${lastLines(log, 30)}`)
  await bundleWorkers(join(output, 'workers'))
  writeFileSync(mark, hash)
  return true
}

if (process.argv[1] && import.meta.url === pathToFileURL(process.argv[1]).href) {
  for (const signal of ['SIGINT', 'SIGTERM']) {
    process.once(signal, () => {
      endRunning()
      process.exit(130)
    })
  }
  try {
    await ensurePackages()
    say(await ensureBuild() ? 'Built.' : 'The build is up to date.')
  } catch (error) {
    process.exit(explain(error))
  }
}
