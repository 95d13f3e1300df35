/** One arrangement of the plate, framed: or the first reason why it cannot be. */
import {
  type Axis, type BayGrid, type PlateModel, type Rectangle, across, along, bayGrid, isCrossing, isStrictlyInside, overlaps,
} from '../plate'
import { takeOverhangs, takeTrimStrips } from './beyond'
import { type LoadBook, loadBook } from './book'
import { columnLineBeams, crossingKey, framingOfBay, intermediateBeams, omittedCrossings, regionsOfBays } from './lines'
import { takeLineLoads } from './lineLoads'
import { takeSlab } from './slab'
import { findSupports, loadOrder } from './supports'
import type { Arrangement, BeamKind, BeamLine, Frame, FrameBeam, FrameColumn, Rejected } from './types'
import { trimVoids } from './voids'

export interface FramingRules {
  /** How far outside a void's edge a beam line still trims it, mm. */
  trimDistance: number
  /** Least spacing of secondary beams, mm; null = none. */
  minSecondarySpacing: number | null
  /** Longest piece, mm; null = none. */
  maxPiece: number | null
}

export function isRejected(result: object): result is Rejected {
  return 'rejection' in result
}

export function frameArrangement(model: PlateModel, arrangement: Arrangement, rules: FramingRules): Frame | Rejected {
  const bays = bayGrid(model, arrangement.grid)
  const regionOf = regionsOfBays(model, bays)
  const omitted = omittedCrossings(model.plate, bays)
  const columns = columnsOf(model, arrangement, bays, regionOf, omitted)
  const inKeepClear = columns.find(c => model.keepClear.some(zone => isStrictlyInside(zone, c.x, c.y)))
  if (inKeepClear) {
    return { rejection: 'column-in-keep-clear', detail: `The column at (${inKeepClear.x}, ${inKeepClear.y}) mm stands in a keep-clear zone.` }
  }
  const lines = columnLineBeams(arrangement, bays, regionOf, omitted)
  const all = [...lines, ...intermediateBeams(arrangement, bays, regionOf)]
  const trimmed = trimVoids(model, all, box => primaryAxisOf(arrangement, bays, regionOf, box), rules.trimDistance)
  if (isRejected(trimmed)) return trimmed
  const book = loadBook(trimmed.beams, columns, model.kinds.size)
  const unsupported = findSupports(book)
  if (unsupported) return unsupported
  const order = loadOrder(book.beams)
  if (!order) return { rejection: 'void-cuts-beam', detail: 'Beams carry each other in a circle, round voids or where columns are omitted.' }
  markHolding(model, book, lines)
  const context = { model, bays, arrangement, regionOf, strips: trimmed.strips }
  const slab = takeSlab(context, book)
  if (isRejected(slab)) return slab
  takeTrimStrips(context, book)
  const refused = takeOverhangs(context, book) ?? takeLineLoads(context, book)
    ?? unheldColumn(model, columns) ?? slab.late ?? lateReasons(arrangement, bays, regionOf, book, rules)
  if (refused) return refused
  for (const beam of book.beams) finishBeam(bays, beam)
  return { bays, beams: book.beams, columns, order, longestSlabSpan: slab.longestSpan }
}

function columnsOf(
  model: PlateModel, arrangement: Arrangement, bays: BayGrid, regionOf: number[][], omitted: Map<string, Axis>,
): FrameColumn[] {
  const columns: FrameColumn[] = []
  bays.grid.xs.forEach((x, i) => bays.grid.ys.forEach((y, j) => {
    if (!isCrossing(bays, i, j) || omitted.has(crossingKey(i, j))) return
    if (model.voids.some(v => isStrictlyInside(v.box, x, y))) return
    columns.push({
      i, j, x, y, ends: [], direct: new Array<number>(model.kinds.size).fill(0),
      web: webAt(arrangement, bays, regionOf, i, j),
      unheldFloors: { x: Infinity, y: Infinity },
    })
  }))
  return columns
}

/** Direction of the primary beams around a crossing; x where they differ. */
function webAt(arrangement: Arrangement, bays: BayGrid, regionOf: number[][], i: number, j: number): Axis {
  let web: Axis | null = null
  for (let a = i - 1; a <= i; a++) {
    for (let b = j - 1; b <= j; b++) {
      const direction = framingOfBay(arrangement, bays, regionOf, a, b)?.direction
      if (web && direction && web !== direction) return 'x'
      web ??= direction ?? null
    }
  }
  return web ?? 'x'
}

/** Primary direction of the region that a void lies in; of the first one where it lies in several. */
function primaryAxisOf(arrangement: Arrangement, bays: BayGrid, regionOf: number[][], box: Rectangle): Axis {
  const { xs, ys } = bays.grid
  for (let i = 0; i + 1 < xs.length; i++) {
    for (let j = 0; j + 1 < ys.length; j++) {
      const framing = framingOfBay(arrangement, bays, regionOf, i, j)
      if (framing && overlaps({ x0: xs[i]!, x1: xs[i + 1]!, y0: ys[j]!, y1: ys[j + 1]! }, box)) return framing.direction
    }
  }
  return 'x'
}

