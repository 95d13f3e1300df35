/**
 * The sections for one beam: every passing section that is the lightest under some depth cap,
 * remembered by the beam's own numbers, so that equal beams of all arrangements are sized once.
 */
import type { Basis } from '#shared/schemas/basis'
import { type NationalChoice, applyOverrides, nationalChoice, psi } from '../actions'
import { tensionResistance, tieForce } from '../ec3'
import type { DemandRules, FrameBeam } from '../framing'
import { E, GRAVITY, type Grade, yieldStrength } from '../materials'
import { type Beam, type BeamRules, type LoadCase, type SizedSection, lightestSections } from '../members'
import type { LoadZoneModel, PlateModel } from '../plate'
import { type Section, sectionsOf } from '../sections'
import { type NumberMap, numberMap } from '../numberKeys'
import type { PassingBook } from './passing'
import { effectsOf, fundamentalFrequency, largestSag, stationsOf } from '../statics'

export type BasisRole = 'secondary' | 'primary'

export interface SizingRules {
  basis: Basis
  choice: NationalChoice
  beam: BeamRules
  demand: DemandRules
  sections: Record<BasisRole, readonly Section[]>
  grades: Record<BasisRole, Grade>
}

export function sizingRules(model: PlateModel, basis: Basis): SizingRules {
  const { choice } = applyOverrides(nationalChoice(basis.nationalChoice), basis.overrides)
  const { combination, criticalMoment, ltbMethod, useF, limits, utilisationLimit } = basis
  return {
    basis, choice,
    beam: { choice, combination, criticalMoment, ltbMethod, useF, limits, utilisationLimit },
    demand: {
      kinds: model.kinds, choice, reducesByArea: basis.reductions.area, constructionStage: basis.constructionStage,
    },
    sections: { secondary: sectionsOf(basis.secondary.families), primary: sectionsOf(basis.primary.families) },
    grades: { secondary: basis.secondary.grade, primary: basis.primary.grade },
  }
}

/** Edge beams, trimmers and ties take the basis of primaries where parallel to them. */
export function roleOf(beam: FrameBeam): BasisRole {
  return beam.isParallelToPrimaries ? 'primary' : 'secondary'
}

/** What a beam asks of a section beyond its verification; part of the beam's key. */
export interface SectionNeeds {
  role: BasisRole
  /** Least flange width, mm; 0 = none. */
  flangeWidth: number
  /** Least depth, mm: floor for a coupled rule; 0 = none. */
  depth: number
  /** Tie force, N, for ties and beams without load; 0 = none. */
  tieForce: number
  /** Least frequency, Hz, where a coupled rule asks for more than the basis; 0 = none. */
  frequency: number
}

/** 30 mm less flange where planks bear from one side only. */
const ONE_SIDE_LESS = 30

/** Depth and slenderness of ties (common practice, no source). */
const TIE_LEAST_DEPTH = 200
const TIE_SPAN_OVER_DEPTH = 40
const TIE_SPAN_OVER_RADIUS = 300

export function needsOf(beam: FrameBeam, model: PlateModel, rules: SizingRules): SectionNeeds {
  const least = rules.basis.buildability.minFlangeWidth
  const flangeWidth = least === null || beam.slabSides === 0 ? 0 : beam.slabSides === 2 ? least : least - ONE_SIDE_LESS
  const isUnloaded = beam.stretches.length === 0 && beam.spots.length === 0 && beam.carries.length === 0
  return {
    role: roleOf(beam), flangeWidth, depth: 0, frequency: 0,
    tieForce: beam.kind === 'tie' || isUnloaded ? tieForceOf(beam, model, rules.choice) : 0,
  }
}

/** Tie force of EN 1991-1-7 A.5 with the floor's own load, N. */
export function tieForceOf(beam: FrameBeam, model: PlateModel, choice: NationalChoice): number {
  const { load }: LoadZoneModel = model.zones[model.zones.length - 1]!
  const factors = psi(choice, model.plate.floorLoad.category)
  const share = choice.tiePsi === 'psi1' ? factors.psi1 : factors.psi2
  return tieForce(beam.isOnOutline ? 'perimeter' : 'internal', load[0]!, load[1]!, share, beam.tieSpacing, beam.to - beam.from)
}

export interface Sizer {
  rules: SizingRules
  /** Passing sections, mass rising, depth falling; empty where none passes. */
  staircase: (beam: Beam, needs: SectionNeeds) => readonly SizedSection[]
  /**
   * The lightest section not shallower than `least` and not deeper than `most`, mm, for as many such
   * pairs as are asked; undefined where none passes.
   */
  withinDepths: (beam: Beam, needs: SectionNeeds) => (least: number, most: number) => SizedSection | undefined
  /** Hz under permanent load and the stated share of the variable load; null without load. `sized` is of the beam's staircase. */
  frequency: (beam: Beam, sized: SizedSection) => number | null
}

