import type { Grade } from '../materials'
import type { Beam, BeamRules, EndReaction } from '../members'
import type { Section } from '../sections'
import { basicsOf } from './basics'
import type { Basics, CaseBasics } from './basics'
import { bucklingRows } from './buckling-rows'
import { drawnLoads, loadsGroup } from './design-loads'
import { diagramsOf } from './diagrams'
import { fireGroup } from './fire-rows'
import { kNm, num, quantity, row } from './format'
import { sectionGroup, sectionProperties } from './section-rows'
import { serviceGroup } from './service-rows'
import { choicesOf } from './sheet-choices'
import { strengthRows } from './strength-rows'
import type { CalculationSheet, SheetContext, SheetGroup, SheetReaction, SheetRow } from './types'
import { tieGroups } from './tie-rows'
import { whyNotLighter } from './why-not'
import { checkName, designationText, governingSentence, worstConstruction } from './words'

const CAUTIONS = [
  'Preliminary sizing for scheme comparison; not for construction.',
  'Webs under the reactions and local loads are not checked at this stage.',
  'Bare steel without composite action; connections, torsion and fire design are outside.',
]

const CONSTRUCTION_CAUTIONS = [
  'Construction stage: the local heap of EN 1991-1-6 4.11.2 (10 % of the slab, 3 × 3 m) is left out.',
  'Planks on one side: their torsion is not checked; an erection order or temporary bracing is needed.',
]

function methodText({ rules }: Basics): string {
  const parts = [
    'EN 1993-1-1:2005 + A1:2014', `${rules.choice.name}, ${rules.combination === '6.10' ? '6.10' : '6.10a and 6.10b'}`,
    `LTB ${rules.ltbMethod}`, rules.criticalMoment === 'by-segment' ? 'by segment' : 'whole beam',
    rules.useF && rules.ltbMethod === '6.3.2.3' ? 'f on' : 'f off',
  ]
  return parts.join(', ')
}

function reaction({ permanent, variable, ultimate }: EndReaction): SheetReaction {
  return { permanent: permanent / 1000, variable: variable / 1000, ultimate: ultimate / 1000 }
}

/** A case that does not govern its stage, in one row. */
function summaryRow(of: CaseBasics): SheetRow {
  const { utilisation, MEd, MbRd, MEdAt } = of.verified
  const worst = Math.max(utilisation.bending, utilisation.shear, utilisation.buckling ?? 0)
  return row({
    clause: of.combination.factors.name,
    check: of.verified.name,
    substituted: `bending ${num(utilisation.bending, 3)}, shear ${num(utilisation.shear, 3)}${utilisation.buckling === null ? '' : `, buckling ${num(utilisation.buckling, 3)}`}; M_{Ed} at ${num(MEdAt / 1000, 2)} m`,
    effect: kNm(MEd),
    resistance: kNm(MbRd),
    utilisation: worst,
  })
}

/** The worst construction case in full, the others in a row each. */
function constructionGroups(basics: Basics, context: SheetContext): SheetGroup[] {
  const worst = worstConstruction(basics.verified.cases)
  if (!worst) return []
  const of = basics.cases[worst.index]!
  const buckling = bucklingRows(basics, of)
  const others = basics.cases.filter(other => other.verified.stage === 'construction' && other !== of)
  const title = `Construction stage, ${of.verified.name}`
  return [
    loadsGroup(basics, of, context, `${title}: loads`),
    { title: `${title}: strength`, rows: strengthRows(basics, of) },
    { title: `${title}: ${buckling.title.charAt(0).toLowerCase()}${buckling.title.slice(1)}`, rows: buckling.rows },
    ...(others.length ? [{ title: 'Construction stage, other cases', rows: others.map(summaryRow) }] : []),
  ]
}

/** Marks the row of the governing check: the one whose utilisation is the highest of all. */
function markGoverning(groups: SheetGroup[], largest: number): void {
  for (const { rows } of groups) {
    const found = rows.find(({ utilisation }) => utilisation !== null && utilisation === largest)
    if (found) {
      found.governs = true
      return
    }
  }
}

function groupsOf(basics: Basics, context: SheetContext): SheetGroup[] {
  const { shown } = basics
  const buckling = bucklingRows(basics, shown)
  const others = basics.cases.filter(other => other.verified.stage === 'service' && other !== shown)
  const groups: SheetGroup[] = [
    loadsGroup(basics, shown, context, basics.rules.combination === '6.10' ? 'Loads' : `Loads, ${shown.combination.factors.name} (larger moment)`),
    sectionGroup(basics),
    { title: 'Strength', rows: strengthRows(basics, shown) },
    buckling,
    ...(others.length ? [{ title: 'Other combination', rows: others.map(summaryRow) }] : []),
    ...constructionGroups(basics, context),
    ...tieGroups(basics, context),
    serviceGroup(basics),
    fireGroup(basics, context),
  ]
  markGoverning(groups, basics.verified.largest)
  return groups
}

/**
 * The calculation sheet of one beam: every check with clause, expression, numbers, result and limit,
 * so that it can be recalculated by hand; diagrams; why the next lighter section is not enough.
 * Throws EngineError for a beam that cannot be (see `verifyBeam`).
 */
export function calculationSheet(
  beam: Beam, section: Section, grade: Grade, rules: BeamRules, context: SheetContext,
): CalculationSheet {
  const basics = basicsOf(beam, section, grade, rules)
  const { verified, shown, weight } = basics
  const { limits } = rules
  const governingSegment = shown.verified.governingSegment
  return {
    title: context.title,
    section: section.designation,
    grade,
    designation: designationText(section.designation),
    facts: context.facts ?? [],
    ends: context.ends ?? ['', ''],
    span: beam.span,
    method: methodText(basics),
    governing: { check: verified.governing, utilisation: verified.largest, sentence: governingSentence(verified) },
    passes: verified.passes,
    combination: shown.combination.factors.name,
    selfWeight: weight > 0 ? quantity(weight * shown.combination.factors.permanent, 'kN/m', 3) : null,
    loads: drawnLoads(basics),
    reactions: { left: reaction(verified.reactions.left), right: reaction(verified.reactions.right) },
    restraint: { held: beam.service.restraint.held.map(({ from, to }) => ({ from, to })), points: [...beam.service.restraint.points] },
    diagrams: diagramsOf(basics),
    segments: shown.verified.segments.map(({ from, to, held, utilisation }, i) => ({
      from, to, held, utilisation, governs: verified.governing === 'buckling' && i === governingSegment,
    })),
    deflectionLimits: {
      variable: limits.variable === null ? null : beam.span / limits.variable,
      total: limits.total === null ? null : beam.span / limits.total,
    },
    groups: groupsOf(basics, context),
    outline: { h: section.h, b: section.b, tw: section.tw, tf: section.tf, r: section.r },
    properties: sectionProperties(section, basics.resistances.fy, basics.resistances.sectionClass),
    whyNotLighter: whyNotLighter(basics, context.candidates),
    choices: choicesOf(rules.choice, context),
    notes: [...verified.notes, ...(verified.passes ? [] : [`Does not pass: ${checkName(verified.governing).toLowerCase()} ${num(verified.largest, 3)}.`])],
    cautions: beam.construction.length ? [...CAUTIONS, ...CONSTRUCTION_CAUTIONS] : CAUTIONS,
  }
}
