/** Passwords that are generated once and kept in the data folder, readable by its owner alone. */
import { randomBytes } from 'node:crypto'
import { existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { folder } from './places.mjs'

const secret = () => randomBytes(32).toString('hex')

/**
 * The secrets of a data folder, made at its first use.
 * @returns {{ id: string, superuser: string, application: string, session: string }} `id`: names this installation;
 *   `superuser` and `application`: database passwords; `session`: seals the session cookie
 */
export function secrets(dataDir) {
  const path = join(folder(dataDir), 'secrets.json')
  if (existsSync(path)) return JSON.parse(readFileSync(path, 'utf8'))
  const made = { id: randomBytes(6).toString('hex'), superuser: secret(), application: secret(), session: secret() }
  writeFileSync(`${path}.new`, JSON.stringify(made), { mode: 0o600 })
  renameSync(`${path}.new`, path)
  return made
}
