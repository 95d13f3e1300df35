/** Where the set-up keeps things. Every place can be moved by an environment variable, so that two copies can run side by side. */
import { existsSync, mkdirSync } from 'node:fs'
import { dirname, join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'

export const root = resolve(dirname(fileURLToPath(import.meta.url)), '../../..')
export const dataDir = resolve(root, process.env.BAYWRIGHT_DATA_DIR ?? '.data')
export const outputDir = resolve(root, process.env.BAYWRIGHT_OUTPUT_DIR ?? '.output')
export const cacheDir = join(root, 'node_modules/.cache/baywright')

/** Makes the folder (with its parents) when it is missing and returns it. */
export function folder(...parts) {
  const path = join(...parts)
  if (!existsSync(path)) mkdirSync(path, { recursive: true })
  return path
}

/** The log file of that name, its folder made. */
export function logFile(name) {
  return join(folder(dataDir, 'log'), `${name}.log`)
}
