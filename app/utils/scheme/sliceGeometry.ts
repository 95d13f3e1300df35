/**
 * The slice through the floor: a section along a seen beam, across the beams that stand at its two ends.
 * Chosen so that the deepest beam of the scheme is cut, or so that it passes through the selected member.
 */
import { liesOn, middleOf, runsAlongX, type Point } from './planGeometry'

export interface SliceBeam {
  mark: string
  section: string
  place: string
  from: Point
  to: Point
  carriedBy: readonly string[]
  carries: readonly string[]
}

/** Depth of a section in mm; 0 where it is not in the catalogue. */
export type DepthOf = (section: string) => number

export interface Slice {
  seen: SliceBeam
  /** The beams cut at the start and the end of the seen beam; null where a column alone carries it. */
  cutAtStart: SliceBeam | null
  cutAtEnd: SliceBeam | null
  alongX: boolean
}

export function chooseSlice(beams: readonly SliceBeam[], selected: string | null, depthOf: DepthOf): Slice | null {
  const chosen = beams.find(beam => beam.mark === selected)
  if (chosen) {
    const own = sliceAlong(chosen, beams, depthOf)
    const marks = new Set(beams.map(beam => beam.mark))
    const bearsOnBeams = chosen.carriedBy.some(mark => marks.has(mark))
    if (bearsOnBeams && own.cutAtStart && own.cutAtEnd) return own
    return bestAcross(chosen, beams, depthOf) ?? own
  }
  const byDepth = [...beams].sort((a, b) => depthOf(b.section) - depthOf(a.section))
  const centre = centreOf(beams)
  const deepest = depthOf(byDepth[0]?.section ?? '')
  const candidates = byDepth.filter(beam => depthOf(beam.section) >= deepest - 0.5)
    .sort((a, b) => distance(middleOf(a), centre) - distance(middleOf(b), centre))
  for (const beam of candidates) {
    const slice = bestAcross(beam, beams, depthOf)
    if (slice) return slice
  }
  return byDepth[0] ? sliceAlong(byDepth[0], beams, depthOf) : null
}

/** The section along a beam, with what is cut at its ends. */
export function sliceAlong(seen: SliceBeam, beams: readonly SliceBeam[], depthOf: DepthOf): Slice {
  const alongX = runsAlongX(seen)
  const axis = alongX ? 0 : 1
  const [start, end] = seen.from[axis] <= seen.to[axis] ? [seen.from, seen.to] : [seen.to, seen.from]
  const cutAt = (place: Point) => beams
    .filter(beam => runsAlongX(beam) !== alongX && liesOn(place, beam))
    .sort((a, b) => depthOf(b.section) - depthOf(a.section))[0] ?? null
  return { seen: { ...seen, from: start, to: end }, cutAtStart: cutAt(start), cutAtEnd: cutAt(end), alongX }
}

/** Of the beams that end on a cut beam, the section with two cut beams that lies nearest to its middle. */
function bestAcross(cut: SliceBeam, beams: readonly SliceBeam[], depthOf: DepthOf): Slice | null {
  const alongX = runsAlongX(cut)
  const middle = middleOf(cut)
  const ending = beams
    .filter(beam => runsAlongX(beam) !== alongX && (liesOn(beam.from, cut) || liesOn(beam.to, cut)))
    .map(beam => sliceAlong(beam, beams, depthOf))
    .filter(slice => slice.cutAtStart && slice.cutAtEnd)
  return ending.sort((a, b) =>
    distance(nearEnd(a, middle), middle) - distance(nearEnd(b, middle), middle)
    || middleOf(b.seen)[1] - middleOf(a.seen)[1])[0] ?? null
}

function nearEnd(slice: Slice, to: Point): Point {
  return distance(slice.seen.from, to) <= distance(slice.seen.to, to) ? slice.seen.from : slice.seen.to
}

function centreOf(beams: readonly SliceBeam[]): Point {
  const sum = beams.reduce<Point>((total, beam) => {
    const [x, y] = middleOf(beam)
    return [total[0] + x, total[1] + y]
  }, [0, 0])
  return [sum[0] / Math.max(1, beams.length), sum[1] / Math.max(1, beams.length)]
}

function distance(a: Point, b: Point): number {
  return Math.hypot(a[0] - b[0], a[1] - b[1])
}

export interface SectionDimensions { h: number, b: number, tw: number, tf: number }

/** Outline of an I section with its top flange up, centred on `x`, its top at `y`; px. Fillets are left out. */
export function iSectionPath(section: SectionDimensions, x: number, y: number, scale: number): string {
  const h = section.h * scale
  const b = section.b * scale
  const tw = Math.max(section.tw * scale, 1.4)
  const tf = Math.max(section.tf * scale, 1.4)
  const [left, right, webLeft, webRight] = [x - b / 2, x + b / 2, x - tw / 2, x + tw / 2]
  return [
    `M${px(left)} ${px(y)}H${px(right)}V${px(y + tf)}H${px(webRight)}V${px(y + h - tf)}`,
    `H${px(right)}V${px(y + h)}H${px(left)}V${px(y + h - tf)}H${px(webLeft)}V${px(y + tf)}H${px(left)}Z`,
  ].join('')
}

/** The floor from the finish down to the ceiling, each part with its depth in mm; parts of no depth are left out. */
export function floorBuildUp(floor: {
  finish: number
  slabDepth: number
  beamDepth: number
  servicesZone: number
  ceiling: number
  storeyHeight: number
}): { parts: { name: string, depth: number }[], structural: number, total: number, clear: number } {
  const parts = [
    { name: 'finish', depth: floor.finish },
    { name: 'slab', depth: floor.slabDepth },
    { name: 'beam', depth: floor.beamDepth },
    { name: 'services', depth: floor.servicesZone },
    { name: 'ceiling', depth: floor.ceiling },
  ].filter(part => part.depth > 0)
  const total = parts.reduce((sum, part) => sum + part.depth, 0)
  return { parts, structural: floor.slabDepth + floor.beamDepth, total, clear: floor.storeyHeight - total }
}

function px(value: number): number {
  return Math.round(value * 100) / 100
}
