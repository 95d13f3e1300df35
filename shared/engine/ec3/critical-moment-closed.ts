import { E, G } from '../materials'
import type { Section } from '../sections'

/**
 * Mcr for uniform moment between forks, Nmm: Mcr,0 = (π² E Iz/L²) √(Iw/Iz + L² G It/(π² E Iz)).
 * NCCI SN003 with k = kw = 1. L mm.
 */
export function criticalMomentUniform({ Iz, It, Iw }: Section, L: number): number {
  const Nz = Math.PI ** 2 * E * Iz / (L * L)
  return Nz * Math.sqrt(Iw / Iz + G * It / Nz)
}

/**
 * Mcr by C1, C2 and the load's height, Nmm:
 * C1 (π² E Iz/L²) {√[Iw/Iz + L² G It/(π² E Iz) + (C2 zg)²] − C2 zg}. NCCI SN003 with k = kw = 1.
 * L, zg mm; zg > 0 above the shear centre. `shearModulus` only where a source has its own.
 */
export function criticalMomentClosed(
  { Iz, It, Iw }: { Iz: number, It: number, Iw: number }, L: number, C1: number, C2: number, zg: number, shearModulus = G,
): number {
  const Nz = Math.PI ** 2 * E * Iz / (L * L)
  const lever = C2 * zg
  return C1 * Nz * (Math.sqrt(Iw / Iz + shearModulus * It / Nz + lever * lever) - lever)
}

/** C1 of a linear diagram, ψ = ratio of the end moments: 1.77 − 1.04ψ + 0.27ψ² ≤ 2.6. Screening only. */
export function c1Linear(psi: number): number {
  return Math.min(2.6, 1.77 - 1.04 * psi + 0.27 * psi * psi)
}

/**
 * C1 of any diagram from the moments at its quarter points:
 * √(35 Mmax²/(Mmax² + 9 M2² + 16 M3² + 9 M4²)) (D. Brown, 2013). For the reader's eye.
 */
export function c1QuarterPoints(Mmax: number, M2: number, M3: number, M4: number): number {
  return Math.sqrt(35 * Mmax ** 2 / (Mmax ** 2 + 9 * M2 ** 2 + 16 * M3 ** 2 + 9 * M4 ** 2))
}

/** C1 and C2 of two equal loads at αL from the supports (Steel Buildings in Europe, Part 10, Table 5.1). */
export function c1c2TwoLoads(alpha: number): { C1: number, C2: number } {
  const C1 = 1 + 2.92 * alpha ** 3
  return { C1, C2: alpha * (2.44 - 3.24 * alpha) * C1 }
}
