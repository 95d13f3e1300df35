/** Forces in a column length under every combination: what the floors above bring. */
import { type CombinationFactors, psi, storeyReduction } from '../actions'
import { type Axis, across } from '../plate'
import type { ColumnDemand, ColumnRules } from './types'

/** One design situation: factors of the permanent load, of each floor's variable kinds and of the roof's. */
export interface Situation {
  name: string
  permanent: number
  roofVariable: number
  /** Factor of a variable kind where `floors` floors are carried. */
  variable: (kind: number, floors: number) => number
}

/** Imposed load of roofs without access: its own action beside the floors' (EN 1991-1-1 3.3.2(1)). */
const ROOF_CATEGORY = 'H'

/**
 * Floors leading with ψ0 on the roof, and with a roof the roof leading with the floors accompanying.
 * An imposed load is reduced by αn or by ψ0, never by both (EN 1991-1-1 3.3.2(2), from memory):
 * where it accompanies, the smaller of the two.
 */
export function situationsOf(rules: ColumnRules): Situation[] {
  const { choice, kinds, roof } = rules
  const psi0 = kinds.map(kind => psi(choice, kind.category).psi0)
  const roofPsi0 = psi(choice, ROOF_CATEGORY).psi0
  const alpha = (kind: number, floors: number) => rules.reducesByStoreys && floors > 0 && kinds[kind]!.reducible
    ? storeyReduction(choice, kinds[kind]!.category, floors)
    : 1
  return rules.combinations.flatMap((combination: CombinationFactors): Situation[] => {
    const { name, permanent, variable, accompanying } = combination
    if (variable === 0) {
      return [{ name, permanent, roofVariable: accompanying * roofPsi0, variable: (kind, floors) => accompanying * Math.min(psi0[kind]!, alpha(kind, floors)) }]
    }
    const floorsLead: Situation = {
      name, permanent, roofVariable: variable * roofPsi0, variable: (kind, floors) => variable * alpha(kind, floors),
    }
    if (!roof) return [floorsLead]
    return [floorsLead, { name: `${name}, roof leading`, permanent, roofVariable: variable, variable: (kind, floors) => variable * Math.min(psi0[kind]!, alpha(kind, floors)) }]
  })
}

/** Design axial force that `floors` floors and the roof bring, N, without the column's own weight. */
export function axialForce(demand: ColumnDemand, rules: ColumnRules, situation: Situation, floors: number): number {
  const all = [demand.direct, ...demand.ends]
  let force = 0
  for (const { permanent, variable, area } of all) {
    force += floors * situation.permanent * permanent
    variable.forEach((value, kind) => {
      force += floors * situation.variable(kind, floors) * value
    })
    if (rules.roof) force += area * 1000 * (situation.permanent * rules.roof.permanent + situation.roofVariable * rules.roof.variable)
  }
  return force
}

/** Unbalanced design reaction at a level along an axis, N: towards larger coordinates less towards smaller. */
export function unbalanced(demand: ColumnDemand, rules: ColumnRules, situation: Situation, axis: Axis, isRoof: boolean): number {
  let force = 0
  for (const end of demand.ends) {
    if (end.axis !== axis) continue
    const reaction = isRoof
      ? end.area * 1000 * (situation.permanent * (rules.roof?.permanent ?? 0) + situation.roofVariable * (rules.roof?.variable ?? 0))
      : situation.permanent * end.permanent + end.variable.reduce((sum, value, kind) => sum + situation.variable(kind, 1) * value, 0)
    force += end.side * reaction
  }
  if (demand.relief) return Math.sign(force) * Math.max(0, Math.abs(force) - situation.permanent * demand.relief[axis])
  return force
}

/** What does not depend on the section, for every situation: axial forces by length, unbalanced reactions by level. N */
export interface ColumnForces {
  demand: ColumnDemand
  /** `axial[situation][length]`, without the column's own weight; lengths count from 1 at the base. */
  axial: number[][]
  /** `floor[situation]` at a floor, `roof[situation]` at the roof. */
  floor: Record<Axis, number>[]
  roof: Record<Axis, number>[]
}

export function forcesOn(demand: ColumnDemand, rules: ColumnRules, situations: readonly Situation[], lengths: number): ColumnForces {
  const level = (situation: Situation, isRoof: boolean) => ({
    x: unbalanced(demand, rules, situation, 'x', isRoof), y: unbalanced(demand, rules, situation, 'y', isRoof),
  })
  return {
    demand,
    axial: situations.map(situation => Array.from({ length: lengths + 1 }, (_, length) =>
      axialForce(demand, rules, situation, Math.max(0, rules.storeys - length + 1)))),
    floor: situations.map(situation => level(situation, false)),
    roof: situations.map(situation => level(situation, true)),
  }
}

/** Buckling length about the axis whose movement is along `direction`: between the levels that hold it, mm. */
export function bucklingLength(demand: ColumnDemand, rules: ColumnRules, direction: Axis, length: number): number {
  const unheld = demand.unheldFloors[direction]
  return length <= unheld + 1 ? (unheld + 1) * rules.storeyHeight : rules.storeyHeight
}

/** Movement along the web is bending about y, movement across it about z. */
export function bucklingLengths(demand: ColumnDemand, rules: ColumnRules, length: number): { y: number, z: number } {
  return {
    y: bucklingLength(demand, rules, demand.web, length),
    z: bucklingLength(demand, rules, across(demand.web), length),
  }
}
