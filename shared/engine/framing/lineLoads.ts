/**
 * Line loads: on the beam that they stand on, else to the two beams that the slab spans between by
 * the lever rule (along the span as point loads, across it as line loads), else to the one beam
 * that carries the strip or overhang they stand on.
 */
import {
  type Axis, type Interval, type LineLoadModel, type OutlineEdge, type PlateModel, type Rectangle, TOLERANCE, across, along,
  distinctRising, intervalOf, isOuterLink, isWhollyInside, nearestCrossing, ownerBeyond, rectangleFrom, withoutIntervals,
} from '../plate'
import { type LoadBook, addSpot, addStretch, addToColumn, beamOn, beamsCovering, columnAt, nearestColumn } from './book'
import { bearingLink } from './beyond'
import { framingOfBay, slabSpanAxis } from './lines'
import type { SlabContext } from './slab'
import type { Rejected } from './types'

/** How far beside a line its surroundings are read, mm: less than half a millimetre, the grid of all edges. */
const PROBE = 0.25

interface Line { axis: Axis, at: number, span: Interval, sides: readonly (-1 | 1)[], load: readonly number[], name: string }

export function takeLineLoads(context: SlabContext, book: LoadBook): Rejected | null {
  for (const line of context.model.lineLoads) {
    for (const part of linesOf(context.model, line)) {
      const rejected = 'inward' in part ? takeOutlineEdge(context, book, line, part) : takeLine(context, book, part)
      if (rejected) return rejected
    }
  }
  return null
}

function linesOf(model: PlateModel, { source, load }: LineLoadModel): (Line | OutlineEdge)[] {
  const { on, name } = source
  if (on === 'outline') return model.edges
  if ('void' in on) {
    const box = model.voids.find(v => v.name === on.void)!.box
    return voidEdges(model, box).map(edge => ('inward' in edge ? edge : { ...edge, load, name }))
  }
  const axis: Axis = on.from[1] === on.to[1] ? 'x' : 'y'
  const k = axis === 'x' ? 0 : 1
  const span = { from: Math.min(on.from[k], on.to[k]), to: Math.max(on.from[k], on.to[k]) }
  return [{ axis, at: on.from[1 - k]!, span, sides: [-1, 1], load, name }]
}

/** The four edges of a void; one that lies on the outline is taken as a piece of the outline. */
function voidEdges(model: PlateModel, box: Rectangle): (Omit<Line, 'load' | 'name'> | OutlineEdge)[] {
  return (['x', 'y'] as const).flatMap((axis) => {
    const span = along(box, axis)
    const width = along(box, across(axis))
    return ([[width.from, -1], [width.to, 1]] as const).map(([at, side]) => {
      const outside = side < 0 ? { from: at - PROBE, to: at } : { from: at, to: at + PROBE }
      if (isWhollyInside(model.outline, rectangleFrom(axis, span, outside))) return { axis, at, span, sides: [side] }
      return { axis, at, from: span.from, to: span.to, inward: side < 0 ? 1 as const : -1 as const, index: -1 }
    })
  })
}

function takeOutlineEdge(context: SlabContext, book: LoadBook, { load, source }: LineLoadModel, edge: OutlineEdge): Rejected | null {
  const { xs, ys } = context.bays.grid
  const runs = edge.axis === 'x' ? xs : ys
  const stations = distinctRising([edge.from, edge.to, ...[...runs, ...book.ends[edge.axis]].filter(at => at > edge.from && at < edge.to)])
  for (let n = 0; n + 1 < stations.length; n++) {
    const piece = { from: stations[n]!, to: stations[n + 1]! }
    if (!takeOutlinePiece(context, book, edge, piece, load)) {
      return { rejection: 'void-cuts-beam', detail: `No beam or column carries ${source.name} at the edge of the slab.` }
    }
  }
  return null
}

function takeOutlinePiece(context: SlabContext, book: LoadBook, edge: OutlineEdge, piece: Interval, load: readonly number[]): boolean {
  const { model } = context
  const limit = model.plate.overhang + TOLERANCE
  const near = book.along[edge.axis]
    .filter((b) => {
      const beam = book.beams[b]!
      const inside = (beam.at - edge.at) * edge.inward
      return inside > -TOLERANCE && inside < limit && beam.from <= piece.from + TOLERANCE && beam.to >= piece.to - TOLERANCE
    })
    .sort((a, b) => Math.abs(book.beams[a]!.at - edge.at) - Math.abs(book.beams[b]!.at - edge.at))
  if (near[0] !== undefined) {
    addStretch(book, near[0], piece, load, 1, 0)
    return true
  }
  const crossed = perpendicularBefore(context, book, edge, piece, limit)
  const m = (piece.from + piece.to) / 2
  if (crossed >= 0) {
    addSpot(book, crossed, edge.at, load, piece.to - piece.from)
    return true
  }
  const [x, y] = edge.axis === 'x' ? [m, edge.at] : [edge.at, m]
  const column = nearestColumn(book, x, y)
  if (column < 0 || !standsBefore(book.columns[column]!, edge, piece, limit)) return false
  addToColumn(book, column, load, piece.to - piece.from)
  return true
}

