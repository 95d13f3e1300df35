import { randomUUID } from 'node:crypto'
import type { EventHandler, EventHandlerRequest, H3Event } from 'h3'
import { log } from './log'
import { refusal } from './refusal'

/** SQLSTATE classes and driver codes that mean: the database is away for the moment. */
const AWAY = /^(08|57P0|53)|^(ECONNREFUSED|ECONNRESET|ETIMEDOUT|EPIPE|ENOTFOUND)$/
const AWAY_MESSAGES = /Connection terminated|timeout exceeded when trying to connect|connection timeout/i

/** Whether an error of the driver means that the database cannot be reached now. */
export function isDatabaseAway(error: unknown): boolean {
  if (!(error instanceof Error)) return false
  const { code } = error as Error & { code?: unknown }
  if (typeof code === 'string' && AWAY.test(code)) return true
  const inner = error instanceof AggregateError ? error.errors : []
  return AWAY_MESSAGES.test(error.message) || inner.some(isDatabaseAway)
}

/** Turns whatever went wrong into a refusal; the unforeseen gets an id that stands in the log too. */
function refusalOf(error: unknown, event: H3Event) {
  if (isError(error)) return error
  if (isDatabaseAway(error)) {
    return refusal('not-ready', 'The database does not answer at the moment. Nothing was changed; try again in a few seconds.')
  }
  const id = randomUUID()
  const { message, stack } = error instanceof Error ? error : new Error(String(error))
  log.error({ id, method: event.method, path: event.path, error: message, stack }, 'unforeseen error')
  return refusal('internal', `Something failed that should not fail. Nothing was changed as far as known; the log has it under ${id}.`, { id })
}

/** Every route of the API: its errors leave in the one shape. */
export function apiHandler<T>(handler: (event: H3Event) => Promise<T> | T): EventHandler<EventHandlerRequest, Promise<T>> {
  return defineEventHandler(async (event) => {
    try {
      return await handler(event)
    } catch (error) {
      throw refusalOf(error, event)
    }
  })
}
