/** The edges of voids: which beam line trims each, which needs a trimmer, which strip of slab lies between. */
import {
  type Axis, type Interval, type PlateModel, type Rectangle, TOLERANCE, across, along, isWhollyInside, overlaps, rectangleFrom, unionOf,
} from '../plate'
import type { BeamLine } from './types'

/** Slab between a void's edge and the beam that trims it from outside. */
export interface TrimStrip { box: Rectangle, axis: Axis, beamAt: number }

export interface Opening { name: string, box: Rectangle, primaryAxis: Axis }

/** An edge of a void: `low` is the one at the smaller coordinate. `trimmedAt`: line of the beam that trims it. */
export interface Edge { axis: Axis, at: number, span: Interval, low: boolean, trimmedAt: number | null, needsTrimmer: boolean }

export function edgesOf(model: PlateModel, openings: Opening[], opening: Opening, beams: BeamLine[], trimDistance: number): Edge[] {
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

export function isCutBy(beam: BeamLine, { box }: Opening): boolean {
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

export function stripsOf(edges: Edge[]): TrimStrip[] {
  return edges.flatMap((edge) => {
    const { axis, at, trimmedAt } = edge
    return trimmedAt === null || Math.abs(trimmedAt - at) <= TOLERANCE ? [] : [{ box: stripBox(edge, trimmedAt), axis, beamAt: trimmedAt }]
  })
}

/** A void with its strips, as it cuts the beams across its heads' direction. */
export function cutExtent(opening: Opening, edges: Edge[], axis: Axis): Interval {
  const length = along(opening.box, axis)
  const across = edges.filter(edge => edge.axis !== axis)
  const low = across.find(edge => edge.low)?.trimmedAt ?? length.from
  const high = across.find(edge => !edge.low)?.trimmedAt ?? length.to
  return { from: Math.min(low, length.from), to: Math.max(high, length.to) }
}
