/** The sections from which a lift may be chosen before it is known what stands above it. */
import type { Section } from '../sections'
import { type ColumnForces, forcesOn } from './actions'
import { type Bench, type ColumnSizer, liftFeet, mayStandUnder, sizeLift, verifyLift, weightOf } from './size'
import type { ColumnDemand } from './types'

/** Takes every moment away. */
const NO_MOMENTS = { x: Infinity, y: Infinity }

/**
 * For each lift, from the base up, the sections that pass under some section that may stand in the
 * lift above with the least weight there, by rising mass, as long as they are at most `heavier[lift]`
 * kg/m heavier than the lightest. No choice of lifts within that uses another section; a choice from
 * these may still fail. A column that a level leaves unheld is asked for its axial force alone, since
 * its resistance does not fall steadily with the moments.
 */
export function liftChoices({ bench }: ColumnSizer, demand: ColumnDemand, heavier: readonly number[]): Section[][] {
  const isHeld = demand.unheldFloors.x === 0 && demand.unheldFloors.y === 0
  const forces = forcesOn(isHeld ? demand : { ...demand, relief: NO_MOMENTS }, bench.rules, bench.situations, bench.lengths)
  const choices: Section[][] = []
  const feet = liftFeet(bench)
  let weightAbove = 0
  for (let n = feet.length - 1; n >= 0; n--) {
    const [foot, top] = [feet[n]!, Math.min(feet[n]! + bench.rules.liftStoreys, bench.lengths)]
    const passing: Section[] = []
    for (const section of bench.rules.sections) {
      const lightest = passing[0]
      if (lightest && section.mass - lightest.mass > heavier[n]!) break
      if (passesUnder(bench, forces, section, foot, top, choices[0] ?? null, weightAbove)) passing.push(section)
    }
    if (!passing[0]) return feet.map(() => [])
    choices.unshift(passing)
    weightAbove += weightOf(passing[0], (top - foot) * bench.rules.storeyHeight)
  }
  return choices
}

function passesUnder(
  bench: Bench, forces: ColumnForces, section: Section, foot: number, top: number, above: readonly Section[] | null, weightAbove: number,
): boolean {
  const limit = bench.rules.utilisationLimit
  const passes = (other: Section | null) => verifyLift(bench, forces, section, foot, top, other, weightAbove, limit) !== null
  if (!above) return passes(null)
  const possible = above.filter(other => mayStandUnder(section, other))
  if (possible.length === 0) return false
  // Under one as stiff a length takes half of a level's moments; only one stiffer about z leaves it less.
  if (passes(section)) return true
  const stiffest = possible.reduce((a, b) => b.Iz > a.Iz ? b : a)
  return stiffest.Iz > section.Iz && passes({ ...section, Iz: stiffest.Iz })
}

/** Which lift of a column, counted from the base, no section passes for; −1 where all have one. */
export function liftWithoutSection({ bench }: ColumnSizer, demand: ColumnDemand): number {
  const feet = liftFeet(bench)
  const forces = forcesOn(demand, bench.rules, bench.situations, bench.lengths)
  let above: Section | null = null
  let weightAbove = 0
  for (let n = feet.length - 1; n >= 0; n--) {
    const top = Math.min(feet[n]! + bench.rules.liftStoreys, bench.lengths)
    const lift = sizeLift(bench, forces, feet[n]!, top, above, weightAbove)
    if (!lift) return n
    above = lift.section
    weightAbove += weightOf(above, (top - feet[n]!) * bench.rules.storeyHeight)
  }
  return -1
}
