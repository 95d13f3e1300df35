import { c1QuarterPoints, criticalMomentClosed, criticalMomentUniform, ltbModification, ltbReduction } from '../ec3'
import type { SegmentVerification } from '../members'
import { largestMoment, momentIn } from '../statics'
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
function loadFactorC2({ x, combination: { qTop, PTop } }: CaseBasics, { from, to }: Piece): number {
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

/** A length between forks and its largest moment, Nmm. */
interface Piece { from: number, to: number, MEd: number }

/** Mcr of a piece by C1 of its quarter points, Nmm; zg counts where there are no end moments. */
function closedForm(basics: Basics, of: CaseBasics, piece: Piece) {
  const L = piece.to - piece.from
  const [start, M2, M3, M4, end] = [0, 1, 2, 3, 4].map(k => momentAt(of, piece.from + L * k / 4)) as [number, number, number, number, number]
  const C1 = c1QuarterPoints(piece.MEd, M2, M3, M4)
  const C2 = loadFactorC2(of, piece)
  const hasEndMoments = Math.max(Math.abs(start), Math.abs(end)) > 1e-6 * piece.MEd
  const zg = C2 === 0 || hasEndMoments ? 0 : basics.section.h / 2
  const words = `moments ${[piece.MEd, M2, M3, M4].map(M => num(M / 1e6, 1)).join(', ')} kNm${C2 > 0 && hasEndMoments ? '; z_{g} left out: no C_{2} for these' : ''}`
  return { C1, C2, zg, words, Mcr: criticalMomentClosed(basics.section, L, C1, C2, zg) }
}

const QUARTER_POINTS = 'C_{1} = √(35 M^{2} / (M^{2} + 9 M_{2}^{2} + 16 M_{3}^{2} + 9 M_{4}^{2}))'

/** The closed form beside the eigenvalue of one segment, with the difference stated. */
function closedRow(basics: Basics, of: CaseBasics, segment: SegmentVerification): SheetRow {
  const { C1, C2, zg, words, Mcr } = closedForm(basics, of, segment)
  const difference = 100 * (Mcr / segment.Mcr! - 1)
  return row({
    check: 'Closed form, for the eye',
    expression: zg === 0
      ? `M_{cr} = C_{1} M_{cr,0}, ${QUARTER_POINTS}`
      : `M_{cr} = C_{1} (π^{2} E I_{z} / L^{2}) (√(I_{w} / I_{z} + L^{2} G I_{t} / (π^{2} E I_{z}) + (C_{2} z_{g})^{2}) − C_{2} z_{g}), ${QUARTER_POINTS}`,
    substituted: zg === 0
      ? `${num(C1, 3)} × ${num(criticalMomentUniform(basics.section, segment.to - segment.from) / 1e6, 2)}; ${words}`
      : `C_{1} ${num(C1, 3)}, C_{2} ${num(C2, 3)}, z_{g} ${num(zg, 1)}; ${words}`,
    effect: `${difference >= 0 ? '+' : ''}${num(difference, 1)} %`,
    resistance: kNm(Mcr),
  })
}

/** Of the pieces between the restraints of a run the one that the closed form lets buckle first, as if it stood alone. */
function weakestPiece(basics: Basics, of: CaseBasics, { from, to }: SegmentVerification): Piece {
  const { x, prepared, total } = of
  const knots = [...x.keys()].filter(i => x[i]! >= from && x[i]! <= to && (x[i] === from || x[i] === to || prepared.restrained[i] === 1))
  const pieces = knots.slice(1).map((end, k): Piece => ({ from: x[knots[k]!]!, to: x[end]!, MEd: largestMoment(x, total, knots[k]!, end).value }))
  const factorOf = (piece: Piece) => piece.MEd > 0 ? closedForm(basics, of, piece).Mcr / piece.MEd : Number.POSITIVE_INFINITY
  return pieces.reduce((weakest, piece) => factorOf(piece) < factorOf(weakest) ? piece : weakest)
}

/** Beside the eigenvalue of a whole beam: the closed form of its weakest piece alone, which leaves out that the pieces help each other. */
function pieceRows(basics: Basics, of: CaseBasics, run: SegmentVerification): SheetRow[] {
  const piece = weakestPiece(basics, of, run)
  const { C1, words, Mcr, zg } = closedForm(basics, of, piece)
  const L = piece.to - piece.from
  const uniform = criticalMomentUniform(basics.section, L)
  const own = zg === 0 ? C1 : Mcr / uniform
  const alone = Mcr * run.MEd / piece.MEd
  const difference = 100 * (alone / run.Mcr! - 1)
  return [
    uniformMomentRow(basics.section, L, `Uniform moment on the piece from ${metres(piece.from)} to ${metres(piece.to)} m`),
    row({
      check: 'Closed form of that piece alone, for the eye',
      expression: `M_{cr} = C_{1} M_{cr,0} M_{Ed} / M, ${QUARTER_POINTS}`,
      substituted: `${num(own, 3)} × ${num(uniform / 1e6, 2)} × ${num(run.MEd / 1e6, 2)} / ${num(piece.MEd / 1e6, 2)}; ${words}`,
      effect: `${difference >= 0 ? '+' : ''}${num(difference, 1)} %`,
      resistance: kNm(alone),
    }),
  ]
}

function criticalRows(basics: Basics, of: CaseBasics, segment: SegmentVerification): SheetRow[] {
  const L = segment.to - segment.from
  const raised = loadFactorC2(of, segment) > 0
  const height = !raised ? 'z_{g} = 0' : `z_{g} = +h/2 = ${num(basics.section.h / 2, 1)}`
  if (segment.C1 === null) {
    return [
      row({
        clause: '6.3.2.2(2)',
        check: 'Elastic critical moment',
        expression: 'M_{cr} = α_{cr} M_{Ed}',
        substituted: `eigenvalue of the whole beam with its restraints, its own moments, ${height}: ${num(segment.Mcr! / segment.MEd, 4)} × ${num(segment.MEd / 1e6, 2)}`,
        effect: `α_{cr} ${num(segment.Mcr! / segment.MEd, 4)}`,
        resistance: kNm(segment.Mcr!),
      }),
      ...pieceRows(basics, of, segment),
    ]
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