/** Whether a column is within the overhang limit of a whole piece of the edge. */
function standsBefore(column: { x: number, y: number }, edge: OutlineEdge, piece: Interval, limit: number): boolean {
  const [along, across] = edge.axis === 'x' ? [column.x, column.y] : [column.y, column.x]
  return Math.abs(across - edge.at) < limit && Math.abs(along - piece.from) < limit && Math.abs(along - piece.to) < limit
}

/** An outer beam across the edge that the piece stands before between its ends, as at the short side of a step in the outline. */
function perpendicularBefore({ bays }: SlabContext, book: LoadBook, edge: OutlineEdge, piece: Interval, limit: number): number {
  const axis = across(edge.axis)
  const lines = edge.axis === 'x' ? bays.grid.xs : bays.grid.ys
  const run = intervalOf(edge.axis === 'x' ? bays.grid.ys : bays.grid.xs, edge.at)
  let best = -1
  let least = Infinity
  lines.forEach((at, l) => {
    const distance = Math.max(piece.to - at, at - piece.from)
    const link = axis === 'x' ? { axis, i: run, j: l } : { axis, i: l, j: run }
    if (distance > limit || distance >= least || !isOuterLink(bays, link)) return
    const beam = beamOn(book, axis, at, { from: edge.at - 2 * TOLERANCE, to: edge.at + 2 * TOLERANCE })
    if (beam < 0) return
    best = beam
    least = distance
  })
  return best
}

function takeLine(context: SlabContext, book: LoadBook, line: Line): Rejected | null {
  const stations = lineStations(context, book, line)
  for (let n = 0; n + 1 < stations.length; n++) {
    const piece = { from: stations[n]!, to: stations[n + 1]! }
    const under = beamOn(book, line.axis, line.at, piece)
    if (under >= 0) {
      addStretch(book, under, piece, line.load, 1, 0)
      continue
    }
    if (!takeBesideBeams(context, book, line, piece)) {
      return { rejection: 'void-cuts-beam', detail: `Line load ${line.name} stands where no beam carries it.` }
    }
  }
  return null
}

function lineStations({ model, bays, strips }: SlabContext, book: LoadBook, line: Line): number[] {
  const { axis, span } = line
  const t = across(axis)
  const grid = axis === 'x' ? bays.grid.xs : bays.grid.ys
  const boxes = [...model.voids.map(v => v.box), ...strips.map(s => s.box), ...model.outline, ...bays.beyond]
  const marks = [
    ...grid,
    ...boxes.flatMap(box => [along(box, axis).from, along(box, axis).to]),
    ...book.along[axis].flatMap(b => [book.beams[b]!.from, book.beams[b]!.to]),
    ...book.along[t].map(b => book.beams[b]!.at),
  ]
  return distinctRising([span.from, span.to, ...marks.filter(at => at > span.from && at < span.to)])
}

/** A piece that stands on slab: half to what lies on either side where both sides are slab. */
function takeBesideBeams(context: SlabContext, book: LoadBook, line: Line, piece: Interval): boolean {
  const m = (piece.from + piece.to) / 2
  const sides = line.sides.filter(side => isSlab(context, line.axis, m, line.at + side * PROBE))
  if (sides.length === 0) return false
  return sides.every(side => takeOnSide(context, book, line, piece, line.at + side * PROBE, 1 / sides.length))
}

function pointOf(axis: Axis, along: number, acrossIt: number): [number, number] {
  return axis === 'x' ? [along, acrossIt] : [acrossIt, along]
}

function within(box: Rectangle, x: number, y: number): boolean {
  return x > box.x0 && x < box.x1 && y > box.y0 && y < box.y1
}

function isSlab({ model }: SlabContext, axis: Axis, s: number, t: number): boolean {
  const [x, y] = pointOf(axis, s, t)
  return model.outline.some(r => x >= r.x0 && x <= r.x1 && y >= r.y0 && y <= r.y1) && !model.voids.some(v => within(v.box, x, y))
}

