/** What a drag of the selection means: for each place of the pointer, the intent that it would carry out. */
import type { Plate } from '#shared/schemas/plate'
import { moveOutlineEdge } from './building'
import { boxOfCorners, placeArea, type AreaKind } from './elements'
import { gridOf, moveGridLine, rangeOfLine } from './grid'
import type { Handle, Hit } from './hit'
import type { Axis, Box, Point } from './outline'
import { attractors, snapCoordinate, snapWithin } from './snap'
import type { Outcome } from './steps'

export type Intent = (plate: Plate) => Outcome

export interface Grip {
  /** Step that positions snap to, mm. */
  module: number
  /** mm within which lines and edges draw a corner in. */
  reach: number
}

export type IntentAt = (world: Point, grip: Grip) => Intent

const LEAST_SIDE = 100

function part(point: Point, axis: Axis): number {
  return axis === 'x' ? point[0] : point[1]
}

function origin(plate: Plate, axis: Axis): number {
  return gridOf(plate, axis)[0]?.at ?? 0
}

/** Snaps a free point to lines, edges or the module. */
export function snapPoint(plate: Plate, world: Point, { module, reach }: Grip): [number, number] {
  const snap = (axis: Axis) => (
    snapCoordinate(part(world, axis), attractors(plate, axis), module, origin(plate, axis), reach)
  )
  return [snap('x'), snap('y')]
}

/** The intents of a drag that starts on `hit` at `start` (mm); null where nothing there can be dragged. */
export function dragIntents(plate: Plate, hit: Hit | null, start: Point): IntentAt | null {
  if (hit?.kind === 'handle') return sizing(plate, hit.area, hit.index, hit.handle)
  if (hit?.kind !== 'selection') return null
  switch (hit.selection.kind) {
    case 'line': return lineMoving(plate, hit.selection.axis, hit.selection.index)
    case 'area': return areaMoving(plate, hit.selection.area, hit.selection.index, start)
    case 'edge': return edgeMoving(plate, hit.selection.index)
    default: return null
  }
}

function lineMoving(plate: Plate, axis: Axis, index: number): IntentAt {
  const own = gridOf(plate, axis)[index]?.at ?? 0
  const zero = index === 0 ? own : origin(plate, axis)
  const [least, most] = rangeOfLine(plate, axis, index)
  return (world, { module }) => {
    const at = snapWithin(part(world, axis), module, zero, least, most)
    return document => moveGridLine(document, axis, index, at)
  }
}

/** Either edge of the area may come to rest on a line or an edge of something else. */
function areaMoving(plate: Plate, kind: AreaKind, index: number, start: Point): IntentAt | null {
  const area: Box | undefined = plate[kind][index]
  if (!area) return null
  return (world, { module, reach }) => {
    const rest = (axis: Axis) => {
      const size = axis === 'x' ? area.width : area.height
      const own = [area[axis], area[axis] + size]
      const targets = attractors(plate, axis).filter(each => !own.includes(each))
      const at = area[axis] + part(world, axis) - part(start, axis)
      return snapCoordinate(at, [...targets, ...targets.map(each => each - size)], module, origin(plate, axis), reach)
    }
    const box = { x: rest('x'), y: rest('y') }
    return document => placeArea(document, kind, index, box)
  }
}

function sizing(plate: Plate, kind: AreaKind, index: number, handle: Handle): IntentAt | null {
  const area: Box | undefined = plate[kind][index]
  if (!area) return null
  return (world, grip) => {
    const corner = snapPoint(plate, world, grip)
    const side = (axis: Axis): [number, number] => {
      const low = area[axis]
      const high = low + (axis === 'x' ? area.width : area.height)
      if (handle[axis] === 0) return [low, high]
      const fixed = handle[axis] === 1 ? low : high
      const moved = part(corner, axis)
      return [fixed, Math.abs(moved - fixed) < LEAST_SIDE ? fixed + LEAST_SIDE * handle[axis] : moved]
    }
    const [x0, x1] = side('x')
    const [y0, y1] = side('y')
    const box = boxOfCorners([x0, y0], [x1, y1])
    return document => placeArea(document, kind, index, box)
  }
}

function edgeMoving(plate: Plate, index: number): IntentAt | null {
  const a = plate.outline[index]
  const b = plate.outline[(index + 1) % plate.outline.length]
  if (!a || !b) return null
  const axis: Axis = a[0] === b[0] ? 'x' : 'y'
  return (world, { module, reach }) => {
    const lines = gridOf(plate, axis).map(line => line.at)
    const at = snapCoordinate(part(world, axis), lines, module, origin(plate, axis), reach)
    return document => moveOutlineEdge(document, axis, index, at)
  }
}
