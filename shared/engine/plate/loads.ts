/**
 * Loads by kind. A load is a vector: the permanent part, one part for each category of imposed
 * load (those that may be reduced by area apart from those that may not), the two parts of the
 * construction stage, and the loaded area itself. Everything that is linear in the loads (take-down,
 * equilibrium, tributary areas) is done on the whole vector at once.
 * Units: N/mm² on areas, N/mm on lines, N at points; the area part is mm² per mm², mm, mm².
 */
import type { Plate, Slab } from '#shared/schemas/plate'
import type { Category } from '../actions'
import { type Rectangle, rectangleOf } from './rectangles'

export interface VariableKind { category: Category, reducible: boolean }

export interface LoadKinds {
  /** Length of a load vector. */
  size: number
  variable: VariableKind[]
  /** Positions in the vector: permanent is 0, the variable kinds follow it. */
  constructionPermanent: number
  constructionVariable: number
  area: number
}

export const PERMANENT = 0

/** A zone (or the floor outside all zones) with its load per area and its slab. */
export interface LoadZoneModel {
  name: string
  /** null: the floor outside all zones. */
  box: Rectangle | null
  load: number[]
  slab: Slab
}

/** Categories whose imposed load may be reduced by area or storeys: never storage, traffic, roofs. */
const REDUCIBLE: readonly Category[] = ['A', 'B', 'C', 'C1', 'C2', 'C3', 'C4', 'C5', 'D', 'D1', 'D2']

/** Imposed load while the floor is built, kN/m² (EN 1991-1-6 Table 4.1, working personnel and small equipment). */
const CONSTRUCTION_IMPOSED = 0.75
/** What wet concrete weighs more than hard concrete, kN/m³ (EN 1991-1-1 Table A.1 note 1). */
const WET_SURPLUS = 1
const PER_AREA = 1e-3

export function loadKindsOf(plate: Plate): LoadKinds {
  const variable: VariableKind[] = []
  const add = (category: Category, reducible: boolean) => {
    if (!variable.some(kind => kind.category === category && kind.reducible === reducible)) variable.push({ category, reducible })
  }
  add(plate.floorLoad.category, REDUCIBLE.includes(plate.floorLoad.category))
  for (const zone of plate.zones) add(zone.category, isReducible(zone))
  return {
    size: variable.length + 4,
    variable,
    constructionPermanent: variable.length + 1,
    constructionVariable: variable.length + 2,
    area: variable.length + 3,
  }
}

function isReducible(zone: Plate['zones'][number]): boolean {
  return zone.reducible && REDUCIBLE.includes(zone.category)
}

export function variableIndex(kinds: LoadKinds, category: Category, reducible: boolean): number {
  return 1 + kinds.variable.findIndex(kind => kind.category === category && kind.reducible === reducible)
}

/** Place of the floor's own variable load, which line loads share. */
export const FLOOR_VARIABLE = 1

/**
 * The floor and its zones as load vectors per area. `slab` stands in for the plate's own where a
 * study tries several: the permanent load then changes by the difference of the two weights.
 */
export function loadZonesOf(plate: Plate, kinds: LoadKinds, slab: Slab): LoadZoneModel[] {
  const exchanged = (slab.weight ?? 0) - (plate.slab.weight ?? 0)
  const change = slab === plate.slab ? 0 : exchanged
  const floor = areaLoad(kinds, slab, plate.floorLoad.permanent + change, plate.floorLoad.variable, FLOOR_VARIABLE)
  const zones = plate.zones.map((zone): LoadZoneModel => {
    const own = zone.slab ?? slab
    const permanent = zone.permanent + (zone.slab ? 0 : change)
    const index = variableIndex(kinds, zone.category, isReducible(zone))
    return { name: zone.name, box: rectangleOf(zone), slab: own, load: areaLoad(kinds, own, permanent, zone.variable, index) }
  })
  return [...zones, { name: 'Floor', box: null, slab, load: floor }]
}

function areaLoad(kinds: LoadKinds, slab: Slab, permanent: number, variable: number, variableAt: number): number[] {
  const load = new Array<number>(kinds.size).fill(0)
  const wet = slab.system === 'planks' ? 0 : WET_SURPLUS * slab.depth / 1000
  load[PERMANENT] = permanent * PER_AREA
  load[variableAt] = variable * PER_AREA
  load[kinds.constructionPermanent] = ((slab.weight ?? 0) + wet) * PER_AREA
  load[kinds.constructionVariable] = CONSTRUCTION_IMPOSED * PER_AREA
  load[kinds.area] = 1
  return load
}

/** A line load as a vector, N/mm; its variable part belongs to the floor's category. */
export function lineLoadVector(kinds: LoadKinds, permanent: number, variable: number): number[] {
  const load = new Array<number>(kinds.size).fill(0)
  load[PERMANENT] = permanent
  load[FLOOR_VARIABLE] = variable
  return load
}

export function addScaled(sum: number[], load: readonly number[], factor: number): void {
  for (let k = 0; k < load.length; k++) sum[k]! += load[k]! * factor
}
