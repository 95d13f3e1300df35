/** Words for what the engine answers about a ranked study. */
import { formatNumber } from '#shared/utils/format'
import { parseSchemeKey, type AnsweredArrangement, type RationalisedScheme, type Robustness, type RobustnessCase, type RobustnessEntry } from '#shared/engine/search'
import type { WhyNotQuestion } from '#shared/schemas/answers'
import type { Direction } from '#shared/schemas/study'
import { parseBays } from '../plate/lengths'
import { baysInWords } from './bays'
import { KIND_WORDS, directionInWords, panelsInWords, type AxisNames } from './words'

export interface WhyNotForm {
  by: 'bays' | 'number'
  number: number | null
  baysX: string
  baysY: string
  direction: Direction | 'any'
  divisions: number | 'any'
}

export type FormProblem = { field: 'number' | 'baysX' | 'baysY' | 'form', sentence: string }

/** The question that the form asks, or what it lacks. */
export function whyNotQuestion(form: WhyNotForm): { question: WhyNotQuestion } | { problem: FormProblem } {
  if (form.by === 'number') {
    return form.number === null
      ? { problem: { field: 'number', sentence: 'Write the number of an arrangement.' } }
      : { question: { number: form.number } }
  }
  const bays: { baysX?: number[], baysY?: number[] } = {}
  for (const field of ['baysX', 'baysY'] as const) {
    if (form[field].trim() === '') continue
    const read = parseBays(form[field])
    if ('problem' in read) return { problem: { field, sentence: read.problem } }
    bays[field] = read.value
  }
  const question = {
    ...bays,
    ...(form.direction === 'any' ? {} : { primaryDirection: form.direction }),
    ...(form.divisions === 'any' ? {} : { divisions: form.divisions }),
  }
  return Object.keys(question).length === 0
    ? { problem: { field: 'form', sentence: 'Write bays, or choose a direction or a number of panels.' } }
    : { question }
}

/** "6 @ 9.0 by 2 @ 7.5, 6.0 m, 3 panels, primaries along numbers". */
export function arrangementInWords({ baysX, baysY, regions }: AnsweredArrangement, names: AxisNames): string {
  const framings = new Set(regions.map(region => `${panelsInWords(region.divisions)}, primaries ${directionInWords(region.direction, names)}`))
  return `${baysInWords(baysX)} by ${baysInWords(baysY)} m, ${[...framings].join('; ')}`
}

/** Kinds of members that share a list of sections. */
export function listInWords(list: string, most: number): string {
  const known = KIND_WORDS as Record<string, string>
  if (list === 'plate') return `With ${most}:`
  const word = known[list] ?? list
  return `${word.charAt(0).toUpperCase()}${word.slice(1)}s:`
}

/** "optimal", "best found, gap 0.3", "proved impossible", "none found". */
export function stepProof({ status, found, gap }: RationalisedScheme): string {
  if (status === 'optimal') return 'optimal'
  if (status === 'impossible') return 'proved impossible'
  if (!found) return 'none found'
  const perArea = gap * found.massPerArea / found.mass
  return `best found, gap ${perArea < 0.05 ? 'under 0.1' : formatNumber(perArea, 1)}`
}

const CASE_WORDS: Record<RobustnessCase['name'], string> = {
  'as-searched': 'As searched',
  'imposed-load': 'Imposed load +10 %',
  'moved-line': 'A line moved',
  'depth-cap': 'Depth −50 mm',
}

export function caseInWords({ name }: RobustnessCase): string {
  return CASE_WORDS[name]
}

/** How an entry stands in its case: the lightest, equal to it (under 3 %), or by how much it is heavier. */
export function standingInWords(entry: RobustnessEntry, { entries }: RobustnessCase): string {
  if (entry.massPerArea === null) return 'no scheme'
  const lightest = Math.min(...entries.map(each => each.massPerArea ?? Infinity))
  if (entry.massPerArea === lightest) return 'lightest'
  return entry.isInFront ? 'equal' : `+${formatNumber(entry.massPerArea - lightest, 1)}`
}

/** The answer in a sentence. */
export function robustnessInWords({ cases, alwaysInFront }: Robustness): string {
  const numbers = (cases[0]?.entries ?? []).filter(({ key }) => alwaysInFront.includes(key)).map(({ number }) => formatNumber(number))
  if (numbers.length === 0) return 'No scheme stays in front in every case: the ranking rests on what was assumed.'
  const names = numbers.length === 1 ? `Scheme ${numbers[0]} stays` : `Schemes ${numbers.slice(0, -1).join(', ')} and ${numbers.at(-1)} stay`
  return `${names} in front in every case.`
}

/** ", beams ≤ 540" where the sizes of a scheme were chosen under a depth cap; else nothing. */
export function capInWords(key: string): string {
  const cap = parseSchemeKey(key)?.depthCap ?? null
  return cap === null ? '' : `, beams ≤ ${formatNumber(cap)}`
}

/** "2.1 kg/m² lighter, 30 mm shallower"; what is equal is left out. */
export function differenceInWords({ lighter, shallower }: { lighter: number, shallower: number }): string {
  const parts = [
    ...(lighter >= 0.05 ? [`${formatNumber(lighter, 1)} kg/m² lighter`] : lighter > 0 ? ['less than 0.1 kg/m² lighter'] : []),
    ...(shallower >= 0.5 ? [`${formatNumber(shallower)} mm shallower`] : shallower > 0 ? ['less than 1 mm shallower'] : []),
  ]
  return parts.length === 0 ? 'as heavy and as deep' : parts.join(', ')
}
