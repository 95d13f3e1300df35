/** Trade words for the names that the engine uses. */
import { formatNumber } from '#shared/utils/format'
import type { MemberKind, Rejection } from '#shared/schemas/study'
import type { StudyState } from '#shared/schemas/api'

export const REJECTION_WORDS: Record<Rejection, string> = {
  'column-in-keep-clear': 'Column in a keep-clear zone',
  'void-cuts-beam': 'A void cuts a beam',
  'column-unheld': 'Column not held by any floor',
  'slab-direction': 'Slab would span the wrong way',
  'slab-span': 'Slab span over its limit',
  'secondary-spacing': 'Secondary beams nearer than the least spacing',
  'piece-length': 'Piece over the longest length',
  'no-section': 'No section passes',
  'depth-cap': 'Deeper than the depth limit',
  'buildability': 'Breaks a buildability rule',
}

export const KIND_WORDS: Record<MemberKind, string> = {
  secondary: 'secondary beam',
  primary: 'primary beam',
  edge: 'edge beam',
  trimmer: 'trimmer',
  tie: 'tie beam',
  column: 'column',
}

export const STATE_WORDS: Record<StudyState, string> = {
  queued: 'Waiting to start',
  running: 'Running',
  finished: 'Finished',
  cancelled: 'Cancelled',
  failed: 'Stopped by a fault',
}

const CHECKS: Record<string, { full: string, short: string }> = {
  bending: { full: 'bending', short: 'bending' },
  shear: { full: 'shear', short: 'shear' },
  buckling: { full: 'lateral-torsional buckling', short: 'LTB' },
  deflectionVariable: { full: 'variable deflection', short: 'δ variable' },
  deflectionTotal: { full: 'total deflection', short: 'δ total' },
  frequency: { full: 'frequency', short: 'frequency' },
  construction: { full: 'construction stage', short: 'constr.' },
  tie: { full: 'tie force and least size', short: 'tie' },
  stability: { full: 'column stability', short: 'stability' },
  buildability: { full: 'buildability rule', short: 'buildability' },
}

/** The check in full; a name that is not known is shown with its hyphens and capitals undone. */
export function checkInWords(check: string): string {
  return CHECKS[check]?.full ?? spaced(check)
}

/** The check as a table cell or a chart label writes it. */
export function checkInShort(check: string): string {
  return CHECKS[check]?.short ?? spaced(check)
}

function spaced(name: string): string {
  return name.replace(/([a-z])([A-Z])/g, '$1 $2').replace(/-/g, ' ').toLowerCase()
}

/** "94 δ total, 36 LTB": the counts of beams by governing check, most first. */
export function governingInShort(governing: Record<string, number>, most = 2): string {
  return governingSorted(governing)
    .slice(0, most)
    .map(({ check, beams }) => `${beams} ${checkInShort(check)}`)
    .join(', ')
}

export function governingSorted(governing: Record<string, number>): { check: string, beams: number }[] {
  return Object.entries(governing)
    .filter(([, beams]) => beams > 0)
    .map(([check, beams]) => ({ check, beams }))
    .sort((a, b) => b.beams - a.beams || a.check.localeCompare(b.check))
}

/** What the grid lines across an axis are called: bays along x are counted by the labels of `gridX`. */
export type AxisNames = Record<'x' | 'y', string>

/** x advances with the numbers and y with the letters by custom; a plate may have it the other way. */
export function axisNames(plate: { gridX: readonly { label: string }[], gridY: readonly { label: string }[] }): AxisNames {
  const x = /^\d/.test(plate.gridX[0]?.label ?? '1') ? 'numbers' : 'letters'
  const y = /^\d/.test(plate.gridY[0]?.label ?? 'A') ? 'numbers' : 'letters'
  return x === y ? { x: 'x', y: 'y' } : { x, y }
}

/** How beams along a direction are called: "along numbers". */
export function directionInWords(direction: 'x' | 'y' | 'mixed', names: AxisNames): string {
  return direction === 'mixed' ? 'by region' : `along ${names[direction]}`
}

export function panelsInWords(divisions: number): string {
  return divisions === 1 ? '1 panel' : `${divisions} panels`
}

/** Seconds as people say them: "3.0 s", "45 s", "24 min", "2 h 10 min". */
export function durationInWords(seconds: number): string {
  if (seconds < 9.95) return `${formatNumber(Math.max(0.1, seconds), 1)} s`
  if (seconds < 119.5) return `${formatNumber(seconds)} s`
  const minutes = Math.round(seconds / 60)
  if (minutes < 120) return `${formatNumber(minutes)} min`
  return `${formatNumber(Math.floor(minutes / 60))} h ${minutes % 60} min`
}
