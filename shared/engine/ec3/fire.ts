import type { Section } from '../sections'

/**
 * Critical temperature, °C: 39.19 ln[1/(0.9674 μ0^3.833) − 1] + 482. EN 1993-1-2:2005 4.2.4(2), (4.22).
 * μ0 at least 0.013 (4.2.4(2)); null where μ0 is so high that the expression has no value.
 * Only where stability does not govern (4.2.4(1)): beams under continuous restraint.
 */
export function criticalTemperature(mu0: number): number | null {
  const inner = 1 / (0.9674 * Math.max(mu0, 0.013) ** 3.833) - 1
  return inner > 0 ? 39.19 * Math.log(inner) + 482 : null
}

/**
 * ηfi = (Gk + ψfi Qk)/Ed. EN 1993-1-2:2005 2.4.2(3), (2.5), (2.5a), (2.5b): `design` is the effect under the
 * combination that the utilisation belongs to, γG Gk + γQ Qk by 6.10, with ψ0 or ξ by 6.10a and 6.10b.
 * Gk, Qk: any effect of permanent and variable load, all three in one unit. 0 where there is no load.
 */
export function fireReduction(Gk: number, Qk: number, psiFire: number, design: number): number {
  return design > 0 ? (Gk + psiFire * Qk) / design : 0
}

/** A/V, 1/m: four sides exposed, or three with the top flange under a slab. EN 1993-1-2:2005 Table 4.2. */
export function sectionFactor({ A, b, perimeter }: Section, sides: 3 | 4): number {
  return 1000 * (sides === 4 ? perimeter : perimeter - b) / A
}
