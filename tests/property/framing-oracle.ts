/**
 * What the tests know of a frame without asking the framing: areas and lengths added up from the
 * plate file, reactions by the lever rule, and the faults that no frame may have.
 */
import type { Frame, FrameBeam } from '#shared/engine/framing'
import type { Plate } from '#shared/schemas/plate'

interface Extent { x0: number, x1: number, y0: number, y1: number }

const extentOf = (b: { x: number, y: number, width: number, height: number }): Extent =>
  ({ x0: b.x, x1: b.x + b.width, y0: b.y, y1: b.y + b.height })
const covers = (r: Extent, x: number, y: number) => x > r.x0 && x < r.x1 && y > r.y0 && y < r.y1

/** Even-odd rule: whether a point off all sides lies inside the outline. */
export function isInside(outline: Plate['outline'], x: number, y: number): boolean {
  let inside = false
  outline.forEach(([ax, ay], n) => {
    const [bx, by] = outline[(n + 1) % outline.length]!
    if (ax === bx && (ay > y) !== (by > y) && ax > x) inside = !inside
  })
  return inside
}

export interface AppliedLoad { permanent: number, variable: (category: string, reducible: boolean) => number, area: number }

/** Permanent load and variable load by kind on the plate, N, and slab area, mm²: cell by cell between all coordinates. */
export function loadOnPlate(plate: Plate): AppliedLoad {
  const floor = { ...plate.floorLoad, reducible: !plate.floorLoad.category.startsWith('E') }
  const variable = new Map<string, number>()
  const addVariable = ({ category, reducible }: { category: string, reducible: boolean }, load: number) => {
    const kind = `${category} ${reducible}`
    variable.set(kind, (variable.get(kind) ?? 0) + load)
  }
  const holes = plate.voids.map(extentOf)
  const zones = plate.zones.map(zone => ({ ...extentOf(zone), zone }))
  const rising = (values: number[]) => [...new Set(values)].sort((a, b) => a - b)
  const xs = rising([...plate.outline.map(p => p[0]), ...[...holes, ...zones].flatMap(r => [r.x0, r.x1])])
  const ys = rising([...plate.outline.map(p => p[1]), ...[...holes, ...zones].flatMap(r => [r.y0, r.y1])])
  let [permanent, slab] = [0, 0]
  for (let i = 0; i + 1 < xs.length; i++) {
    for (let j = 0; j + 1 < ys.length; j++) {
      const [x, y] = [(xs[i]! + xs[i + 1]!) / 2, (ys[j]! + ys[j + 1]!) / 2]
      if (!isInside(plate.outline, x, y) || holes.some(h => covers(h, x, y))) continue
      const area = (xs[i + 1]! - xs[i]!) * (ys[j + 1]! - ys[j]!)
      const load = zones.find(z => covers(z, x, y))?.zone ?? floor
      permanent += load.permanent * area / 1000
      addVariable({ category: load.category, reducible: load.reducible && !load.category.startsWith('E') }, load.variable * area / 1000)
      slab += area
    }
  }
  for (const line of plate.lineLoads) {
    const length = lengthOf(plate, line.on)
    permanent += line.permanent * length
    addVariable(floor, line.variable * length)
  }
  return { permanent, variable: (category, reducible) => variable.get(`${category} ${reducible}`) ?? 0, area: slab }
}

function lengthOf(plate: Plate, on: Plate['lineLoads'][number]['on']): number {
  if (on === 'outline') {
    return plate.outline.reduce((sum, [x, y], n) => {
      const [nx, ny] = plate.outline[(n + 1) % plate.outline.length]!
      return sum + Math.abs(nx - x) + Math.abs(ny - y)
    }, 0)
  }
  if ('void' in on) {
    const box = plate.voids.find(v => v.name === on.void)!
    return 2 * (box.width + box.height)
  }
  return Math.abs(on.to[0] - on.from[0]) + Math.abs(on.to[1] - on.from[1])
}

