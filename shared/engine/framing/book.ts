/** Beams and columns while their loads are being written to them; look-up by line and place. */
import { type Axis, type Interval, TOLERANCE, addScaled, distinctRising } from '../plate'
import type { BeamLine, FrameBeam, FrameColumn, StretchLoad } from './types'

export interface LoadBook {
  beams: FrameBeam[]
  columns: FrameColumn[]
  /** Indices of the beams along each axis, by rising line. */
  along: Record<Axis, number[]>
  /** Where beams along each axis begin and end, rising. */
  ends: Record<Axis, number[]>
  size: number
}

export function loadBook(lines: readonly BeamLine[], columns: FrameColumn[], size: number): LoadBook {
  const beams = lines.map(({ axis, at, from, to, isParallelToPrimaries, isOnOutline, isTrimmer }): FrameBeam => ({
    axis, at, from, to, isParallelToPrimaries, isOnOutline, isTrimmer, kind: 'secondary', stretches: [], spots: [], held: [], heldInConstruction: [], slabSides: 0, hasSlab: false,
    supports: [{ kind: 'column', column: -1 }, { kind: 'column', column: -1 }], carries: [], tieSpacing: 0,
  }))
  const indices = beams.map((_, index) => index)
  const byLine = (axis: Axis) => indices.filter(b => beams[b]!.axis === axis).sort((a, b) => beams[a]!.at - beams[b]!.at)
  const along = { x: byLine('x'), y: byLine('y') }
  const ends = (axis: Axis) => {
    const places = new Set<number>()
    for (const b of along[axis]) places.add(beams[b]!.from).add(beams[b]!.to)
    return distinctRising([...places])
  }
  return { beams, columns, along, ends: { x: ends('x'), y: ends('y') }, size }
}

export function addStretch(book: LoadBook, beam: number, piece: Interval, load: readonly number[], factor: number, side: StretchLoad['side']): void {
  const scaled = new Array<number>(book.size).fill(0)
  addScaled(scaled, load, factor)
  putStretch(book, beam, piece, scaled, side)
}

/** The same with a load that is the stretch's own from now on. */
export function putStretch(book: LoadBook, beam: number, piece: Interval, load: number[], side: StretchLoad['side']): void {
  const { from, stretches } = book.beams[beam]!
  stretches.push({ from: piece.from - from, to: piece.to - from, load, side })
}

export function addSpot(book: LoadBook, beam: number, at: number, load: readonly number[], factor: number): void {
  const { from } = book.beams[beam]!
  const scaled = new Array<number>(book.size).fill(0)
  addScaled(scaled, load, factor)
  book.beams[beam]!.spots.push({ at: at - from, load: scaled })
}

export function addToColumn(book: LoadBook, column: number, load: readonly number[], factor: number): void {
  addScaled(book.columns[column]!.direct, load, factor)
}

/** Place in `along` of the first beam on or behind a line. */
export function firstFrom(book: LoadBook, axis: Axis, at: number): number {
  const list = book.along[axis]
  let [low, high] = [0, list.length]
  while (low < high) {
    const middle = (low + high) >> 1
    if (book.beams[list[middle]!]!.at < at) low = middle + 1
    else high = middle
  }
  return low
}

/** The beam along `axis` on line `at` that covers a stretch; −1: none. */
export function beamOn(book: LoadBook, axis: Axis, at: number, piece: Interval): number {
  const list = book.along[axis]
  for (let n = firstFrom(book, axis, at - TOLERANCE); n < list.length; n++) {
    const b = list[n]!
    const beam = book.beams[b]!
    if (beam.at > at + TOLERANCE) break
    if (beam.from <= piece.from + TOLERANCE && beam.to >= piece.to - TOLERANCE) return b
  }
  return -1
}

/** Beams along `axis` that cover a whole stretch, by rising line. */
export function beamsCovering(book: LoadBook, axis: Axis, piece: Interval): number[] {
  const [low, high] = [piece.from + TOLERANCE, piece.to - TOLERANCE]
  const covering: number[] = []
  for (const b of book.along[axis]) {
    const beam = book.beams[b]!
    if (beam.from <= low && beam.to >= high) covering.push(b)
  }
  return covering
}

export function columnAt(book: LoadBook, i: number, j: number): number {
  return book.columns.findIndex(column => column.i === i && column.j === j)
}

/** The nearest column to a point; columns are never none on a framed plate. */
export function nearestColumn(book: LoadBook, x: number, y: number): number {
  let best = -1
  let least = Infinity
  book.columns.forEach((column, c) => {
    const distance = Math.abs(column.x - x) + Math.abs(column.y - y)
    if (distance < least) {
      least = distance
      best = c
    }
  })
  return best
}
