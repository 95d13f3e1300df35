import {
  CLASS_LIMITS, IMPERFECTION, bendingModulus, classInCompression, criticalMomentUniform, epsilon, flangeClass, flangeOutstand,
  flexuralBuckling, ltbCurve, ltbReduction, ltbResistance, ltbSlenderness, webClassInCompression, webStraightDepth,
} from '../ec3'
import type { Axis, FlexuralBuckling, SectionClass } from '../ec3'
import { E, yieldStrength } from '../materials'
import type { Section } from '../sections'
import { annexBRows } from './annex-b-rows'
import { factor, kN, kNm, metres, mm, num, quantity, row } from './format'
import { reductionRows, slendernessRow, uniformMomentRow } from './ltb-rows'
import { classRow, yieldRow } from './section-rows'
import { modulus } from './strength-rows'
import type { ColumnSheetInput, ColumnSheetLength, ColumnSheetMoment, ColumnSheetTerm, SheetGroup, SheetRow } from './types'

/** What a section resists over one length. N, Nmm. */
export interface LengthResistance {
  section: Section
  fy: number
  sectionClass: SectionClass
  y: FlexuralBuckling
  z: FlexuralBuckling
  Wy: number
  Wz: number
  Mcr: number
  lambdaLT: number
  chiLT: number
  MbRd: number
  MczRd: number
}

export function lengthResistance({ grade, choice, ltbMethod }: ColumnSheetInput, section: Section, length: ColumnSheetLength): LengthResistance {
  const fy = yieldStrength(grade, Math.max(section.tf, section.tw), choice.yieldRule)!
  const sectionClass = classInCompression(section, fy)
  const Wy = bendingModulus(section, sectionClass)
  const Wz = sectionClass <= 2 ? section.WplZ : section.WelZ
  const Mcr = criticalMomentUniform(section, length.ltbLength)
  const lambdaLT = ltbSlenderness(Wy, fy, Mcr)
  const chiLT = ltbReduction(lambdaLT, ltbCurve(section, ltbMethod, choice))
  return {
    section, fy, sectionClass, Wy, Wz, Mcr, lambdaLT, chiLT,
    y: flexuralBuckling(section, grade, fy, choice.gammaM1, length.LcrY, 'y'),
    z: flexuralBuckling(section, grade, fy, choice.gammaM1, length.LcrZ, 'z'),
    MbRd: ltbResistance(chiLT, Wy, fy, choice.gammaM1),
    MczRd: Wz * fy / choice.gammaM0,
  }
}

/** "1.35 × 4 × (137.50 − 20.00)" in kN. */
function termText({ factors, towards, away }: ColumnSheetTerm): string {
  const force = away > 0 ? `(${num(towards / 1000, 2)} − ${num(away / 1000, 2)})` : num(towards / 1000, 2)
  return [...factors.map(value => Number.isInteger(value) ? String(value) : factor(value)), force].join(' × ')
}

function momentRow(axis: Axis, end: 'top' | 'foot', moment: ColumnSheetMoment): SheetRow[] {
  if (moment.value === 0) return []
  const { terms, lever, share, value } = moment
  const where = share === 1 ? 'all to this length' : share === 0.5 ? 'half to this length' : `${num(share, 4)} to this length by I/L`
  return [row({
    check: `Moment about ${axis}, at the ${end}`,
    expression: `M_{${axis}} = R e · share, e = ${axis === 'y' ? 'h' : 't_{w}'}/2 + 100 mm`,
    substituted: `(${terms.map(termText).join(' + ')}) × ${num(lever / 1000, 4)} × ${num(share, 4)}; R unbalanced, ${where}`,
    resistance: kNm(value),
  })]
}

/** Axial force and moments of one length. */
export function forceRows(length: ColumnSheetLength): SheetRow[] {
  const { axial, moments } = length
  const rows = [
    row({
      clause: length.combination,
      check: 'Axial force at the foot',
      expression: 'N_{Ed} = Σ γ F',
      substituted: `${axial.map(termText).join(' + ')}; ${axial.map(({ what }) => what).join(' + ')}`,
      resistance: kN(length.NEd),
    }),
    ...momentRow('y', 'top', moments.topY), ...momentRow('y', 'foot', moments.footY),
    ...momentRow('z', 'top', moments.topZ), ...momentRow('z', 'foot', moments.footZ),
  ]
  if (rows.length === 1) rows.push(row({ check: 'Moments', substituted: 'none: the reactions of both sides balance', resistance: 'M_{Ed} = 0' }))
  return rows
}

