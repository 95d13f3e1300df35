/** Axis-parallel rectangles and intervals, mm. */

export type Axis = 'x' | 'y'
export type Point = readonly [number, number]

export interface Rectangle { x0: number, y0: number, x1: number, y1: number }
export interface Interval { from: number, to: number }

/** Lengths closer than this are one and the same place, mm. */
export const TOLERANCE = 1e-6

export function rectangleOf(box: { x: number, y: number, width: number, height: number }): Rectangle {
  return { x0: box.x, y0: box.y, x1: box.x + box.width, y1: box.y + box.height }
}

/** The extent of a rectangle along an axis. */
export function along(rectangle: Rectangle, axis: Axis): Interval {
  return axis === 'x'
    ? { from: rectangle.x0, to: rectangle.x1 }
    : { from: rectangle.y0, to: rectangle.y1 }
}

export function across(axis: Axis): Axis {
  return axis === 'x' ? 'y' : 'x'
}

/** The rectangle with extent `s` along `axis` and extent `t` across it. */
export function rectangleFrom(axis: Axis, s: Interval, t: Interval): Rectangle {
  return axis === 'x'
    ? { x0: s.from, x1: s.to, y0: t.from, y1: t.to }
    : { x0: t.from, x1: t.to, y0: s.from, y1: s.to }
}

/** Whether the open insides of two rectangles meet. */
export function overlaps(a: Rectangle, b: Rectangle): boolean {
  return a.x0 < b.x1 && b.x0 < a.x1 && a.y0 < b.y1 && b.y0 < a.y1
}

/** Whether a point lies strictly inside. */
export function isStrictlyInside(rectangle: Rectangle, x: number, y: number): boolean {
  return x > rectangle.x0 && x < rectangle.x1 && y > rectangle.y0 && y < rectangle.y1
}

export function areaOf(rectangle: Rectangle): number {
  return (rectangle.x1 - rectangle.x0) * (rectangle.y1 - rectangle.y0)
}

/** The common part of two rectangles; null where they only touch or stand apart. */
export function intersection(a: Rectangle, b: Rectangle): Rectangle | null {
  if (!overlaps(a, b)) return null
  return {
    x0: Math.max(a.x0, b.x0), x1: Math.min(a.x1, b.x1), y0: Math.max(a.y0, b.y0), y1: Math.min(a.y1, b.y1),
  }
}

/** `whole` less each of `holes`, as rising disjoint intervals. */
export function withoutIntervals(whole: Interval, holes: readonly Interval[]): Interval[] {
  let rest: Interval[] = [whole]
  for (const hole of holes) {
    if (hole.to <= whole.from || hole.from >= whole.to) continue
    const next: Interval[] = []
    for (const piece of rest) {
      if (hole.to <= piece.from || hole.from >= piece.to) {
        next.push(piece)
        continue
      }
      if (hole.from > piece.from) next.push({ from: piece.from, to: hole.from })
      if (hole.to < piece.to) next.push({ from: hole.to, to: piece.to })
    }
    rest = next
  }
  return rest
}

/** Rising disjoint union; intervals that touch become one. */
export function unionOf(intervals: readonly Interval[]): Interval[] {
  const rising = [...intervals].sort((a, b) => a.from - b.from)
  const merged: Interval[] = []
  for (const { from, to } of rising) {
    const last = merged[merged.length - 1]
    if (last && from <= last.to + TOLERANCE) last.to = Math.max(last.to, to)
    else merged.push({ from, to })
  }
  return merged
}

/** Rising numbers without repetitions (closer than the tolerance). */
export function distinctRising(values: readonly number[]): number[] {
  const rising = new Float64Array(values).sort()
  const distinct: number[] = []
  for (const value of rising) {
    const last = distinct[distinct.length - 1]
    if (last === undefined || value - last > TOLERANCE) distinct.push(value)
  }
  return distinct
}
