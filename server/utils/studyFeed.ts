import pg from 'pg'
import type { StudyProgress } from '#shared/schemas/api'
import { databaseUrl } from '../database/client'
import { findProgress } from '../database/queries/studies'
import { PROGRESS_CHANNEL } from '../database/queue'
import { useDb } from './db'
import { log } from './log'

type Listener = (progress: StudyProgress) => void

const AGAIN_AFTER_MS = 500

const listeners = new Map<string, Set<Listener>>()
let connection: pg.Client | undefined
let isConnecting = false
/** Studies that are being read; `true` where another word came meanwhile. */
const reading = new Map<string, boolean>()

/** Reads a study once for all who watch it. Words that come while it is read make one more read. */
async function tell(studyId: string): Promise<void> {
  if (!listeners.has(studyId)) return
  if (reading.has(studyId)) {
    reading.set(studyId, true)
    return
  }
  reading.set(studyId, false)
  try {
    const progress = await findProgress(useDb(), studyId)
    if (progress) for (const listener of listeners.get(studyId) ?? []) listener(progress)
  } catch (error) {
    log.warn({ studyId, error: String(error) }, 'progress could not be read')
  }
  const again = reading.get(studyId)
  reading.delete(studyId)
  if (again) await tell(studyId)
}

/** One listening connection for the whole process; after a loss every watched study is read anew. */
async function connect(): Promise<void> {
  if (connection || isConnecting) return
  isConnecting = true
  const client = new pg.Client({ connectionString: databaseUrl(process.env), application_name: 'baywright web feed', keepAlive: true })
  const lost = () => {
    if (connection === client) connection = undefined
    if (listeners.size > 0) setTimeout(connect, AGAIN_AFTER_MS).unref()
  }
  client.on('error', () => {})
  client.on('notification', ({ payload }) => {
    if (payload) void tell(payload)
  })
  try {
    await client.connect()
    await client.query(`listen ${PROGRESS_CHANNEL}`)
    connection = client
    client.once('end', lost)
    for (const studyId of listeners.keys()) void tell(studyId)
  } catch (error) {
    log.warn({ error: String(error) }, 'the progress feed could not connect')
    await client.end().catch(() => {})
    lost()
  } finally {
    isConnecting = false
  }
}

/** Calls `listener` on each progress of a study until the function that it returns is called. */
export function watchStudy(studyId: string, listener: Listener): () => void {
  const watching = listeners.get(studyId) ?? new Set<Listener>()
  watching.add(listener)
  listeners.set(studyId, watching)
  void connect()
  return () => {
    watching.delete(listener)
    if (watching.size === 0 && listeners.get(studyId) === watching) listeners.delete(studyId)
  }
}

/** Ends the listening connection. */
export async function closeFeed(): Promise<void> {
  listeners.clear()
  const open = connection
  connection = undefined
  await open?.end().catch(() => {})
}
