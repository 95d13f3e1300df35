import { createError, type H3Error } from 'h3'
import type { ApiErrorBody, ApiErrorCode } from '#shared/schemas/api'

const STATUS: Record<ApiErrorCode, [number, string]> = {
  'malformed': [400, 'Bad Request'],
  'not-signed-in': [401, 'Unauthorized'],
  'wrong-credentials': [401, 'Unauthorized'],
  'not-allowed': [403, 'Forbidden'],
  'foreign-origin': [403, 'Forbidden'],
  'not-found': [404, 'Not Found'],
  'stale-version': [409, 'Conflict'],
  'cannot-be-framed': [422, 'Unprocessable Content'],
  'last-engineer': [422, 'Unprocessable Content'],
  'too-many-tries': [429, 'Too Many Requests'],
  'internal': [500, 'Internal Server Error'],
  'not-ready': [503, 'Service Unavailable'],
}

/** The one shape of a refusal: a code of the closed list, a sentence, and where it lies. */
export function refusal(code: ApiErrorCode, message: string, more: { path?: string } & Record<string, unknown> = {}): H3Error {
  const [statusCode, statusMessage] = STATUS[code]
  const data: ApiErrorBody & Record<string, unknown> = { code, message, ...more }
  return createError({ statusCode, statusMessage, message, data })
}

/** 404 for what is missing and for what is not the asker's: the answer tells no difference. */
export function notFound(what: string): H3Error {
  const people = what === 'project' ? 'its people' : 'the people of its project'
  return refusal('not-found', `This ${what} does not exist, or you are not one of ${people}. Ask the engineer of the project to add you.`)
}

/** 404 for a part of what the asker may read. */
export function missing(part: string, whole: string): H3Error {
  return refusal('not-found', `This ${whole} has no such ${part}.`)
}

/** A project keeps one engineer at least, or nobody could add another. */
export function lastEngineer(): H3Error {
  return refusal('last-engineer', 'This is the last scheme engineer of the project. Make another person scheme engineer first.')
}
