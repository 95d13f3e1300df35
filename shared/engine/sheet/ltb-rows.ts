import { criticalMomentUniform, ltbPhi, ltbReduction } from '../ec3'
import type { LtbCurve } from '../ec3'
import { E, G } from '../materials'
import type { Section } from '../sections'
import { factor, kNm, num, quantity, row } from './format'
import type { SheetRow } from './types'

/** Mcr,0 of uniform moment between forks, L mm. */
export function uniformMomentRow(section: Section, L: number, check: string): SheetRow {
  const { Iz, It, Iw } = section
  return row({
    clause: 'SN003',
    check,
    expression: 'M_{cr,0} = (π^{2} E I_{z} / L^{2}) √(I_{w} / I_{z} + L^{2} G I_{t} / (π^{2} E I_{z}))',
    substituted: `(π^{2} × ${num(E, 0)} × ${num(Iz / 1e4, 2)} × 10^{4} / ${num(L, 0)}^{2}) √(${num(Iw / Iz, 1)}`
      + ` + ${num(L, 0)}^{2} × ${num(G, 0)} × ${num(It / 1e4, 3)} × 10^{4} / (π^{2} × ${num(E, 0)} × ${num(Iz / 1e4, 2)} × 10^{4}))`,
    resistance: kNm(criticalMomentUniform(section, L)),
  })
}

/** λ̄LT from W fy and Mcr, Nmm; `modulus` is the symbol of W. */
export function slendernessRow(modulus: string, MRk: number, Mcr: number, lambda: number, { plateau }: LtbCurve): SheetRow {
  return row({
    clause: '6.3.2.2(1)',
    check: 'Slenderness',
    expression: `λ̄_{LT} = √(${modulus} f_{y} / M_{cr})`,
    substituted: `√(${num(MRk / 1e6, 2)} / ${num(Mcr / 1e6, 2)})`,
    effect: `${lambda > plateau ? '>' : '≤'} ${factor(plateau)}`,
    resistance: quantity(lambda, '', 4),
  })
}

/** χLT without f. */
export function reductionRows(curve: LtbCurve, lambda: number, { h, b }: Section): SheetRow[] {
  const { method, plateau, alpha, beta } = curve
  if (lambda <= plateau) {
    return [row({
      clause: method, check: 'Reduction',
      expression: 'λ̄_{LT} ≤ λ̄_{LT,0}', substituted: `${num(lambda, 4)} ≤ ${factor(plateau)}`, resistance: 'χ_{LT} 1.0',
    })]
  }
  const phi = ltbPhi(lambda, curve)
  return [
    row({
      clause: method === '6.3.2.3' ? '(6.57)' : '(6.56)',
      check: `Φ, curve ${curve.curve}`,
      expression: 'Φ_{LT} = 0.5 [1 + α_{LT} (λ̄_{LT} − λ̄_{LT,0}) + β λ̄_{LT}^{2}]',
      substituted: `0.5 [1 + ${factor(alpha)} (${num(lambda, 4)} − ${factor(plateau)}) + ${factor(beta)} × ${num(lambda, 4)}^{2}]`,
      effect: `h/b ${num(h / b, 2)}`,
      resistance: quantity(phi, '', 4),
    }),
    row({
      clause: method,
      check: 'Reduction',
      expression: 'χ_{LT} = 1 / (Φ_{LT} + √(Φ_{LT}^{2} − β λ̄_{LT}^{2}))',
      substituted: `1 / (${num(phi, 4)} + √(${num(phi, 4)}^{2} − ${factor(beta)} × ${num(lambda, 4)}^{2}))`,
      effect: method === '6.3.2.3' ? `≤ 1, ≤ 1/λ̄_{LT}^{2} = ${num(1 / lambda ** 2, 4)}` : '≤ 1',
      resistance: quantity(ltbReduction(lambda, curve), '', 4),
    }),
  ]
}
