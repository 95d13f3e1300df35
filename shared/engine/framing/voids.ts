/**
 * Voids cut beams and are trimmed. A beam line on a void's edge or close outside it trims that edge;
 * every other edge gets a trimmer, first the heads (parallel to the primaries, between the nearest
 * uncut beams across or up to the side of another void before them), then the sides (head to head,
 * or to the primary where there is no head).
 */
import { type Axis, type PlateModel, type Rectangle, TOLERANCE, across, along, rectangleFrom, withoutIntervals } from '../plate'
import { type Piece, addTrimmer, headsOf, trimmer } from './heads'
import { type Edge, type Opening, type TrimStrip, cutExtent, edgesOf, isCutBy, stripsOf } from './openings'
import type { BeamLine, Rejected } from './types'

export interface Trimmed { beams: BeamLine[], strips: TrimStrip[] }

export function trimVoids(
  model: PlateModel, lines: BeamLine[], primaryAxisAt: (box: Rectangle) => Axis, trimDistance: number,
): Trimmed | Rejected {
  if (model.voids.length === 0) return { beams: lines, strips: [] }
  const openings = model.voids.map(({ name, box }) => ({ name, box, primaryAxis: primaryAxisAt(box) }))
  const standing = removePrimaries(lines, openings)
  if ('rejection' in standing) return standing
  const edges = openings.map(opening => edgesOf(model, openings, opening, standing, trimDistance))
  const strips = edges.flatMap(stripsOf)
  const pieces = standing.flatMap(beam => cutBeam(beam, openings, edges))
  const heads = headsOf(openings, edges, pieces)
  if ('rejection' in heads) return heads
  const sides = sidesOf(openings, edges, heads)
  if ('rejection' in sides) return sides
  const cut = pieces.flatMap(piece => splitAtHeads(piece.line, heads)).filter(piece => reachesSupports(piece, openings, heads))
  const beams = [...cut, ...heads, ...sides]
  if ([...heads, ...sides].some(trimmer => beams.some(beam => crosses(trimmer, beam)))) {
    return { rejection: 'void-cuts-beam', detail: 'Voids stand so close that their trimmers would cross.' }
  }
  return { beams, strips: strips.map(strip => upToNearestBeam(strip, beams)) }
}

/** A head of another void may stand in a strip: the strip then reaches to it only. */
function upToNearestBeam({ box, axis, beamAt }: TrimStrip, beams: BeamLine[]): TrimStrip {
  const [span, width] = [along(box, axis), along(box, across(axis))]
  const inside = beams.filter(beam => beam.axis === axis && beam.at > width.from + TOLERANCE && beam.at < width.to - TOLERANCE
    && beam.from <= span.from + TOLERANCE && beam.to >= span.to - TOLERANCE).map(beam => beam.at)
  if (inside.length === 0) return { box, axis, beamAt }
  const isBelow = beamAt === width.from
  const at = isBelow ? Math.max(...inside) : Math.min(...inside)
  return { axis, beamAt: at, box: rectangleFrom(axis, span, isBelow ? { from: at, to: width.to } : { from: width.from, to: at }) }
}

function removePrimaries(lines: BeamLine[], openings: Opening[]): BeamLine[] | Rejected {
  const standing: BeamLine[] = []
  for (const beam of lines) {
    let gone = false
    if (beam.isParallelToPrimaries) {
      for (const { name, box } of openings) {
        const length = along(box, beam.axis)
        const width = along(box, across(beam.axis))
        if (beam.at <= width.from || beam.at >= width.to || length.to <= beam.from || length.from >= beam.to) continue
        if (length.from <= beam.from && length.to >= beam.to) gone = true
        else return { rejection: 'void-cuts-beam', detail: `Void ${name} cuts a primary beam between its columns.` }
      }
    }
    if (!gone) standing.push(beam)
  }
  return standing
}

function sidesOf(openings: Opening[], edges: Edge[][], heads: BeamLine[]): BeamLine[] | Rejected {
  const sides: BeamLine[] = []
  for (const [v, opening] of openings.entries()) {
    const ends = edges[v]!.filter(edge => edge.axis === opening.primaryAxis)
    for (const edge of edges[v]!) {
      if (edge.axis === opening.primaryAxis || !edge.needsTrimmer) continue
      const [low, high] = [true, false].map(isLow => endOfSide(ends.find(end => end.low === isLow)!, heads))
      if (low === null || high === null || low === undefined || high === undefined) {
        return { rejection: 'void-cuts-beam', detail: `Nothing carries the trimmer at the side of void ${opening.name}.` }
      }
      addTrimmer(sides, trimmer(edge.axis, edge.at, low, high, false))
    }
  }
  return sides
}

function endOfSide(end: Edge, heads: BeamLine[]): number | null {
  if (end.trimmedAt !== null) return end.trimmedAt
  return heads.some(head => head.axis === end.axis && head.at === end.at) ? end.at : null
}

/** A piece of a cut beam stands if it does not lie wholly between a void and what trims it. */
function reachesSupports(piece: BeamLine, openings: Opening[], heads: BeamLine[]): boolean {
  const endsInVoid = (end: number) => openings.some(({ box }) => {
    const width = along(box, across(piece.axis))
    const length = along(box, piece.axis)
    return piece.at > width.from && piece.at < width.to && end > length.from && end < length.to
  })
  const onHead = (end: number) => heads.some(head => head.axis !== piece.axis && head.at === end)
  return [piece.from, piece.to].every(end => !endsInVoid(end) || onHead(end))
}

/** A cut beam ends on every head that it meets. */
function splitAtHeads(piece: BeamLine, heads: BeamLine[]): BeamLine[] {
  const ends = heads.filter(head => crosses(head, piece)).map(head => head.at).sort((a, b) => a - b)
  return [piece.from, ...ends].map((from, n) => ({ ...piece, from, to: ends[n] ?? piece.to }))
}

function crosses(a: BeamLine, b: BeamLine): boolean {
  return a.axis !== b.axis && a.at > b.from + TOLERANCE && a.at < b.to - TOLERANCE && b.at > a.from + TOLERANCE && b.at < a.to - TOLERANCE
}

/** What voids leave of a beam line. */
function cutBeam(beam: BeamLine, openings: Opening[], edges: Edge[][]): Piece[] {
  const holes = openings.flatMap((opening, v) => isCutBy(beam, opening) ? [{ v, ...cutExtent(opening, edges[v]!, beam.axis) }] : [])
  return withoutIntervals({ from: beam.from, to: beam.to }, holes)
    .filter(piece => piece.to - piece.from > TOLERANCE)
    .map(({ from, to }) => ({ line: { ...beam, from, to }, cutBy: holes.filter(hole => hole.from === to || hole.to === from).map(hole => hole.v) }))
}
