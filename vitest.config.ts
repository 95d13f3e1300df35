import { fileURLToPath } from 'node:url'
import { defineVitestProject } from '@nuxt/test-utils/config'
import { defineConfig } from 'vitest/config'

const root = fileURLToPath(new URL('.', import.meta.url))
const alias = { '#shared': `${root}shared`, '~~': root.replace(/\/$/, '') }

/** The plain Node project needs no Nuxt: leaving it out keeps `npm run test:unit` quick. */
const unitOnly = process.argv.some((argument, index) =>
  argument === '--project=unit' || (argument === 'unit' && process.argv[index - 1] === '--project'))

/** A text here keeps esbuild from reading tsconfig.json, whose references exist only after `nuxi prepare`. */
const esbuild = { tsconfigRaw: '{"compilerOptions":{"target":"es2023","verbatimModuleSyntax":true}}' }

/** ms. No test measures speed: a busy machine must not fail one that only waits for its turn. */
const slowMachine = 60_000

const unit = {
  resolve: { alias },
  esbuild,
  test: {
    name: 'unit',
    environment: 'node',
    include: ['tests/{unit,published,property,architecture}/**/*.spec.ts'],
    testTimeout: slowMachine,
  },
}

export default defineConfig(async () => ({
  esbuild,
  test: {
    reporters: ['default', './tests/closing-line.ts'],
    projects: unitOnly
      ? [unit]
      : [
          unit,
          await defineVitestProject({
            test: {
              name: 'nuxt',
              environment: 'nuxt',
              environmentOptions: { nuxt: { domEnvironment: 'happy-dom' } },
              include: ['tests/components/**/*.spec.ts'],
              testTimeout: slowMachine,
              hookTimeout: slowMachine,
            },
          }),
          {
            resolve: { alias },
            esbuild,
            test: {
              name: 'server',
              environment: 'node',
              include: ['tests/api/**/*.spec.ts'],
              globalSetup: ['./tests/stack.setup.ts'],
              fileParallelism: false,
              testTimeout: 60_000,
              hookTimeout: 120_000,
            },
          },
          {
            resolve: { alias },
            esbuild,
            test: {
              name: 'e2e',
              environment: 'node',
              include: ['tests/e2e/**/*.spec.ts'],
              globalSetup: ['./tests/stack.setup.ts'],
              fileParallelism: false,
              testTimeout: 180_000,
              hookTimeout: 180_000,
            },
          },
        ],
  },
}))
