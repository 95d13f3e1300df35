import { z } from 'zod'
import { EngineError } from '#shared/engine/errors'

/** What bad input is answered with, on standard error. */
export interface Failure { code: string, message: string, path: string }

/** `[0].point[2].at` */
export function pathText(path: readonly PropertyKey[]): string {
  return path.reduce<string>((text, key) => {
    if (typeof key === 'number') return `${text}[${key}]`
    return text === '' ? String(key) : `${text}.${String(key)}`
  }, '')
}

function joined(prefix: string, path: string): string {
  if (prefix === '' || path === '') return prefix + path
  return path.startsWith('[') ? prefix + path : `${prefix}.${path}`
}

function firstIssue(error: z.ZodError): Failure {
  const issue = error.issues[0]!
  const path = pathText(issue.path)
  if (issue.code === 'unrecognized_keys') {
    return { code: 'unknown-field', message: `There is no field "${issue.keys[0]}".`, path: joined(path, issue.keys[0]!) }
  }
  if (issue.code === 'custom' && typeof issue.params?.code === 'string') {
    return { code: issue.params.code, message: issue.message, path }
  }
  return { code: 'invalid-value', message: issue.message, path }
}

/** Bad input of any kind as one failure; null for what is no fault of the input. */
export function failureOf(error: unknown, prefix = ''): Failure | null {
  if (error instanceof z.ZodError) return firstIssue(error)
  if (error instanceof EngineError) return { code: error.code, message: error.message, path: joined(prefix, error.path) }
  if (error instanceof SyntaxError) return { code: 'invalid-json', message: error.message, path: '' }
  return null
}

/** What is no fault of the input: answered in the same form, with exit code 1. */
export function internalFailure(error: unknown): Failure {
  return { code: 'internal', message: error instanceof Error ? `${error.name}: ${error.message}` : String(error), path: '' }
}
