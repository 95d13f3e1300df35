/** The way back: from grid lines to the number of their layout, or to the limit of the range that leaves them out. mm */
import type { Bays } from '#shared/schemas/range'
import type { Axis } from '../plate'
import type { Family, Interval } from './layouts'

export type LayoutPlace = { index: number } | { reason: string }

type FreeBays = Exclude<Bays, { kind: 'fixed' }>

export function placeOfFixed(axis: Axis, drawn: readonly number[], lines: readonly number[]): LayoutPlace {
  const isDrawn = lines.length === drawn.length && lines.every((at, n) => at === drawn[n])
  return isDrawn ? { index: 0 } : { reason: `The range keeps the grid lines along ${axis} as they are drawn.` }
}

export function placeOfLayout(axis: Axis, bays: FreeBays, intervals: readonly Interval[], lines: readonly number[]): LayoutPlace {
  const [first, last] = [intervals[0]!.from, intervals[intervals.length - 1]!.to]
  if (lines[0] !== first || lines[lines.length - 1] !== last) {
    return { reason: `The bays along ${axis} add up to ${lines[lines.length - 1]! - lines[0]!} mm; between the outer grid lines there are ${last - first} mm.` }
  }
  let index = 0
  for (const interval of intervals) {
    if (!lines.includes(interval.to)) return { reason: `A grid line along ${axis} stays at ${interval.to} mm; this arrangement has none there.` }
    const inside = lines.filter(at => at > interval.from && at < interval.to)
    const place = placeInside(axis, bays, interval, [interval.from, ...inside, interval.to])
    if ('reason' in place) return place
    index = index * interval.count + place.index
  }
  return { index }
}

function placeInside(axis: Axis, bays: FreeBays, interval: Interval, lines: readonly number[]): LayoutPlace {
  const lengths = lines.slice(1).map((at, n) => at - lines[n]!)
  if (interval.kind === 'one') {
    return lengths.length === 1 ? { index: 0 } : { reason: `Between ${interval.from} and ${interval.to} mm along ${axis} there is room for one bay only: the least is ${bays.min} mm.` }
  }
  const allowed = interval.kind === 'equal'
    ? { least: Math.floor((interval.to - interval.from) / lengths.length), most: Math.ceil((interval.to - interval.from) / lengths.length) }
    : { least: Math.min(...lengths), most: Math.max(...lengths) }
  if (interval.kind === 'equal' && !isEqual(lines)) return { reason: `The range takes equal bays along ${axis} between ${interval.from} and ${interval.to} mm; these are not.` }
  if (allowed.most > bays.max && (interval.kind === 'module' || lengths.length < interval.least)) {
    return { reason: `A bay along ${axis} is ${allowed.most} mm long; the range goes up to ${bays.max} mm.` }
  }
  if (allowed.least < bays.min && (interval.kind === 'module' || lengths.length >= interval.least + interval.count)) {
    return { reason: `A bay along ${axis} is ${allowed.least} mm long; the range begins at ${bays.min} mm.` }
  }
  return interval.kind === 'equal' ? { index: lengths.length - interval.least } : placeOfSequence(axis, bays, interval.families, lengths)
}

/** Lines at L·i/n, rounded half up to the millimetre. */
function isEqual(lines: readonly number[]): boolean {
  const [from, n] = [lines[0]!, lines.length - 1]
  const length = lines[n]! - from
  return lines.every((at, i) => at === from + Math.floor(length * i / n + 0.5))
}

function placeOfSequence(axis: Axis, bays: FreeBays, families: readonly Family[], lengths: readonly number[]): LayoutPlace {
  const module = bays.kind === 'module' ? bays.module : 1
  const odd = lengths.find(length => length % module !== 0)
  if (odd !== undefined) return { reason: `A bay along ${axis} is ${odd} mm long, which is no multiple of the module of ${module} mm.` }
  const different = [...new Set(lengths)].sort((a, b) => a - b)
  if (different.length > 2) return { reason: `Between two fixed lines along ${axis} at most two different bays are tried; here there are ${different.length}.` }
  const [a, b] = [different[0]!, different[different.length - 1]!]
  let index = 0
  for (const family of families) {
    if (family.a === a && family.b === b && family.p === lengths.filter(length => length === a).length) {
      return { index: index + orderOf(family, lengths) }
    }
    index += family.count
  }
  return { reason: `These bays along ${axis} do not fill the length between the fixed lines.` }
}

/** Number of the sequence among those of its family: lexicographic, the shorter bay first. */
function orderOf({ a, p, q }: Family, lengths: readonly number[]): number {
  let order = 0
  let [left, right] = [p, q]
  for (const length of lengths) {
    if (q === 0) break
    if (length === a) {
      left--
      continue
    }
    if (left > 0) order += waysToOrder(left + right - 1, left - 1)
    right--
  }
  return order
}

function waysToOrder(n: number, k: number): number {
  let result = 1
  for (let i = 1; i <= k; i++) result = Math.round(result * (n - k + i) / i)
  return result
}
