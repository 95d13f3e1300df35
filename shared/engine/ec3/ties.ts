/** Least tie force, N. EN 1991-1-7:2006 A.5.1. */
const LEAST_TIE_FORCE = 75_000

/**
 * Tie force of a beam line, N: internal 0.8 (gk + ψ qk) s L, perimeter 0.4 (gk + ψ qk) s L, at least 75 kN.
 * EN 1991-1-7:2006 A.5.1, (A.1) and (A.2). Loads N/mm² (1 kN/m² = 0.001), spacing s and span L mm.
 */
export function tieForce(place: 'internal' | 'perimeter', gk: number, qk: number, psi: number, spacing: number, span: number): number {
  const share = place === 'internal' ? 0.8 : 0.4
  return Math.max(LEAST_TIE_FORCE, share * (gk + psi * qk) * spacing * span)
}

/** Tension resistance of the gross section, N: A fy/γM0. EN 1993-1-1:2005 6.2.3(2) a), (6.6). */
export function tensionResistance(A: number, fy: number, gammaM0: number): number {
  return A * fy / gammaM0
}
