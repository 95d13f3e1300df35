/** Where the member stands that left an arrangement without a scheme, in grid words. */
import type { Rejection } from '#shared/schemas/study'
import { resistancesOf, verifyBeam } from '../members'
import { checkName } from '../sheet'
import type { NumberedArrangement } from './arrangements'
import { beamPlace, columnPlace, namedGrid } from './naming'
import type { PreparedStudy } from './prepare'
import { columnDemand, frameForSizing, isNoScheme } from './schemes'
import { NO_CAPS, type Unsized, capOf, isUnsized, sizeFrame } from './sizedFrame'

/** null where no single member is to blame: the reason's own words then say what can be said. */
export function placeOfRejection(study: PreparedStudy, arrangement: NumberedArrangement, rejection: Rejection): string | null {
  if (rejection !== 'no-section' && rejection !== 'depth-cap') return null
  const prepared = frameForSizing(study, arrangement)
  if (isNoScheme(prepared)) return null
  const { gridX, gridY } = namedGrid(study.input.plate, arrangement.grid)
  const { beams, columns } = prepared.frame
  const caps = rejection === 'depth-cap' ? study.caps : NO_CAPS
  const sized = sizeFrame(prepared, study.sizer, caps)
  if (isUnsized(sized)) {
    const place = beamPlace(beams[sized.beam]!, gridX, gridY)
    return `${place}${failingCheck(study, sized, prepared.needs[sized.beam]!.role, capOf(beams[sized.beam]!, caps))}`
  }
  const without = columns.findIndex((_, c) => study.columns.size(columnDemand(prepared, sized, c)) === null)
  return without < 0 ? null : columnPlace(columns[without]!, gridX, gridY)
}

/** What the strongest section offered fails by. */
function failingCheck(study: PreparedStudy, { demand }: Unsized, role: 'primary' | 'secondary', cap: number): string {
  const { rules } = study.sizer
  const grade = rules.grades[role]
  const offered = rules.sections[role].filter(section => section.h <= cap && resistancesOf(section, grade, rules.choice) !== null)
  if (offered.length === 0) return ''
  const strongest = offered.reduce((a, b) => b.WplY > a.WplY ? b : a)
  const { governing, largest } = verifyBeam(demand, strongest, grade, rules.beam)
  return largest > rules.beam.utilisationLimit ? ` (${strongest.designation}: ${checkName(governing).toLowerCase()} ${largest.toFixed(2)})` : ''
}
