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

/** ρ = (2 VEd/Vpl,Rd − 1)² where VEd > 0.5 Vpl,Rd, else 0. EN 1993-1-1:2005 6.2.8(2), (3). N. */
export function highShearFactor(VEd: number, VplRd: number): number {
  const ratio = Math.abs(VEd) / VplRd
  return ratio > 0.5 ? (2 * ratio - 1) ** 2 : 0
}

/**
 * Part of the modulus that the web loses at ρ = 1, mm³: Aw²/(4 tw) with Aw = hw tw for classes 1 and 2
 * (EN 1993-1-1:2005 6.2.8(5), (6.30)); the web's share of Wel, tw hw³/(6h), for class 3 (6.2.8(3)).
 */
export function webModulus({ h, tw, tf }: Section, sectionClass: SectionClass): number {
  const hw = h - 2 * tf
  return sectionClass <= 2 ? tw * hw * hw / 4 : tw * hw ** 3 / (6 * h)
}

/** What is left of W at least: far beyond Vpl,Rd (6.30) would give none or less, and no utilisation. */
const LEAST_MODULUS = 1e-3

/** My,V,Rd, Nmm: bending resistance beside high shear. EN 1993-1-1:2005 6.2.8, (6.30). Wweb of `webModulus`. */
export function bendingResistanceWithShear(W: number, Wweb: number, rho: number, fy: number, gammaM0: number): number {
  return Math.max(W - rho * Wweb, LEAST_MODULUS * W) * fy / gammaM0
}

/** VEd/Vpl,Rd from which on `bendingResistanceWithShear` falls no further. */
export function exhaustingShear(W: number, Wweb: number): number {
  return (1 + Math.sqrt((1 - LEAST_MODULUS) * W / Wweb)) / 2
}