/** On which floors each column is held along x and along y. */
function markHolding(model: PlateModel, book: LoadBook, lines: readonly BeamLine[]): void {
  for (const column of book.columns) {
    for (const axis of ['x', 'y'] as const) {
      const isMet = column.ends.some(end => book.beams[end.beam]!.axis === axis)
      column.unheldFloors[axis] = isMet ? 0 : missingFloors(model, lines, column, axis)
    }
  }
}

/** Floors on which the beams along an axis are missing because voids took them; Infinity where the grid has none. */
function missingFloors(model: PlateModel, lines: readonly BeamLine[], column: FrameColumn, axis: Axis): number {
  const at = axis === 'x' ? column.y : column.x
  const place = axis === 'x' ? column.x : column.y
  const drawn = lines.filter(line => line.axis === axis && line.at === at && (line.from === place || line.to === place))
  const floors = drawn.map(line => Math.max(0, ...model.voids.filter(({ box }) => {
    const width = along(box, across(axis))
    const length = along(box, axis)
    return line.at > width.from && line.at < width.to && length.to > line.from && length.from < line.to
  }).map(v => v.floors)))
  return floors.length === 0 ? Infinity : Math.min(...floors)
}

function unheldColumn(model: PlateModel, columns: readonly FrameColumn[]): Rejected | null {
  const highest = model.plate.roof ? model.plate.storeys + 1 : model.plate.storeys
  for (const column of columns) {
    for (const axis of ['x', 'y'] as const) {
      if (column.unheldFloors[axis] >= highest) {
        return { rejection: 'column-unheld', detail: `No beam along ${axis} holds the column at (${column.x}, ${column.y}) mm on any level.` }
      }
    }
  }
  return null
}

function lateReasons(
  arrangement: Arrangement, bays: BayGrid, regionOf: number[][], book: LoadBook, rules: FramingRules,
): Rejected | null {
  return spacingReason(arrangement, bays, regionOf, rules.minSecondarySpacing) ?? lengthReason(book, rules.maxPiece)
}

function spacingReason(arrangement: Arrangement, bays: BayGrid, regionOf: number[][], least: number | null): Rejected | null {
  if (least === null) return null
  const { xs, ys } = bays.grid
  for (let i = 0; i < bays.full.length; i++) {
    for (let j = 0; j < bays.full[i]!.length; j++) {
      const framing = framingOfBay(arrangement, bays, regionOf, i, j)
      if (!framing || framing.divisions === 1) continue
      const bay = framing.direction === 'x' ? xs[i + 1]! - xs[i]! : ys[j + 1]! - ys[j]!
      if (bay / framing.divisions < least - 1e-6) {
        return { rejection: 'secondary-spacing', detail: `Secondary beams stand ${(bay / framing.divisions / 1000).toFixed(2)} m apart; the least is ${(least / 1000).toFixed(2)} m.` }
      }
    }
  }
  return null
}

function lengthReason(book: LoadBook, longest: number | null): Rejected | null {
  if (longest === null) return null
  const beam = book.beams.find(b => b.to - b.from > longest + 1e-6)
  return beam
    ? { rejection: 'piece-length', detail: `A beam is ${((beam.to - beam.from) / 1000).toFixed(2)} m long; the longest piece is ${(longest / 1000).toFixed(2)} m.` }
    : null
}

function finishBeam(bays: BayGrid, beam: FrameBeam): void {
  beam.slabSides = (beam.slabSides & 1) + (beam.slabSides >> 1)
  beam.kind = kindOf(beam)
  beam.tieSpacing = spacingAcross(bays, beam)
}

function kindOf(beam: FrameBeam): BeamKind {
  if (beam.isTrimmer) return 'trimmer'
  if (beam.isOnOutline) return 'edge'
  if (!beam.hasSlab && beam.carries.length === 0) return 'tie'
  return beam.isParallelToPrimaries ? 'primary' : 'secondary'
}

/** Index of the bay that a place lies strictly inside; −1: none. */
function bayOf(lines: readonly number[], place: number): number {
  for (let n = 0; n + 1 < lines.length; n++) if (lines[n]! < place && lines[n + 1]! > place) return n
  return -1
}

/** Mean width of the bays on both sides of a beam, mm: the spacing of ties. */
function spacingAcross(bays: BayGrid, beam: FrameBeam): number {
  const { xs, ys } = bays.grid
  const m = (beam.from + beam.to) / 2
  const widths: number[] = []
  for (const side of [-0.5, 0.5]) {
    const [x, y] = beam.axis === 'x' ? [m, beam.at + side] : [beam.at + side, m]
    const i = bayOf(xs, x)
    const j = bayOf(ys, y)
    if (i < 0 || j < 0 || !bays.full[i]?.[j]) continue
    widths.push(beam.axis === 'x' ? ys[j + 1]! - ys[j]! : xs[i + 1]! - xs[i]!)
  }
  return widths.length === 0 ? 0 : widths.reduce((sum, width) => sum + width, 0) / widths.length
}
