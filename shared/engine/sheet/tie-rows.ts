import { tensionResistance } from '../ec3'
import type { Basics } from './basics'
import { factor, kN, mm, num, row } from './format'
import type { SheetContext, SheetGroup } from './types'

/** Rules for a beam that no load but its own weight keeps from being too light (engineering basis, section 5). */
const LEAST_DEPTH = 200
const SPAN_OVER_DEPTH = 40
const SPAN_OVER_RADIUS = 300

/** Tie force against the gross section, depth and slenderness; nothing where the beam has to serve no tie. */
export function tieGroups({ section, beam: { span }, resistances: { fy }, rules: { choice } }: Basics, { tieForce }: SheetContext): SheetGroup[] {
  if (!tieForce) return []
  const NtRd = tensionResistance(section.A, fy, choice.gammaM0)
  const depth = Math.max(LEAST_DEPTH, span / SPAN_OVER_DEPTH)
  const radius = span / SPAN_OVER_RADIUS
  return [{
    title: 'Tie',
    rows: [
      row({
        clause: 'EN 1991-1-7 A.5', check: 'Tie force, 6.2.3(2)',
        expression: 'N_{t,Rd} = A f_{y} / γ_{M0}',
        substituted: `${num(section.A, 1)} × ${num(fy, 0)} / ${factor(choice.gammaM0)}`,
        effect: kN(tieForce, 1), resistance: kN(NtRd, 1), utilisation: tieForce / NtRd,
      }),
      row({
        check: 'Depth (common practice)', expression: 'h ≥ max(200 mm, L / 40)', substituted: `${num(span, 0)} / ${SPAN_OVER_DEPTH} = ${num(span / SPAN_OVER_DEPTH, 1)}`,
        effect: mm(depth, 1), resistance: mm(section.h, 1), utilisation: depth / section.h,
      }),
      row({
        check: 'Slenderness (common practice)', expression: 'i_{z} ≥ L / 300', substituted: `${num(span, 0)} / ${SPAN_OVER_RADIUS}`,
        effect: mm(radius, 1), resistance: mm(section.iz, 1), utilisation: radius / section.iz,
      }),
    ],
  }]
}
