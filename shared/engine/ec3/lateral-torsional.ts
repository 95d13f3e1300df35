import type { BucklingCurve, NationalChoice } from '../actions'
import type { Section } from '../sections'
import { IMPERFECTION, curveFor } from './curves'

export type LtbMethod = '6.3.2.3' | '6.3.2.2'

/** What a method needs to turn λ̄LT into χLT. */
export interface LtbCurve { method: LtbMethod, curve: BucklingCurve, alpha: number, plateau: number, beta: number }

/** Curve, α, λ̄LT,0 and β of a section. EN 1993-1-1:2005 6.3.2.2 (Table 6.4), 6.3.2.3 (Table 6.5), national form. */
export function ltbCurve({ h, b }: Section, method: LtbMethod, { ltb }: NationalChoice): LtbCurve {
  const rules = method === '6.3.2.3' ? ltb.rolled : ltb.general
  const curve = curveFor(h / b, rules.curves)
  const beta = method === '6.3.2.3' ? ltb.rolled.beta : 1
  return { method, curve, alpha: IMPERFECTION[curve], plateau: rules.plateau, beta }
}

/** λ̄LT = √(Wy fy/Mcr). EN 1993-1-1:2005 6.3.2.2(1). W mm³, fy N/mm², Mcr Nmm. */
export function ltbSlenderness(W: number, fy: number, Mcr: number): number {
  return Math.sqrt(W * fy / Mcr)
}

/** ΦLT. EN 1993-1-1:2005 (6.56), where λ̄LT,0 = 0.2 and β = 1, and (6.57). */
export function ltbPhi(lambdaLT: number, { alpha, plateau, beta }: LtbCurve): number {
  return 0.5 * (1 + alpha * (lambdaLT - plateau) + beta * lambdaLT * lambdaLT)
}

/**
 * χLT without f. EN 1993-1-1:2005 (6.56), (6.57): at most 1 and, by 6.3.2.3, 1/λ̄LT².
 * 1 up to the plateau; the permission MEd/Mcr ≤ λ̄LT,0² of 6.3.2.2(4) is not used.
 */
export function ltbReduction(lambdaLT: number, curve: LtbCurve): number {
  if (lambdaLT <= curve.plateau) return 1
  const phi = ltbPhi(lambdaLT, curve)
  const chi = 1 / (phi + Math.sqrt(phi * phi - curve.beta * lambdaLT * lambdaLT))
  return curve.method === '6.3.2.3' ? Math.min(chi, 1, 1 / (lambdaLT * lambdaLT)) : Math.min(chi, 1)
}

/** f = 1 − 0.5 (1 − kc) [1 − 2 (λ̄LT − 0.8)²] ≤ 1. EN 1993-1-1:2005 6.3.2.3(2). */
export function ltbModification(lambdaLT: number, kc: number): number {
  return Math.min(1, 1 - 0.5 * (1 - kc) * (1 - 2 * (lambdaLT - 0.8) ** 2))
}

/** χLT,mod = χLT/f, at most 1 and 1/λ̄LT². EN 1993-1-1:2005 (6.58) with the limit of the page's basis. */
export function ltbReductionModified(lambdaLT: number, curve: LtbCurve, kc: number): number {
  if (lambdaLT <= curve.plateau) return 1
  const chi = ltbReduction(lambdaLT, curve) / ltbModification(lambdaLT, kc)
  return Math.min(chi, 1, 1 / (lambdaLT * lambdaLT))
}

/** Mb,Rd, Nmm. EN 1993-1-1:2005 (6.55). */
export function ltbResistance(chiLT: number, W: number, fy: number, gammaM1: number): number {
  return chiLT * W * fy / gammaM1
}

/** kc = 1/√C1 ≤ 1: UK form of 6.3.2.3(2), and the value of Table 6.6 for its diagrams within 1 %. */
export function kcFromC1(C1: number): number {
  return Math.min(1, 1 / Math.sqrt(C1))
}

/** kc of a linear diagram, −1 ≤ ψ ≤ 1. EN 1993-1-1:2005 Table 6.6. */
export function kcLinear(psi: number): number {
  return 1 / (1.33 - 0.33 * psi)
}

/** kc of a piece without end moments: uniform load; load in the middle. EN 1993-1-1:2005 Table 6.6. */
export const KC_UNIFORM_LOAD = 0.94
export const KC_CENTRAL_LOAD = 0.86
