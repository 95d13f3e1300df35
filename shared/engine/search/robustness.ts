/** Does the front of the ranking hold when what was assumed changes a little? */
import type { SchemeRow } from '#shared/schemas/api'
import type { Plate } from '#shared/schemas/plate'
import type { StudyInput } from '#shared/schemas/study'
import { grams } from '../quantities'
import type { NumberedArrangement } from './arrangements'
import { movedGrids } from './movedLines'
import { sizeOffered } from './offered'
import { type PreparedStudy, prepareStudy } from './prepare'
import { parseSchemeKey } from './rows'
import { type NoScheme, type Scheme, frameForSizing, isNoScheme } from './schemes'
import { areEquallyHeavy } from './study'

export type RobustnessCaseName = 'as-searched' | 'imposed-load' | 'moved-line' | 'depth-cap'

export interface RobustnessEntry {
  key: string
  number: number
  /** null: no scheme any more, with the reason. */
  massPerArea: number | null
  depth: number | null
  reason: string | null
  /** Among the lightest of the case: within 3 % counts as equal. */
  isInFront: boolean
  /** Moved lines only: how many moves were tried, and how many of them give no scheme. */
  moves?: { tried: number, failed: number }
}

export interface RobustnessCase {
  name: RobustnessCaseName
  /** Said in full: what was changed. */
  change: string
  /** In the order of the schemes asked about. */
  entries: RobustnessEntry[]
}

export interface Robustness {
  cases: RobustnessCase[]
  /** Keys of the schemes that are in front in every case. */
  alwaysInFront: string[]
}

/** Schemes asked about where no number is given: what a page shows, and a bound on the time. */
export const ASKED_SCHEMES = 6
const MORE_IMPOSED = 1.1
const LESS_DEPTH = 50

/** @param rows the kept schemes, ranked; the first `count` arrangements are asked about */
export function robustness(study: PreparedStudy, rows: readonly SchemeRow[], count = ASKED_SCHEMES): Robustness {
  const asked = firstArrangements(rows, count)
  if (asked.length === 0) return { cases: [], alwaysInFront: [] }
  const cases = [searched(asked), underMoreLoad(study, asked), ...withMovedLines(study, asked), underLessDepth(study, asked)]
  const alwaysInFront = asked.map(row => row.key).filter((_, n) => cases.every(({ entries }) => entries[n]!.isInFront))
  return { cases, alwaysInFront }
}

/** One row for each arrangement, the lightest. */
function firstArrangements(rows: readonly SchemeRow[], count: number): SchemeRow[] {
  const first = new Map<number, SchemeRow>()
  for (const row of rows) if (first.size < count && !first.has(row.number)) first.set(row.number, row)
  return [...first.values()]
}

function searched(asked: readonly SchemeRow[]): RobustnessCase {
  return {
    name: 'as-searched', change: 'As searched.',
    entries: inFront(asked.map(({ key, number, massPerArea, depth }) => ({ key, number, massPerArea, depth, reason: null }))),
  }
}

function underMoreLoad(study: PreparedStudy, asked: readonly SchemeRow[]): RobustnessCase {
  const heavier = prepareStudy({ ...study.input, plate: withImposed(study.input.plate, MORE_IMPOSED) })
  return {
    name: 'imposed-load', change: 'Imposed loads 10 % higher.',
    entries: inFront(asked.map(row => entryOf(row, sizedAgain(heavier, heavier.arrangements.at(row.number), capOfKey(row))))),
  }
}

/** Every imposed load of the floors times a factor: floor, zones and line loads; the roof keeps its own. */
function withImposed(plate: Plate, factor: number): Plate {
  const times = <T extends { variable: number }>(load: T): T => ({ ...load, variable: load.variable * factor })
  return { ...plate, floorLoad: times(plate.floorLoad), zones: plate.zones.map(times), lineLoads: plate.lineLoads.map(times) }
}

function underLessDepth(study: PreparedStudy, asked: readonly SchemeRow[]): RobustnessCase {
  const cap = (study.input.range.depthCap ?? asked[0]!.depth) - LESS_DEPTH
  return {
    name: 'depth-cap', change: `No beam deeper than ${Math.round(cap)} mm, 50 mm less than ${study.input.range.depthCap === null ? 'the first scheme' : 'the range allows'}.`,
    entries: inFront(asked.map(row => entryOf(row, sizedAgain(study, study.arrangements.at(row.number), Math.min(cap, capOfKey(row) ?? cap))))),
  }
}

/** One grid line moved by one module, or one equal bay more or less: the heaviest of all moves that still give a scheme. */
function withMovedLines(study: PreparedStudy, asked: readonly SchemeRow[]): RobustnessCase[] {
  const moves = asked.map(row => movedGrids(study.input, study.arrangements.at(row.number).grid))
  if (moves.every(grids => grids.length === 0)) return []
  const entries = asked.map((row, n) => {
    const arrangement = study.arrangements.at(row.number)
    const results = moves[n]!.map(grid => sizedAgain(study, { ...arrangement, grid }, capOfKey(row)))
    const schemes = results.flatMap(result => isNoScheme(result) ? [] : [result])
    const moved = { tried: results.length, failed: results.length - schemes.length }
    const heaviest = schemes.reduce<Scheme | null>((a, b) => a && grams(a.mass.mass) >= grams(b.mass.mass) ? a : b, null)
    return { ...entryOf(row, heaviest ?? results.find(isNoScheme) ?? NOTHING_MOVES), moves: moved }
  })
  return [{ name: 'moved-line', change: movedWords(study.input), entries: inFront(entries) }]
}

const NOTHING_MOVES: NoScheme = { rejection: 'buildability', detail: 'No grid line of this arrangement can move.' }

function movedWords({ range }: StudyInput): string {
  const words = (['x', 'y'] as const).flatMap((axis) => {
    const bays = range[axis]
    return bays.kind === 'fixed' ? [] : [bays.kind === 'module' ? `one line along ${axis} moved by ${bays.module} mm` : `one bay more or less along ${axis}`]
  })
  return `Heaviest with ${words.join(', or ')}.`
}

function capOfKey(row: SchemeRow): number | null {
  return parseSchemeKey(row.key)?.depthCap ?? null
}

function sizedAgain(study: PreparedStudy, arrangement: NumberedArrangement, depthCap: number | null): Scheme | NoScheme {
  const prepared = frameForSizing(study, arrangement)
  return isNoScheme(prepared) ? prepared : sizeOffered(study, arrangement, prepared, depthCap)
}

type Entry = Omit<RobustnessEntry, 'isInFront'>

function entryOf({ key, number }: SchemeRow, result: Scheme | NoScheme): Entry {
  if (isNoScheme(result)) return { key, number, massPerArea: null, depth: null, reason: result.detail }
  return { key, number, massPerArea: result.mass.massPerArea, depth: result.sized.depth, reason: null }
}

/** Marks what is lightest in its case, and what is as good as equal to that. */
function inFront(entries: readonly Entry[]): RobustnessEntry[] {
  const lightest = Math.min(...entries.map(entry => entry.massPerArea ?? Infinity))
  return entries.map(entry => ({
    ...entry, isInFront: entry.massPerArea !== null && (entry.massPerArea === lightest || areEquallyHeavy(entry.massPerArea, lightest)),
  }))
}
