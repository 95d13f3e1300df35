/** What carries each beam, and the order in which loads run down. */
import { TOLERANCE } from '../plate'
import { type LoadBook, firstFrom } from './book'
import type { FrameBeam, Rejected, Support } from './types'

/** Finds the support of every beam end: a column, or a beam across. */
export function findSupports(book: LoadBook): Rejected | null {
  const columns = new Map<number, number>()
  book.columns.forEach((column, c) => columns.set(placeKey(column.x, column.y), c))
  for (const [b, beam] of book.beams.entries()) {
    for (const end of [0, 1] as const) {
      const support = supportAt(book, columns, beam, end === 0 ? beam.from : beam.to)
      if (!support) {
        return { rejection: 'void-cuts-beam', detail: 'A beam cut by a void ends where nothing carries it.' }
      }
      beam.supports[end] = support
      if (support.kind === 'column') book.columns[support.column]!.ends.push({ beam: b, end })
      else book.beams[support.beam]!.carries.push({ beam: b, at: support.at, end })
    }
  }
  return null
}

/** More millimetres than any plate is long, twice. */
const KEY_STEP = 2 ** 24

/** Columns stand on whole millimetres. */
function placeKey(x: number, y: number): number {
  return Math.round(x) * KEY_STEP + Math.round(y)
}

function supportAt(book: LoadBook, columns: ReadonlyMap<number, number>, beam: FrameBeam, end: number): Support | null {
  const [x, y] = beam.axis === 'x' ? [end, beam.at] : [beam.at, end]
  const column = columns.get(placeKey(x, y))
  const stands = column === undefined ? undefined : book.columns[column]
  if (column !== undefined && stands && Math.abs(stands.x - x) < TOLERANCE && Math.abs(stands.y - y) < TOLERANCE) return { kind: 'column', column }
  const other = beam.axis === 'x' ? 'y' : 'x'
  const list = book.along[other]
  for (let n = firstFrom(book, other, end - TOLERANCE); n < list.length; n++) {
    const b = list[n]!
    const carrier = book.beams[b]!
    if (carrier.at > end + TOLERANCE) break
    if (carrier.from < beam.at - TOLERANCE && carrier.to > beam.at + TOLERANCE) {
      return { kind: 'beam', beam: b, at: beam.at - carrier.from }
    }
  }
  return null
}

/** Beams so that each comes after all that it carries; null where beams carry each other in a circle. */
export function loadOrder(beams: readonly FrameBeam[]): number[] | null {
  const waiting = beams.map(beam => beam.carries.length)
  const order = beams.flatMap((_, b) => waiting[b] === 0 ? [b] : [])
  for (let n = 0; n < order.length; n++) {
    for (const support of beams[order[n]!]!.supports) {
      if (support.kind !== 'beam') continue
      waiting[support.beam]!--
      if (waiting[support.beam] === 0) order.push(support.beam)
    }
  }
  return order.length === beams.length ? order : null
}
