/** The range of a study as a numbered list of arrangements, none of which is stored. */
import type { Plate } from '#shared/schemas/plate'
import type { Range } from '#shared/schemas/range'
import { EngineError } from '../errors'
import type { Arrangement, RegionFraming } from '../framing'
import type { Axis, Grid } from '../plate'
import { type Layouts, layoutsAlong } from './layouts'

export interface RangeCount {
  total: number
  layoutsX: number
  layoutsY: number
  /** Directions × divisions, multiplied over the regions. */
  directionsAndDivisions: number
  slabs: number
}

export interface NumberedArrangement extends Arrangement {
  /** From 1. */
  number: number
  /** Index of the slab system; 0 where only the plate's own is tried. */
  slab: number
}

export interface Arrangements {
  count: RangeCount
  /** @param number from 1 to `count.total` */
  at: (number: number) => NumberedArrangement
  x: Layouts
  y: Layouts
  /** For each region what it may have, in order. */
  framings: RegionFraming[][]
}

export function arrangementsOf(plate: Plate, range: Range): Arrangements {
  const x = layoutsAlong(plate, 'x', range.x)
  const y = layoutsAlong(plate, 'y', range.y)
  const framings = regionFramings(plate, range)
  const perLayout = framings.reduce((product, list) => product * list.length, 1)
  const slabs = range.slabs?.length ?? 1
  const total = x.count * y.count * perLayout * slabs
  if (total > Number.MAX_SAFE_INTEGER) {
    throw new EngineError('too-many', 'The range holds more arrangements than can be counted. Narrow it.', 'range')
  }
  const count = { total, layoutsX: x.count, layoutsY: y.count, directionsAndDivisions: perLayout, slabs }
  const gridAt = gridsOf(x, y)
  return { count, x, y, framings, at: number => arrangementAt(gridAt, framings, perLayout, slabs, number) }
}

/** Grids by number; the last one is kept, since the framings of a grid follow one another. */
function gridsOf(x: Layouts, y: Layouts): (index: number) => Grid {
  let last: { index: number, grid: Grid } | null = null
  return (index) => {
    if (last?.index !== index) last = { index, grid: { xs: x.lines(Math.floor(index / y.count)), ys: y.lines(index % y.count) } }
    return last.grid
  }
}

function arrangementAt(
  gridAt: (index: number) => Grid, framings: RegionFraming[][], perLayout: number, slabs: number, number: number,
): NumberedArrangement {
  let rest = number - 1
  const slab = rest % slabs
  rest = Math.floor(rest / slabs)
  let framing = rest % perLayout
  rest = Math.floor(rest / perLayout)
  const regions: RegionFraming[] = []
  for (let r = framings.length - 1; r >= 0; r--) {
    const list = framings[r]!
    regions[r] = list[framing % list.length]!
    framing = Math.floor(framing / list.length)
  }
  return { number, slab, regions, grid: gridAt(rest) }
}

/** For each region its directions × divisions, x first, divisions rising. */
function regionFramings(plate: Plate, range: Range): RegionFraming[][] {
  const names = plate.regions.map(region => region.name)
  for (const name of Object.keys(range.regions ?? {})) {
    if (!names.includes(name)) {
      throw new EngineError('unknown-reference', `The range speaks of region ${name}, which is not on the plate.`, `range.regions.${name}`)
    }
  }
  if (names.length === 0) return [combined(range.primaryDirections, range.divisions)]
  return names.map((name) => {
    const own = range.regions?.[name]
    return combined(own?.primaryDirections ?? range.primaryDirections, own?.divisions ?? range.divisions)
  })
}

function combined(directions: readonly Axis[], divisions: readonly number[]): RegionFraming[] {
  const rising = [...divisions].sort((a, b) => a - b)
  return (['x', 'y'] as const).filter(direction => directions.includes(direction))
    .flatMap(direction => rising.map(n => ({ direction, divisions: n })))
}

export function countRange(plate: Plate, range: Range): RangeCount {
  return arrangementsOf(plate, range).count
}
