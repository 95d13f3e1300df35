/**
 * What zod says of a value that does not fit, in one sentence: shown as it is by the API and by `headless`.
 * The schemas of plate and basis import this file, and every document is checked with them at hand.
 */
import { z } from 'zod'

const KINDS: Record<string, string> = {
  number: 'a number', int: 'a whole number', string: 'a text', boolean: 'true or false', array: 'a list', tuple: 'a list', object: 'an object', record: 'an object',
}

const COUNTED: Record<string, [string, string]> = { string: ['character', 'characters'], array: ['entry', 'entries'] }

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1)

function kindOf(input: unknown): string {
  if (input === null) return 'null'
  if (Array.isArray(input)) return 'a list'
  return KINDS[typeof input] ?? typeof input
}

function typeSentence(expected: string, input: unknown): string | undefined {
  const wanted = KINDS[expected]
  if (!wanted) return undefined
  if (input === undefined) return `This value is missing; ${wanted} is needed.`
  const given = typeof input === 'number' ? String(input) : kindOf(input)
  return `${capital(wanted)} is needed, not ${given}.`
}

function sizeSentence(bound: 'at least' | 'at most', limit: number | bigint, origin: string): string {
  const [one, many] = COUNTED[origin] ?? ['', '']
  const unit = limit === 1 ? one : many
  const verb = limit === 1 || unit === '' ? 'is' : 'are'
  return `${capital(bound)} ${limit}${unit && ` ${unit}`} ${verb} ${bound === 'at least' ? 'needed' : 'allowed'}.`
}

z.config({
  customError: (issue) => {
    switch (issue.code) {
      case 'invalid_type': return typeSentence(issue.expected, issue.input)
      case 'too_small': return sizeSentence('at least', issue.minimum, issue.origin)
      case 'too_big': return sizeSentence('at most', issue.maximum, issue.origin)
      case 'invalid_value': {
        const values = issue.values.map(value => typeof value === 'string' ? value : String(value))
        return values.length === 1 ? `Only ${values[0]} is allowed here.` : `One of ${values.join(', ')} is needed.`
      }
      default: return undefined
    }
  },
})
