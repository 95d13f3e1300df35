/**
 * A study in parts that can be done anywhere, in any order, any number of times: each part examines
 * a run of arrangements, parts merge into one, and the result is the same byte for byte.
 */
import type { SchemeRow } from '#shared/schemas/api'
import type { Rejection, StudyCounts } from '#shared/schemas/study'
import { grams } from '../quantities'
import type { PreparedStudy } from './prepare'
import { compareRows, schemeRow, tradeOffRows } from './rows'
import { schemesOffered } from './offered'
import { emptyFront, isNoScheme } from './schemes'

export interface StudyPart {
  examined: number
  counts: StudyCounts
  /** Kept rows, in their order: the lightest schemes of their arrangements and the trade-off line. */
  rows: SchemeRow[]
  /** Lightest kg/m² after so many arrangements, falling, for the curve. */
  history: { examined: number, massPerArea: number }[]
}

/** Lightest schemes that are kept beside the trade-off line. */
export const KEPT_SCHEMES = 5000

export function emptyPart(): StudyPart {
  return { examined: 0, counts: { range: 0, examined: 0, cut: 0, rejected: {}, feasible: 0 }, rows: [], history: [] }
}

export interface ExamineOptions {
  /** Asked before each arrangement; the part then ends with what it has. */
  shouldStop?: () => boolean
  /** Called after each arrangement with the number examined in this part and the part so far. */
  onProgress?: (examined: number, part: StudyPart) => void
  /** Called for each arrangement that gives no scheme. */
  onLeftOut?: (number: number, reason: { rejection: Rejection, detail: string }) => void
}

/** Examines arrangements `from` (counted from 0) up to, not including, `to`. */
export function examineRange(study: PreparedStudy, from: number, to: number, options: ExamineOptions = {}): StudyPart {
  const part = emptyPart()
  const front = emptyFront()
  let best = Infinity
  for (let index = from; index < to; index++) {
    if (options.shouldStop?.()) break
    const result = schemesOffered(study, study.arrangements.at(index + 1), front)
    part.examined++
    if (isNoSchemeList(result)) {
      part.counts.rejected[result.rejection] = (part.counts.rejected[result.rejection] ?? 0) + 1
      options.onLeftOut?.(index + 1, result)
    } else {
      part.counts.feasible++
      for (const scheme of result) part.rows.push(schemeRow(study, scheme))
      const { massPerArea } = result[0]!.mass
      if (massPerArea < best) {
        best = massPerArea
        part.history.push({ examined: part.examined, massPerArea })
      }
    }
    if (part.rows.length > 2 * KEPT_SCHEMES) part.rows = keptRows(part.rows)
    options.onProgress?.(part.examined, part)
  }
  part.counts.examined = part.examined
  part.rows = keptRows(part.rows)
  return part
}

function isNoSchemeList(result: ReturnType<typeof schemesOffered>): result is { rejection: Rejection, detail: string } {
  return !Array.isArray(result) && isNoScheme(result)
}

/** The first schemes by their order, one for each arrangement, and the whole trade-off line. */
function keptRows(rows: readonly SchemeRow[]): SchemeRow[] {
  const ordered = [...rows].sort(compareRows)
  const front = new Set(tradeOffRows(ordered).map(row => row.key))
  let lightest = 0
  return ordered.filter((row) => {
    if (row.depthCap === null && lightest < KEPT_SCHEMES) {
      lightest++
      return true
    }
    return front.has(row.key)
  })
}

/** Two parts of one study as one; the order does not matter but for the curve, which is of the first then the second. */
export function mergeParts(a: StudyPart, b: StudyPart): StudyPart {
  const rejected: StudyCounts['rejected'] = { ...a.counts.rejected }
  for (const [reason, count] of Object.entries(b.counts.rejected)) {
    const key = reason as Rejection
    rejected[key] = (rejected[key] ?? 0) + count
  }
  return {
    examined: a.examined + b.examined,
    counts: {
      range: a.counts.range + b.counts.range,
      examined: a.counts.examined + b.counts.examined,
      cut: a.counts.cut + b.counts.cut,
      rejected,
      feasible: a.counts.feasible + b.counts.feasible,
    },
    rows: keptRows([...a.rows, ...b.rows]),
    history: mergedHistory(a, b),
  }
}

function mergedHistory(a: StudyPart, b: StudyPart): StudyPart['history'] {
  const last = a.history[a.history.length - 1]?.massPerArea ?? Infinity
  const later = b.history.filter(point => point.massPerArea < last).map(point => ({ ...point, examined: point.examined + a.examined }))
  return [...a.history, ...later]
}

/** The kept rows with rank and trade-off line. */
export function rankRows(part: StudyPart): SchemeRow[] {
  const ordered = [...part.rows].sort(compareRows)
  const front = new Set(tradeOffRows(ordered).map(row => row.key))
  return ordered.map((row, n) => ({ ...row, rank: n + 1, onTradeOffLine: front.has(row.key) }))
}

/** Whether two schemes count as equally heavy: less than 3 % apart (common practice, no source). */
export function areEquallyHeavy(a: number, b: number): boolean {
  return Math.abs(grams(a) - grams(b)) < 0.03 * Math.min(grams(a), grams(b))
}
