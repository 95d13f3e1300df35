/** What the forces of a sized column are made of, for its calculation sheet. N, mm, Nmm. */
import type { ColumnSheetInput, ColumnSheetLength, ColumnSheetMoment, ColumnSheetTerm } from '../sheet'
import { type Axis, across } from '../plate'
import type { Section } from '../sections'
import { type ColumnForces, type Situation, forcesOn } from './actions'
import { type Bench, type ColumnSizer, REACTION_OFFSET, endMoments, shareBelow, uniformMoments, weightOf } from './size'
import type { ColumnDemand, ColumnLength, ColumnLift, ColumnRules, SizedColumn } from './types'

/** A sized column with the parts of every force, as `columnSheet` needs it. */
export function explainColumn({ bench }: ColumnSizer, demand: ColumnDemand, sized: SizedColumn): ColumnSheetInput {
  const { rules } = bench
  const forces = forcesOn(demand, rules, bench.situations, bench.lengths)
  return {
    grade: rules.grade, choice: rules.choice, ltbMethod: rules.ltbMethod,
    combinations: rules.combinations.map(({ name }) => name).join(' and '),
    storeyHeight: rules.storeyHeight, utilisationLimit: rules.utilisationLimit,
    lifts: sized.lifts.map((lift, n) => ({ ...lift, lengths: lift.lengths.map(length => explainLength(bench, forces, sized.lifts, n, length)) })),
    mass: sized.mass, base: sized.base,
  }
}

function explainLength(bench: Bench, forces: ColumnForces, lifts: readonly ColumnLift[], n: number, verified: ColumnLength): ColumnSheetLength {
  const { rules, situations, lengths } = bench
  const { section, toLevel } = lifts[n]!
  const length = verified.fromLevel + 1
  const s = situations.findIndex(({ name }) => name === verified.combination)
  const situation = situations[s]!
  const above = length === lengths ? null : length === toLevel ? lifts[n + 1]!.section : section
  const { top, foot } = endMoments(bench, forces, s, section, length, above)
  const { web } = forces.demand
  const moment = (axis: Axis, level: number, lever: number, share: number, value: number): ColumnSheetMoment => ({
    terms: unbalancedTerms(forces.demand, rules, situation, axis, level), lever, share, value: Math.abs(value),
  })
  const [eY, eZ] = [section.h / 2 + REACTION_OFFSET, section.tw / 2 + REACTION_OFFSET]
  const footShare = length === 1 ? 0 : 1 / 2
  const { combination, method, NEd, MyEd, MzEd, LcrY, LcrZ, utilisation } = verified
  return {
    fromLevel: verified.fromLevel, combination, method, NEd, MyEd, MzEd, LcrY, LcrZ, utilisation,
    ltbLength: Math.max(rules.storeyHeight, LcrZ),
    axial: axialTerms(bench, forces.demand, situation, length, weightDownTo(lifts, verified.fromLevel, rules.storeyHeight)),
    moments: {
      topY: moment(web, length, eY, shareBelow(section.Iy, above && above.Iy), top.y),
      topZ: moment(across(web), length, eZ, shareBelow(section.Iz, above && above.Iz), top.z),
      footY: moment(web, length - 1, eY, footShare, foot.y),
      footZ: moment(across(web), length - 1, eZ, footShare, foot.z),
    },
    ...uniformMoments(rules, verified, top, foot),
  }
}

function weightDownTo(lifts: readonly ColumnLift[], level: number, storeyHeight: number): number {
  return lifts.reduce((sum: number, { section, fromLevel, toLevel }: { section: Section, fromLevel: number, toLevel: number }) =>
    sum + weightOf(section, Math.max(0, toLevel - Math.max(level, fromLevel)) * storeyHeight), 0)
}

/** Factors apart as the clause has them: ξ γG, γQ ψ0, γQ αn. */
function factorsOf({ choice, combinations }: ColumnRules, { name, permanent }: Situation) {
  const combination = combinations.find(other => name === other.name || name.startsWith(`${other.name},`))!
  const gammaQ = combination.variable || combination.accompanying
  return {
    permanent: combination.name === '6.10b' ? [choice.xi, choice.gammaG] : [permanent],
    variable: (factor: number) => factor === gammaQ || gammaQ === 0 ? [factor] : [gammaQ, factor / gammaQ],
  }
}

function axialTerms({ rules }: Bench, { direct, ends }: ColumnDemand, situation: Situation, length: number, weight: number): ColumnSheetTerm[] {
  const floors = Math.max(0, rules.storeys - length + 1)
  const factors = factorsOf(rules, situation)
  const parts = [direct, ...ends]
  const sum = (of: (part: ColumnDemand['direct']) => number) => parts.reduce((total, part) => total + of(part), 0)
  const area = sum(part => part.area) * 1000
  const storeys = `${floors} floor${floors === 1 ? '' : 's'}`
  const terms: ColumnSheetTerm[] = floors === 0
    ? []
    : [
        { what: `permanent of ${storeys}`, factors: [...factors.permanent, floors], towards: sum(part => part.permanent), away: 0 },
        ...rules.kinds.map((kind, k) => ({
          what: `variable ${kind.category} of ${storeys}`,
          factors: [...factors.variable(situation.variable(k, floors)), floors], towards: sum(part => part.variable[k]!), away: 0,
        })),
      ]
  if (rules.roof) {
    terms.push(
      { what: 'permanent of the roof', factors: factors.permanent, towards: area * rules.roof.permanent, away: 0 },
      { what: 'variable of the roof', factors: factors.variable(situation.roofVariable), towards: area * rules.roof.variable, away: 0 },
    )
  }
  terms.push({ what: 'own weight', factors: factors.permanent, towards: weight, away: 0 })
  return terms.filter(({ towards }) => towards > 0)
}

/** The reactions at a level along an axis: of the side that brings more, less the other side. */
function unbalancedTerms(demand: ColumnDemand, rules: ColumnRules, situation: Situation, axis: Axis, level: number): ColumnSheetTerm[] {
  const isRoof = level > rules.storeys
  const factors = factorsOf(rules, situation)
  const ends = demand.ends.filter(end => end.axis === axis)
  const term = (what: string, parts: number[], of: (end: ColumnDemand['ends'][number]) => number): ColumnSheetTerm => {
    const on = (side: 1 | -1) => ends.reduce((sum, end) => end.side === side ? sum + of(end) : sum, 0)
    return { what, factors: parts, towards: on(1), away: on(-1) }
  }
  const { roof } = rules
  const terms = isRoof && roof
    ? [
        term('roof, permanent', factors.permanent, end => end.area * 1000 * roof.permanent),
        term('roof, variable', factors.variable(situation.roofVariable), end => end.area * 1000 * roof.variable),
      ]
    : [
        term('permanent', factors.permanent, end => end.permanent),
        ...rules.kinds.map((kind, k) => term(`variable, category ${kind.category}`, factors.variable(situation.variable(k, 1)), end => end.variable[k]!)),
      ]
  const value = terms.reduce((sum, { factors: parts, towards, away }) => sum + parts.reduce((a, b) => a * b, 1) * (towards - away), 0)
  const turned = value < 0 ? terms.map(({ towards, away, ...rest }) => ({ ...rest, towards: away, away: towards })) : terms
  return turned.filter(({ towards, away }) => towards > 0 || away > 0)
}
