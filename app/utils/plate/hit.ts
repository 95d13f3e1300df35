/** What lies under the pointer. Pure geometry in px, so that it can be tested without a canvas. */
import type { Plate } from '#shared/schemas/plate'
import type { ColumnPosition } from './columns'
import type { AreaKind } from './elements'
import { along, type Frame } from './frame'
import { gridOf } from './grid'
import { coversPoint, type Axis, type Box, type Point } from './outline'
import type { Selection } from './selection'
import { toScreen, toWorld, type View } from './view'

/** A handle of a selected area: -1, 0 or 1 along each axis, 0/0 for the whole. */
export interface Handle { x: -1 | 0 | 1, y: -1 | 0 | 1 }

export type Hit
  = | { kind: 'selection', selection: Selection }
    | { kind: 'bay-length', axis: Axis, bay: number }
    | { kind: 'overall', axis: Axis }
    | { kind: 'handle', area: AreaKind, index: number, handle: Handle }

const REACH = 5
const COLUMN_REACH = 9
const STRING_REACH = 12

export interface Scene {
  plate: Plate
  columns: readonly ColumnPosition[]
  view: View
  frame: Frame
  selection: Selection | null
}

export function hitTest(scene: Scene, point: Point): Hit | null {
  return hitHandle(scene, point) ?? hitStrings(scene, point) ?? hitPlan(scene, point)
}

function select(selection: Selection): Hit {
  return { kind: 'selection', selection }
}

/** Screen rectangle of an area, px. */
export function screenBox(view: View, box: Box): Box {
  const [x, y] = toScreen(view, [box.x, box.y + box.height])
  return { x, y, width: box.width * view.scale, height: box.height * view.scale }
}

export function handlesOf(box: Box): { handle: Handle, at: [number, number] }[] {
  const steps = [-1, 0, 1] as const
  return steps.flatMap(x => steps.flatMap((y) => {
    if (x === 0 && y === 0) return []
    const at: [number, number] = [
      box.x + (box.width * (x + 1)) / 2, box.y + (box.height * (1 - y)) / 2,
    ]
    return [{ handle: { x, y }, at }]
  }))
}

function hitHandle({ plate, view, selection }: Scene, [px, py]: Point): Hit | null {
  if (selection?.kind !== 'area') return null
  const area = plate[selection.area][selection.index]
  if (!area) return null
  const found = handlesOf(screenBox(view, area))
    .find(({ at }) => Math.abs(at[0] - px) <= 7 && Math.abs(at[1] - py) <= 7)
  return found
    ? { kind: 'handle', area: selection.area, index: selection.index, handle: found.handle }
    : null
}

function hitStrings({ plate, view, frame }: Scene, [px, py]: Point): Hit | null {
  for (const axis of ['x', 'y'] as const) {
    const [main, cross] = axis === 'x' ? [px, py] : [py, px]
    const lines = gridOf(plate, axis)
    const places = lines.map(line => along(view, axis, line.at))
    const [near, far] = axis === 'x'
      ? [frame.bubbles.top, frame.bubbles.bottom]
      : [frame.bubbles.left, frame.bubbles.right]
    const reach = frame.radius + 3
    if (Math.abs(cross - near) <= reach || Math.abs(cross - far) <= reach) {
      const index = nearest(places, main, reach)
      if (index !== null) return select({ kind: 'line', axis, index })
    }
    const bays = axis === 'x' ? frame.bays.top : frame.bays.left
    if (Math.abs(cross - bays) <= STRING_REACH) {
      const bay = places.findIndex((place, i) => {
        const next = places[i + 1]
        return next !== undefined && main > Math.min(place, next) && main < Math.max(place, next)
      })
      if (bay >= 0) return { kind: 'bay-length', axis, bay }
    }
    const overall = axis === 'x' ? frame.overall.top : frame.overall.left
    const ends = [places[0] ?? 0, places.at(-1) ?? 0]
    const middle = ((ends[0] ?? 0) + (ends[1] ?? 0)) / 2
    if (Math.abs(cross - overall) <= STRING_REACH && Math.abs(main - middle) <= 40) {
      return { kind: 'overall', axis }
    }
  }
  return null
}

function nearest(places: readonly number[], at: number, reach: number): number | null {
  let best: number | null = null
  places.forEach((place, i) => {
    const gap = Math.abs(place - at)
    if (gap <= reach && (best === null || gap < Math.abs((places[best] ?? Infinity) - at))) best = i
  })
  return best
}

function contains(box: Box, [px, py]: Point, rim = 0): boolean {
  return px >= box.x - rim && px <= box.x + box.width + rim && py >= box.y - rim && py <= box.y + box.height + rim
}

