/** Beam lines of an arrangement before voids: column to column, and the intermediate secondary beams. */
import type { Plate } from '#shared/schemas/plate'
import {
  type Axis, type BayGrid, type Link, type PlateModel, across, hasLink, isFull, isOuterLink,
} from '../plate'
import type { Arrangement, BeamLine, RegionFraming } from './types'

/** `regionOf[i][j]`: index of the region of a full bay. */
export function regionsOfBays(model: PlateModel, bays: BayGrid): number[][] {
  const { xs, ys } = bays.grid
  return bays.full.map((column, i) => column.map((_, j) => {
    if (model.regions.length === 0) return 0
    const x = (xs[i]! + xs[i + 1]!) / 2
    const y = (ys[j]! + ys[j + 1]!) / 2
    return model.regions.findIndex(({ box }) => x > box.x0 && x < box.x1 && y > box.y0 && y < box.y1)
  }))
}

/** Framing of the region of a bay; undefined outside the full bays. */
export function framingOfBay(
  arrangement: Arrangement, bays: BayGrid, regionOf: number[][], i: number, j: number,
): RegionFraming | undefined {
  if (!isFull(bays, i, j)) return undefined
  return arrangement.regions[regionOf[i]![j]!]
}

/** Direction in which the slab of a bay spans: across the secondary beams, or with one panel across the primaries. */
export function slabSpanAxis(framing: RegionFraming): Axis {
  return framing.divisions === 1 ? across(framing.direction) : framing.direction
}

/** Omitted columns as crossings of this grid; one whose line the layout dropped counts for nothing. */
export function omittedCrossings(plate: Plate, bays: BayGrid): Map<string, Axis> {
  const omitted = new Map<string, Axis>()
  for (const column of plate.omittedColumns) {
    const x = plate.gridX.find(line => line.label === column.x)?.at
    const y = plate.gridY.find(line => line.label === column.y)?.at
    const i = bays.grid.xs.findIndex(at => at === x)
    const j = bays.grid.ys.findIndex(at => at === y)
    if (i >= 0 && j >= 0) omitted.set(crossingKey(i, j), column.line)
  }
  return omitted
}

export function crossingKey(i: number, j: number): string {
  return `${i}/${j}`
}

/** Beam lines on the grid lines; one runs through where a column is omitted in its direction. */
export function columnLineBeams(
  arrangement: Arrangement, bays: BayGrid, regionOf: number[][], omitted: Map<string, Axis>,
): BeamLine[] {
  const { xs, ys } = bays.grid
  const beams: BeamLine[] = []
  for (const axis of ['x', 'y'] as const) {
    const [lines, runs] = axis === 'x' ? [ys, xs] : [xs, ys]
    for (let l = 0; l < lines.length; l++) {
      let open: BeamLine | null = null
      for (let r = 0; r + 1 < runs.length; r++) {
        const link: Link = axis === 'x' ? { axis, i: r, j: l } : { axis, i: l, j: r }
        if (!hasLink(bays, link)) {
          open = null
          continue
        }
        const piece = linkBeam(arrangement, bays, regionOf, link)
        const runsOn = open !== null && omitted.get(axis === 'x' ? crossingKey(r, l) : crossingKey(l, r)) === axis
        if (runsOn && open) {
          open.to = piece.to
          open.isParallelToPrimaries ||= piece.isParallelToPrimaries
          open.isOnOutline ||= piece.isOnOutline
        } else {
          open = piece
          beams.push(open)
        }
      }
    }
  }
  return beams
}

function linkBeam(arrangement: Arrangement, bays: BayGrid, regionOf: number[][], link: Link): BeamLine {
  const { axis, i, j } = link
  const { xs, ys } = bays.grid
  const beside = axis === 'x' ? [[i, j - 1], [i, j]] : [[i - 1, j], [i, j]]
  return {
    axis,
    at: axis === 'x' ? ys[j]! : xs[i]!,
    from: axis === 'x' ? xs[i]! : ys[j]!,
    to: axis === 'x' ? xs[i + 1]! : ys[j + 1]!,
    isParallelToPrimaries: beside.some(([a, b]) => framingOfBay(arrangement, bays, regionOf, a!, b!)?.direction === axis),
    isOnOutline: isOuterLink(bays, link),
    isTrimmer: false,
  }
}

/** Intermediate secondary beams of every full bay, at exact fractions of the bay. */
export function intermediateBeams(arrangement: Arrangement, bays: BayGrid, regionOf: number[][]): BeamLine[] {
  const { xs, ys } = bays.grid
  const beams: BeamLine[] = []
  bays.full.forEach((column, i) => column.forEach((_, j) => {
    const framing = framingOfBay(arrangement, bays, regionOf, i, j)
    if (!framing) return
    const alongX = framing.direction === 'x'
    const start = alongX ? xs[i]! : ys[j]!
    const end = alongX ? xs[i + 1]! : ys[j + 1]!
    for (let k = 1; k < framing.divisions; k++) {
      beams.push({
        axis: across(framing.direction),
        at: start + (end - start) * k / framing.divisions,
        from: alongX ? ys[j]! : xs[i]!,
        to: alongX ? ys[j + 1]! : xs[i + 1]!,
        isParallelToPrimaries: false,
        isOnOutline: false,
        isTrimmer: false,
      })
    }
  }))
  return beams
}
