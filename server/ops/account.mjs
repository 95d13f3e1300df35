/**
 * `npm run account -- --email a@b.example --name "First Last" --practice "Name" [--role engineer] [--administrator]`:
 * adds an account, beside a running application or without one. The password is generated and printed once;
 * BAYWRIGHT_NEW_PASSWORD gives one of your own.
 */
import { randomBytes } from 'node:crypto'
import { join } from 'node:path'
import { pathToFileURL } from 'node:url'
import { parseArgs } from 'node:util'
import { bundleWorkers } from './bundle.mjs'
import { holder } from './setup/lock.mjs'
import { ensurePackages } from './setup/packages.mjs'
import { cacheDir, dataDir } from './setup/places.mjs'
import { startDatabase } from './setup/stack.mjs'
import { explain, SetupError } from './setup/words.mjs'

const usage = 'npm run account -- --email name@practice.example --name "First Last" --practice "Practice" [--role engineer|architect|cost-planner|checker] [--administrator]'

function readWish() {
  const text = { type: 'string' }
  try {
    const { values } = parseArgs({
      options: { email: text, name: text, practice: text, role: text, administrator: { type: 'boolean', default: false } },
    })
    if (!values.email || !values.name || !values.practice) throw new Error('e-mail, name and practice are needed')
    return values
  } catch (error) {
    throw new SetupError(`${error.message}; write it as ${usage}.`)
  }
}

async function addAccount() {
  const { email, name, practice, role, administrator } = readWish()
  await ensurePackages()
  const folder = join(cacheDir, 'account')
  await bundleWorkers(folder)
  const load = file => import(pathToFileURL(join(folder, file)).href)
  const [{ openClient }, { migrate }, { createAccount }] = await Promise.all(['client.mjs', 'migrate.mjs', 'new-account.mjs'].map(load))
  const isRunning = holder(dataDir) !== undefined
  const database = await startDatabase(dataDir)
  try {
    await migrate(database.databaseUrl)
    const { db, close } = openClient(database.databaseUrl, { max: 2, name: 'baywright account' })
    const password = process.env.BAYWRIGHT_NEW_PASSWORD ?? randomBytes(12).toString('base64url')
    try {
      await createAccount(db, { email, name, practice, role: role ?? null, isAdministrator: administrator, password })
    } catch (error) {
      throw new SetupError(`the account was not made. ${error.message}`)
    } finally {
      await close()
    }
    const shown = process.env.BAYWRIGHT_NEW_PASSWORD ? 'with the password that you gave' : `with the password ${password}   (shown this once)`
    process.stdout.write(`${email} may sign in ${shown}\n`)
  } finally {
    if (!isRunning) await database.stop()
  }
}

try {
  await addAccount()
} catch (error) {
  process.exitCode = explain(error)
}
