import { epsilon, needsShearBucklingCheck, shearArea, shearBucklingFactor, webSlenderness } from '../ec3'
import type { Basics, CaseBasics } from './basics'
import { factor, kN, kNm, metres, num, quantity, row } from './format'
import type { SheetRow } from './types'

function modulusSymbol({ resistances }: Basics): string {
  return resistances.sectionClass <= 2 ? 'W_{pl,y}' : 'W_{el,y}'
}

/** "2 828.4 × 10^{3}" of a modulus in mm³. */
export function modulus(W: number): string {
  return `${num(W / 1000, 1)} × 10^{3}`
}

function bendingRow(basics: Basics, of: CaseBasics): SheetRow {
  const { resistances: { W, fy, McRd }, rules: { choice } } = basics
  return row({
    clause: '6.2.5',
    check: 'Bending',
    expression: `M_{c,Rd} = ${modulusSymbol(basics)} f_{y} / γ_{M0}`,
    substituted: `${modulus(W)} × ${num(fy, 0)} / ${factor(choice.gammaM0)}`,
    effect: kNm(of.verified.MEd),
    resistance: kNm(McRd),
    utilisation: of.verified.bendingAt.rho > 0 ? null : of.verified.utilisation.bending,
  })
}

function shearAreaRow({ section, rules: { choice } }: Basics): SheetRow {
  const { A, h, b, tw, tf, r } = section
  const Av = shearArea(section, choice.eta)
  const least = choice.eta * (h - 2 * tf) * tw
  const byWeb = Av === least
  return row({
    clause: '6.2.6(3)',
    check: 'Shear area',
    expression: byWeb ? 'A_{v} = η h_{w} t_{w}' : 'A_{v} = A − 2 b t_{f} + (t_{w} + 2 r) t_{f}',
    substituted: byWeb
      ? `${factor(choice.eta)} × ${num(h - 2 * tf, 1)} × ${num(tw, 1)}`
      : `${num(A, 1)} − 2 × ${num(b, 1)} × ${num(tf, 1)} + (${num(tw, 1)} + 2 × ${num(r, 1)}) × ${num(tf, 1)}`,
    effect: byWeb ? null : `≥ η h_{w} t_{w} = ${num(least, 1)}`,
    resistance: quantity(Av, 'mm²', 1),
  })
}

function shearRows(basics: Basics, of: CaseBasics): SheetRow[] {
  const { section, resistances: { fy, VplRd, VbwRd }, rules: { choice } } = basics
  const { tw, tf, h } = section
  const eps = epsilon(fy)
  const hw = h - 2 * tf
  const buckles = needsShearBucklingCheck(section, fy, choice.eta)
  const limit = 72 * eps / choice.eta
  const rows = [
    shearAreaRow(basics),
    row({
      clause: '6.2.6',
      check: 'Shear',
      expression: 'V_{pl,Rd} = A_{v} (f_{y} / √3) / γ_{M0}',
      substituted: `${num(shearArea(section, choice.eta), 1)} × (${num(fy, 0)} / √3) / ${factor(choice.gammaM0)}`,
      effect: kN(of.verified.VEd),
      resistance: kN(VplRd, 1),
      utilisation: VbwRd !== null && VbwRd < VplRd ? null : of.verified.utilisation.shear,
    }),
    row({
      clause: 'EN 1993-1-5 5.1(2)',
      check: 'Web slenderness in shear',
      expression: 'h_{w} / t_{w} ≤ 72 ε / η',
      substituted: `${num(hw, 1)} / ${num(tw, 1)} = ${num(hw / tw, 1)}`,
      effect: buckles ? 'shear buckling is checked' : 'no shear buckling',
      resistance: num(limit, 1),
    }),
  ]
  if (VbwRd === null) return rows
  const lambdaW = webSlenderness(section, fy)
  const chiW = shearBucklingFactor(lambdaW, choice.eta)
  rows.push(
    row({
      clause: 'EN 1993-1-5 5.3',
      check: 'Shear buckling factor',
      expression: 'λ̄_{w} = h_{w} / (86.4 t_{w} ε), χ_{w} by Table 5.1, non-rigid end post',
      substituted: `${num(hw, 1)} / (86.4 × ${num(tw, 1)} × ${num(eps, 4)}) = ${num(lambdaW, 4)}`,
      resistance: `χ_{w} ${num(chiW, 4)}`,
    }),
    row({
      clause: 'EN 1993-1-5 (5.2)',
      check: 'Shear buckling',
      expression: 'V_{bw,Rd} = χ_{w} f_{y} h_{w} t_{w} / (√3 γ_{M1})',
      substituted: `${num(chiW, 4)} × ${num(fy, 0)} × ${num(hw, 1)} × ${num(tw, 1)} / (1.7321 × ${factor(choice.gammaM1)})`,
      effect: kN(of.verified.VEd),
      resistance: kN(VbwRd, 1),
      utilisation: VbwRd < VplRd ? of.verified.utilisation.shear : null,
    }),
  )
  return rows
}

function highShearRow(basics: Basics, of: CaseBasics): SheetRow {
  const { bendingAt, utilisation, VEd } = of.verified
  const { VplRd, W, Wweb, fy, sectionClass } = basics.resistances
  const half = num(VplRd / 2000, 1)
  if (VEd <= 0.5 * VplRd) {
    return row({
      clause: '6.2.8(2)',
      check: 'Bending with shear',
      expression: 'V_{Ed} ≤ 0.5 V_{pl,Rd}',
      substituted: `${num(VEd / 1000, 1)} ≤ ${half}`,
      resistance: 'no reduction',
    })
  }
  if (bendingAt.rho === 0) {
    return row({
      clause: '6.2.8(2)',
      check: 'Bending with shear',
      expression: 'V at the place of the highest M / M_{V,Rd} ≤ 0.5 V_{pl,Rd}',
      substituted: `at ${metres(bendingAt.x)} m: ${num(bendingAt.V / 1000, 1)} ≤ ${half}; checked on both sides of every load`,
      resistance: 'no reduction',
      utilisation: utilisation.bending,
    })
  }
  return row({
    clause: sectionClass <= 2 ? '6.2.8(5)' : '6.2.8(3)',
    check: `Bending with shear, at ${metres(bendingAt.x)} m`,
    expression: sectionClass <= 2
      ? 'M_{V,Rd} = (W_{pl,y} − ρ A_{w}^{2} / (4 t_{w})) f_{y} / γ_{M0}, ρ = (2 V / V_{pl,Rd} − 1)^{2}'
      : 'M_{V,Rd} = (W_{el,y} − ρ t_{w} h_{w}^{3} / (6 h)) f_{y} / γ_{M0}, ρ = (2 V / V_{pl,Rd} − 1)^{2}',
    substituted: `ρ = (2 × ${num(bendingAt.V / 1000, 1)} / ${num(VplRd / 1000, 1)} − 1)^{2} = ${num(bendingAt.rho, 4)}; `
      + `(${modulus(W)} − ${num(bendingAt.rho, 4)} × ${modulus(Wweb)}) × ${num(fy, 0)} / ${factor(basics.rules.choice.gammaM0)}`,
    effect: kNm(bendingAt.M),
    resistance: kNm(bendingAt.MvRd),
    utilisation: utilisation.bending,
  })
}

/** 6.2: bending, shear with its buckling, bending with shear. */
export function strengthRows(basics: Basics, of: CaseBasics): SheetRow[] {
  return [bendingRow(basics, of), ...shearRows(basics, of), highShearRow(basics, of)]
}
