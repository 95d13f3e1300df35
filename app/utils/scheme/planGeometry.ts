/**
 * Pure geometry of the framing plan: millimetres of the plate (y upwards) to pixels of the drawing
 * (y downwards), beams drawn short of what carries them, places for sizes, the nearest member in a direction.
 */
import type { MemberKind } from '#shared/schemas/study'

export type Point = [number, number]

export interface PlanBeam { mark: string, kind: MemberKind, from: Point, to: Point, section: string }
export interface PlanColumn { mark: string, at: Point }
export interface Extent { left: number, right: number, bottom: number, top: number }
export interface Segment { x1: number, y1: number, x2: number, y2: number }

export interface PlanView {
  /** px per mm */
  scale: number
  width: number
  height: number
  x: (mm: number) => number
  y: (mm: number) => number
}

/** What surrounds the plate on the sheet, px: bubbles and dimension strings above and at the left. */
export interface Margins { left: number, right: number, top: number, bottom: number }

export function extentOf(points: readonly Point[]): Extent {
  const extent = { left: Infinity, right: -Infinity, bottom: Infinity, top: -Infinity }
  for (const [x, y] of points) {
    extent.left = Math.min(extent.left, x)
    extent.right = Math.max(extent.right, x)
    extent.bottom = Math.min(extent.bottom, y)
    extent.top = Math.max(extent.top, y)
  }
  return extent
}

/** The largest scale at which an extent and its margins fit a sheet, times `zoom`. */
export function planView(
  extent: Extent, sheet: { width: number, height: number }, margins: Margins, zoom = 1,
): PlanView {
  const spanX = Math.max(1, extent.right - extent.left)
  const spanY = Math.max(1, extent.top - extent.bottom)
  const free = {
    width: Math.max(40, sheet.width - margins.left - margins.right),
    height: Math.max(40, sheet.height - margins.top - margins.bottom),
  }
  const scale = Math.min(free.width / spanX, free.height / spanY) * zoom
  return {
    scale,
    width: spanX * scale + margins.left + margins.right,
    height: spanY * scale + margins.top + margins.bottom,
    x: mm => margins.left + (mm - extent.left) * scale,
    y: mm => margins.top + (extent.top - mm) * scale,
  }
}

/** A drawing smaller than its sheet, moved to the middle of it; a larger one stays where it is. */
export function centred(view: PlanView, sheet: { width: number, height: number }): PlanView {
  const across = Math.max(0, sheet.width - view.width) / 2
  const down = Math.max(0, sheet.height - view.height) / 2
  return {
    scale: view.scale,
    width: view.width + across * 2,
    height: view.height + down * 2,
    x: mm => view.x(mm) + across,
    y: mm => view.y(mm) + down,
  }
}

/** Share of ink in a beam's line by its utilisation: half at 0.5 and below, full from 1.0. */
export function inkShare(utilisation: number): number {
  return Math.min(1, Math.max(0.5, utilisation))
}

export interface LineWeights {
  primary: number
  secondary: number
  trimmer: number
  trimmerDashed: boolean
  slabEdge: number
  thin: number
  sizes: 'none' | 'chosen' | 'all'
  primarySize: number
  secondarySize: number
}

/** Line weights and sizes of lettering by zoom, px per metre (design page, table of lines). */
export function lineWeights(pxPerMetre: number): LineWeights {
  if (pxPerMetre < 7) {
    return { primary: 2.1, secondary: 0.9, trimmer: 0.8, trimmerDashed: true, slabEdge: 1, thin: 0.75, sizes: 'none', primarySize: 10, secondarySize: 9 }
  }
  if (pxPerMetre < 11) {
    return { primary: 2, secondary: 0.9, trimmer: 0.9, trimmerDashed: false, slabEdge: 1, thin: 0.75, sizes: 'chosen', primarySize: 10, secondarySize: 9 }
  }
  if (pxPerMetre <= 20) {
    return { primary: 2.6, secondary: 1.2, trimmer: 1.2, trimmerDashed: false, slabEdge: 1.2, thin: 0.75, sizes: 'all', primarySize: 10, secondarySize: 9 }
  }
  return { primary: 3.2, secondary: 1.6, trimmer: 1.4, trimmerDashed: false, slabEdge: 1.4, thin: 1, sizes: 'all', primarySize: 11, secondarySize: 10 }
}

/** Runs along x (true) or along y (false). Beams of a plate are parallel to one of the two. */
export function runsAlongX(beam: { from: Point, to: Point }): boolean {
  return Math.abs(beam.to[0] - beam.from[0]) >= Math.abs(beam.to[1] - beam.from[1])
}

