/** What the slab would say to a framing, from the grid alone: for grids on which nothing else can differ. */
import { type BayGrid, type PlateModel, TOLERANCE, isFull } from '../plate'
import { slabSpanAxis } from './lines'
import { directionReason, spanReason } from './slab'
import type { RegionFraming, Rejected } from './types'

/**
 * Whether reasons earlier than the slab's depend on the grid alone, not on direction and divisions:
 * no void or omitted column cuts beams, one region, one kind of slab, line loads on the outline only.
 */
export function isJudgedByGrid({ plate, zones, slab }: PlateModel): boolean {
  return plate.voids.length === 0 && plate.omittedColumns.length === 0 && plate.regions.length === 0
    && plate.lineLoads.every(line => line.on === 'outline')
    && zones.every(zone => zone.slab.span === slab.span && zone.slab.maxSpan === slab.maxSpan)
}

/** The reason that the framing of such a grid would give for its slab, or null. Rows and panels in the order of the framing. */
export function slabReason({ slab }: PlateModel, bays: BayGrid, framing: RegionFraming): Rejected | null {
  const axis = slabSpanAxis(framing)
  if (slab.span !== 'free' && slab.span !== axis) return directionReason(slab, axis)
  const [lines, rows] = axis === 'x' ? [bays.grid.xs, bays.grid.ys] : [bays.grid.ys, bays.grid.xs]
  const parts = framing.direction === axis ? framing.divisions : 1
  for (let r = 0; r + 1 < rows.length; r++) {
    for (let n = 0; n + 1 < lines.length; n++) {
      if (axis === 'x' ? !isFull(bays, n, r) : !isFull(bays, r, n)) continue
      const [start, end] = [lines[n]!, lines[n + 1]!]
      for (let k = 0; k < parts; k++) {
        const from = k === 0 ? start : start + (end - start) * k / parts
        const to = k + 1 === parts ? end : start + (end - start) * (k + 1) / parts
        if (to - from > slab.maxSpan + TOLERANCE) return spanReason(slab, to - from)
      }
    }
  }
  return null
}
