/** One starter for one data folder: a second one would stop the database under the first. */
import { readFileSync, readlinkSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { folder } from './places.mjs'
import { SetupError } from './words.mjs'

function isStarter(pid) {
  try {
    process.kill(pid, 0)
    return /node/.test(readlinkSync(`/proc/${pid}/exe`))
  } catch (error) {
    return error.code === 'EPERM'
  }
}

/** The process and address that hold the data folder at this moment, or undefined. */
export function holder(dataDir) {
  try {
    const held = JSON.parse(readFileSync(join(dataDir, 'starter.json'), 'utf8'))
    return held.pid !== process.pid && isStarter(held.pid) ? held : undefined
  } catch {
    return undefined
  }
}

/**
 * Takes the data folder for this process; given back when the process ends.
 * @throws {SetupError} when another starter holds it, or it cannot be written
 */
export function takeDataFolder(dataDir, address) {
  const other = holder(dataDir)
  if (other) {
    throw new SetupError(`it already runs from this folder (process ${other.pid}${other.address ? `, ${other.address}` : ''}); use that one, or stop it with "kill ${other.pid}" first.`)
  }
  const path = join(dataDir, 'starter.json')
  try {
    folder(dataDir)
    writeFileSync(path, JSON.stringify({ pid: process.pid, address }))
  } catch (error) {
    if (error.code === 'ENOSPC') throw error
    throw new SetupError(`the data folder ${dataDir} cannot be written (${error.code}); mend its rights, or name another folder in BAYWRIGHT_DATA_DIR.`)
  }
  process.once('exit', () => rmSync(path, { force: true }))
}
