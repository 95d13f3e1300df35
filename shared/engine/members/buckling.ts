import type { NationalChoice } from '../actions'
import {
  KC_CENTRAL_LOAD, KC_UNIFORM_LOAD, criticalFactor, criticalMomentUniform, kcFromC1, kcLinear, ltbReduction,
  ltbReductionModified, ltbResistance, ltbSlenderness,
} from '../ec3'
import { largestMoment } from '../statics'
import { meshOf } from './prepare'
import type { PreparedCase, PreparedCombination, Stretch } from './prepare'
import type { Resistances } from './resistances'
import type { BeamRules } from './types'

export interface BucklingResult {
  MEd: number
  Mcr: number | null
  lambdaLT: number | null
  chiLT: number
  kc: number
  /** The C1 that kc comes from, all loads at the shear centre; null where it is a row of Table 6.6 or f is not used. */
  kcC1?: number | null
  MbRd: number
  utilisation: number
}

/** Nmm: less is the rounding of a moment that is none. */
export const NO_MOMENT = 1e-6

/** Mcr, Nmm: the eigenvalue for loads scaled to MEd = 1. */
function criticalMomentOf(stretch: Stretch, loads: PreparedCase, combination: PreparedCombination | null, MEd: number, resistances: Resistances): number {
  const { total } = loads
  const none = combination ? null : zerosFor(total.M.length)
  const effects = { M: total.M, V: total.V, q: total.q, qTop: none ?? combination!.qTop, PTop: none ?? combination!.PTop }
  const { section, EIz, GIt, EIw } = resistances
  return criticalFactor(meshOf(stretch, loads), effects, combination ? section.h / 2 : 0, EIz, GIt, EIw, 1 / MEd)
}

let zeros = new Float64Array(0)

/** Loads of no height, in reused room. */
function zerosFor(length: number): Float64Array {
  if (zeros.length < length) zeros = new Float64Array(length)
  return zeros
}

/** C1 of the diagram alone: Mcr with every load at the shear centre over Mcr for uniform moment. */
function shapeFactor(stretch: Stretch, loads: PreparedCase, MEd: number, resistances: Resistances): number {
  const length = loads.x[stretch.to]! - loads.x[stretch.from]!
  return criticalMomentOf(stretch, loads, null, MEd, resistances) / criticalMomentUniform(resistances.section, length)
}

/** The row of Table 6.6 that a stretch's diagram is, or null where the table has none. */
function kcOfTable({ from, to }: Stretch, { x, total }: PreparedCase): number | null {
  let loaded = 0
  for (let i = from; i < to; i++) if (total.q[i]! > 0) loaded++
  const jumps: number[] = []
  for (let i = from + 1; i < to; i++) {
    const before = total.V[i - 1]! - total.q[i - 1]! * (x[i]! - x[i - 1]!)
    if (Math.abs(before - total.V[i]!) > 1e-9 * (Math.abs(before) + Math.abs(total.V[i]!))) jumps.push(i)
  }
  const a = total.M[from]!
  const b = total.M[to]!
  if (loaded === 0 && jumps.length === 0) {
    return kcLinear(Math.abs(a) > Math.abs(b) ? b / a : a / b)
  }
  if (a !== 0 || b !== 0) return null
  if (loaded === to - from && jumps.length === 0) {
    const uniform = total.q.subarray(from, to).every(q => q === total.q[from])
    return uniform ? KC_UNIFORM_LOAD : null
  }
  const middle = (x[from]! + x[to]!) / 2
  const central = jumps.length === 1 && Math.abs(x[jumps[0]!]! - middle) < 1e-6 * (x[to]! - x[from]!)
  return loaded === 0 && central ? KC_CENTRAL_LOAD : null
}

/**
 * kc of a stretch: 1/√C1, or Table 6.6 where the diagram is one of its rows and 1/√C1 elsewhere.
 * 1 for a run with restraints inside, whose C1 would count the restraints a second time.
 */
function correctionFactor(
  stretch: Stretch, loads: PreparedCase, MEd: number, resistances: Resistances, choice: NationalChoice,
): { kc: number, kcC1: number | null } {
  if (stretch.inside > 0) return { kc: 1, kcC1: null }
  const fromTable = choice.ltb.kcRule === 'table-6.6' ? kcOfTable(stretch, loads) : null
  if (fromTable !== null) return { kc: fromTable, kcC1: null }
  const kcC1 = shapeFactor(stretch, loads, MEd, resistances)
  return { kc: kcFromC1(kcC1), kcC1 }
}

/** Lateral-torsional buckling of one free stretch under `loads.total`. EN 1993-1-1:2005 6.3.2. Fills `out`. */
export function bucklingOf(
  out: BucklingResult, stretch: Stretch, loads: PreparedCase, combination: PreparedCombination,
  resistances: Resistances, rules: BeamRules,
): BucklingResult {
  const MEd = largestMoment(loads.x, loads.total, stretch.from, stretch.to).value
  out.MEd = MEd
  out.kc = 1
  if (MEd < NO_MOMENT) {
    out.Mcr = null
    out.lambdaLT = null
    out.chiLT = 1
    out.MbRd = resistances.MbRdFull
    out.utilisation = 0
    return out
  }
  const { W, fy } = resistances
  const curve = resistances.curves[rules.ltbMethod]
  const Mcr = criticalMomentOf(stretch, loads, combination.raised ? combination : null, MEd, resistances)
  const lambdaLT = ltbSlenderness(W, fy, Mcr)
  if (rules.useF && rules.ltbMethod === '6.3.2.3') {
    Object.assign(out, correctionFactor(stretch, loads, MEd, resistances, rules.choice))
    out.chiLT = ltbReductionModified(lambdaLT, curve, out.kc)
  } else {
    out.chiLT = ltbReduction(lambdaLT, curve)
  }
  out.Mcr = Mcr
  out.lambdaLT = lambdaLT
  out.MbRd = ltbResistance(out.chiLT, W, fy, rules.choice.gammaM1)
  out.utilisation = MEd / out.MbRd
  return out
}
