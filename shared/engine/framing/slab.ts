/**
 * The slab's load on the beams: a one-way panel loads the two beams at the ends of its span, each
 * with the load on its half of the panel by true plan area. Rows between all edges across the span
 * are taken one by one, so that voids and zones cut the load exactly where they lie.
 */
import type { Slab } from '#shared/schemas/plate'
import {
  type Axis, type BayGrid, type Interval, type LoadZoneModel, type PlateModel, TOLERANCE, across, addScaled, along,
  distinctRising, unionOf, withoutIntervals,
} from '../plate'
import { type LoadBook, beamsCovering, putStretch } from './book'
import { framingOfBay, slabSpanAxis } from './lines'
import type { Arrangement, Rejected, StretchLoad } from './types'
import type { TrimStrip } from './openings'

export interface SlabContext {
  model: PlateModel
  bays: BayGrid
  arrangement: Arrangement
  regionOf: number[][]
  strips: TrimStrip[]
}

/** `late`: a slab over its limit or in the wrong direction, asked after the columns. */
export interface SlabTaken { longestSpan: number, late: Rejected | null }

interface Row {
  /** Direction of the slab span. */
  axis: Axis
  piece: Interval
  /** Zones that cover the row, with their extent along the span. */
  zones: { zone: LoadZoneModel, extent: Interval }[]
  floor: LoadZoneModel
}

/** Writes the load of all full bays to the beams, or says why it cannot. */
export function takeSlab(context: SlabContext, book: LoadBook): SlabTaken | Rejected {
  const taken: SlabTaken = { longestSpan: 0, late: null }
  const late: Rejected[] = []
  for (const axis of ['x', 'y'] as const) {
    const runs = bayRuns(context, axis)
    if (runs.length === 0) continue
    const stations = rowStations(context, book, axis, runs)
    for (let r = 0; r + 1 < stations.length; r++) {
      const rejected = takeRow(context, book, axis, runs, { from: stations[r]!, to: stations[r + 1]! }, taken, late)
      if (rejected) return rejected
    }
  }
  taken.late = late.find(l => l.rejection === 'slab-direction') ?? late[0] ?? null
  return taken
}

/** Full bays whose slab spans along the axis, as extents along and across. */
function bayRuns({ bays, arrangement, regionOf }: SlabContext, axis: Axis): { s: Interval, t: Interval }[] {
  const { xs, ys } = bays.grid
  const runs: { s: Interval, t: Interval }[] = []
  bays.full.forEach((column, i) => column.forEach((_, j) => {
    const framing = framingOfBay(arrangement, bays, regionOf, i, j)
    if (!framing || slabSpanAxis(framing) !== axis) return
    const x = { from: xs[i]!, to: xs[i + 1]! }
    const y = { from: ys[j]!, to: ys[j + 1]! }
    runs.push(axis === 'x' ? { s: x, t: y } : { s: y, t: x })
  }))
  return runs
}

function rowStations({ model, strips }: SlabContext, book: LoadBook, axis: Axis, runs: { t: Interval }[]): number[] {
  const t = across(axis)
  const bounds = runs.flatMap(run => [run.t.from, run.t.to])
  const edges = [
    ...model.voids.map(v => along(v.box, t)),
    ...model.zones.flatMap(zone => zone.box ? [along(zone.box, t)] : []),
    ...strips.map(strip => along(strip.box, t)),
  ].flatMap(({ from, to }) => [from, to])
  const low = Math.min(...bounds)
  const high = Math.max(...bounds)
  const inside = [...edges, ...book.ends[t]].filter(value => value > low && value < high)
  return distinctRising([...bounds, ...inside])
}

function takeRow(
  context: SlabContext, book: LoadBook, axis: Axis, runs: { s: Interval, t: Interval }[], piece: Interval,
  taken: SlabTaken, late: Rejected[],
): Rejected | null {
  const { model } = context
  const t = across(axis)
  const m = (piece.from + piece.to) / 2
  const within = ({ from, to }: Interval) => m > from && m < to
  const slab = unionOf(runs.filter(run => within(run.t)).map(run => run.s))
  if (slab.length === 0) return null
  const holes = [
    ...model.voids.filter(v => within(along(v.box, t))).map(v => along(v.box, axis)),
    ...context.strips.filter(strip => strip.axis === axis && within(along(strip.box, t))).map(strip => along(strip.box, axis)),
  ]
  const row: Row = {
    axis, piece,
    zones: model.zones.flatMap(zone => zone.box && within(along(zone.box, t)) ? [{ zone, extent: along(zone.box, axis) }] : []),
    floor: model.zones[model.zones.length - 1]!,
  }
  const beams = beamsCovering(book, t, piece)
  for (const solid of slab.flatMap(run => withoutIntervals(run, holes))) {
    const rejected = takeSolid(book, row, solid, beams, taken, late)
    if (rejected) return rejected
  }
  return null
}

