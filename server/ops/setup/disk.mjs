/** Room on the disk, asked before something large is written. */
import { existsSync, statfsSync } from 'node:fs'
import { dirname } from 'node:path'
import { SetupError } from './words.mjs'

/**
 * Throws a SetupError when the disk of that folder has less room than `megabytes`.
 * @param {string} path a folder, which need not exist yet
 * @param {number} megabytes room that is needed, MB
 * @param {string} purpose what it is needed for, in words that follow "for"
 */
export function demandRoom(path, megabytes, purpose) {
  let existing = path
  while (!existsSync(existing)) existing = dirname(existing)
  const { bavail, bsize } = statfsSync(existing)
  const free = Math.floor(bavail * bsize / 1e6)
  if (free < megabytes) {
    throw new SetupError(`only ${free} MB are free on the disk of ${existing}, and about ${megabytes} MB are needed for ${purpose}; `
      + 'free some space there, or clone into a folder on another disk, and run the command again.')
  }
}
