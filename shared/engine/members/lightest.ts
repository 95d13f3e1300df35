import type { Grade } from '../materials'
import type { Section } from '../sections'
import { fundamentalFrequency, largestMoment, largestShear } from '../statics'
import { NO_MOMENT, bucklingOf } from './buckling'
import type { BucklingResult } from './buckling'
import { prepareBeam } from './prepare'
import type { PreparedBeam, PreparedCase, PreparedCombination } from './prepare'
import { resistancesFrom, resistanceTable } from './resistances'
import type { Resistances } from './resistances'
import type { SizedSection } from './result'
import { leastBucklingUtilisation, mostBucklingUtilisation } from './screening'
import { characteristicSag, vibratingSag } from './service'
import { addOwnWeight, bendingAlong } from './strength'
import type { BendingResult } from './strength'
import type { Beam, BeamRules, CheckName } from './types'
import { validateBeam, validateRules } from './validate'

/** Rounding must not turn a bound into a verdict. */
const SAFE = 1 + 1e-9

const bending: BendingResult = { utilisation: 0, x: 0, M: 0, V: 0, rho: 0, MvRd: 0 }
const buckling: BucklingResult = { MEd: 0, Mcr: null, lambdaLT: null, chiLT: 1, kc: 1, MbRd: 0, utilisation: 0 }

/** Highest utilisation of each ultimate check over the combinations of a stage, in reused room. */
const highest = { bending: 0, shear: 0, buckling: 0, construction: 0 }

/** Least E·I and resistances that any passing section has: own weight, left out here, only adds. */
interface Least { EIy: number, McRd: number, VRd: number }

function leastOf(prepared: PreparedBeam, rules: BeamRules): Least {
  const limit = rules.utilisationLimit * SAFE
  const { limits } = rules
  const least: Least = { EIy: 0, McRd: 0, VRd: 0 }
  if (limits.variable !== null) least.EIy = Math.max(least.EIy, prepared.sagVariable.value / (limit * prepared.span / limits.variable))
  if (limits.total !== null) least.EIy = Math.max(least.EIy, prepared.sagCharacteristic / (limit * prepared.span / limits.total))
  if (limits.frequency !== null) {
    // 18/√δ ≥ frequency/limit
    least.EIy = Math.max(least.EIy, prepared.sagVibrating / ((18 * limit / limits.frequency) ** 2 * SAFE))
  }
  for (const { combinations } of prepared.cases) {
    for (const { baseMoment, baseShear } of combinations) {
      least.McRd = Math.max(least.McRd, baseMoment / limit)
      least.VRd = Math.max(least.VRd, baseShear / limit)
    }
  }
  return least
}

/** MEd and bounds by stretch, in reused room. */
const moments: number[] = []
const order: number[] = []
const lowest: number[] = []

/** Highest buckling utilisation of the free stretches, or a value over the limit as soon as one is. */
function bucklingOver(loads: PreparedCase, combination: PreparedCombination, weight: number, r: Resistances, rules: BeamRules): number {
  const { x, stretches, total } = loads
  const limit = rules.utilisationLimit
  order.length = 0
  for (let i = 0; i < stretches.length; i++) {
    const stretch = stretches[i]!
    if (stretch.held) continue
    const MEd = largestMoment(x, total, stretch.from, stretch.to).value
    moments[i] = MEd
    lowest[i] = MEd < NO_MOMENT ? 0 : leastBucklingUtilisation(i, stretch, MEd, loads, combination, weight, r, rules)
    if (lowest[i]! > limit * SAFE) return lowest[i]!
    order.push(i)
  }
  if (order.length > 1) order.sort((a, b) => lowest[b]! - lowest[a]!)
  let worst = 0
  for (const i of order) {
    const stretch = stretches[i]!
    if (moments[i]! < NO_MOMENT) continue
    // A stretch that even uniform moment would use less cannot change the highest.
    if (mostBucklingUtilisation(stretch, moments[i]!, loads, combination, r, rules) * SAFE < worst) continue
    const { utilisation } = bucklingOf(buckling, stretch, loads, combination, r, rules)
    if (utilisation > worst) worst = utilisation
    if (worst > limit) return worst
  }
  return worst
}

/** Ultimate checks of one combination; false as soon as one is over the limit. Results in `highest`. */
function passesStrength(loads: PreparedCase, combination: PreparedCombination, weight: number, r: Resistances, rules: BeamRules): boolean {
  const { x, stage } = loads
  const limit = rules.utilisationLimit
  const total = addOwnWeight(loads, combination, weight)
  const moment = largestMoment(x, total)
  const shear = largestShear(x, total)
  const shearUtilisation = shear.value / r.VRd
  if (shearUtilisation > limit) return false
  const bendingUtilisation = bendingAlong(bending, x, total, moment, shear, r, rules.choice.gammaM0).utilisation
  if (bendingUtilisation > limit) return false
  const bucklingUtilisation = loads.continuous ? 0 : bucklingOver(loads, combination, weight, r, rules)
  if (bucklingUtilisation > limit) return false
  if (stage === 'construction') {
    highest.construction = Math.max(highest.construction, bendingUtilisation, shearUtilisation, bucklingUtilisation)
    return true
  }
  highest.bending = Math.max(highest.bending, bendingUtilisation)
  highest.shear = Math.max(highest.shear, shearUtilisation)
  highest.buckling = Math.max(highest.buckling, bucklingUtilisation)
  return true
}