/** A stretch of slab without hole, cut by the beams that it crosses. */
function takeSolid(book: LoadBook, row: Row, solid: Interval, beams: number[], taken: SlabTaken, late: Rejected[]): Rejected | null {
  const inside = beams.filter((b) => {
    const { at } = book.beams[b]!
    return at >= solid.from - TOLERANCE && at <= solid.to + TOLERANCE
  })
  if (inside.length === 0) {
    return { rejection: 'void-cuts-beam', detail: 'Slab beside a void reaches no beam that could carry it.' }
  }
  const first = inside[0]!
  const last = inside[inside.length - 1]!
  takeStrip(book, row, first, { from: solid.from, to: book.beams[first]!.at }, -1)
  takeStrip(book, row, last, { from: book.beams[last]!.at, to: solid.to }, 1)
  for (let n = 0; n + 1 < inside.length; n++) takePanel(book, row, inside[n]!, inside[n + 1]!, taken, late)
  return null
}

/** Slab that one beam alone carries: between it and a void. */
function takeStrip(book: LoadBook, row: Row, beam: number, strip: Interval, side: -1 | 1): void {
  if (strip.to - strip.from <= TOLERANCE) return
  write(book, row, beam, strip, side)
}

/** A panel between two beams: half to each; its span is held against the limits of its slabs. */
function takePanel(book: LoadBook, row: Row, left: number, right: number, taken: SlabTaken, late: Rejected[]): void {
  const a = book.beams[left]!.at
  const b = book.beams[right]!.at
  const span = b - a
  if (span <= TOLERANCE) return
  taken.longestSpan = Math.max(taken.longestSpan, span)
  for (const { zone } of zonesWithin(row, { from: a, to: b })) {
    if (zone.slab.span !== 'free' && zone.slab.span !== row.axis) {
      late.push(directionReason(zone.slab, row.axis))
    } else if (span > zone.slab.maxSpan + TOLERANCE) {
      late.push(spanReason(zone.slab, span))
    }
  }
  const m = (a + b) / 2
  write(book, row, left, { from: a, to: m }, 1)
  write(book, row, right, { from: m, to: b }, -1)
  markSide(book, left, 1)
  markSide(book, right, -1)
}

export function directionReason(slab: Slab, axis: Axis): Rejected {
  return { rejection: 'slab-direction', detail: `The slab spans along ${slab.span}; this framing needs a span along ${axis}.` }
}

export function spanReason(slab: Slab, span: number): Rejected {
  return { rejection: 'slab-span', detail: `The slab spans ${(span / 1000).toFixed(2)} m; its limit is ${(slab.maxSpan / 1000).toFixed(2)} m.` }
}

function markSide(book: LoadBook, beam: number, side: -1 | 1): void {
  book.beams[beam]!.slabSides |= side > 0 ? 2 : 1
}

function write(book: LoadBook, row: Row, beam: number, part: Interval, side: StretchLoad['side']): void {
  const target = book.beams[beam]!
  const load = new Array<number>(book.size).fill(0)
  let holds = true
  let holdsInConstruction = true
  for (const { zone, width } of zonesWithin(row, part)) {
    addScaled(load, zone.load, width)
    holds &&= zone.slab.fixedToTopFlange
    holdsInConstruction &&= zone.slab.fixedToTopFlange && zone.slab.system === 'deck'
  }
  putStretch(book, beam, row.piece, load, side)
  target.hasSlab = true
  const place = { from: row.piece.from - target.from, to: row.piece.to - target.from }
  if (holds) target.held.push(place)
  if (holdsInConstruction) target.heldInConstruction.push(place)
}

/** Zones along a stretch of the row with the width of each; the floor has what no zone covers. */
function zonesWithin(row: Row, part: Interval): { zone: LoadZoneModel, width: number }[] {
  const widths: { zone: LoadZoneModel, width: number }[] = []
  let rest = part.to - part.from
  for (const { zone, extent } of row.zones) {
    const width = Math.min(extent.to, part.to) - Math.max(extent.from, part.from)
    if (width <= TOLERANCE) continue
    widths.push({ zone, width })
    rest -= width
  }
  if (rest > TOLERANCE) widths.push({ zone: row.floor, width: rest })
  return widths
}
