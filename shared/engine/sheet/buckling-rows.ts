import { c1QuarterPoints, criticalMomentClosed, criticalMomentUniform, ltbModification, ltbReduction } from '../ec3'
import type { SegmentVerification } from '../members'
import { momentIn } from '../statics'
import type { Basics, CaseBasics } from './basics'
import { factor, kNm, metres, num, quantity, row } from './format'
import { reductionRows, slendernessRow, uniformMomentRow } from './ltb-rows'
import { modulus } from './strength-rows'
import type { SheetRow } from './types'

/** Moment at any place, Nmm. */
function momentAt({ x, total }: CaseBasics, place: number): number {
  let i = 0
  while (i < x.length - 2 && place > x[i + 1]!) i++
  return momentIn(total, i, place - x[i]!)
}

/** C2 of pieces without end moments: uniform load (SN003); 1 … 5 equal loads, from the eigenvalue (engineering basis, section 6). */
const C2_UNIFORM = 0.454
const C2_BY_LOADS = [0.57, 0.5, 0.48, 0.47, 0.465]

/** C2 for the loads with a height inside the segment, by what prevails among them; 0 where there is none. */
function loadFactorC2({ x, combination: { qTop, PTop } }: CaseBasics, { from, to }: SegmentVerification): number {
  let line = 0
  let point = 0
  let loads = 0
  for (let i = 0; i < x.length - 1; i++) {
    if (x[i]! >= from && x[i + 1]! <= to) line += qTop[i]! * (x[i + 1]! - x[i]!)
    if (x[i]! > from && x[i]! < to && PTop[i]! > 0) {
      point += PTop[i]!
      loads++
    }
  }
  if (line === 0 && point === 0) return 0
  return line >= point ? C2_UNIFORM : C2_BY_LOADS[loads - 1] ?? C2_UNIFORM
}

/** The closed form beside the eigenvalue, with the difference stated. */
function closedRow(basics: Basics, of: CaseBasics, segment: SegmentVerification): SheetRow {
  const L = segment.to - segment.from
  const quarter = (k: number) => momentAt(of, segment.from + L * k / 4)
  const C1 = c1QuarterPoints(segment.MEd, quarter(1), quarter(2), quarter(3))
  const C2 = loadFactorC2(of, segment)
  const hasEndMoments = Math.max(Math.abs(quarter(0)), Math.abs(quarter(4))) > 1e-6 * segment.MEd
  const zg = C2 === 0 || hasEndMoments ? 0 : basics.section.h / 2
  const closed = criticalMomentClosed(basics.section, L, C1, C2, zg)
  const difference = 100 * (closed / segment.Mcr! - 1)
  const leftOut = C2 > 0 && hasEndMoments ? '; z_{g} left out: no C_{2} for these moments' : ''
  return row({
    check: 'Closed form, for the eye',
    expression: zg === 0
      ? 'C_{1} by quarter points, M_{cr} = C_{1} M_{cr,0}'
      : 'C_{1} by quarter points, M_{cr} = C_{1} (π^{2} E I_{z} / L^{2}) (√(I_{w} / I_{z} + L^{2} G I_{t} / (π^{2} E I_{z}) + (C_{2} z_{g})^{2}) − C_{2} z_{g})',
    substituted: zg === 0
      ? `${num(C1, 3)} × ${num(criticalMomentUniform(basics.section, L) / 1e6, 2)}${leftOut}`
      : `C_{1} ${num(C1, 3)}, C_{2} ${num(C2, 3)}, z_{g} ${num(zg, 1)}`,
    effect: `${difference >= 0 ? '+' : ''}${num(difference, 1)} %`,
    resistance: kNm(closed),
  })
}

function criticalRows(basics: Basics, of: CaseBasics, segment: SegmentVerification): SheetRow[] {
  const L = segment.to - segment.from
  const raised = loadFactorC2(of, segment) > 0
  const height = !raised ? 'z_{g} = 0' : `z_{g} = +h/2 = ${num(basics.section.h / 2, 1)}`
  if (segment.C1 === null) {
    return [row({
      clause: '6.3.2.2(2)',
      check: 'Elastic critical moment',
      expression: 'M_{cr} = α_{cr} M_{Ed}',
      substituted: `eigenvalue of the whole beam with its restraints, its own moments, ${height}: ${num(segment.Mcr! / segment.MEd, 4)} × ${num(segment.MEd / 1e6, 2)}`,
      effect: `α_{cr} ${num(segment.Mcr! / segment.MEd, 4)}`,
      resistance: kNm(segment.Mcr!),
    })]
  }
  return [
    uniformMomentRow(basics.section, L, 'Uniform moment, for comparison'),
    row({
      clause: '6.3.2.2(2)',
      check: 'Elastic critical moment',
      expression: 'M_{cr} = C_{1} M_{cr,0}',
      substituted: `eigenvalue over ${metres(L)} m between forks, its own moments, ${height}: ${num(segment.C1, 4)} × ${num(criticalMomentUniform(basics.section, L) / 1e6, 2)}`,
      effect: `C_{1} ${num(segment.C1, 4)}${raised ? ' with z_{g}' : ''}`,
      resistance: kNm(segment.Mcr!),
    }),
    closedRow(basics, of, segment),
  ]
}