export function columnSectionRows({ grade, choice }: ColumnSheetInput, { section, fy }: LengthResistance): SheetRow[] {
  const eps = epsilon(fy)
  return [
    yieldRow(section, grade, fy, choice),
    classRow('Flange in compression', 'c_{f} / t_{f}', flangeOutstand(section), section.tf, flangeClass(section, fy), CLASS_LIMITS.outstandFlange, eps),
    classRow('Web in compression', 'c_{w} / t_{w}', webStraightDepth(section), section.tw, webClassInCompression(section, fy), CLASS_LIMITS.webInCompression, eps),
  ]
}

function reductionOf(axis: Axis, { lambda, chi, curve }: FlexuralBuckling): SheetRow[] {
  if (lambda <= 0.2) {
    return [row({ clause: '6.3.1.2(4)', check: 'Reduction', expression: `λ̄_{${axis}} ≤ 0.2`, substituted: `${num(lambda, 4)} ≤ 0.2`, resistance: `χ_{${axis}} 1.0` })]
  }
  const phi = 0.5 * (1 + IMPERFECTION[curve] * (lambda - 0.2) + lambda * lambda)
  return [
    row({
      clause: '6.3.1.2(1)', check: `Φ, curve ${curve}`,
      expression: `Φ = 0.5 [1 + α (λ̄_{${axis}} − 0.2) + λ̄_{${axis}}^{2}]`,
      substituted: `0.5 [1 + ${factor(IMPERFECTION[curve])} (${num(lambda, 4)} − 0.2) + ${num(lambda, 4)}^{2}]`,
      resistance: quantity(phi, '', 4),
    }),
    row({
      clause: '(6.49)', check: 'Reduction',
      expression: `χ_{${axis}} = 1 / (Φ + √(Φ^{2} − λ̄_{${axis}}^{2})) ≤ 1`,
      substituted: `1 / (${num(phi, 4)} + √(${num(phi, 4)}^{2} − ${num(lambda, 4)}^{2}))`,
      resistance: quantity(chi, '', 4),
    }),
  ]
}

/** 6.3.1 about one axis. */
export function flexuralRows({ choice }: ColumnSheetInput, { section, fy, ...of }: LengthResistance, axis: Axis, Lcr: number, NEd: number): SheetRow[] {
  const buckling = of[axis]
  const I = axis === 'y' ? section.Iy : section.Iz
  return [
    row({
      clause: '6.3.1.2', check: `Critical force about ${axis}`,
      expression: `N_{cr,${axis}} = π^{2} E I_{${axis}} / L_{cr,${axis}}^{2}`,
      substituted: `π^{2} × ${num(E, 0)} × ${num(I / 1e4, 2)} × 10^{4} / ${num(Lcr, 0)}^{2}`,
      resistance: kN(buckling.Ncr, 1),
    }),
    row({
      clause: '(6.50)', check: 'Slenderness',
      expression: `λ̄_{${axis}} = √(A f_{y} / N_{cr,${axis}})`,
      substituted: `√(${num(section.A * fy / 1000, 1)} / ${num(buckling.Ncr / 1000, 1)})`,
      resistance: quantity(buckling.lambda, '', 4),
    }),
    ...reductionOf(axis, buckling),
    row({
      clause: '(6.47)', check: `Buckling resistance about ${axis}`,
      expression: `N_{b,${axis},Rd} = χ_{${axis}} A f_{y} / γ_{M1}`,
      substituted: `${num(buckling.chi, 4)} × ${num(section.A, 1)} × ${num(fy, 0)} / ${factor(choice.gammaM1)}`,
      effect: kN(NEd),
      resistance: kN(buckling.NbRd, 1),
    }),
  ]
}

