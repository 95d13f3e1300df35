import type { BucklingCurve } from '../actions'
import { E } from '../materials'
import type { Grade } from '../materials'
import type { Section } from '../sections'
import { IMPERFECTION } from './curves'

export type Axis = 'y' | 'z'

/**
 * Buckling curve of a rolled I or H section. EN 1993-1-1:2005 Table 6.2 (S460 has its own column).
 * The table has no row for flanges above 100 mm with h/b > 1.2: the last row of h/b ≤ 1.2 is used.
 */
export function flexuralBucklingCurve({ h, b, tf }: Section, axis: Axis, grade: Grade): BucklingCurve {
  const strong = grade === 'S460'
  if (tf > 100) return strong ? 'c' : 'd'
  if (h / b > 1.2) {
    if (tf <= 40) return axis === 'y' ? (strong ? 'a0' : 'a') : (strong ? 'a0' : 'b')
    return axis === 'y' ? (strong ? 'a' : 'b') : (strong ? 'a' : 'c')
  }
  return axis === 'y' ? (strong ? 'a' : 'b') : (strong ? 'a' : 'c')
}

/** Ncr = π² E I/Lcr², N. I mm⁴, Lcr mm. */
export function eulerLoad(I: number, Lcr: number): number {
  return Math.PI ** 2 * E * I / (Lcr * Lcr)
}

/** χ. EN 1993-1-1:2005 6.3.1.2(1), (6.49); 1 for λ̄ ≤ 0.2 (6.3.1.2(4)). */
export function flexuralReduction(lambda: number, curve: BucklingCurve): number {
  if (lambda <= 0.2) return 1
  const phi = 0.5 * (1 + IMPERFECTION[curve] * (lambda - 0.2) + lambda * lambda)
  return Math.min(1, 1 / (phi + Math.sqrt(phi * phi - lambda * lambda)))
}

export interface FlexuralBuckling { Ncr: number, lambda: number, chi: number, curve: BucklingCurve, NbRd: number }

/**
 * Flexural buckling about one axis, gross area (classes 1 to 3). EN 1993-1-1:2005 6.3.1, (6.47), (6.50).
 * fy N/mm², Lcr mm → Ncr, Nb,Rd in N.
 */
export function flexuralBuckling(
  section: Section, grade: Grade, fy: number, gammaM1: number, Lcr: number, axis: Axis,
): FlexuralBuckling {
  const Ncr = eulerLoad(axis === 'y' ? section.Iy : section.Iz, Lcr)
  const lambda = Math.sqrt(section.A * fy / Ncr)
  const curve = flexuralBucklingCurve(section, axis, grade)
  const chi = flexuralReduction(lambda, curve)
  return { Ncr, lambda, chi, curve, NbRd: chi * section.A * fy / gammaM1 }
}
