import type { NationalChoice } from '../actions'
import type { SheetContext } from './types'

/** National choice, overrides in force, values from memory. */
export function choicesOf(choice: NationalChoice, context: SheetContext): string[] {
  const fromMemory = Object.values(choice.sources).filter(({ status }) => status === 'from-memory').map(({ source }) => source)
  return [
    `National choices: ${choice.name}`,
    ...(context.overrides ?? []).map(({ name, from, to }) => `${name}: ${to} instead of ${from}, set in the basis of design`),
    ...(fromMemory.length ? [`From memory, confirm: ${[...new Set(fromMemory)].join('; ')}`] : []),
  ]
}
