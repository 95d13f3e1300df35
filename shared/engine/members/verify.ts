import { EngineError } from '../errors'
import { criticalMomentUniform } from '../ec3'
import type { Grade } from '../materials'
import type { Section } from '../sections'
import { fundamentalFrequency, largestMoment, largestShear } from '../statics'
import { bucklingOf } from './buckling'
import type { BucklingResult } from './buckling'
import { Governing } from './governing'
import { prepareBeam } from './prepare'
import type { PreparedBeam, PreparedCase, PreparedCombination } from './prepare'
import { resistancesFrom, resistanceTable } from './resistances'
import type { Resistances } from './resistances'
import type { BeamVerification, CaseVerification, EndReaction, SegmentVerification } from './result'
import { sagsOf } from './service'
import type { Sags } from './service'
import { addOwnWeight, bendingAlong } from './strength'
import type { Beam, BeamRules } from './types'
import { validateBeam, validateRules } from './validate'

/**
 * Every check of one beam with one section, explained. EN 1993-1-1:2005 + A1:2014 section 6.2 and
 * 6.3.2, EN 1993-1-5 section 5, deflection and frequency. N, mm, Nmm, Hz.
 * Throws EngineError for values that no beam can have and where the grade is not offered at the
 * section's thickness; a beam that fails is a value.
 */
export function verifyBeam(beam: Beam, section: Section, grade: Grade, rules: BeamRules): BeamVerification {
  validateBeam(beam)
  validateRules(rules, grade)
  const resistances = resistancesFrom(resistanceTable(grade, rules.choice), section, grade, rules.choice)
  if (!resistances) {
    throw new EngineError('out-of-range', `${grade} is not offered at the thickness of ${section.designation}.`, 'grade')
  }
  return verifyPrepared(prepareBeam(beam, rules), resistances, rules)
}

/** The same on a beam prepared before. */
export function verifyPrepared(prepared: PreparedBeam, resistances: Resistances, rules: BeamRules): BeamVerification {
  const weight = prepared.selfWeight ? resistances.weight : 0
  const governing = new Governing()
  const cases: CaseVerification[] = []
  let shown = 0
  for (const loads of prepared.cases) {
    for (const combination of loads.combinations) {
      const result = verifyCase(loads, combination, weight, resistances, rules)
      const first = cases[shown]
      if (loads.stage === 'service' && first && result.MEd > first.MEd) shown = cases.length
      cases.push(result)
      governing.takeCase(loads.stage, result.utilisation.bending, result.utilisation.shear, result.utilisation.buckling)
    }
  }
  const sags = sagsOf(prepared, resistances, weight)
  const service = serviceUtilisation(prepared, sags, rules)
  governing.take('deflectionVariable', service.deflectionVariable)
  governing.take('deflectionTotal', service.deflectionTotal)
  governing.take('frequency', service.frequency)
  const view = cases[shown]!
  return {
    fy: resistances.fy,
    class: resistances.sectionClass,
    cases,
    shown,
    reactions: reactionsOf(prepared, weight, shown),
    deflection: { variable: sags.variable, total: sags.total, atVariable: sags.atVariable, atTotal: sags.atTotal },
    frequency: sags.vibrating > 0 ? fundamentalFrequency(sags.vibrating) : null,
    frequencyDeflection: sags.vibrating,
    utilisation: { ...view.utilisation, ...service, construction: governing.construction },
    largest: governing.largest,
    governing: governing.name,
    passes: governing.largest <= rules.utilisationLimit && resistances.sectionClass !== 4,
    notes: notesOf(resistances, rules, cases, shown),
  }
}