function takeOnSide(context: SlabContext, book: LoadBook, line: Line, piece: Interval, beside: number, share: number): boolean {
  const { bays, arrangement, regionOf, strips } = context
  const m = (piece.from + piece.to) / 2
  const [x, y] = pointOf(line.axis, m, beside)
  const framing = framingOfBay(arrangement, bays, regionOf, intervalOf(bays.grid.xs, x), intervalOf(bays.grid.ys, y))
  if (!framing) return takeBeyond(context, book, line, piece, beside, share)
  const axis = slabSpanAxis(framing)
  const strip = strips.find(s => s.axis !== axis ? false : within(s.box, x, y))
  if (strip) return takeOnBeamLine(book, strip.axis, strip.beamAt, line, piece, share)
  return axis === line.axis ? takeAlongSpan(context, book, line, piece, beside, share) : takeAcrossSpan(context, book, line, piece, beside, share)
}

/** On a strip that one beam carries: along it as a line load, across it as a point load. */
function takeOnBeamLine(book: LoadBook, axis: Axis, at: number, line: Line, piece: Interval, share: number): boolean {
  const isAlong = axis === line.axis
  const beam = beamOn(book, axis, at, isAlong ? piece : { from: line.at, to: line.at })
  if (beam < 0) return false
  if (isAlong) addStretch(book, beam, piece, line.load, share, 0)
  else addSpot(book, beam, line.at, line.load, share * (piece.to - piece.from))
  return true
}

function takeBeyond(context: SlabContext, book: LoadBook, line: Line, piece: Interval, beside: number, share: number): boolean {
  const { model, bays } = context
  const box = rectangleFrom(line.axis, piece, { from: Math.min(beside, line.at), to: Math.max(beside, line.at) })
  const owner = ownerBeyond(model, bays, box)
  if (!owner) return false
  const link = owner.kind === 'link' ? owner.link : owner.kind === 'both' ? bearingLink(context, owner.links) : null
  if (link) return takeOnBeamLine(book, link.axis, link.axis === 'x' ? bays.grid.ys[link.j]! : bays.grid.xs[link.i]!, line, piece, share)
  const crossing = nearestCrossing(model, bays, box)
  const column = crossing ? columnAt(book, crossing.i, crossing.j) : -1
  if (column < 0) return false
  addToColumn(book, column, line.load, share * (piece.to - piece.from))
  return true
}

/** Bearing beams beside a place in a panel: the neighbours within the slab without a void between. */
function bearingBeside(context: SlabContext, book: LoadBook, axis: Axis, row: Interval, place: number): [number, number] {
  const { model, strips } = context
  const t = across(axis)
  const m = (row.from + row.to) / 2
  const crosses = ({ from, to }: Interval) => m > from && m < to
  const holes = [
    ...model.voids.filter(v => crosses(along(v.box, t))).map(v => along(v.box, axis)),
    ...strips.filter(s => s.axis === axis && crosses(along(s.box, t))).map(s => along(s.box, axis)),
  ]
  const solid = withoutIntervals({ from: -Infinity, to: Infinity }, holes).find(s => place >= s.from && place <= s.to)
  if (!solid) return [-1, -1]
  const beams = beamsCovering(book, t, row).filter((b) => {
    const { at } = book.beams[b]!
    return at >= solid.from - TOLERANCE && at <= solid.to + TOLERANCE
  })
  const left = beams.filter(b => book.beams[b]!.at <= place).pop() ?? -1
  const right = beams.find(b => book.beams[b]!.at >= place) ?? -1
  return [left, right]
}

function takeAlongSpan(context: SlabContext, book: LoadBook, line: Line, piece: Interval, beside: number, share: number): boolean {
  const m = (piece.from + piece.to) / 2
  const [left, right] = bearingBeside(context, book, line.axis, { from: beside, to: beside }, m)
  const total = share * (piece.to - piece.from)
  return shareOut(book, left, right, m, (beam, part) => addSpot(book, beam, line.at, line.load, total * part))
}

function takeAcrossSpan(context: SlabContext, book: LoadBook, line: Line, piece: Interval, beside: number, share: number): boolean {
  const [left, right] = bearingBeside(context, book, across(line.axis), piece, beside)
  return shareOut(book, left, right, line.at, (beam, part) => addStretch(book, beam, piece, line.load, share * part, 0))
}

/** Lever rule between two beams; all to the one where there is one only. */
function shareOut(book: LoadBook, left: number, right: number, place: number, give: (beam: number, part: number) => void): boolean {
  if (left < 0 && right < 0) return false
  if (left < 0 || right < 0 || left === right) {
    give(left < 0 ? right : left, 1)
    return true
  }
  const a = book.beams[left]!.at
  const b = book.beams[right]!.at
  const part = (place - a) / (b - a)
  give(left, 1 - part)
  give(right, part)
  return true
}
