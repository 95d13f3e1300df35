/** Slab outside the panels: strips between a beam and a void's edge, and overhangs with their corners. */
import {
  type Axis, type Interval, type Link, type PlateModel, type Rectangle, TOLERANCE, across, along, areaOf, bayBox,
  baysBeside, distinctRising, intersection, nearestCrossing, overlaps, ownerBeyond, rectangleFrom, zoneAt,
} from '../plate'
import { type LoadBook, addStretch, addToColumn, beamOn, columnAt, nearestColumn } from './book'
import { framingOfBay, slabSpanAxis } from './lines'
import type { SlabContext } from './slab'
import type { Rejected } from './types'
import type { TrimStrip } from './openings'

/** Strips along the slab's span load the beam that trims the void and do not hold it; bay by bay, since regions may differ. */
export function takeTrimStrips(context: SlabContext, book: LoadBook): void {
  for (const strip of context.strips) {
    for (const part of partsAlongSpan(context, strip)) {
      for (const piece of cutAtZones(context.model, part)) {
        loadBeam(context.model, book, strip.axis, strip.beamAt, along(piece, strip.axis), piece)
      }
    }
  }
}

/** The parts of a strip in bays whose slab spans along it. */
function partsAlongSpan({ bays, arrangement, regionOf }: SlabContext, { box, axis }: TrimStrip): Rectangle[] {
  return bays.full.flatMap((column, i) => column.flatMap((_, j) => {
    const framing = framingOfBay(arrangement, bays, regionOf, i, j)
    return framing && slabSpanAxis(framing) === axis ? intersection(bayBox(bays.grid, i, j), box) ?? [] : []
  }))
}

function loadBeam(model: PlateModel, book: LoadBook, axis: Axis, at: number, extent: Interval, piece: Rectangle): boolean {
  const width = areaOf(piece) / (extent.to - extent.from)
  const { load } = zoneAt(model, (piece.x0 + piece.x1) / 2, (piece.y0 + piece.y1) / 2)
  const whole = beamOn(book, axis, at, extent)
  if (whole >= 0) {
    addStretch(book, whole, extent, load, width, 0)
    book.beams[whole]!.hasSlab = true
    return true
  }
  const cuts = distinctRising([extent.from, extent.to, ...book.along[axis].flatMap((b) => {
    const beam = book.beams[b]!
    return Math.abs(beam.at - at) <= TOLERANCE ? [beam.from, beam.to].filter(end => end > extent.from && end < extent.to) : []
  })])
  let done = true
  for (let n = 0; n + 1 < cuts.length; n++) {
    const part = { from: cuts[n]!, to: cuts[n + 1]! }
    const beam = beamOn(book, axis, at, part)
    if (beam < 0) {
      done = false
      continue
    }
    addStretch(book, beam, part, load, width, 0)
    book.beams[beam]!.hasSlab = true
  }
  return done
}

/** Slab beyond the outer beam lines: to the edge beam before it, at corners to the column. */
export function takeOverhangs(context: SlabContext, book: LoadBook): Rejected | null {
  const { model, bays } = context
  for (const region of bays.beyond) {
    for (const piece of cutAtVoids(model, region).flatMap(part => cutAtZones(model, part))) {
      const rejected = takeOverhangPiece(context, book, piece)
      if (rejected) return rejected
    }
  }
  return null
}

function takeOverhangPiece(context: SlabContext, book: LoadBook, piece: Rectangle): Rejected | null {
  const { model, bays } = context
  const owner = ownerBeyond(model, bays, piece)
  if (!owner) return { rejection: 'void-cuts-beam', detail: 'Slab at the edge has no beam within the overhang limit.' }
  const link = owner.kind === 'link' ? owner.link : owner.kind === 'both' ? bearingLink(context, owner.links) : null
  if (link) {
    const at = link.axis === 'x' ? bays.grid.ys[link.j]! : bays.grid.xs[link.i]!
    if (loadBeam(model, book, link.axis, at, along(piece, link.axis), piece)) return null
    return { rejection: 'void-cuts-beam', detail: 'A void takes away the edge beam that carries an overhang.' }
  }
  const crossing = owner.kind === 'link' ? nearestCrossing(model, bays, piece) : owner.kind === 'both' ? owner.crossing : owner
  const { load } = zoneAt(model, (piece.x0 + piece.x1) / 2, (piece.y0 + piece.y1) / 2)
  const there = crossing ? columnAt(book, crossing.i, crossing.j) : -1
  const column = there >= 0 ? there : nearestColumn(book, (piece.x0 + piece.x1) / 2, (piece.y0 + piece.y1) / 2)
  addToColumn(book, column, load, areaOf(piece))
  return null
}

/** Of two edge beams before a re-entrant corner, the one that the slab bears on; null: both or neither. */
export function bearingLink(context: SlabContext, links: readonly [Link, Link]): Link | null {
  const [a, b] = links.map(link => bears(context, link))
  if (a === b) return null
  return a ? links[0] : links[1]
}

function bears({ bays, arrangement, regionOf }: SlabContext, link: Link): boolean {
  const [before] = baysBeside(bays, link)
  const i = link.axis === 'y' && before ? link.i - 1 : link.i
  const j = link.axis === 'x' && before ? link.j - 1 : link.j
  const framing = framingOfBay(arrangement, bays, regionOf, i, j)
  return framing !== undefined && slabSpanAxis(framing) === across(link.axis)
}

function cutAtZones(model: PlateModel, box: Rectangle): Rectangle[] {
  const boxes = model.zones.flatMap(zone => zone.box && overlaps(zone.box, box) ? [zone.box] : [])
  return boxes.length === 0 ? [box] : cutAt(box, boxes)
}

function cutAtVoids(model: PlateModel, box: Rectangle): Rectangle[] {
  const holes = model.voids.filter(v => overlaps(v.box, box)).map(v => v.box)
  if (holes.length === 0) return [box]
  return cutAt(box, holes).filter((piece) => {
    const x = (piece.x0 + piece.x1) / 2
    const y = (piece.y0 + piece.y1) / 2
    return !holes.some(hole => x > hole.x0 && x < hole.x1 && y > hole.y0 && y < hole.y1)
  })
}

function cutAt(box: Rectangle, boxes: readonly Rectangle[]): Rectangle[] {
  const cuts = (axis: Axis) => {
    const { from, to } = along(box, axis)
    const inside = boxes.flatMap(r => [along(r, axis).from, along(r, axis).to]).filter(value => value > from && value < to)
    return distinctRising([from, to, ...inside])
  }
  const xs = cuts('x')
  const ys = cuts('y')
  const pieces: Rectangle[] = []
  for (let i = 0; i + 1 < xs.length; i++) {
    for (let j = 0; j + 1 < ys.length; j++) {
      pieces.push(rectangleFrom('x', { from: xs[i]!, to: xs[i + 1]! }, { from: ys[j]!, to: ys[j + 1]! }))
    }
  }
  return pieces
}
