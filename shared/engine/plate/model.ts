/** The plate as the framing works with it: rectangles instead of records, loads as vectors. */
import type { LineLoad, Plate, Slab } from '#shared/schemas/plate'
import { type LoadKinds, type LoadZoneModel, addScaled, lineLoadVector, loadKindsOf, loadZonesOf } from './loads'
import { type OutlineEdge, coveredArea, outlineEdges, outlineRectangles } from './outline'
import { type Rectangle, areaOf, intersection, rectangleOf } from './rectangles'

export interface VoidModel { name: string, box: Rectangle, floors: number }
export interface RegionModel { name: string, box: Rectangle }
export interface LineLoadModel { source: LineLoad, index: number, load: number[] }

export interface PlateModel {
  plate: Plate
  slab: Slab
  /** The outline cut into disjoint rectangles. */
  outline: Rectangle[]
  edges: OutlineEdge[]
  voids: VoidModel[]
  keepClear: Rectangle[]
  regions: RegionModel[]
  kinds: LoadKinds
  /** Zones, then the floor outside them. */
  zones: LoadZoneModel[]
  lineLoads: LineLoadModel[]
  /** mm² */
  grossArea: number
  /** Outline less voids, mm². */
  slabArea: number
}

export function plateModel(plate: Plate, slab: Slab = plate.slab): PlateModel {
  const outline = outlineRectangles(plate.outline)
  const kinds = loadKindsOf(plate)
  const voids = plate.voids.map(v => ({ name: v.name, box: rectangleOf(v), floors: v.floors ?? plate.storeys }))
  const grossArea = outline.reduce((sum, r) => sum + areaOf(r), 0)
  return {
    plate,
    slab,
    outline,
    edges: outlineEdges(plate.outline),
    voids,
    keepClear: plate.keepClear.map(rectangleOf),
    regions: plate.regions.map(r => ({ name: r.name, box: rectangleOf(r) })),
    kinds,
    zones: loadZonesOf(plate, kinds, slab),
    lineLoads: plate.lineLoads.map((source, index) => ({
      source, index, load: lineLoadVector(kinds, source.permanent, source.variable),
    })),
    grossArea,
    slabArea: grossArea - voids.reduce((sum, v) => sum + coveredArea(outline, v.box), 0),
  }
}

/** Length of a line load on the plate, mm. */
export function lineLoadLength(model: PlateModel, line: LineLoad): number {
  const { on } = line
  if (on === 'outline') return model.edges.reduce((sum, edge) => sum + edge.to - edge.from, 0)
  if ('void' in on) {
    const box = model.voids.find(v => v.name === on.void)?.box
    return box ? 2 * (box.x1 - box.x0 + box.y1 - box.y0) : 0
  }
  return Math.abs(on.to[0] - on.from[0]) + Math.abs(on.to[1] - on.from[1])
}

/**
 * All load on the plate by kind, N, from areas and lengths alone: what the column reactions must
 * add up to. Own weight of the steel is not in it.
 */
export function appliedLoad(model: PlateModel): number[] {
  const total = new Array<number>(model.kinds.size).fill(0)
  let zoned = 0
  for (const zone of model.zones) {
    if (!zone.box) continue
    const area = slabAreaWithin(model, zone.box)
    zoned += area
    addScaled(total, zone.load, area)
  }
  addScaled(total, model.zones[model.zones.length - 1]!.load, model.slabArea - zoned)
  for (const line of model.lineLoads) addScaled(total, line.load, lineLoadLength(model, line.source))
  return total
}

/** Slab (outline less voids) inside a rectangle, mm². */
export function slabAreaWithin(model: PlateModel, box: Rectangle): number {
  let area = coveredArea(model.outline, box)
  for (const opening of model.voids) {
    const common = intersection(opening.box, box)
    if (common) area -= coveredArea(model.outline, common)
  }
  return area
}

/** The zone in force at a point that lies on no zone's edge. */
export function zoneAt(model: PlateModel, x: number, y: number): LoadZoneModel {
  for (const zone of model.zones) {
    const box = zone.box
    if (!box || (x > box.x0 && x < box.x1 && y > box.y0 && y < box.y1)) return zone
  }
  return model.zones[model.zones.length - 1]!
}