/** Utilisations of the serviceability limits, −1 where there is no limit; in reused room. */
const service = { deflectionVariable: -1, deflectionTotal: -1, frequency: -1 }

function passesService(prepared: PreparedBeam, r: Resistances, weight: number, rules: BeamRules): boolean {
  const { limits, utilisationLimit: limit } = rules
  const { span } = prepared
  service.deflectionVariable = service.deflectionTotal = service.frequency = -1
  if (limits.variable !== null) {
    service.deflectionVariable = prepared.sagVariable.value / r.EIy / (span / limits.variable)
    if (service.deflectionVariable > limit) return false
  }
  if (limits.total !== null) {
    service.deflectionTotal = characteristicSag(prepared, weight).value / r.EIy / (span / limits.total)
    if (service.deflectionTotal > limit) return false
  }
  if (limits.frequency !== null) {
    const sag = vibratingSag(prepared, weight).value / r.EIy
    service.frequency = sag > 0 ? limits.frequency / fundamentalFrequency(sag) : 0
    if (service.frequency > limit) return false
  }
  return true
}

/** The section's utilisation and governing check, or null where it does not pass. */
export function sizeUp(prepared: PreparedBeam, r: Resistances, rules: BeamRules): SizedSection | null {
  const weight = prepared.selfWeight ? r.weight : 0
  if (!passesService(prepared, r, weight, rules)) return null
  highest.bending = highest.shear = highest.buckling = highest.construction = 0
  for (const loads of prepared.cases) {
    for (const combination of loads.combinations) {
      if (!passesStrength(loads, combination, weight, r, rules)) return null
    }
  }
  let utilisation = highest.bending
  let governing: CheckName = 'bending'
  if (highest.shear > utilisation) [utilisation, governing] = [highest.shear, 'shear']
  if (highest.buckling > utilisation) [utilisation, governing] = [highest.buckling, 'buckling']
  if (service.deflectionVariable > utilisation) [utilisation, governing] = [service.deflectionVariable, 'deflectionVariable']
  if (service.deflectionTotal > utilisation) [utilisation, governing] = [service.deflectionTotal, 'deflectionTotal']
  if (service.frequency > utilisation) [utilisation, governing] = [service.frequency, 'frequency']
  if (highest.construction > utilisation) [utilisation, governing] = [highest.construction, 'construction']
  return { section: r.section, utilisation, governing }
}

/**
 * The staircase of mass and depth: first the lightest passing section, then each heavier one that
 * passes and is shallower than all before. `candidates` sorted by mass, then depth, then catalogue.
 * Empty where none passes. The same verdicts and numbers as `verifyBeam` on each, only sooner: cheap
 * bounds first, the eigenvalue of lateral-torsional buckling last.
 */
export function lightestSections(
  beam: Beam, candidates: readonly Section[], grade: Grade, rules: BeamRules, accept?: (section: Section) => boolean,
): SizedSection[] {
  validateBeam(beam)
  validateRules(rules, grade)
  return lightestPrepared(prepareBeam(beam, rules), candidates, grade, rules, accept)
}

/**
 * One section after another for a beam that is prepared once: null where it does not pass. The
 * verdicts and numbers of `verifyBeam`, only sooner.
 */
export function sectionVerdicts(
  beam: Beam, grade: Grade, rules: BeamRules, accept?: (section: Section) => boolean,
): (section: Section) => SizedSection | null {
  validateBeam(beam)
  validateRules(rules, grade)
  const prepared = prepareBeam(beam, rules)
  return section => lightestPrepared(prepared, [section], grade, rules, accept)[0] ?? null
}

/** The same on a beam prepared before. */
export function lightestPrepared(
  prepared: PreparedBeam, candidates: readonly Section[], grade: Grade, rules: BeamRules, accept?: (section: Section) => boolean,
): SizedSection[] {
  const table = resistanceTable(grade, rules.choice)
  const least = leastOf(prepared, rules)
  const staircase: SizedSection[] = []
  let shallowest = Number.POSITIVE_INFINITY
  for (const section of candidates) {
    if (section.h >= shallowest) continue
    const r = resistancesFrom(table, section, grade, rules.choice)
    if (r === null || r.EIy < least.EIy || r.McRd < least.McRd || r.VRd < least.VRd || r.sectionClass === 4) continue
    if (accept && !accept(section)) continue
    const sized = sizeUp(prepared, r, rules)
    if (sized === null) continue
    staircase.push(sized)
    shallowest = section.h
  }
  return staircase
}