function verifyCase(
  loads: PreparedCase, combination: PreparedCombination, weight: number, resistances: Resistances, rules: BeamRules,
): CaseVerification {
  const { x } = loads
  const total = addOwnWeight(loads, combination, weight)
  const moment = largestMoment(x, total)
  const shear = largestShear(x, total)
  const bending = bendingAlong(
    { utilisation: 0, x: 0, M: 0, V: 0, rho: 0, MvRd: 0 }, x, total, moment, shear, resistances, rules.choice.gammaM0,
  )
  const { utilisation: bendingUtilisation, ...bendingAt } = bending
  const segments = loads.stretches.map(stretch => segmentOf(stretch, loads, combination, resistances, rules))
  let governingSegment: number | null = null
  segments.forEach(({ utilisation }, i) => {
    if (utilisation === null) return
    if (governingSegment === null || utilisation > segments[governingSegment]!.utilisation!) governingSegment = i
  })
  const segment = governingSegment === null ? null : segments[governingSegment]!
  return {
    name: loads.name,
    stage: loads.stage,
    combination: combination.factors.name,
    MEd: moment.value,
    MEdAt: moment.at,
    VEd: shear.value,
    McRd: resistances.McRd,
    VplRd: resistances.VplRd,
    VbwRd: resistances.VbwRd,
    Mcr: segment?.Mcr ?? null,
    lambdaLT: segment?.lambdaLT ?? null,
    chiLT: segment?.chiLT ?? 1,
    MbRd: segment?.MbRd ?? resistances.MbRdFull,
    governingSegment,
    segments,
    bendingAt,
    utilisation: {
      bending: bendingUtilisation,
      shear: shear.value / resistances.VRd,
      buckling: segment?.utilisation ?? null,
    },
  }
}

function segmentOf(
  stretch: PreparedCase['stretches'][number], loads: PreparedCase, combination: PreparedCombination,
  resistances: Resistances, rules: BeamRules,
): SegmentVerification {
  const { x, total } = loads
  const place = { from: x[stretch.from]!, to: x[stretch.to]!, held: stretch.held }
  if (stretch.held) {
    const MEd = largestMoment(x, total, stretch.from, stretch.to).value
    return { ...place, MEd, Mcr: null, C1: null, lambdaLT: null, chiLT: 1, kc: null, MbRd: resistances.MbRdFull, utilisation: null }
  }
  const out: BucklingResult = { MEd: 0, Mcr: null, lambdaLT: null, chiLT: 1, kc: 1, MbRd: 0, utilisation: 0 }
  const result = bucklingOf(out, stretch, loads, combination, resistances, rules)
  const uniform = criticalMomentUniform(resistances.section, place.to - place.from)
  const usesF = rules.useF && rules.ltbMethod === '6.3.2.3' && result.Mcr !== null
  return {
    ...place,
    ...result,
    kc: usesF ? result.kc : null,
    C1: result.Mcr === null || stretch.inside > 0 ? null : result.Mcr / uniform,
  }
}

function serviceUtilisation({ span }: PreparedBeam, sags: Sags, { limits }: BeamRules) {
  return {
    deflectionVariable: limits.variable === null ? null : sags.variable / (span / limits.variable),
    deflectionTotal: limits.total === null ? null : sags.total / (span / limits.total),
    frequency: limits.frequency === null
      ? null
      : sags.vibrating > 0 ? limits.frequency / fundamentalFrequency(sags.vibrating) : 0,
  }
}

function reactionsOf({ cases }: PreparedBeam, weight: number, shown: number): { left: EndReaction, right: EndReaction } {
  const { permanent, variable, accompanying, self, combinations } = cases[0]!
  const { factors } = combinations[shown]!
  const at = (side: 'left' | 'right'): EndReaction => {
    const parts = {
      permanent: permanent[side] + weight * self[side],
      variable: variable[side],
      accompanying: accompanying[side],
    }
    const ultimate = factors.permanent * parts.permanent + factors.variable * parts.variable + factors.accompanying * parts.accompanying
    return { ...parts, ultimate }
  }
  return { left: at('left'), right: at('right') }
}

function notesOf({ sectionClass, section }: Resistances, rules: BeamRules, cases: CaseVerification[], shown: number): string[] {
  const notes: string[] = []
  if (sectionClass === 4) notes.push(`${section.designation} is class 4 in bending: its effective section is not computed and it is not offered.`)
  if (rules.useF && rules.ltbMethod === '6.3.2.2') notes.push('The factor f belongs to 6.3.2.3 and is not used with 6.3.2.2.')
  const view = cases[shown]!
  for (const other of cases) {
    if (other.stage !== 'service' || other === view) continue
    const worse = other.utilisation.bending > view.utilisation.bending || other.utilisation.shear > view.utilisation.shear
      || (other.utilisation.buckling ?? 0) > (view.utilisation.buckling ?? 0)
    if (worse) notes.push(`A check is used more under ${other.combination} than under ${view.combination}, which is shown for its larger moment; both are verified.`)
  }
  return notes
}
