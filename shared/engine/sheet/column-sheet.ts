import { columnSectionRows, expressionGroup, flexuralRows, forceRows, lengthRow, lengthResistance, momentResistanceRows } from './column-rows'
import { kN, num, row } from './format'
import { sectionProperties } from './section-rows'
import { choicesOf } from './sheet-choices'
import type {
  ColumnSheet, ColumnSheetInput, ColumnSheetLength, ColumnSheetLift, ColumnSheetLiftShown, SheetContext, SheetGroup, SheetRow,
} from './types'
import { designationText } from './words'

const CAUTIONS = [
  'Preliminary sizing for scheme comparison; not for construction.',
  'Vertical load only: wind, sway and notional horizontal loads go to the bracing, which is not designed here.',
  'Bases are pinned; splices, bases and connections are not designed.',
]

function mostUsed<T extends { utilisation: number }>(list: readonly T[]): T {
  return list.reduce((most, next) => next.utilisation > most.utilisation ? next : most)
}

function levels({ fromLevel }: ColumnSheetLength): string {
  return `level ${fromLevel} to ${fromLevel + 1}`
}

/** A length that is not shown in full, in one row. */
function otherRow(input: ColumnSheetInput, lift: ColumnSheetLift, length: ColumnSheetLength): SheetRow {
  const { rows } = expressionGroup(input, lengthResistance(input, lift.section, length), length)
  const worst = mostUsed(rows.flatMap(({ utilisation, effect, clause }) => utilisation === null ? [] : [{ utilisation, effect, clause }]))
  return row({
    clause: worst.clause,
    check: `Length ${levels(length)}, ${length.combination}`,
    substituted: `M_{y,Ed} ${num(length.MyEd / 1e6, 2)}, M_{z,Ed} ${num(length.MzEd / 1e6, 2)} kNm${typeof worst.effect === 'string' ? `: ${worst.effect}` : ''}`,
    effect: kN(length.NEd),
    utilisation: length.utilisation,
  })
}

function groupsOf(input: ColumnSheetInput, lift: ColumnSheetLift): SheetGroup[] {
  const length = mostUsed(lift.lengths)
  const r = lengthResistance(input, lift.section, length)
  const others = lift.lengths.filter(other => other !== length)
  return [
    { title: `Forces, ${levels(length)}, ${length.combination}`, rows: [...forceRows(length), lengthRow(length, input.storeyHeight)] },
    { title: 'Section', rows: columnSectionRows(input, r) },
    { title: 'Flexural buckling about y', rows: flexuralRows(input, r, 'y', length.LcrY, length.NEd) },
    { title: 'Flexural buckling about z', rows: flexuralRows(input, r, 'z', length.LcrZ, length.NEd) },
    { title: 'Moments', rows: momentResistanceRows(input, r, length) },
    expressionGroup(input, r, length),
    ...(others.length ? [{ title: 'Other lengths', rows: others.map(other => otherRow(input, lift, other)) }] : []),
  ]
}

function liftShown(input: ColumnSheetInput, lift: ColumnSheetLift): ColumnSheetLiftShown {
  const { section } = lift
  const { fy, sectionClass } = lengthResistance(input, section, lift.lengths[0]!)
  return {
    levels: `Levels ${lift.fromLevel} to ${lift.toLevel}`,
    section: section.designation,
    designation: designationText(section.designation),
    utilisation: lift.utilisation,
    outline: { h: section.h, b: section.b, tw: section.tw, tf: section.tf, r: section.r },
    properties: sectionProperties(section, fy, sectionClass),
    groups: groupsOf(input, lift),
  }
}

/** Marks the row that has the highest utilisation and gives its words. */
function markGoverning(groups: readonly SheetGroup[], utilisation: number): SheetRow | undefined {
  const rows = groups.flatMap(group => group.rows)
  const found = rows.find(candidate => candidate.utilisation !== null && Math.abs(candidate.utilisation - utilisation) < 1e-9)
  if (found) found.governs = true
  return found
}

/**
 * The calculation sheet of one column, lift by lift from the base up: forces by parts, class, buckling
 * about both axes, moment resistances and the expression they stand in, to be recalculated by hand.
 */
export function columnSheet(input: ColumnSheetInput, context: SheetContext): ColumnSheet {
  const lifts = input.lifts.map(lift => liftShown(input, lift))
  const worst = mostUsed(input.lifts)
  const length = mostUsed(worst.lengths)
  const lift = input.lifts.indexOf(worst)
  const governs = markGoverning(lifts[lift]!.groups, length.utilisation)
  const parts = typeof governs?.effect === 'string' ? `: ${governs.effect}` : ''
  const top = input.lifts[input.lifts.length - 1]!.toLevel
  return {
    title: context.title,
    grade: input.grade,
    facts: context.facts ?? [],
    method: `EN 1993-1-1:2005 + A1:2014, ${input.choice.name}, ${input.combinations}, ${length.method}, LTB ${input.ltbMethod}`,
    governing: {
      lift, fromLevel: length.fromLevel, utilisation: length.utilisation,
      sentence: `${governs?.check ?? 'Stability'}, ${levels(length)}, ${length.combination}${parts}`,
    },
    passes: worst.utilisation <= input.utilisationLimit,
    height: top * input.storeyHeight,
    mass: input.mass,
    base: { permanent: input.base.permanent / 1000, variable: input.base.variable / 1000, ultimate: input.base.ultimate / 1000 },
    lifts,
    choices: choicesOf(input.choice, context),
    cautions: CAUTIONS,
  }
}
