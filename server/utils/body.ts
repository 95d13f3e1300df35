import type { H3Event } from 'h3'
import type { z } from 'zod'
import { refusal } from './refusal'

/** Bytes of the largest document accepted. */
const MOST_BYTES = 4_000_000

/** `plate.zones[2].width`, as the contracts write paths. */
export function pathOf(keys: readonly PropertyKey[]): string {
  return keys.reduce<string>((path, key) => {
    if (typeof key === 'number') return `${path}[${key}]`
    return path === '' ? String(key) : `${path}.${String(key)}`
  }, '')
}

async function readText(event: H3Event): Promise<string> {
  const tooLarge = () => refusal('malformed', `The document is larger than ${MOST_BYTES / 1_000_000} MB. Split it, or leave out what is not needed.`)
  if (Number(getRequestHeader(event, 'content-length') ?? 0) > MOST_BYTES) throw tooLarge()
  const chunks: Buffer[] = []
  let bytes = 0
  for await (const chunk of event.node.req as AsyncIterable<Buffer>) {
    bytes += chunk.length
    if (bytes > MOST_BYTES) throw tooLarge()
    chunks.push(chunk)
  }
  return new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(chunks))
}

/** PostgreSQL keeps no NUL and no half of a surrogate pair in a text. */
function hasUnstorableText(value: unknown): boolean {
  if (typeof value === 'string') return value.includes('\0') || !value.isWellFormed()
  if (Array.isArray(value)) return value.some(hasUnstorableText)
  if (typeof value !== 'object' || value === null) return false
  return Object.entries(value).some(([key, entry]) => hasUnstorableText(key) || hasUnstorableText(entry))
}

async function readJson(event: H3Event): Promise<unknown> {
  try {
    const document: unknown = JSON.parse(await readText(event))
    if (hasUnstorableText(document)) throw new RangeError('unstorable')
    return document
  } catch (error) {
    if (isError(error)) throw error
    throw refusal('malformed', 'The request holds no readable JSON document in UTF-8. Send one JSON object.', { path: '' })
  }
}

/** The first thing that is wrong with a document, as a refusal with its path. */
export function malformed(error: z.ZodError): ReturnType<typeof refusal> {
  const issue = error.issues[0]
  const keys = issue?.code === 'unrecognized_keys' ? [...issue.path, issue.keys[0] ?? ''] : issue?.path ?? []
  const path = pathOf(keys)
  const reason = issue?.code === 'unrecognized_keys' ? 'this field is not known; remove it' : issue?.message ?? 'not valid'
  return refusal('malformed', path === '' ? `The document is not valid: ${reason}.` : `${path}: ${reason}${reason.endsWith('.') ? '' : '.'}`, { path })
}

/** The request's JSON document, checked by `schema`; 400 with the path of what is wrong. */
export async function readDocument<S extends z.ZodType>(event: H3Event, schema: S): Promise<z.output<S>> {
  const result = schema.safeParse(await readJson(event))
  if (!result.success) throw malformed(result.error)
  return result.data
}

/** The address's query, checked by `schema`; 400 with the name of what is wrong. */
export function readQuery<S extends z.ZodType>(event: H3Event, schema: S): z.output<S> {
  const result = schema.safeParse(getQuery(event))
  if (!result.success) throw malformed(result.error)
  return result.data
}
