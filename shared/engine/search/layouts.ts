/**
 * Layouts of grid lines along one axis: what a range allows between the pinned lines, counted
 * exactly and numbered, so that any layout is rebuilt from its number. mm.
 */
import type { Plate } from '#shared/schemas/plate'
import type { Bays } from '#shared/schemas/range'
import { EngineError } from '../errors'
import { type Axis, distinctRising, outlineEdges } from '../plate'
import { type LayoutPlace, placeOfFixed, placeOfLayout } from './layoutPlace'

/** Bay sequences of one interval with the same two bay lengths: `p` bays of `a` and `q` of `b` in every order. */
export interface Family { a: number, b: number, p: number, q: number, count: number }

export type Interval
  = { kind: 'one', from: number, to: number, count: 1 }
    | { kind: 'equal', from: number, to: number, least: number, count: number }
    | { kind: 'module', from: number, to: number, families: Family[], count: number }

export interface Layouts {
  count: number
  /** Grid lines of layout `index`, 0 ≤ index < count. */
  lines: (index: number) => number[]
  /** Which layout these grid lines are, or which limit of the range leaves them out. */
  find: (lines: readonly number[]) => LayoutPlace
  /** First and last line. */
  ends: [number, number]
}

/** Above this a number is no longer exact. */
const LARGEST_COUNT = Number.MAX_SAFE_INTEGER

/** @throws EngineError `empty-interval` where an interval has no solution, `too-many` beyond exact counting. */
export function layoutsAlong(plate: Plate, axis: Axis, bays: Bays): Layouts {
  const drawn = (axis === 'x' ? plate.gridX : plate.gridY).map(line => line.at)
  if (bays.kind === 'fixed') return { count: 1, lines: () => drawn, find: lines => placeOfFixed(axis, drawn, lines), ends: [drawn[0]!, drawn[drawn.length - 1]!] }
  const pinned = pinnedLines(plate, axis)
  const intervals: Interval[] = []
  for (let n = 0; n + 1 < pinned.length; n++) intervals.push(intervalOf(axis, bays, pinned[n]!, pinned[n + 1]!))
  const count = intervals.reduce((product, interval) => product * interval.count, 1)
  if (count > LARGEST_COUNT) {
    throw new EngineError('too-many', `The bays along ${axis} may be laid out in more ways than can be counted. Narrow the range.`, `range.${axis}`)
  }
  return {
    count,
    lines: index => linesOf(intervals, pinned, index),
    find: lines => placeOfLayout(axis, bays, intervals, lines),
    ends: [pinned[0]!, pinned[pinned.length - 1]!],
  }
}

/**
 * Lines that stay in every layout: first and last, those marked pinned, those within the overhang
 * limit inside an edge of the outline; an edge (or a region's border) without one gets a line on itself.
 */
export function pinnedLines(plate: Plate, axis: Axis): number[] {
  const lines = axis === 'x' ? plate.gridX : plate.gridY
  const positions = lines.map(line => line.at)
  const pinned = new Set<number>([positions[0]!, positions[positions.length - 1]!])
  for (const line of lines) if (line.pinned) pinned.add(line.at)
  for (const edge of outlineEdges(plate.outline)) {
    if (edge.axis === axis) continue
    const near = positions.filter((at) => {
      const inside = (at - edge.at) * edge.inward
      return inside >= 0 && inside <= plate.overhang
    })
    if (near.length === 0) pinned.add(edge.at)
    for (const at of near) pinned.add(at)
  }
  for (const region of plate.regions) {
    const [from, to] = axis === 'x' ? [region.x, region.x + region.width] : [region.y, region.y + region.height]
    for (const at of [from, to]) if (at > positions[0]! && at < positions[positions.length - 1]!) pinned.add(at)
  }
  return distinctRising([...pinned])
}

function intervalOf(axis: Axis, bays: Exclude<Bays, { kind: 'fixed' }>, from: number, to: number): Interval {
  const length = to - from
  if (length < bays.min) return { kind: 'one', from, to, count: 1 }
  const interval: Interval = bays.kind === 'equal' ? equalInterval(bays, from, to) : moduleInterval(bays, from, to)
  if (interval.count === 0) {
    throw new EngineError('empty-interval',
      `No bays of ${bays.min} to ${bays.max} mm${bays.kind === 'module' ? ` in steps of ${bays.module} mm` : ''} fill the ${length} mm between ${from} and ${to}. Widen the range or unpin a line.`,
      `range.${axis}`)
  }
  return interval
}

/** Every n ≥ 1 with n · min ≤ L ≤ n · max. */
function equalInterval(bays: { min: number, max: number }, from: number, to: number): Interval {
  const length = to - from
  const least = Math.max(1, Math.ceil(length / bays.max))
  const most = Math.floor(length / bays.min)
  return { kind: 'equal', from, to, least, count: Math.max(0, most - least + 1) }
}

/** Every order of bays that are multiples of the module, at most two different ones. */
function moduleInterval(bays: { module: number, min: number, max: number }, from: number, to: number): Interval {
  const length = to - from
  const families: Family[] = []
  let count = 0
  const add = (family: Family) => {
    families.push(family)
    count += family.count
  }
  const first = Math.ceil(bays.min / bays.module) * bays.module
  for (let a = first; a <= bays.max; a += bays.module) {
    if (length % a === 0) add({ a, b: a, p: length / a, q: 0, count: 1 })
    for (let b = a + bays.module; b <= bays.max; b += bays.module) {
      for (let p = 1; p * a < length; p++) {
        const rest = length - p * a
        if (rest % b === 0) add({ a, b, p, q: rest / b, count: binomial(p + rest / b, p) })
      }
      // Beyond exact counting the rest decides nothing: the range is refused.
      if (count > LARGEST_COUNT) return { kind: 'module', from, to, families, count }
    }
  }
  return { kind: 'module', from, to, families, count }
}

function binomial(n: number, k: number): number {
  let result = 1
  for (let i = 1; i <= k; i++) result = Math.round(result * (n - k + i) / i)
  return result
}

function linesOf(intervals: Interval[], pinned: number[], index: number): number[] {
  const lines: number[] = [pinned[0]!]
  const digits: number[] = []
  let rest = index
  for (let n = intervals.length - 1; n >= 0; n--) {
    digits[n] = rest % intervals[n]!.count
    rest = Math.floor(rest / intervals[n]!.count)
  }
  intervals.forEach((interval, n) => lines.push(...interiorLines(interval, digits[n]!), interval.to))
  return lines
}

function interiorLines(interval: Interval, index: number): number[] {
  const { from, to } = interval
  if (interval.kind === 'one') return []
  if (interval.kind === 'equal') {
    const n = interval.least + index
    return Array.from({ length: n - 1 }, (_, i) => from + Math.floor((to - from) * (i + 1) / n + 0.5))
  }
  const lines: number[] = []
  let at = from
  for (const bay of baySequence(interval.families, index)) {
    at += bay
    if (at < to) lines.push(at)
  }
  return lines
}

/** The sequence with a number: families in their order, inside a family in lexicographic order, shorter bay first. */
function baySequence(families: Family[], index: number): number[] {
  let rest = index
  for (const { a, b, p, q, count } of families) {
    if (rest >= count) {
      rest -= count
      continue
    }
    const bays: number[] = []
    let [left, right] = [p, q]
    while (left + right > 0) {
      const startingWithA = left > 0 ? binomial(left + right - 1, left - 1) : 0
      if (rest < startingWithA) {
        bays.push(a)
        left--
      } else {
        rest -= startingWithA
        bays.push(b)
        right--
      }
    }
    return bays
  }
  return []
}
