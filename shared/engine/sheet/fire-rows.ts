import { criticalTemperature, fireReduction, sectionFactor } from '../ec3'
import type { Basics } from './basics'
import { factor, num, quantity, row } from './format'
import type { SheetContext, SheetGroup, SheetRow } from './types'

/** The design load of the combination shown in numbers, kN, and the expression of EN 1993-1-2 2.4.2(3) that has it. */
function designNumbers({ shown, rules: { choice } }: Basics, Gk: number, Qk: number): { numbers: string, clause: string } {
  const { gammaG, gammaQ, xi } = choice
  const { accompanying } = shown.prepared
  const G = num(Gk / 1000, 1)
  switch (shown.combination.factors.name) {
    case '6.10': return { clause: '(2.5)', numbers: `${factor(gammaG)} × ${G} + ${factor(gammaQ)} × ${num(Qk / 1000, 1)}` }
    case '6.10a': return { clause: '(2.5a)', numbers: `${factor(gammaG)} × ${G} + ${factor(gammaQ)} × ${num((accompanying.left + accompanying.right) / 1000, 1)}` }
    case '6.10b': return { clause: '(2.5b)', numbers: `${factor(xi)} × ${factor(gammaG)} × ${G} + ${factor(gammaQ)} × ${num(Qk / 1000, 1)}` }
  }
}

function temperatureRow(basics: Basics, { psiFire }: SheetContext): SheetRow {
  const clause = 'EN 1993-1-2 4.2.4'
  const check = 'Critical temperature'
  const { shown } = basics
  const held = shown.verified.segments.every(segment => segment.held)
  if (!held) return row({ clause, check, resistance: 'not given: stability governs' })
  if (psiFire === undefined) return row({ clause, check, resistance: 'not given: no ψ_{fi} for these loads' })
  const { prepared, verified, total } = shown
  const Gk = prepared.permanent.left + prepared.permanent.right + basics.weight * basics.beam.span
  const Qk = prepared.variable.left + prepared.variable.right
  const eta = fireReduction(Gk, Qk, psiFire, total.left + total.right)
  const { numbers, clause: reduction } = designNumbers(basics, Gk, Qk)
  const utilisation = Math.max(verified.utilisation.bending, verified.utilisation.shear)
  const theta = criticalTemperature(eta * utilisation)
  return row({
    clause,
    check,
    expression: 'θ_{cr} = 39.19 ln[1 / (0.9674 μ_{0}^{3.833}) − 1] + 482, μ_{0} = η_{fi} · utilisation',
    substituted: `ψ_{fi} ${factor(psiFire)}: η_{fi} = (${num(Gk / 1000, 1)} + ${factor(psiFire)} × ${num(Qk / 1000, 1)}) / (${numbers}) = ${num(eta, 3)} by ${reduction}; μ_{0} = ${num(eta, 3)} × ${num(utilisation, 3)} = ${num(eta * utilisation, 3)}`,
    resistance: theta === null ? 'no value: μ_{0} too high' : quantity(theta, '°C', 0),
  })
}

/** Section factors always; the critical temperature only where stability does not govern. */
export function fireGroup(basics: Basics, context: SheetContext): SheetGroup {
  const { section } = basics
  const factorRow = (sides: 3 | 4) => row({
    clause: 'EN 1993-1-2 Table 4.2',
    check: sides === 3 ? 'Section factor, three sides' : 'Section factor, four sides',
    expression: sides === 3 ? 'A_{m} / V = (perimeter − b) / A' : 'A_{m} / V = perimeter / A',
    substituted: sides === 3
      ? `(${num(section.perimeter, 0)} − ${num(section.b, 1)}) × 10^{3} / ${num(section.A, 0)}`
      : `${num(section.perimeter, 0)} × 10^{3} / ${num(section.A, 0)}`,
    resistance: quantity(sectionFactor(section, sides), '1/m', 0),
  })
  return { title: 'Fire, as output only', rows: [factorRow(3), factorRow(4), temperatureRow(basics, context)] }
}
