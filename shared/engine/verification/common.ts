import { nationalChoice } from '../actions'
import type { ChoiceCode } from '../actions'
import { criticalMoment, criticalMomentUniform } from '../ec3'
import type { Grade } from '../materials'
import { resistancesOf } from '../members'
import type { Resistances } from '../members'
import { findSection } from '../sections'
import type { Section } from '../sections'

export function section(designation: string): Section {
  const found = findSection(designation)
  if (!found) throw new Error(`No section ${designation}`)
  return found
}

export function resistances(designation: string, grade: Grade, code: ChoiceCode): Resistances {
  const found = resistancesOf(section(designation), grade, nationalChoice(code))
  if (!found) throw new Error(`${grade} is not offered for ${designation}`)
  return found
}

/** Mcr of the eigenvalue under a uniform load of 1 N/mm between forks, at a height above the shear centre. */
export function uniformLoadMcr(of: Section, L: number, zg: number): number {
  return criticalMoment({ pieces: [{ length: L, M: 0, V: L / 2, q: 1, qTop: 1 }], section: of, zg }).Mcr
}

/** Mcr under n equal loads that cut the span into equal parts. */
export function pointLoadsMcr(of: Section, L: number, n: number, zg: number, restrained = false): number {
  const a = L / (n + 1)
  const pieces = Array.from({ length: n + 1 }, (_, i) => ({
    length: a,
    V: n / 2 - i,
    M: Array.from({ length: i }, (_unused, k) => (n / 2 - k) * a).reduce((sum, part) => sum + part, 0),
    q: 0,
    PTop: i === 0 ? 0 : 1,
    restrained: restrained && i > 0,
  }))
  return criticalMoment({ pieces, section: of, zg }).Mcr
}

/** C1 of end moments in the ratio ψ. */
export function endMomentsC1(of: Section, L: number, psi: number): number {
  const pieces = [{ length: L, M: 1e6, V: (psi - 1) * 1e6 / L, q: 0 }]
  return criticalMoment({ pieces, section: of, zg: 0 }).Mcr / criticalMomentUniform(of, L)
}