/** Column reactions by kind: every beam by the lever rule, its carried beams first; `weightOf` a beam's own weight, N. */
export function columnLoads(frame: Frame, size: number, weightOf: (beam: number) => number): number[][] {
  const carried = frame.beams.map((): { beam: number, end: number, at: number }[] => [])
  frame.beams.forEach((beam, b) => beam.supports.forEach((support, end) => {
    if (support.kind === 'beam') carried[support.beam]!.push({ beam: b, end, at: support.at })
  }))
  const ends = new Map<number, [number[], number[]]>()
  const reactions = (b: number): [number[], number[]] => {
    const known = ends.get(b)
    if (known) return known
    const beam = frame.beams[b]!
    const span = beam.to - beam.from
    const pair: [number[], number[]] = [new Array<number>(size).fill(0), new Array<number>(size).fill(0)]
    const put = (load: readonly number[], amount: number, at: number) => load.forEach((value, k) => {
      pair[0][k]! += value * amount * (1 - at / span)
      pair[1][k]! += value * amount * at / span
    })
    for (const { from, to, load } of beam.stretches) put(load, to - from, (from + to) / 2)
    for (const { at, load } of beam.spots) put(load, 1, at)
    for (const { beam: other, end, at } of carried[b]!) put(reactions(other)[end]!, 1, at)
    for (const end of pair) end[0]! += weightOf(b) / 2
    ends.set(b, pair)
    return pair
  }
  const columns = frame.columns.map(column => [...column.direct])
  frame.beams.forEach((beam, b) => beam.supports.forEach((support, end) => {
    if (support.kind === 'column') reactions(b)[end]!.forEach((value, k) => {
      columns[support.column]![k]! += value
    })
  }))
  return columns
}

const NEAR = 1e-6
const apart = (a: number, b: number) => Math.abs(a - b) > NEAR
const within = (value: number, from: number, to: number) => value > from + NEAR && value < to - NEAR

function pointOn(beam: FrameBeam, along: number): [number, number] {
  return beam.axis === 'x' ? [along, beam.at] : [beam.at, along]
}

/** Faults in words; an empty list is a sound frame. */
export function faultsOf(frame: Frame, plate: Plate): string[] {
  const faults: string[] = []
  frame.beams.forEach((beam, b) => {
    const name = `beam ${b} along ${beam.axis} at ${beam.at} from ${beam.from} to ${beam.to}`
    if (!(beam.to - beam.from > NEAR)) faults.push(`${name} has no length`)
    faults.push(...endFaults(frame, beam, name))
    frame.columns.forEach(({ x, y }) => {
      const [s, t] = beam.axis === 'x' ? [x, y] : [y, x]
      if (!apart(t, beam.at) && within(s, beam.from, beam.to)) faults.push(`${name} runs over the column at ${x}, ${y}`)
    })
    for (const v of plate.voids.map(extentOf)) {
      const [length, width] = beam.axis === 'x' ? [[v.x0, v.x1], [v.y0, v.y1]] as const : [[v.y0, v.y1], [v.x0, v.x1]] as const
      if (within(beam.at, width[0], width[1]) && beam.from < length[1] - NEAR && beam.to > length[0] + NEAR) faults.push(`${name} runs through a void`)
    }
    frame.beams.slice(0, b).forEach((other, o) => {
      if (other.axis === beam.axis) {
        if (!apart(other.at, beam.at) && other.from < beam.to - NEAR && beam.from < other.to - NEAR) faults.push(`${name} lies on beam ${o}`)
      } else if (within(other.at, beam.from, beam.to) && within(beam.at, other.from, other.to)) {
        faults.push(`${name} crosses beam ${o} along ${other.axis} at ${other.at}`)
      }
    })
    for (const { from, to } of [...beam.stretches, ...beam.held, ...beam.heldInConstruction]) {
      if (from < -NEAR || to > beam.to - beam.from + NEAR || from >= to) faults.push(`${name} has a stretch ${from} to ${to} beyond its ends`)
    }
    for (const { at } of beam.spots) if (at < -NEAR || at > beam.to - beam.from + NEAR) faults.push(`${name} has a load at ${at} beyond its ends`)
  })
  if (new Set(frame.order).size !== frame.beams.length) faults.push('the load order leaves beams out')
  return faults
}

function endFaults(frame: Frame, beam: FrameBeam, name: string): string[] {
  return beam.supports.flatMap((support, end) => {
    const [x, y] = pointOn(beam, end === 0 ? beam.from : beam.to)
    if (support.kind === 'column') {
      const column = frame.columns[support.column]
      return column && !apart(column.x, x) && !apart(column.y, y) ? [] : [`${name}: no column at end ${end}`]
    }
    const carrier = frame.beams[support.beam]
    if (!carrier || carrier.axis === beam.axis) return [`${name}: no beam across at end ${end}`]
    const [s, t] = carrier.axis === 'x' ? [x, y] : [y, x]
    const sound = !apart(carrier.at, t) && within(s, carrier.from, carrier.to) && !apart(s - carrier.from, support.at)
    return sound ? [] : [`${name}: its end ${end} is not inside the beam that carries it`]
  })
}

