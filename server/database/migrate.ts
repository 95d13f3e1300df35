import { pathToFileURL } from 'node:url'
import { Migrator, type Kysely } from 'kysely'
import { databaseUrl, openClient, type Db } from './client'
import { MIGRATIONS } from './migrations'
import { prepareQueues } from './queue'

/** Brings the tables up to date. Two at once are safe: Kysely takes a lock. Returns what was done. */
export async function migrateTables(db: Db): Promise<string[]> {
  const migrator = new Migrator({
    db: db as unknown as Kysely<unknown>,
    provider: { getMigrations: async () => MIGRATIONS },
  })
  const { error, results } = await migrator.migrateToLatest()
  if (error) {
    const failed = results?.find(result => result.status === 'Error')?.migrationName ?? 'before the first'
    throw new Error(`The database could not be brought up to date (migration ${failed}): ${String(error)}`, { cause: error })
  }
  return (results ?? []).map(result => result.migrationName)
}

/** Tables and queues of the database at `url`. */
export async function migrate(url: string): Promise<string[]> {
  const client = openClient(url, { max: 2, name: 'baywright migrate' })
  try {
    const done = await migrateTables(client.db)
    await prepareQueues(url)
    return done
  } finally {
    await client.close()
  }
}

const isScript = process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href
if (isScript) {
  try {
    await migrate(databaseUrl(process.env))
  } catch (error) {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`)
    process.exitCode = 1
  }
}
