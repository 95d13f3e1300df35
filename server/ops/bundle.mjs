/** Bundles what runs outside Nitro: the worker and its threads, the headless command, migrations and seed. */
import { existsSync, readdirSync } from 'node:fs'
import { join } from 'node:path'
import { root } from './setup/places.mjs'

const singles = [
  'workers/main.ts',
  'workers/headless.ts',
  'server/database/client.ts',
  'server/database/migrate.ts',
  'server/database/seed.ts',
  'server/database/new-account.ts',
]

function entries() {
  const threads = join(root, 'workers/threads')
  const files = existsSync(threads) ? readdirSync(threads).filter(name => name.endsWith('.ts')) : []
  return [
    ...singles.filter(path => existsSync(join(root, path))).map(path => ({
      in: join(root, path), out: path.split('/').at(-1).replace(/\.ts$/, ''),
    })),
    ...files.map(name => ({ in: join(threads, name), out: `threads/${name.replace(/\.ts$/, '')}` })),
  ]
}

/** esbuild's options for the entries given; packages stay outside and are read from node_modules. */
export function bundleOptions(outdir, entryPoints = entries()) {
  return {
    entryPoints,
    outdir,
    outExtension: { '.js': '.mjs' },
    bundle: true,
    format: 'esm',
    platform: 'node',
    target: 'node20',
    packages: 'external',
    sourcemap: true,
    logLevel: 'warning',
    absWorkingDir: root,
    // A text here keeps esbuild from reading tsconfig.json, whose references exist only after `nuxi prepare`.
    tsconfigRaw: '{"compilerOptions":{"target":"es2023","verbatimModuleSyntax":true}}',
    alias: { '#shared': join(root, 'shared'), '~~': root },
  }
}

/** Writes the bundles to `outdir`/*.mjs and `outdir`/threads/*.mjs. */
export async function bundleWorkers(outdir) {
  const { build } = await import('esbuild')
  await build(bundleOptions(outdir))
}