export function beamSizer(rules: SizingRules, book: PassingBook): Sizer {
  const stairs = numberMap<readonly SizedSection[]>()
  const frequencies = new WeakMap<SizedSection, number | null>()
  return {
    rules,
    staircase(beam, needs) {
      addBeam(stairs, beam, needs)
      return stairs.end(() =>
        lightestSections(beam, rules.sections[needs.role], rules.grades[needs.role], withFrequency(rules.beam, needs), acceptance(beam, needs, rules))
          .map(sized => asTie(sized, beam.span, needs, rules)))
    },
    withinDepths(beam, needs) {
      return book.firstWithin(beam, needs, rules.sections[needs.role])
    },
    frequency(beam, sized) {
      const known = frequencies.get(sized)
      if (known !== undefined) return known
      const frequency = frequencyOf(beam, sized.section, rules.beam.limits.variableShare)
      frequencies.set(sized, frequency)
      return frequency
    },
  }
}

/** 18/√δ under permanent load, the share of the variable load and own weight, Hz; null without load. */
function frequencyOf(beam: Beam, section: Section, share: number): number | null {
  const line = beam.service.line.map(load => ({ from: load.from, to: load.to, q: load.permanent + share * load.variable }))
  const point = beam.service.point.map(load => ({ at: load.at, P: load.permanent + share * load.variable }))
  if (beam.selfWeight) line.push({ from: 0, to: beam.span, q: section.mass * GRAVITY / 1000 })
  const x = stationsOf(beam.span, line.flatMap(load => [load.from, load.to]).concat(point.map(load => load.at)))
  const sag = largestSag(x, effectsOf(x, line, point)).value / (E * section.Iy)
  return sag > 0 ? fundamentalFrequency(sag) : null
}

export function withFrequency(rules: BeamRules, { frequency }: SectionNeeds): BeamRules {
  if (frequency === 0) return rules
  return { ...rules, limits: { ...rules.limits, frequency: Math.max(rules.limits.frequency ?? 0, frequency) } }
}

/** Parts a row of numbers into its lists: no load and no length is ever that. */
const MARK = -1e300

/** A beam and its needs as a row of numbers. */
export function addBeam(row: Pick<NumberMap<unknown>, 'begin' | 'add'>, beam: Beam, needs: SectionNeeds): void {
  const { add } = row
  row.begin()
  add(needs.role === 'primary' ? 1 : 0)
  add(needs.flangeWidth)
  add(needs.depth)
  add(needs.frequency)
  add(needs.tieForce === 0 ? 0 : Number(needs.tieForce.toPrecision(9)))
  add(beam.span)
  addCase(add, beam.service)
  for (const loads of beam.construction) addCase(add, loads)
}

function addCase(add: (value: number) => void, { line, point, restraint }: LoadCase): void {
  add(MARK)
  for (const { from, to, permanent, variable, accompanying, height } of line) {
    add(from)
    add(to)
    add(permanent)
    add(variable)
    add(accompanying)
    add(height === 'top' ? 1 : 0)
  }
  add(MARK)
  for (const { at, permanent, variable, accompanying, height } of point) {
    add(at)
    add(permanent)
    add(variable)
    add(accompanying)
    add(height === 'top' ? 1 : 0)
  }
  add(MARK)
  for (const { from, to } of restraint.held) {
    add(from)
    add(to)
  }
  add(MARK)
  for (const at of restraint.points) add(at)
}

export function acceptance(beam: Beam, needs: SectionNeeds, rules: SizingRules): ((section: Section) => boolean) | undefined {
  const { flangeWidth, depth, tieForce: force, role } = needs
  if (flangeWidth === 0 && depth === 0 && force === 0) return undefined
  return (section) => {
    if (section.b < flangeWidth || section.h < depth) return false
    return force === 0 || servesAsTie(section, beam.span, force, rules, role)
  }
}

function servesAsTie(section: Section, span: number, force: number, rules: SizingRules, role: BasisRole): boolean {
  return tieUtilisation(section, span, force, rules, role) <= 1
}

/** Largest of least depth, least radius and tie force against what the section has; Infinity where the grade is not offered. */
export function tieUtilisation(section: Section, span: number, force: number, { choice, grades }: SizingRules, role: BasisRole): number {
  const fy = yieldStrength(grades[role], Math.max(section.tf, section.tw), choice.yieldRule)
  if (fy === null) return Infinity
  return Math.max(
    Math.max(TIE_LEAST_DEPTH, span / TIE_SPAN_OVER_DEPTH) / section.h,
    span / TIE_SPAN_OVER_RADIUS / section.iz,
    force / tensionResistance(section.A, fy, choice.gammaM0),
  )
}

/** A tie is governed by what ties are asked for where that uses it more than its loads do. */
function asTie(sized: SizedSection, span: number, { tieForce: force, role }: SectionNeeds, rules: SizingRules): SizedSection {
  if (force === 0) return sized
  const utilisation = tieUtilisation(sized.section, span, force, rules, role)
  return utilisation > sized.utilisation ? { ...sized, utilisation, governing: 'tie' } : sized
}
