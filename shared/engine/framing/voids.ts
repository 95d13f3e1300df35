/**
 * Voids cut beams and are trimmed. A beam line on a void's edge or close outside it trims that edge;
 * every other edge gets a trimmer, first the heads (parallel to the primaries, between the nearest
 * uncut beams across), then the sides (head to head, or to the primary where there is no head).
 */
import {
  type Axis, type Interval, type PlateModel, type Rectangle, TOLERANCE, across, along, isWhollyInside, overlaps, rectangleFrom,
  unionOf, withoutIntervals,
} from '../plate'
import type { BeamLine, Rejected } from './types'

/** Slab between a void's edge and the beam that trims it from outside. */
export interface TrimStrip { box: Rectangle, axis: Axis, beamAt: number }

export interface Trimmed { beams: BeamLine[], strips: TrimStrip[] }

interface Opening { name: string, box: Rectangle, primaryAxis: Axis }

/** An edge of a void: `low` is the one at the smaller coordinate. `trimmedAt`: line of the beam that trims it. */
interface Edge { axis: Axis, at: number, span: Interval, low: boolean, trimmedAt: number | null, needsTrimmer: boolean }

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
  const cut = pieces.filter(piece => reachesSupports(piece, openings, heads))
  return { beams: [...cut, ...heads, ...sides], strips }
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

function edgesOf(model: PlateModel, openings: Opening[], opening: Opening, beams: BeamLine[], trimDistance: number): Edge[] {
  const edges: Edge[] = []
  for (const axis of [opening.primaryAxis, across(opening.primaryAxis)]) {
    const width = along(opening.box, across(axis))
    for (const low of [true, false]) {
      const edge: Edge = {
        axis, at: low ? width.from : width.to, span: along(opening.box, axis), low, trimmedAt: null, needsTrimmer: true,
      }
      edge.trimmedAt = trimmingLine(edge, openings, opening, beams, trimDistance)
      edge.needsTrimmer = edge.trimmedAt === null && hasSlabOutside(model, edge)
      edges.push(edge)
    }
  }
  return edges
}

/**
 * Line of the nearest beams that lie along the whole edge, on it or up to the trim distance outside
 * with slab all the way between; null: none.
 */
function trimmingLine(edge: Edge, openings: Opening[], opening: Opening, beams: BeamLine[], trimDistance: number): number | null {
  const sign = edge.low ? -1 : 1
  const near = beams.filter((beam) => {
    const distance = (beam.at - edge.at) * sign
    return beam.axis === edge.axis && distance > -TOLERANCE && distance < trimDistance + TOLERANCE && !isCutBy(beam, opening)
  })
  const lines = [...new Set(near.map(beam => beam.at))].sort((a, b) => (a - b) * sign)
  for (const at of lines) {
    const covered = unionOf(near.filter(beam => beam.at === at).map(({ from, to }) => ({ from, to })))
    if (!covered.some(({ from, to }) => from <= edge.span.from + TOLERANCE && to >= edge.span.to - TOLERANCE)) continue
    const strip = stripBox(edge, at)
    return openings.some(other => other !== opening && overlaps(other.box, strip)) ? null : at
  }
  return null
}

/** Between an edge and a line outside it. */
function stripBox({ axis, span, at, low }: Edge, line: number): Rectangle {
  return rectangleFrom(axis, span, low ? { from: line, to: at } : { from: at, to: line })
}

function isCutBy(beam: BeamLine, { box }: Opening): boolean {
  const width = along(box, across(beam.axis))
  const length = along(box, beam.axis)
  return beam.at > width.from + TOLERANCE && beam.at < width.to - TOLERANCE && length.to > beam.from && length.from < beam.to
}

function hasSlabOutside(model: PlateModel, edge: Edge): boolean {
  const outside: Interval = edge.low ? { from: edge.at - 0.5, to: edge.at } : { from: edge.at, to: edge.at + 0.5 }
  const middle = (edge.span.from + edge.span.to) / 2
  const probes = [edge.span, { from: middle - 0.25, to: middle + 0.25 }]
  return probes.some(probe => isWhollyInside(model.outline, rectangleFrom(edge.axis, probe, outside)))
}

function stripsOf(edges: Edge[]): TrimStrip[] {
  return edges.flatMap((edge) => {
    const { axis, at, trimmedAt } = edge
    return trimmedAt === null || Math.abs(trimmedAt - at) <= TOLERANCE ? [] : [{ box: stripBox(edge, trimmedAt), axis, beamAt: trimmedAt }]
  })
}

/** A void with its strips, as it cuts the beams across its heads' direction. */
function cutExtent(opening: Opening, edges: Edge[], axis: Axis): Interval {
  const length = along(opening.box, axis)
  const across = edges.filter(edge => edge.axis !== axis)
  const low = across.find(edge => edge.low)?.trimmedAt ?? length.from
  const high = across.find(edge => !edge.low)?.trimmedAt ?? length.to
  return { from: Math.min(low, length.from), to: Math.max(high, length.to) }
}

function cutBeam(beam: BeamLine, openings: Opening[], edges: Edge[][]): BeamLine[] {
  const holes = openings.flatMap((opening, v) => isCutBy(beam, opening) ? [cutExtent(opening, edges[v]!, beam.axis)] : [])
  if (holes.length === 0) return [beam]
  return withoutIntervals({ from: beam.from, to: beam.to }, holes)
    .filter(piece => piece.to - piece.from > TOLERANCE)
    .map(piece => ({ ...beam, ...piece }))
}

function headsOf(openings: Opening[], edges: Edge[][], beams: BeamLine[]): BeamLine[] | Rejected {
  const heads: BeamLine[] = []
  for (const [v, opening] of openings.entries()) {
    for (const edge of edges[v]!) {
      if (edge.axis !== opening.primaryAxis || !edge.needsTrimmer) continue
      const left = supportBeside(beams, edge, -1)
      const right = supportBeside(beams, edge, 1)
      if (left === null || right === null) {
        return { rejection: 'void-cuts-beam', detail: `No beam beside void ${opening.name} carries its trimmer.` }
      }
      const head = trimmer(edge.axis, edge.at, left, right, true)
      if (openings.some(other => other !== opening && isCutBy(head, other))) {
        return { rejection: 'void-cuts-beam', detail: `The trimmer of void ${opening.name} would cross another void.` }
      }
      addTrimmer(heads, head)
    }
  }
  return heads
}

/** Line of the nearest beam across, at or outside the edge's end, that passes the edge's line uncut. */
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

function trimmer(axis: Axis, at: number, from: number, to: number, isParallelToPrimaries: boolean): BeamLine {
  return { axis, at, from, to, isParallelToPrimaries, isOnOutline: false, isTrimmer: true }
}

/** Two voids may share a trimmer: one beam over the length of both. */
function addTrimmer(trimmers: BeamLine[], added: BeamLine): void {
  const same = trimmers.find(t => t.axis === added.axis && t.at === added.at && t.from < added.to && added.from < t.to)
  if (!same) {
    trimmers.push(added)
    return
  }
  same.from = Math.min(same.from, added.from)
  same.to = Math.max(same.to, added.to)
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
