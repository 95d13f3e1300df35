import type { Kysely } from 'kysely'
import { databaseUrl, openClient, type Client } from '../database/client'
import type { Database } from '../database/schema'
import { log } from './log'

let client: Client | undefined

/** The web process's one pool. */
export function useClient(): Client {
  client ??= openClient(databaseUrl(process.env), {
    max: 12,
    name: 'baywright web',
    onConnectionLost: error => log.warn({ error: error.message }, 'a database connection was lost'),
  })
  return client
}

export function useDb(): Kysely<Database> {
  return useClient().db
}

/** Ends the pool; the next use opens a new one. */
export async function closeDb(): Promise<void> {
  const open = client
  client = undefined
  await open?.close()
}