/** Area of slab that each beam should carry from the full bays, mm², by walking along the span from every cell to the beams. */
export function areaOnBeams(frame: Frame, plate: Plate, spanAt: (x: number, y: number) => 'x' | 'y' | null): number[] {
  const areas = new Array<number>(frame.beams.length).fill(0)
  const holes = plate.voids.map(extentOf)
  const strips = trimStrips(frame, holes)
  const rising = (values: number[]) => [...new Set(values)].sort((a, b) => a - b)
  const boxes = [...holes, ...strips.map(s => s.box)]
  const cuts = (axis: 'x' | 'y') => rising([
    ...frame.bays.grid[axis === 'x' ? 'xs' : 'ys'],
    ...boxes.flatMap(r => axis === 'x' ? [r.x0, r.x1] : [r.y0, r.y1]),
    ...frame.beams.flatMap(b => b.axis === axis ? [b.from, b.to] : [b.at]),
  ])
  const [xs, ys] = [cuts('x'), cuts('y')]
  for (let i = 0; i + 1 < xs.length; i++) {
    for (let j = 0; j + 1 < ys.length; j++) {
      const [x0, x1, y0, y1] = [xs[i]!, xs[i + 1]!, ys[j]!, ys[j + 1]!]
      const [x, y] = [(x0 + x1) / 2, (y0 + y1) / 2]
      const span = spanAt(x, y)
      if (span === null || holes.some(h => covers(h, x, y))) continue
      const strip = strips.find(s => s.axis === span && covers(s.box, x, y))
      if (strip) {
        areas[strip.beamAt(span === 'x' ? x : y)]! += (x1 - x0) * (y1 - y0)
        continue
      }
      const [from, to, width] = span === 'x' ? [x0, x1, y1 - y0] : [y0, y1, x1 - x0]
      const [left, right] = [-1, 1].map(sign => nearestBeam(frame, span, span === 'x' ? x : y, span === 'x' ? y : x, sign, (s, t) => {
        const [px, py] = span === 'x' ? [s, t] : [t, s]
        return spanAt(px, py) === span && !holes.some(h => covers(h, px, py)) && !strips.some(p => p.axis === span && covers(p.box, px, py))
      }, span === 'x' ? xs : ys))
      if (left === undefined || right === undefined || (left < 0 && right < 0)) throw new Error(`slab at ${x}, ${y} reaches no beam`)
      if (left < 0 || right < 0) {
        areas[Math.max(left, right)]! += (to - from) * width
        continue
      }
      const m = Math.min(to, Math.max(from, (frame.beams[left]!.at + frame.beams[right]!.at) / 2))
      areas[left]! += (m - from) * width
      areas[right]! += (to - m) * width
    }
  }
  return areas
}

/** The nearest beam across the span on one side of a place, over slab only; −1: none. */
function nearestBeam(
  frame: Frame, span: 'x' | 'y', s: number, t: number, sign: number, isSlab: (s: number, t: number) => boolean, stations: number[],
): number {
  const ahead = sign > 0 ? stations.filter(v => v > s) : stations.filter(v => v < s).reverse()
  for (let n = 0; n < ahead.length; n++) {
    const at = ahead[n]!
    const beam = frame.beams.findIndex(b => b.axis !== span && !apart(b.at, at) && within(t, b.from, b.to))
    if (beam >= 0) return beam
    const beyond = ahead[n + 1]
    if (beyond === undefined || !isSlab((at + beyond) / 2, t)) return -1
  }
  return -1
}

/** Slab between a void's edge and the nearest beams parallel to it that run along the whole edge within 600 mm. */
function trimStrips(frame: Frame, holes: readonly Extent[]): { axis: 'x' | 'y', box: Extent, beamAt: (s: number) => number }[] {
  return holes.flatMap(hole => (['x', 'y'] as const).flatMap(axis => ([-1, 1] as const).flatMap((sign) => {
    const [from, to] = axis === 'x' ? [hole.x0, hole.x1] : [hole.y0, hole.y1]
    const edge = axis === 'x' ? (sign < 0 ? hole.y0 : hole.y1) : (sign < 0 ? hole.x0 : hole.x1)
    const near = frame.beams.filter(b => b.axis === axis && (b.at - edge) * sign > -NEAR && (b.at - edge) * sign < 600 + NEAR && b.from < to && b.to > from)
    const at = [...new Set(near.map(b => b.at))].sort((a, b) => (a - b) * sign).find((line) => {
      const covered = near.filter(b => b.at === line).reduce((sum, b) => sum + Math.min(to, b.to) - Math.max(from, b.from), 0)
      return covered >= to - from - NEAR
    })
    if (at === undefined || !apart(at, edge)) return []
    const [low, high] = [Math.min(at, edge), Math.max(at, edge)]
    const box = axis === 'x' ? { x0: from, x1: to, y0: low, y1: high } : { y0: from, y1: to, x0: low, x1: high }
    if (holes.some(o => o.x0 < box.x1 && box.x0 < o.x1 && o.y0 < box.y1 && box.y0 < o.y1)) return []
    const beamAt = (s: number) => frame.beams.findIndex(b => b.axis === axis && b.at === at && within(s, b.from, b.to))
    return [{ axis, box, beamAt }]
  })))
}
