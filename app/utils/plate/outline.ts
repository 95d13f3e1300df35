/** Outline geometry: orthogonal polygons in whole millimetres. */
import type { Plate } from '#shared/schemas/plate'

export type Axis = 'x' | 'y'
export type Point = readonly [number, number]
export type Outline = Plate['outline']

export interface Box { x: number, y: number, width: number, height: number }

export function coordinate(point: Point, axis: Axis): number {
  return axis === 'x' ? point[0] : point[1]
}

/** Smallest rectangle round the outline, mm. */
export function boundsOf(outline: readonly Point[]): Box {
  const xs = outline.map(point => point[0])
  const ys = outline.map(point => point[1])
  const x = Math.min(...xs)
  const y = Math.min(...ys)
  return { x, y, width: Math.max(...xs) - x, height: Math.max(...ys) - y }
}

export function isRectangle(outline: readonly Point[]): boolean {
  return outline.length === 4
    && new Set(outline.map(point => point[0])).size === 2
    && new Set(outline.map(point => point[1])).size === 2
}

/** True inside the outline or on its edge. */
export function coversPoint(outline: readonly Point[], [x, y]: Point): boolean {
  let inside = false
  for (let i = 0; i < outline.length; i++) {
    const a = outline[i]
    const b = outline[(i + 1) % outline.length]
    if (!a || !b) continue
    if (liesOnEdge(a, b, x, y)) return true
    const isCrossed = (a[1] > y) !== (b[1] > y)
    if (isCrossed && x < a[0] + ((y - a[1]) * (b[0] - a[0])) / (b[1] - a[1])) {
      inside = !inside
    }
  }
  return inside
}

function liesOnEdge(a: Point, b: Point, x: number, y: number): boolean {
  return x >= Math.min(a[0], b[0]) && x <= Math.max(a[0], b[0])
    && y >= Math.min(a[1], b[1]) && y <= Math.max(a[1], b[1])
    && (b[0] - a[0]) * (y - a[1]) === (b[1] - a[1]) * (x - a[0])
}

/**
 * The outline with the coordinates of one axis moved. Null where the move would fold it: corners
 * that were apart must stay apart and in order.
 */
export function mapOutline(
  outline: Outline, axis: Axis, move: (at: number) => number,
): Outline | null {
  const places = [...new Set(outline.map(point => coordinate(point, axis)))].sort((a, b) => a - b)
  const moved = places.map(move)
  if (moved.some((at, i) => i > 0 && at <= (moved[i - 1] ?? -Infinity))) return null
  return outline.map(([x, y]) => (axis === 'x' ? [move(x), y] : [x, move(y)]))
}

/** Parts of the line `axis = at` that lie inside the outline, as [from, to] of the other axis. */
export function spansInside(outline: readonly Point[], axis: Axis, at: number): [number, number][] {
  const other: Axis = axis === 'x' ? 'y' : 'x'
  const cuts = [...new Set(outline.map(point => coordinate(point, other)))].sort((a, b) => a - b)
  const spans: [number, number][] = []
  for (let i = 0; i + 1 < cuts.length; i++) {
    const from = cuts[i] ?? 0
    const to = cuts[i + 1] ?? 0
    const middle = (from + to) / 2
    if (!coversPoint(outline, axis === 'x' ? [at, middle] : [middle, at])) continue
    const last = spans.at(-1)
    if (last && last[1] === from) last[1] = to
    else spans.push([from, to])
  }
  return spans
}
