/**
 * `npm test [-- vitest arguments]`: packages, PostgreSQL, Chromium, build, then lint, types and every suite.
 * The last line is `N passed, N failed, N skipped`; lint and types count as one each.
 */
import { readFileSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { spawn } from 'node:child_process'
import { ensureBuild } from './build.mjs'
import { ensureChromium } from './setup/chromium.mjs'
import { holder } from './setup/lock.mjs'
import { ensurePackages } from './setup/packages.mjs'
import { cacheDir, dataDir, folder, outputDir, root } from './setup/places.mjs'
import { ensureServer } from './setup/postgres-server.mjs'
import { endRunning, run } from './setup/run.mjs'
import { explain, say } from './setup/words.mjs'

let suites

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
  process.on(signal, () => {
    endRunning()
    if (suites) suites.kill('SIGINT')
    else process.exit(130)
  })
}

/** A running application keeps its own build: the tests then build beside it. */
function testOutput() {
  return holder(dataDir) ? join(cacheDir, 'test-output') : outputDir
}

async function check(name, args) {
  say(`${name} is checked …`)
  const { code, output } = await run(process.execPath, args, { quiet: true })
  if (code !== 0) process.stdout.write(`${output}\n`)
  say(`${name}: ${code === 0 ? 'clean' : 'failed'}`)
  return code === 0
}

function runSuites(env) {
  return new Promise((done) => {
    suites = spawn(process.execPath, ['node_modules/vitest/vitest.mjs', 'run', ...process.argv.slice(2)], {
      cwd: root, env, stdio: ['ignore', 'inherit', 'inherit'],
    })
    suites.on('exit', code => done(code ?? 1))
  })
}

/** Adds the two checks to what the suites counted and writes the closing line. */
function close(checks, suitesCode, countsFile) {
  let counts = { passed: 0, failed: 1, skipped: 0 }
  try {
    counts = JSON.parse(readFileSync(countsFile, 'utf8'))
  } catch {
    say('The suites ended before they could be counted.')
  }
  const passed = counts.passed + checks.filter(Boolean).length
  const failed = counts.failed + checks.filter(isClean => !isClean).length
  const isGreen = failed === 0 && suitesCode === 0
  const total = isGreen || failed > 0 ? failed : 1
  process.stdout.write(`${passed} passed, ${total} failed, ${counts.skipped} skipped\n`)
  return isGreen ? 0 : 1
}

try {
  await ensurePackages()
  await ensureServer()
  const chromium = await ensureChromium()
  const output = testOutput()
  await ensureBuild(output)
  const checks = await Promise.all([
    check('Lint', ['node_modules/eslint/bin/eslint.js', '.', '--max-warnings', '0']),
    check('Types', ['node_modules/nuxt/bin/nuxt.mjs', 'typecheck']),
  ])
  const countsFile = join(folder(cacheDir), `counts-${process.pid}.json`)
  const code = await runSuites({
    ...process.env, BAYWRIGHT_OUTPUT_DIR: output, BAYWRIGHT_CHROMIUM: chromium, BAYWRIGHT_COUNTS: countsFile,
  })
  process.exitCode = close(checks, code, countsFile)
  rmSync(countsFile, { force: true })
} catch (error) {
  process.exitCode = explain(error)
  process.stdout.write('0 passed, 1 failed, 0 skipped\n')
}
