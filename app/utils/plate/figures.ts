/** Figures of the plate beside its drawing, taken from the engine's model of it. */
import { applyOverrides, combinationFactors, nationalChoice, psi } from '#shared/engine/actions'
import { outlineFault, plateModel, slabAreaWithin } from '#shared/engine/plate'
import type { Basis } from '#shared/schemas/basis'
import type { Plate } from '#shared/schemas/plate'
import { columnPositions } from './columns'
import type { Box } from './outline'

type FloorLoad = Plate['floorLoad']

export interface PlateFigures {
  /** m² */
  grossArea: number
  voidArea: number
  slabArea: number
  columns: number
}

const MM2_PER_M2 = 1e6

/** Null for an outline that encloses no area: the problem list says why. */
export function plateFigures(plate: Plate): PlateFigures | null {
  if (outlineFault(plate.outline)) return null
  const model = plateModel(plate)
  return {
    grossArea: model.grossArea / MM2_PER_M2,
    voidArea: (model.grossArea - model.slabArea) / MM2_PER_M2,
    slabArea: model.slabArea / MM2_PER_M2,
    columns: columnPositions(plate).filter(column => !column.isOmitted).length,
  }
}

export interface BayLoad {
  /** Slab in the bay, m². */
  area: number
  /** Permanent and variable load on it by the zones that it lies in, kN. */
  permanent: number
  variable: number
  /** Largest design value over the combinations of the basis, kN. */
  design: number | null
}

/** Loads of a rectangle of the plate: each zone on its own area, the floor load on the rest. */
export function bayLoad(plate: Plate, box: Box, basis: Basis | null): BayLoad | null {
  if (outlineFault(plate.outline)) return null
  const model = plateModel(plate)
  const whole = { x0: box.x, y0: box.y, x1: box.x + box.width, y1: box.y + box.height }
  const area = slabAreaWithin(model, whole)
  const parts: { load: FloorLoad, area: number }[] = []
  let zoned = 0
  for (const zone of plate.zones) {
    const common = {
      x0: Math.max(whole.x0, zone.x), y0: Math.max(whole.y0, zone.y),
      x1: Math.min(whole.x1, zone.x + zone.width), y1: Math.min(whole.y1, zone.y + zone.height),
    }
    if (common.x1 <= common.x0 || common.y1 <= common.y0) continue
    const part = slabAreaWithin(model, common)
    zoned += part
    parts.push({ load: zone, area: part })
  }
  parts.push({ load: plate.floorLoad, area: area - zoned })
  const sum = (of: (load: FloorLoad) => number) =>
    parts.reduce((total, part) => total + of(part.load) * part.area, 0) / MM2_PER_M2
  return {
    area: area / MM2_PER_M2,
    permanent: sum(load => load.permanent),
    variable: sum(load => load.variable),
    design: basis ? designValue(basis, sum) : null,
  }
}

type Sum = (of: (load: FloorLoad) => number) => number

function designValue(basis: Basis, sum: Sum): number {
  const choice = choiceOf(basis)
  return Math.max(...combinationFactors(choice, basis.combination).map(factors => (
    sum(load => factors.permanent * load.permanent
      + (factors.variable + factors.accompanying * psi(choice, load.category).psi0) * load.variable)
  )))
}

function choiceOf(basis: Basis) {
  return applyOverrides(nationalChoice(basis.nationalChoice), basis.overrides).choice
}

export interface DesignLoad {
  /** "6.10", "6.10a", "6.10b": the one that gives the larger value. */
  combination: string
  permanent: number
  variable: number
  /** kN/m² */
  value: number
}

/** Design load of a floor load under the basis, kN/m², with the factors that give it. */
export function designLoad(load: FloorLoad, basis: Basis): DesignLoad {
  const choice = choiceOf(basis)
  const values = combinationFactors(choice, basis.combination).map((factors) => {
    const variable = factors.variable + factors.accompanying * psi(choice, load.category).psi0
    return {
      combination: factors.name, permanent: factors.permanent, variable,
      value: factors.permanent * load.permanent + variable * load.variable,
    }
  })
  return values.reduce((most, each) => (each.value > most.value ? each : most))
}
