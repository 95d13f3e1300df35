import type { Section } from '../sections'
import type { SectionClass } from './classification'

/** Modulus that counts, mm³: Wpl,y for classes 1 and 2, Wel,y above. EN 1993-1-1:2005 6.2.5(2). */
export function bendingModulus(section: Section, sectionClass: SectionClass): number {
  return sectionClass <= 2 ? section.WplY : section.WelY
}

/**
 * Mc,Rd, Nmm. EN 1993-1-1:2005 6.2.5(2), (6.13) and (6.14). W mm³, fy N/mm².
 * Class 4 wants an effective modulus and is not offered.
 */
export function bendingResistance(W: number, fy: number, gammaM0: number): number {
  return W * fy / gammaM0
}

/**
 * ρ = (2 VEd/Vpl,Rd − 1)² where VEd > 0.5 Vpl,Rd, else 0. EN 1993-1-1:2005 6.2.8(2), (3). N.
 * At most 1: beyond Vpl,Rd the web has nothing left to lose (the check of shear has failed by then).
 */
export function highShearFactor(VEd: number, VplRd: number): number {
  const ratio = Math.abs(VEd) / VplRd
  return ratio > 0.5 ? Math.min(1, (2 * ratio - 1) ** 2) : 0
}

/**
 * Part of the modulus that the web loses at ρ = 1, mm³: Aw²/(4 tw) with Aw = hw tw for classes 1 and 2
 * (EN 1993-1-1:2005 6.2.8(5), (6.30)); the web's share of Wel, tw hw³/(6h), for class 3 (6.2.8(3)).
 */
export function webModulus({ h, tw, tf }: Section, sectionClass: SectionClass): number {
  const hw = h - 2 * tf
  return sectionClass <= 2 ? tw * hw * hw / 4 : tw * hw ** 3 / (6 * h)
}

/** My,V,Rd, Nmm: bending resistance beside high shear. EN 1993-1-1:2005 6.2.8, (6.30). Wweb of `webModulus`. */
export function bendingResistanceWithShear(W: number, Wweb: number, rho: number, fy: number, gammaM0: number): number {
  return (W - rho * Wweb) * fy / gammaM0
}