/** Does a point lie on a beam, ends included, within a tolerance in mm? */
export function liesOn(point: Point, beam: { from: Point, to: Point }, tolerance = 1): boolean {
  const [x, y] = point
  if (runsAlongX(beam)) {
    return Math.abs(y - beam.from[1]) <= tolerance
      && x >= Math.min(beam.from[0], beam.to[0]) - tolerance && x <= Math.max(beam.from[0], beam.to[0]) + tolerance
  }
  return Math.abs(x - beam.from[0]) <= tolerance
    && y >= Math.min(beam.from[1], beam.to[1]) - tolerance && y <= Math.max(beam.from[1], beam.to[1]) + tolerance
}

/**
 * The line of a beam in px, stopped short at both ends: `atColumn` px before a column, else `atBeam`
 * px before the beam across that carries it; a free end stays where it is.
 */
export function beamSegment(
  beam: PlanBeam, view: PlanView, columns: ReadonlySet<string>, crossing: (beam: PlanBeam, end: Point) => boolean,
  gaps: { atColumn: number, atBeam: number },
): Segment {
  const gapAt = (end: Point) => columns.has(placeKey(end)) ? gaps.atColumn : crossing(beam, end) ? gaps.atBeam : 0
  const start = gapAt(beam.from)
  const stop = gapAt(beam.to)
  const x1 = view.x(beam.from[0])
  const y1 = view.y(beam.from[1])
  const x2 = view.x(beam.to[0])
  const y2 = view.y(beam.to[1])
  const length = Math.hypot(x2 - x1, y2 - y1)
  if (length <= start + stop) return { x1, y1, x2, y2 }
  const ux = (x2 - x1) / length
  const uy = (y2 - y1) / length
  return { x1: x1 + ux * start, y1: y1 + uy * start, x2: x2 - ux * stop, y2: y2 - uy * stop }
}

export function placeKey(point: Point): string {
  return `${Math.round(point[0])} ${Math.round(point[1])}`
}

/** Is a beam's end carried by a beam across it? Beams are looked up by line, so that thousands stay quick. */
export function crossingIndex(beams: readonly PlanBeam[]): (beam: PlanBeam, end: Point) => boolean {
  const rows = new Map<number, PlanBeam[]>()
  const columns = new Map<number, PlanBeam[]>()
  for (const beam of beams) {
    const along = runsAlongX(beam)
    const line = Math.round(along ? beam.from[1] : beam.from[0])
    const shelf = along ? rows : columns
    const list = shelf.get(line)
    if (list) list.push(beam)
    else shelf.set(line, [beam])
  }
  return (beam, end) => {
    const shelf = runsAlongX(beam) ? columns : rows
    const line = Math.round(runsAlongX(beam) ? end[0] : end[1])
    return [line - 1, line, line + 1].some(at => shelf.get(at)?.some(other => liesOn(end, other)) ?? false)
  }
}

export interface SizeLabel { mark: string, text: string, x: number, y: number, turned: boolean, fontSize: number }

/** Width of a size in px: digits of the drawing's font are 0.6 em wide, the sign × somewhat less. */
export function sizeWidth(text: string, fontSize: number): number {
  return text.length * fontSize * 0.565
}

/** A size that stands across a beam's line needs this much of the bay's lower end for itself, px. */
const ROW = 13

/**
 * Where a beam's size stands: beside the middle of its line, turned along it; null where it would not
 * fit. Sizes of beams along x stand above their line, so a turned one keeps clear of the lower end.
 */
export function sizeLabel(beam: PlanBeam, segment: Segment, text: string, weight: number, fontSize: number): SizeLabel | null {
  const length = Math.hypot(segment.x2 - segment.x1, segment.y2 - segment.y1)
  const turned = !runsAlongX(beam)
  const width = sizeWidth(text, fontSize)
  if (width > length - 4) return null
  const x = (segment.x1 + segment.x2) / 2
  const y = (segment.y1 + segment.y2) / 2
  const off = weight / 2 + 3
  if (!turned) return { mark: beam.mark, text, turned, fontSize, x, y: y - off }
  const crowding = Math.max(0, ROW - (length - width) / 2)
  return { mark: beam.mark, text, turned, fontSize, x: x - off, y: y - Math.min(crowding, (length - width) / 2) }
}

interface Box { left: number, right: number, top: number, bottom: number }

/** The box of a written size, px. */
function labelBox(label: SizeLabel): Box {
  const half = sizeWidth(label.text, label.fontSize) / 2
  return label.turned
    ? { left: label.x - label.fontSize, right: label.x + 2, top: label.y - half, bottom: label.y + half }
    : { left: label.x - half, right: label.x + half, top: label.y - label.fontSize, bottom: label.y + 2 }
}

