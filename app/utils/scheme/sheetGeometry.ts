/** Pure geometry of the diagrams on a calculation sheet: all on one axis along the beam. */

export interface Axis {
  /** px of the left support. */
  left: number
  right: number
  /** mm */
  span: number
}

/** Width of a diagram, px of its view box; the axis leaves room for the names of the ends. */
export const SHEET_WIDTH = 352

export function sheetAxis(span: number): Axis {
  return { left: 38, right: SHEET_WIDTH - 38, span }
}

/** Values with their sign turned, for what is drawn upwards. */
export function minus(values: readonly number[]): number[] {
  return values.map(value => -value)
}

export function along(axis: Axis, x: number): number {
  return axis.left + (x / axis.span) * (axis.right - axis.left)
}

/** The line of a diagram: values drawn from `base` px, `perUnit` px for each unit, downwards positive. */
export function diagramLine(
  axis: Axis, x: readonly number[], values: readonly number[], base: number, perUnit: number,
): string {
  return x.map((at, i) => `${i === 0 ? 'M' : 'L'}${px(along(axis, at))} ${px(base + (values[i] ?? 0) * perUnit)}`).join('')
}

/** The area between the line of a diagram and its base. */
export function diagramArea(
  axis: Axis, x: readonly number[], values: readonly number[], base: number, perUnit: number,
): string {
  if (x.length === 0) return ''
  const line = diagramLine(axis, x, values, base, perUnit).replace(/^M/, 'L')
  return `M${px(along(axis, x[0] ?? 0))} ${base}${line}L${px(along(axis, x.at(-1) ?? 0))} ${base}Z`
}

/** px for each unit so that the largest of several diagrams fills `height`; 0 where all are nil. */
export function perUnit(height: number, ...series: readonly (readonly number[])[]): number {
  let largest = 0
  for (const values of series) for (const value of values) largest = Math.max(largest, Math.abs(value))
  return largest > 0 ? height / largest : 0
}

/** Height of the short strokes of a line load, in proportion to the largest but never too small to see. */
export function loadHeight(value: number, largest: number, tallest: number): number {
  if (!(largest > 0)) return 0
  return Math.max(5, (Math.abs(value) / largest) * tallest)
}

/** Rows for figures that would run into each other on one: 0 = the lowest. `places` in px, rising. */
export function figureRows(places: readonly number[], width: number): number[] {
  const ends: number[] = []
  return places.map((place) => {
    const free = ends.findIndex(end => place - width / 2 >= end)
    const row = free < 0 ? ends.length : free
    ends[row] = place + width / 2
    return row
  })
}

/** Places moved up so that each is at least `least` px after the one before; in the order given. */
export function spread(places: readonly number[], least: number): number[] {
  const sorted = places.map((at, i) => ({ at, i })).sort((a, b) => a.at - b.at)
  const out = places.map(at => at)
  let last = -Infinity
  for (const { at, i } of sorted) {
    const place = Math.max(at, last + least)
    out[i] = place
    last = place
  }
  return out
}

export interface ShearFigure { x: number, value: number, anchor: 'start' | 'middle' | 'end' }

/**
 * Which values of the shear are written, and on which side of their place: between two jumps the value
 * behind the first and the one before the second; the larger alone where both would not fit or are alike;
 * none where not even one fits, unless it is the largest of all.
 */
export function shearFigures(
  axis: Axis, peaks: readonly { x: number, value: number }[], room = 84,
): ShearFigure[] {
  const sorted = [...peaks].sort((a, b) => a.x - b.x)
  const figures: ShearFigure[] = []
  const largest = Math.max(0, ...sorted.map(peak => Math.abs(peak.value)))
  for (let i = 0; i + 1 < sorted.length; i += 1) {
    const behind = sorted[i]
    const before = sorted[i + 1]
    if (!behind || !before || before.x - behind.x < 0.5) continue
    const width = along(axis, before.x) - along(axis, behind.x)
    const larger = Math.abs(behind.value) >= Math.abs(before.value) ? behind : before
    const areAlike = Math.abs(behind.value - before.value) < 0.03 * Math.abs(larger.value)
    if (width < room * 0.45 && Math.abs(larger.value) < largest) continue
    if (width < room || areAlike) figures.push({ x: (behind.x + before.x) / 2, value: larger.value, anchor: 'middle' })
    else figures.push({ ...behind, anchor: 'start' }, { ...before, anchor: 'end' })
  }
  return figures
}

/** Distinct positions along the beam that carry a dimension string: supports, point loads and restraints. */
export function stations(span: number, points: readonly number[]): number[] {
  const all = [0, ...points, span].filter(at => at >= 0 && at <= span).sort((a, b) => a - b)
  return all.filter((at, i) => i === 0 || at - (all[i - 1] ?? 0) > 0.5)
}

function px(value: number): number {
  return Math.round(value * 100) / 100
}
