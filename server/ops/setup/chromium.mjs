/** The browser of the end-to-end tests. */
import { existsSync } from 'node:fs'
import { join } from 'node:path'
import { installPackages } from './debian.mjs'
import { SetupError } from './words.mjs'

function findChromium() {
  const named = process.env.BAYWRIGHT_CHROMIUM
  if (named) {
    if (existsSync(named)) return named
    throw new SetupError(`BAYWRIGHT_CHROMIUM names ${named}, where there is no browser; correct it or unset it.`)
  }
  const folders = (process.env.PATH ?? '').split(':').filter(folder => folder !== '')
  return [...folders, '/usr/bin'].map(folder => join(folder, 'chromium')).find(existsSync)
}

/** Path of Chromium, installed from Debian's packages when it is missing. */
export async function ensureChromium() {
  const found = findChromium()
  if (found) return found
  await installPackages(['chromium'], 'Chromium (the browser of the end-to-end tests)')
  const installed = findChromium()
  if (installed) return installed
  throw new SetupError('Chromium is still missing after its installation; set BAYWRIGHT_CHROMIUM to the path of the browser.')
}
