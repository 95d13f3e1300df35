import type { Section } from '../sections'
import { epsilon } from './classification'

/** Av of a rolled I section, load parallel to the web, mm². EN 1993-1-1:2005 6.2.6(3) a). η national. */
export function shearArea({ A, h, b, tw, tf, r }: Section, eta: number): number {
  return Math.max(A - 2 * b * tf + (tw + 2 * r) * tf, eta * (h - 2 * tf) * tw)
}

/** Vpl,Rd, N. EN 1993-1-1:2005 6.2.6(2), (6.18). Av mm², fy N/mm². */
export function plasticShearResistance(Av: number, fy: number, gammaM0: number): number {
  return Av * (fy / Math.sqrt(3)) / gammaM0
}

/** Whether shear buckling of the unstiffened web must be checked: hw/tw > 72 ε/η. EN 1993-1-5:2006 5.1(2). */
export function needsShearBucklingCheck({ h, tw, tf }: Section, fy: number, eta: number): boolean {
  return (h - 2 * tf) / tw > 72 * epsilon(fy) / eta
}

/** λ̄w, stiffeners at the supports only. EN 1993-1-5:2006 5.3(3), (5.5). */
export function webSlenderness({ h, tw, tf }: Section, fy: number): number {
  return (h - 2 * tf) / (86.4 * tw * epsilon(fy))
}

/** χw, non-rigid end post. EN 1993-1-5:2006 Table 5.1. */
export function shearBucklingFactor(lambdaW: number, eta: number): number {
  return lambdaW < 0.83 / eta ? eta : 0.83 / lambdaW
}

/**
 * Vbw,Rd, N: the web's contribution, at most η fy hw tw/(√3 γM1), which χw ≤ η ensures.
 * EN 1993-1-5:2006 5.2(1), (5.1) and (5.2). fy N/mm².
 */
export function shearBucklingResistance(section: Section, fy: number, eta: number, gammaM1: number): number {
  const chi = shearBucklingFactor(webSlenderness(section, fy), eta)
  return chi * fy * (section.h - 2 * section.tf) * section.tw / (Math.sqrt(3) * gammaM1)
}