/** χLT, with f where it is used. */
function modifiedRows({ rules, resistances, section }: Basics, segment: SegmentVerification): SheetRow[] {
  const curve = resistances.curves[rules.ltbMethod]
  const lambda = segment.lambdaLT!
  const rows = reductionRows(curve, lambda, section)
  if (segment.kc === null || lambda <= curve.plateau) return rows
  const chi = ltbReduction(lambda, curve)
  const f = ltbModification(lambda, segment.kc)
  const unlimited = 1 - 0.5 * (1 - segment.kc) * (1 - 2 * (lambda - 0.8) ** 2)
  rows.push(row({
    clause: '(6.58)',
    check: 'Modification by the moments',
    expression: 'f = 1 − 0.5 (1 − k_{c}) [1 − 2 (λ̄_{LT} − 0.8)^{2}] ≤ 1, χ_{LT,mod} = χ_{LT} / f',
    substituted: `${num(chi, 4)} / ${num(f, 4)}; f = 1 − 0.5 (1 − ${num(segment.kc, 4)}) [1 − 2 (${num(lambda, 4)} − 0.8)^{2}] = ${num(unlimited, 4)}${unlimited > 1 ? ' (taken as 1)' : ''}, ${correctionWords(segment)}`,
    effect: '≤ 1, ≤ 1/λ̄_{LT}^{2}',
    resistance: quantity(segment.chiLT, '', 4),
  }))
  return rows
}

/** Where kc comes from. */
function correctionWords({ kc, kcC1 }: SegmentVerification): string {
  if (kcC1) return `k_{c} = 1 / √${num(kcC1, 4)} with C_{1} of loads at the shear centre`
  return kc === 1 ? 'k_{c} = 1, the restraints are in M_{cr}' : 'k_{c} of Table 6.6'
}

function segmentName(segment: SegmentVerification, index: number, of: CaseBasics): string {
  return of.verified.segments.length === 1 ? '' : `segment ${index + 1} from ${metres(segment.from)} to ${metres(segment.to)} m`
}

/** The words of the restraint of a case. */
export function restraintWords(of: CaseBasics): string {
  const { segments } = of.verified
  if (segments.every(segment => segment.held)) return 'held along its whole length'
  if (of.prepared.stretches.some(stretch => stretch.inside > 0)) return 'whole beam with its restraints'
  return segments.length === 1 ? 'not held between its ends' : ''
}

function resistanceRow(basics: Basics, segment: SegmentVerification): SheetRow {
  const { resistances: { W, fy, sectionClass }, rules: { choice } } = basics
  return row({
    clause: '(6.55)',
    check: 'Buckling resistance',
    expression: `M_{b,Rd} = χ_{LT} ${sectionClass <= 2 ? 'W_{pl,y}' : 'W_{el,y}'} f_{y} / γ_{M1}`,
    substituted: `${num(segment.chiLT, 4)} × ${modulus(W)} × ${num(fy, 0)} / ${factor(choice.gammaM1)}`,
    effect: kNm(segment.MEd),
    resistance: kNm(segment.MbRd),
    utilisation: segment.utilisation,
  })
}

/** The other segments, those alike in one row. */
function otherRows(of: CaseBasics, governing: number): SheetRow[] {
  const groups: { names: number[], segment: SegmentVerification }[] = []
  of.verified.segments.forEach((segment, i) => {
    if (i === governing || segment.utilisation === null) return
    const alike = groups.find(group => Math.abs(group.segment.utilisation! - segment.utilisation!) < 1e-6
      && Math.abs(group.segment.MEd - segment.MEd) < 1e-6 * segment.MEd)
    if (alike) alike.names.push(i + 1)
    else groups.push({ names: [i + 1], segment })
  })
  return groups.map(({ names, segment }) => row({
    check: `${names.length > 1 ? 'Segments' : 'Segment'} ${names.join(', ')}`,
    substituted: segment.Mcr === null
      ? 'no moment'
      : `M_{cr} ${num(segment.Mcr / 1e6, 1)}${segment.C1 === null ? '' : `, C_{1} ${num(segment.C1, 3)}`}, λ̄_{LT} ${num(segment.lambdaLT!, 4)}, χ_{LT} ${num(segment.chiLT, 4)}`,
    effect: kNm(segment.MEd),
    resistance: kNm(segment.MbRd),
    utilisation: segment.utilisation,
  }))
}

/** 6.3.2 of one case: the governing segment in full, the others in a row each. */
export function bucklingRows(basics: Basics, of: CaseBasics): { title: string, rows: SheetRow[] } {
  const { governingSegment, segments } = of.verified
  const title = 'Lateral-torsional buckling'
  if (governingSegment === null) {
    return {
      title,
      rows: [row({
        clause: '6.3.2.1(2)', check: 'Compression flange', substituted: 'held along its whole length by the slab that is fixed to it', resistance: 'no reduction',
      })],
    }
  }
  const segment = segments[governingSegment]!
  const words = segmentName(segment, governingSegment, of) || restraintWords(of)
  if (segment.Mcr === null) {
    return { title: `${title}, ${words}`, rows: [row({ clause: '6.3.2', check: 'Moment', substituted: 'none', resistance: 'no reduction' })] }
  }
  const { W, fy, sectionClass, curves } = basics.resistances
  const held = segments.filter(({ held: isHeld }) => isHeld).map(({ from, to }) => `${metres(from)} to ${metres(to)} m`)
  return {
    title: `${title}, ${words}`,
    rows: [
      ...criticalRows(basics, of, segment),
      slendernessRow(sectionClass <= 2 ? 'W_{pl,y}' : 'W_{el,y}', W * fy, segment.Mcr, segment.lambdaLT!, curves[basics.rules.ltbMethod]),
      ...modifiedRows(basics, segment),
      resistanceRow(basics, segment),
      ...otherRows(of, governingSegment),
      ...held.map(place => row({ check: `Held from ${place}`, substituted: 'under the slab that is fixed to the flange', resistance: 'no reduction' })),
    ],
  }
}
