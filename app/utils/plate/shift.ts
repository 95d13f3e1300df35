/** What stands on the plate goes along when bays change their length. */
import type { Plate } from '#shared/schemas/plate'
import { mapOutline, type Axis, type Box } from './outline'
import type { PlatePatch } from './steps'

/**
 * Voids and keep-clear zones keep their size and go with their near edge; load zones and regions
 * stretch with both edges. Null where the outline would fold.
 */
export function shiftElements(
  plate: Plate, axis: Axis, move: (at: number) => number,
): PlatePatch | null {
  const outline = mapOutline(plate.outline, axis, move)
  if (!outline) return null
  return {
    outline,
    voids: plate.voids.map(each => withNearEdge(each, axis, move)),
    keepClear: plate.keepClear.map(each => withNearEdge(each, axis, move)),
    zones: plate.zones.map(each => withBothEdges(each, axis, move)),
    regions: plate.regions.map(each => withBothEdges(each, axis, move)),
    lineLoads: plate.lineLoads.map((lineLoad) => {
      const { on } = lineLoad
      if (typeof on === 'string' || !('from' in on)) return lineLoad
      return { ...lineLoad, on: { from: movePoint(on.from, axis, move), to: movePoint(on.to, axis, move) } }
    }),
  }
}

function movePoint(point: [number, number], axis: Axis, move: (at: number) => number): [number, number] {
  return axis === 'x' ? [move(point[0]), point[1]] : [point[0], move(point[1])]
}

function withNearEdge<Rectangle extends Box>(box: Rectangle, axis: Axis, move: (at: number) => number): Rectangle {
  return { ...box, [axis]: move(box[axis]) }
}

function withBothEdges<Rectangle extends Box>(box: Rectangle, axis: Axis, move: (at: number) => number): Rectangle {
  const size = axis === 'x' ? 'width' : 'height'
  const from = move(box[axis])
  const length = move(box[axis] + box[size]) - from
  return length >= 1 ? { ...box, [axis]: from, [size]: length } : withNearEdge(box, axis, move)
}
