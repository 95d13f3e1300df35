/** Heads: the trimmers parallel to the primaries, on which cut beams end. */
import { type Axis, TOLERANCE, across, along } from '../plate'
import type { Edge, Opening } from './openings'
import type { BeamLine, Rejected } from './types'

/** A piece of a beam line between voids, with the voids at its ends. */
export interface Piece { line: BeamLine, cutBy: number[] }

/** Where a head ends; `leansOn`: the void whose side carries it. */
interface HeadEnd { at: number, leansOn: number | null }

interface Heads { heads: BeamLine[], leaning: Leaning }

/** `leaning[v]`: voids on whose sides, directly or over others, the heads of void v end. */
type Leaning = readonly ReadonlySet<number>[]

/**
 * Heads of all voids. A head does not end on a beam that ends on the heads of a void leaning on its
 * own void, since they would carry each other: found by asking again with what is known to lean.
 */
export function headsOf(openings: Opening[], edges: Edge[][], pieces: Piece[]): BeamLine[] | Rejected {
  let leaning: Leaning = openings.map(() => new Set<number>())
  for (let round = 0; round <= openings.length; round++) {
    const found = headsWith(openings, edges, pieces, leaning)
    if ('rejection' in found) return found
    const settled = found.leaning.every((set, v) => [...set].every(other => leaning[v]!.has(other)))
    if (settled) return found.heads
    leaning = found.leaning
  }
  return { rejection: 'void-cuts-beam', detail: 'Voids stand so close that their trimmers would carry each other.' }
}

function headsWith(openings: Opening[], edges: Edge[][], pieces: Piece[], known: Leaning): Heads | Rejected {
  const heads: BeamLine[] = []
  const leaning = known.map(set => new Set(set))
  for (const [v, opening] of openings.entries()) {
    const beams = pieces.filter(piece => !piece.cutBy.some(other => known[other]!.has(v))).map(piece => piece.line)
    for (const edge of edges[v]!) {
      if (edge.axis !== opening.primaryAxis || !edge.needsTrimmer) continue
      const left = headEnd(openings, edges, beams, edge, -1)
      const right = headEnd(openings, edges, beams, edge, 1)
      if (left === null || right === null) {
        return { rejection: 'void-cuts-beam', detail: `No beam beside void ${opening.name} carries its trimmer.` }
      }
      addTrimmer(heads, trimmer(edge.axis, edge.at, left.at, right.at, true))
      for (const { leansOn } of [left, right]) {
        if (leansOn === null) continue
        leaning[v]!.add(leansOn)
        for (const further of known[leansOn]!) leaning[v]!.add(further)
      }
    }
  }
  return { heads, leaning }
}

/** The nearest beam across, or the side of a void that lies before it; null: neither carries the head. */
function headEnd(openings: Opening[], edges: Edge[][], beams: BeamLine[], edge: Edge, sign: -1 | 1): HeadEnd | null {
  const end = sign < 0 ? edge.span.from : edge.span.to
  const beam = supportBeside(beams, edge, sign)
  let best: HeadEnd | null = beam === null ? null : { at: beam, leansOn: null }
  let isCarried = true
  for (const [v, { box, primaryAxis }] of openings.entries()) {
    const width = along(box, across(edge.axis))
    const facing = edges[v]!.find(other => other.axis !== edge.axis && other.low === (sign > 0))!
    if (edge.at <= width.from + TOLERANCE || edge.at >= width.to - TOLERANCE || (facing.at - end) * sign < -TOLERANCE) continue
    if (best !== null && (facing.at - best.at) * sign >= -TOLERANCE) continue
    best = { at: facing.at, leansOn: v }
    isCarried = facing.needsTrimmer && primaryAxis === edge.axis
  }
  return isCarried ? best : null
}

/** Line of the nearest beam across, at or outside the edge's end, that passes the edge's line. */
function supportBeside(beams: BeamLine[], edge: Edge, sign: -1 | 1): number | null {
  const end = sign < 0 ? edge.span.from : edge.span.to
  let best: number | null = null
  for (const beam of beams) {
    if (beam.axis === edge.axis || (beam.at - end) * sign < -TOLERANCE) continue
    if (beam.from >= edge.at - TOLERANCE || beam.to <= edge.at + TOLERANCE) continue
    if (best === null || (beam.at - best) * sign < 0) best = beam.at
  }
  return best
}

export function trimmer(axis: Axis, at: number, from: number, to: number, isParallelToPrimaries: boolean): BeamLine {
  return { axis, at, from, to, isParallelToPrimaries, isOnOutline: false, isTrimmer: true }
}

/** Two voids may share a trimmer: one beam over the length of both. */
export function addTrimmer(trimmers: BeamLine[], added: BeamLine): void {
  const same = trimmers.find(t => t.axis === added.axis && t.at === added.at && t.from < added.to && added.from < t.to)
  if (!same) {
    trimmers.push(added)
    return
  }
  same.from = Math.min(same.from, added.from)
  same.to = Math.max(same.to, added.to)
}
