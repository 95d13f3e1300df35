import { bendingResistanceWithShear, exhaustingShear, highShearFactor } from '../ec3'
import { momentIn } from '../statics'
import type { Effects, Peak } from '../statics'
import type { PreparedCase, PreparedCombination } from './prepare'
import type { Resistances } from './resistances'

/** total ← base + γG · own weight: q, V and M only (what strength needs). */
export function addOwnWeight({ total, self }: PreparedCase, { base, factors }: PreparedCombination, weight: number): Effects {
  const w = factors.permanent * weight
  const last = total.M.length - 1
  for (let i = 0; i < last; i++) {
    total.q[i] = base.q[i]! + w
    total.V[i] = base.V[i]! + w * self.V[i]!
    total.M[i] = base.M[i]! + w * self.M[i]!
  }
  return total
}

export interface BendingResult {
  utilisation: number
  x: number
  M: number
  V: number
  rho: number
  MvRd: number
}

/** Takes (M, V) at x into the result where it is used more than what is there. */
function consider(out: BendingResult, resistances: Resistances, gammaM0: number, x: number, M: number, V: number): void {
  const rho = highShearFactor(V, resistances.VplRd)
  const MvRd = rho > 0
    ? bendingResistanceWithShear(resistances.W, resistances.Wweb, rho, resistances.fy, gammaM0)
    : resistances.McRd
  const utilisation = Math.abs(M) / MvRd
  if (utilisation > out.utilisation) {
    out.utilisation = utilisation
    out.x = x
    out.M = Math.abs(M)
    out.V = Math.abs(V)
    out.rho = rho
    out.MvRd = MvRd
  }
}

/**
 * The place inside a stretch of uniform load from which on the shear leaves nothing to lose. There is no other
 * largest M/My,V,Rd between the ends but at zero shear: with v = 2|V|/Vpl − 1, k = Wweb/W, a = (Vpl/2)²/q and
 * C = M + V²/(2q), which is constant on the stretch, it turns where a k v² + (a + a k − 2 k C) v + a = 0. The
 * product of the two places is 1/k: the first is a least value, the second lies where 1 − k v² has gone.
 */
function considerExhausted(out: BendingResult, resistances: Resistances, gammaM0: number, x0: number, effects: Effects, i: number, h: number): void {
  const { q, V } = effects
  const shear = resistances.VplRd * exhaustingShear(resistances.W, resistances.Wweb)
  for (const signed of [shear, -shear]) {
    const s = (V[i]! - signed) / q[i]!
    if (s > 0 && s < h) consider(out, resistances, gammaM0, x0 + s, momentIn(effects, i, s), signed)
  }
}

/**
 * Largest M/My,V,Rd along the beam, M and V taken at the same place, on both sides of every load.
 * EN 1993-1-1:2005 6.2.5 and 6.2.8.
 */
export function bendingAlong(
  out: BendingResult, x: Float64Array, effects: Effects, moment: Peak, shear: Peak, resistances: Resistances, gammaM0: number,
): BendingResult {
  out.utilisation = moment.value / resistances.McRd
  out.x = moment.at
  out.M = moment.value
  out.V = 0
  out.rho = 0
  out.MvRd = resistances.McRd
  if (shear.value <= 0.5 * resistances.VplRd) return out
  out.utilisation = -1
  for (let i = 0; i < x.length - 1; i++) {
    const h = x[i + 1]! - x[i]!
    const { q, V, M } = effects
    const end = V[i]! - q[i]! * h
    consider(out, resistances, gammaM0, x[i]!, M[i]!, V[i]!)
    if (q[i]! > 0) {
      const turn = V[i]! / q[i]!
      if (turn > 0 && turn < h) consider(out, resistances, gammaM0, x[i]! + turn, momentIn(effects, i, turn), 0)
      considerExhausted(out, resistances, gammaM0, x[i]!, effects, i, h)
    }
    consider(out, resistances, gammaM0, x[i + 1]!, M[i + 1]!, end)
  }
  return out
}