/** Mb,Rd for uniform moment and Mc,z,Rd. */
export function momentResistanceRows({ choice, ltbMethod }: ColumnSheetInput, r: LengthResistance, length: ColumnSheetLength): SheetRow[] {
  const [symbolY, symbolZ] = r.sectionClass <= 2 ? ['W_{pl,y}', 'W_{pl,z}'] : ['W_{el,y}', 'W_{el,z}']
  const curve = ltbCurve(r.section, ltbMethod, choice)
  return [
    uniformMomentRow(r.section, length.ltbLength, `Critical moment over ${metres(length.ltbLength)} m, uniform moment`),
    slendernessRow(symbolY!, r.Wy * r.fy, r.Mcr, r.lambdaLT, curve),
    ...reductionRows(curve, r.lambdaLT, r.section),
    row({
      clause: '(6.55)', check: 'Buckling resistance in bending',
      expression: `M_{b,Rd} = χ_{LT} ${symbolY} f_{y} / γ_{M1}`,
      substituted: `${num(r.chiLT, 4)} × ${modulus(r.Wy)} × ${num(r.fy, 0)} / ${factor(choice.gammaM1)}`,
      effect: kNm(length.MyEd), resistance: kNm(r.MbRd),
    }),
    row({
      clause: '6.2.5', check: 'Bending about z',
      expression: `M_{c,z,Rd} = ${symbolZ} f_{y} / γ_{M0}`,
      substituted: `${modulus(r.Wz)} × ${num(r.fy, 0)} / ${factor(choice.gammaM0)}`,
      effect: kNm(length.MzEd), resistance: kNm(r.MczRd),
    }),
  ]
}

const MINOR_AXIS_FACTOR = 1.5
const PINNED_BASE_LIMIT = 0.83

/** The expression for simple construction, part by part. */
export function simpleRows(r: LengthResistance, { NEd, MyEd, MzEd, fromLevel }: ColumnSheetLength): SheetRow[] {
  const NbRd = Math.min(r.y.NbRd, r.z.NbRd)
  const parts = [NEd / NbRd, MyEd / r.MbRd, MINOR_AXIS_FACTOR * MzEd / r.MczRd]
  const sum = parts[0]! + parts[1]! + parts[2]!
  const rows = [row({
    clause: 'NCCI SN048', check: 'Axial force with moments, simple construction',
    expression: 'N_{Ed} / N_{b,min,Rd} + M_{y,Ed} / M_{b,Rd} + 1.5 M_{z,Ed} / M_{c,z,Rd} ≤ 1',
    substituted: `${num(NEd / 1e3, 2)} / ${num(NbRd / 1e3, 2)} + ${num(MyEd / 1e6, 3)} / ${num(r.MbRd / 1e6, 3)} + 1.5 × ${num(MzEd / 1e6, 3)} / ${num(r.MczRd / 1e6, 3)}`,
    effect: parts.map(part => num(part, 3)).join(' + '),
    resistance: quantity(sum, '', 4),
    utilisation: sum,
  })]
  if (fromLevel === 0) {
    const pinned = NEd / (PINNED_BASE_LIMIT * r.y.NbRd)
    rows.push(row({
      clause: 'NCCI SN048', check: 'At the pinned base (0.83 from memory, confirm)',
      expression: 'N_{Ed} / (0.83 N_{b,y,Rd}) ≤ 1',
      substituted: `${num(NEd / 1e3, 2)} / (0.83 × ${num(r.y.NbRd / 1e3, 2)})`,
      resistance: quantity(pinned, '', 4),
      utilisation: pinned,
    }))
  }
  return rows
}

/** Buckling lengths of a length, as rows of words. */
export function lengthRow({ LcrY, LcrZ, method }: ColumnSheetLength, storeyHeight: number): SheetRow {
  const held = method === 'simple construction' ? 'held both ways on every floor' : 'a level leaves an axis unheld'
  return row({
    check: 'Buckling lengths between the levels that hold it',
    expression: 'L_{cr,y}, L_{cr,z}',
    substituted: `${held}; storey height ${num(storeyHeight, 0)} mm`,
    effect: mm(LcrY, 0), resistance: mm(LcrZ, 0),
  })
}

export function expressionGroup(input: ColumnSheetInput, r: LengthResistance, length: ColumnSheetLength): SheetGroup {
  return length.method === 'simple construction'
    ? { title: 'Simple construction', rows: simpleRows(r, length) }
    : { title: '6.3.3 with Annex B', rows: annexBRows(input, r, length) }
}
