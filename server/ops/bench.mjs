/** `npm run bench [-- name]`: bundles and runs the benchmarks of tests/bench, one after the other. */
import { existsSync, readdirSync } from 'node:fs'
import { join } from 'node:path'
import { spawn } from 'node:child_process'
import { bundleOptions } from './bundle.mjs'
import { ensurePackages } from './setup/packages.mjs'
import { cacheDir, root } from './setup/places.mjs'
import { explain, SetupError } from './setup/words.mjs'

const source = join(root, 'tests/bench')

function benchmarks(wanted) {
  const all = existsSync(source)
    ? readdirSync(source).filter(name => name.endsWith('.bench.ts')).map(name => name.replace('.bench.ts', '')).sort()
    : []
  const chosen = wanted.length === 0 ? all : all.filter(name => wanted.includes(name))
  if (chosen.length === 0) {
    throw new SetupError(`there is no benchmark ${wanted.join(', ')}; there are: ${all.join(', ')}.`)
  }
  return chosen
}

function runOne(file) {
  return new Promise((done) => {
    spawn(process.execPath, ['--enable-source-maps', file], { cwd: root, stdio: 'inherit' }).on('exit', code => done(code ?? 1))
  })
}

try {
  await ensurePackages()
  const { build } = await import('esbuild')
  const names = benchmarks(process.argv.slice(2))
  const outdir = join(cacheDir, 'bench')
  const threads = join(root, 'workers/threads')
  const threadFiles = existsSync(threads) ? readdirSync(threads).filter(name => name.endsWith('.ts')) : []
  await build(bundleOptions(outdir, [
    ...names.map(name => ({ in: join(source, `${name}.bench.ts`), out: `${name}.bench` })),
    ...threadFiles.map(name => ({ in: join(threads, name), out: `threads/${name.replace('.ts', '')}` })),
  ]))
  for (const name of names) {
    process.stdout.write(`\n${name}\n`)
    const code = await runOne(join(outdir, `${name}.bench.mjs`))
    if (code !== 0) process.exitCode = 1
  }
} catch (error) {
  process.exitCode = explain(error)
}