function isOnRim(box: Box, point: Point): boolean {
  const inner = { x: box.x + REACH, y: box.y + REACH, width: box.width - 2 * REACH, height: box.height - 2 * REACH }
  return contains(box, point, REACH) && !(inner.width > 0 && inner.height > 0 && contains(inner, point))
}

function hitPlan(scene: Scene, point: Point): Hit | null {
  return hitColumn(scene, point)
    ?? hitArea(scene, point, 'voids', 'inside')
    ?? hitArea(scene, point, 'keepClear', 'label')
    ?? hitArea(scene, point, 'zones', 'label')
    ?? hitLineLoad(scene, point)
    ?? hitGridLine(scene, point)
    ?? hitArea(scene, point, 'keepClear', 'rim')
    ?? hitArea(scene, point, 'zones', 'rim')
    ?? hitArea(scene, point, 'regions', 'rim')
    ?? hitEdge(scene, point)
    ?? hitBay(scene, point)
}

function hitColumn({ plate, columns, view }: Scene, point: Point): Hit | null {
  const x = nearest(plate.gridX.map(line => along(view, 'x', line.at)), point[0], COLUMN_REACH)
  const y = nearest(plate.gridY.map(line => along(view, 'y', line.at)), point[1], COLUMN_REACH)
  if (x === null || y === null) return null
  const isThere = columns.some(column => column.x === x && column.y === y)
  return isThere ? select({ kind: 'column', x, y }) : null
}

/** Half the width and height of a label in the middle of an area, px. */
const LABEL = { width: 56, height: 20 }

function hitArea({ plate, view }: Scene, point: Point, area: AreaKind, by: 'inside' | 'label' | 'rim'): Hit | null {
  const list = plate[area]
  for (let index = list.length - 1; index >= 0; index--) {
    const each = list[index]
    if (!each) continue
    const box = screenBox(view, each)
    const isHit = by === 'inside'
      ? contains(box, point)
      : by === 'rim' ? isOnRim(box, point) : contains(labelBox(box), point) && contains(box, point)
    if (isHit) return select({ kind: 'area', area, index })
  }
  return null
}

function labelBox(box: Box): Box {
  return {
    x: box.x + box.width / 2 - LABEL.width, y: box.y + box.height / 2 - LABEL.height,
    width: LABEL.width * 2, height: LABEL.height * 2,
  }
}

function hitLineLoad({ plate, view }: Scene, point: Point): Hit | null {
  const index = plate.lineLoads.findIndex(({ on }) => {
    if (typeof on === 'string' || !('from' in on)) return false
    const a = toScreen(view, on.from)
    const b = toScreen(view, on.to)
    const box = {
      x: Math.min(a[0], b[0]), y: Math.min(a[1], b[1]),
      width: Math.abs(a[0] - b[0]), height: Math.abs(a[1] - b[1]),
    }
    return contains(box, point, REACH)
  })
  return index >= 0 ? select({ kind: 'lineLoad', index }) : null
}

function hitGridLine({ plate, view, frame }: Scene, point: Point): Hit | null {
  const within = point[0] >= frame.left - 30 && point[0] <= frame.right + 30
    && point[1] >= frame.top - 30 && point[1] <= frame.bottom + 30
  if (!within) return null
  for (const axis of ['x', 'y'] as const) {
    const places = gridOf(plate, axis).map(line => along(view, axis, line.at))
    const index = nearest(places, axis === 'x' ? point[0] : point[1], REACH)
    if (index !== null) return select({ kind: 'line', axis, index })
  }
  return null
}

function hitEdge({ plate, view }: Scene, [px, py]: Point): Hit | null {
  const count = plate.outline.length
  const index = plate.outline.findIndex((corner, i) => {
    const next = plate.outline[(i + 1) % count]
    if (!next) return false
    const a = toScreen(view, corner)
    const b = toScreen(view, next)
    return px >= Math.min(a[0], b[0]) - REACH && px <= Math.max(a[0], b[0]) + REACH
      && py >= Math.min(a[1], b[1]) - REACH && py <= Math.max(a[1], b[1]) + REACH
  })
  return index >= 0 ? select({ kind: 'edge', index }) : null
}

function hitBay({ plate, view }: Scene, point: Point): Hit | null {
  const at = toWorld(view, point)
  const x = plate.gridX.findIndex((line, i) => at[0] > line.at && at[0] < (plate.gridX[i + 1]?.at ?? -Infinity))
  const y = plate.gridY.findIndex((line, i) => at[1] > line.at && at[1] < (plate.gridY[i + 1]?.at ?? -Infinity))
  if (x < 0 || y < 0 || !coversPoint(plate.outline, at)) return null
  return select({ kind: 'bay', x, y })
}
