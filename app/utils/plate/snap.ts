/** Where a dragged point comes to rest. */
import type { Plate } from '#shared/schemas/plate'
import { gridOf } from './grid'
import { coordinate, type Axis } from './outline'

/** Nearest multiple of the module, counted from the first grid line, mm. */
export function snapToModule(at: number, module: number, origin: number): number {
  return module > 0 ? origin + Math.round((at - origin) / module) * module : Math.round(at)
}

/** Coordinates that attract a point: grid lines, the outline, and edges of what stands on the plate. */
export function attractors(plate: Plate, axis: Axis): number[] {
  const size = axis === 'x' ? 'width' : 'height'
  const areas = [...plate.voids, ...plate.keepClear, ...plate.zones, ...plate.regions]
  return [...new Set([
    ...gridOf(plate, axis).map(line => line.at),
    ...plate.outline.map(point => coordinate(point, axis)),
    ...areas.flatMap(area => [area[axis], area[axis] + area[size]]),
  ])].sort((a, b) => a - b)
}

/**
 * Rest of a coordinate: an attractor within reach wins, else the module.
 * @param reach mm within which an attractor draws the point in
 */
export function snapCoordinate(
  at: number, targets: readonly number[], module: number, origin: number, reach: number,
): number {
  let best: number | null = null
  for (const target of targets) {
    if (Math.abs(target - at) <= reach && (best === null || Math.abs(target - at) < Math.abs(best - at))) {
      best = target
    }
  }
  return best ?? snapToModule(at, module, origin)
}

export function clamp(value: number, least: number, most: number): number {
  return Math.min(Math.max(value, least), most)
}

/** Module position nearest to `at` within bounds; the bound itself where no module fits. */
export function snapWithin(
  at: number, module: number, origin: number, least: number, most: number,
): number {
  const snapped = snapToModule(clamp(at, least, most), module, origin)
  if (snapped >= least && snapped <= most) return snapped
  const inwards = snapped < least ? snapped + module : snapped - module
  return inwards >= least && inwards <= most ? inwards : clamp(at, least, most)
}