function overlap(a: Box, b: Box): boolean {
  return a.right > b.left && a.left < b.right && a.bottom > b.top && a.top < b.bottom
}

/**
 * Sizes in the order of their importance without those that would run over an earlier one or along the
 * line of another beam; a line across is cut by the knocked-out ground. The one of mark `always` is
 * written whatever lies beneath.
 */
export function withoutOverlap<T extends SizeLabel>(
  labels: readonly T[], lines: readonly { mark: string, segment: Segment }[] = [], always: string | null = null,
): T[] {
  const boxes = lines.map(({ mark, segment: { x1, y1, x2, y2 } }) => ({
    mark, turned: Math.abs(y2 - y1) > Math.abs(x2 - x1),
    box: { left: Math.min(x1, x2) - 0.5, right: Math.max(x1, x2) + 0.5, top: Math.min(y1, y2) - 0.5, bottom: Math.max(y1, y2) + 0.5 },
  }))
  const kept: { label: T, box: Box }[] = []
  for (const label of labels) {
    const box = labelBox(label)
    const isFree = label.mark === always || (kept.every(({ box: other }) => !overlap(box, other))
      && boxes.every(line => line.mark === label.mark || line.turned !== label.turned || !overlap(box, line.box)))
    if (isFree) kept.push({ label, box })
  }
  return kept.map(({ label }) => label)
}

export interface Dimension { from: number, to: number, text: string }

/** Dimension string of the bays between lines; positions in mm. */
export function bayDimensions(lines: readonly { at: number }[], write: (mm: number) => string): Dimension[] {
  const sorted = lines.map(line => line.at).sort((a, b) => a - b)
  return sorted.slice(1).map((to, i) => {
    const from = sorted[i] ?? to
    return { from, to, text: write(to - from) }
  })
}

/**
 * The member to go to with an arrow key: the nearest in a cone of 45° around the direction, measured
 * from the middle of the selected one, in mm. y of `direction` points upwards on the plan.
 */
export function nextMember(
  places: readonly { mark: string, at: Point }[], selected: string | null, direction: Point,
): string | null {
  const from = places.find(place => place.mark === selected)
  if (!from) return places[0]?.mark ?? null
  let best: string | null = null
  let least = Infinity
  for (const place of places) {
    if (place.mark === selected) continue
    const dx = place.at[0] - from.at[0]
    const dy = place.at[1] - from.at[1]
    const along = dx * direction[0] + dy * direction[1]
    const across = Math.abs(dx * direction[1]) + Math.abs(dy * direction[0])
    if (along <= 0 || across > along) continue
    const cost = along + across * 2
    if (cost < least) {
      least = cost
      best = place.mark
    }
  }
  return best ?? selected
}

export function middleOf(beam: { from: Point, to: Point }): Point {
  return [(beam.from[0] + beam.to[0]) / 2, (beam.from[1] + beam.to[1]) / 2]
}

/** The member nearest to a place on the plate within `reach` mm: a column first, then a beam. */
export function memberAt(
  place: Point, columns: readonly PlanColumn[], beams: readonly PlanBeam[], reach: number,
): string | null {
  const column = nearest(columns, member => Math.hypot(member.at[0] - place[0], member.at[1] - place[1]), reach)
  return column?.mark ?? nearest(beams, beam => distanceTo(place, beam), reach)?.mark ?? null
}

function nearest<T>(list: readonly T[], distance: (each: T) => number, reach: number): T | null {
  let best: T | null = null
  let least = reach
  for (const each of list) {
    const here = distance(each)
    if (here < least) {
      least = here
      best = each
    }
  }
  return best
}

/** Distance of a place from a beam's line between its ends, mm. */
export function distanceTo([x, y]: Point, beam: { from: Point, to: Point }): number {
  const dx = beam.to[0] - beam.from[0]
  const dy = beam.to[1] - beam.from[1]
  const length = dx * dx + dy * dy
  const along = length > 0 ? Math.min(1, Math.max(0, ((x - beam.from[0]) * dx + (y - beam.from[1]) * dy) / length)) : 0
  return Math.hypot(beam.from[0] + along * dx - x, beam.from[1] + along * dy - y)
}

/** A column as an I in plan with its web along an axis; px, centred on the place. */
export function columnGlyph(x: number, y: number, size: number, webAlongX: boolean): string {
  const h = size / 2
  return webAlongX
    ? `M${x - h} ${y}H${x + h}M${x - h} ${y - h}V${y + h}M${x + h} ${y - h}V${y + h}`
    : `M${x} ${y - h}V${y + h}M${x - h} ${y - h}H${x + h}M${x - h} ${y + h}H${x + h}`
}
