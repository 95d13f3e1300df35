import type { Grade } from '../materials'
import { prepareBeam, resistancesOf, verifyBeam } from '../members'
import type { Beam, BeamRules, BeamVerification, CaseVerification, PreparedCase, PreparedCombination, Resistances } from '../members'
import type { Section } from '../sections'
import { emptyEffects, superpose } from '../statics'
import type { Effects } from '../statics'

/** What every part of the sheet is written from. */
export interface Basics {
  beam: Beam
  section: Section
  grade: Grade
  rules: BeamRules
  resistances: Resistances
  verified: BeamVerification
  /** Own weight, N/mm; 0 where it does not count. */
  weight: number
  /** Characteristic effects: variable alone, and permanent + variable with own weight. */
  variable: Effects
  characteristic: Effects
  /** Permanent + share · variable, own weight included: what vibrates. */
  vibrating: Effects
  cases: CaseBasics[]
  /** The service combination that is shown. */
  shown: CaseBasics
}

/** One load case under one combination, with its design effects. */
export interface CaseBasics {
  prepared: PreparedCase
  combination: PreparedCombination
  verified: CaseVerification
  x: Float64Array
  total: Effects
}

export function basicsOf(beam: Beam, section: Section, grade: Grade, rules: BeamRules): Basics {
  const verified = verifyBeam(beam, section, grade, rules)
  const resistances = resistancesOf(section, grade, rules.choice)!
  const weight = beam.selfWeight ? resistances.weight : 0
  const prepared = prepareBeam(beam, rules)
  const cases: CaseBasics[] = []
  for (const loads of prepared.cases) {
    for (const combination of loads.combinations) {
      cases.push({
        prepared: loads,
        combination,
        verified: verified.cases[cases.length]!,
        x: loads.x,
        total: superpose(emptyEffects(loads.x.length), [
          [1, combination.base], [combination.factors.permanent * weight, loads.self],
        ]),
      })
    }
  }
  const service = prepared.cases[0]!
  const n = service.x.length
  return {
    beam, section, grade, rules, resistances, verified, weight, cases,
    variable: service.variable,
    characteristic: superpose(emptyEffects(n), [[1, prepared.characteristic], [weight, service.self]]),
    vibrating: superpose(emptyEffects(n), [[1, prepared.vibrating], [weight, service.self]]),
    shown: cases[verified.shown]!,
  }
}
