/** Chart points from the columns that the API sends. */
import { parseSchemeKey } from '#shared/engine/search'
import type { SchemePoints } from '#shared/schemas/api'
import type { ChartPoint } from './chartGeometry'

/** `shownDepth` makes the depth of the chart, mm, out of the deepest beam and the slab system. */
export function chartPoints(points: SchemePoints, shownDepth: (beamDepth: number, slab: number) => number): ChartPoint[] {
  return points.key.map((key, i) => ({
    key,
    number: points.number[i] ?? 0,
    massPerArea: points.massPerArea[i] ?? 0,
    depth: shownDepth(points.depth[i] ?? 0, points.slab[i] ?? 0),
    slab: points.slab[i] ?? 0,
    depthCap: parseSchemeKey(key)?.depthCap ?? null,
    onTradeOffLine: points.onTradeOffLine[i] ?? false,
  }))
}
