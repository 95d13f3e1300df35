import type { BeamVerification, CaseVerification, CheckName } from '../members'
import { metres, num } from './format'

const NAMES: Record<CheckName, string> = {
  bending: 'Bending',
  shear: 'Shear',
  buckling: 'Lateral-torsional buckling',
  deflectionVariable: 'Deflection under variable load',
  deflectionTotal: 'Total deflection',
  frequency: 'Frequency of the beam alone',
  construction: 'Construction stage',
  tie: 'Tie rules',
  stability: 'Stability',
}

export function checkName(check: CheckName): string {
  return NAMES[check]
}

/** "UB 533×210×92" */
export function designationText(designation: string): string {
  return designation.replaceAll('x', '×')
}

function bucklingWords({ governingSegment, segments }: CaseVerification): string {
  if (governingSegment === null) return ''
  const segment = segments[governingSegment]!
  return segments.length === 1 ? ' over the whole beam' : ` between ${metres(segment.from)} and ${metres(segment.to)} m`
}

/** The construction case that is used most and the check that makes it so. */
export function worstConstruction(cases: readonly CaseVerification[]): { index: number, check: 'bending' | 'shear' | 'buckling', value: number } | null {
  let worst: { index: number, check: 'bending' | 'shear' | 'buckling', value: number } | null = null
  cases.forEach((value, index) => {
    if (value.stage !== 'construction') return
    for (const check of ['bending', 'shear', 'buckling'] as const) {
      const utilisation = value.utilisation[check]
      if (utilisation !== null && (worst === null || utilisation > worst.value)) worst = { index, check, value: utilisation }
    }
  })
  return worst
}

/** The governing check and where it governs, in a sentence. */
export function governingSentence(verified: BeamVerification): string {
  const view = verified.cases[verified.shown]!
  switch (verified.governing) {
    case 'bending': return `Bending at ${metres(view.bendingAt.x)} m${view.bendingAt.rho > 0 ? ', reduced for the shear there' : ''}`
    case 'shear': return view.VbwRd !== null && view.VbwRd < view.VplRd ? 'Shear at a support, by buckling of the web' : 'Shear at a support'
    case 'buckling': return `Lateral-torsional buckling${bucklingWords(view)}`
    case 'deflectionVariable': return `Deflection under variable load, at ${metres(verified.deflection.atVariable)} m`
    case 'deflectionTotal': return `Total deflection, at ${metres(verified.deflection.atTotal)} m`
    case 'frequency': return 'Frequency of the beam alone'
    case 'construction': {
      const worst = worstConstruction(verified.cases)
      if (!worst) return NAMES.construction
      const of = verified.cases[worst.index]!
      const where = worst.check === 'buckling' ? bucklingWords(of) : ''
      return `Construction stage, ${of.name}: ${NAMES[worst.check].toLowerCase()}${where}`
    }
    default: return NAMES[verified.governing]
  }
}

/** Why a section fails: its highest check with the numbers that stand against each other. */
export function failureSentence(verified: BeamVerification, span: number, limits: { variable: number | null, total: number | null, frequency: number | null }): string {
  if (verified.class === 4) return 'class 4 in bending'
  const view = verified.cases[verified.shown]!
  const against = (effect: number, resistance: number, unit: string, digits: number) =>
    `${num(effect, digits)} against ${num(resistance, digits)} ${unit}`
  const utilisation = num(verified.largest, 3)
  switch (verified.governing) {
    case 'bending': return `bending ${utilisation}: ${against(view.bendingAt.M / 1e6, view.bendingAt.MvRd / 1e6, 'kNm', 1)}`
    case 'shear': return `shear ${utilisation}: ${against(view.VEd / 1e3, Math.min(view.VplRd, view.VbwRd ?? view.VplRd) / 1e3, 'kN', 1)}`
    case 'buckling': {
      const segment = view.governingSegment === null ? null : view.segments[view.governingSegment]!
      return `lateral-torsional buckling ${utilisation}${segment ? `: ${against(segment.MEd / 1e6, segment.MbRd / 1e6, 'kNm', 1)}` : ''}`
    }
    case 'deflectionVariable': return `deflection under variable load ${utilisation}: ${against(verified.deflection.variable, span / limits.variable!, 'mm', 1)}`
    case 'deflectionTotal': return `total deflection ${utilisation}: ${against(verified.deflection.total, span / limits.total!, 'mm', 1)}`
    case 'frequency': return `frequency ${utilisation}: ${against(verified.frequency!, limits.frequency!, 'Hz', 2)}`
    default: return `${governingSentence(verified).toLowerCase()} ${utilisation}`
  }
}
