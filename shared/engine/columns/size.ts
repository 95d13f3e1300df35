/**
 * Columns sized lift by lift from the top down: the lightest section that passes in every length of
 * the lift and is not narrower than the lift above.
 */
import { cmLinear, interactionAnnexB } from '../ec3'
import { GRAVITY } from '../materials'
import { type NumberMap, numberMap } from '../numberKeys'
import { across } from '../plate'
import type { Section } from '../sections'
import { type ColumnForces, type Situation, axialForce, bucklingLengths, forcesOn, situationsOf } from './actions'
import { type ColumnResistance, type ColumnResistances, columnResistances } from './resistances'
import type { ColumnDemand, ColumnLength, ColumnLift, ColumnRules, SizedColumn } from './types'

/** Distance of a beam's reaction from the column's face, mm (common practice, no source). */
export const REACTION_OFFSET = 100
/** Above this ratio of stiffnesses a moment is shared by I/L, below it equally (common practice for simple construction). */
const EQUAL_SHARE_RATIO = 1.5
/** Factor of the minor-axis moment in the expression for simple construction (published NCCI SN048). */
const MINOR_AXIS_FACTOR = 1.5
/** Largest share of the major-axis buckling resistance at a pinned base (NCCI SN048, from memory). */
const PINNED_BASE_LIMIT = 0.83

export interface ColumnSizer {
  bench: Bench
  /** null: no section of the families passes. */
  size: (demand: ColumnDemand) => SizedColumn | null
  /** The same from fewer sections, in the order of the rules' own. */
  among: (sections: readonly Section[]) => ColumnSizer
}

export interface Bench {
  rules: ColumnRules
  situations: Situation[]
  resistances: ColumnResistances
  /** Number of lengths over all storeys, roof length included. */
  lengths: number
}

export function columnSizer(rules: ColumnRules): ColumnSizer {
  return sizerOn({
    rules, situations: situationsOf(rules), resistances: columnResistances(rules), lengths: rules.storeys + (rules.roof ? 1 : 0),
  })
}

function sizerOn(bench: Bench): ColumnSizer {
  const known = numberMap<SizedColumn | null>()
  return {
    bench,
    among: sections => sizerOn({ ...bench, rules: { ...bench.rules, sections: bench.rules.sections.filter(section => sections.includes(section)) } }),
    size(demand) {
      addDemand(known, demand)
      return known.end(() => sizeColumn(bench, demand))
    },
  }
}

/** A demand as a row of numbers, of which the first nine figures count. */
function addDemand(row: Pick<NumberMap<unknown>, 'begin' | 'add'>, { web, direct, ends, unheldFloors }: ColumnDemand): void {
  const addFigures = ({ permanent, variable, area }: ColumnDemand['direct']) => {
    row.add(nineFigures(permanent))
    for (const value of variable) row.add(nineFigures(value))
    row.add(nineFigures(area))
  }
  row.begin()
  row.add(web === 'x' ? 0 : 1)
  row.add(unheldFloors.x)
  row.add(unheldFloors.y)
  addFigures(direct)
  for (const end of ends) {
    row.add((end.axis === 'x' ? 0 : 2) + (end.side > 0 ? 1 : 0))
    addFigures(end)
  }
}

/** Splits a number (Dekker): to 33 of its 53 bits, which are nine figures. */
const SPLIT = 2 ** 20 + 1

function nineFigures(value: number): number {
  const wide = SPLIT * value
  return wide - (wide - value)
}

function sizeColumn(bench: Bench, demand: ColumnDemand): SizedColumn | null {
  const { rules, lengths } = bench
  const lifts: ColumnLift[] = []
  const forces = forcesOn(demand, rules, bench.situations, lengths)
  let weightAbove = 0
  for (const foot of liftFeet(bench).reverse()) {
    const top = Math.min(foot + rules.liftStoreys, lengths)
    const above = lifts[0]?.section ?? null
    const lift = sizeLift(bench, forces, foot, top, above, weightAbove)
    if (!lift) return null
    lifts.unshift(lift)
    weightAbove += weightOf(lift.section, (top - foot) * rules.storeyHeight)
  }
  return { lifts, mass: weightAbove / GRAVITY, base: baseLoads(bench, demand, weightAbove) }
}

/** Levels at the foot of each lift, from the base up. */
export function liftFeet({ rules, lengths }: Bench): number[] {
  const feet: number[] = []
  for (let foot = 0; foot < lengths; foot += rules.liftStoreys) feet.push(foot)
  return feet
}

export function weightOf({ mass }: Section, length: number): number {
  return mass * length / 1000 * GRAVITY
}

export function sizeLift(
  bench: Bench, forces: ColumnForces, foot: number, top: number, above: Section | null, weightAbove: number,
): ColumnLift | null {
  const limit = bench.rules.utilisationLimit
  for (const section of bench.rules.sections) {
    if (above && !mayStandUnder(section, above)) continue
    const lengths = verifyLift(bench, forces, section, foot, top, above, weightAbove, limit)
    if (!lengths) continue
    const utilisation = Math.max(...lengths.map(length => length.utilisation))
    if (utilisation <= limit) return { fromLevel: foot, toLevel: top, section, utilisation, lengths }
  }
  return null
}

/** Not narrower than the lift above, nor less than 1/1.5 as stiff: the lift above never takes more than half of a moment. */
export function mayStandUnder(section: Section, above: Section): boolean {
  return section.b >= above.b - 1e-9 && section.Iy * EQUAL_SHARE_RATIO >= above.Iy && section.Iz * EQUAL_SHARE_RATIO >= above.Iz
}

/** All lengths of a lift from the top down; null as soon as one fails or the section is not offered. */
export function verifyLift(
  bench: Bench, forces: ColumnForces, section: Section, foot: number, top: number, above: Section | null, weightAbove: number, limit: number,
): ColumnLength[] | null {
  const verified: ColumnLength[] = []
  let weight = weightAbove
  for (let length = top; length > foot; length--) {
    weight += weightOf(section, bench.rules.storeyHeight)
    const Lcr = bucklingLengths(forces.demand, bench.rules, length)
    const resistance = bench.resistances(section, Lcr.y, Lcr.z, Math.max(bench.rules.storeyHeight, Lcr.z))
    if (!resistance || isTooMuchAxially(bench, forces, resistance, length, weight, limit)) return null
    const worst = verifyLength(bench, forces, section, resistance, length, length === top ? above : section, weight, Lcr)
    if (worst.utilisation > limit) return null
    verified.unshift(worst)
  }
  return verified
}

/** Every expression begins with N/Nb,Rd: over the limit with that alone no moment need be asked. */
function isTooMuchAxially(bench: Bench, forces: ColumnForces, resistance: ColumnResistance, length: number, weight: number, limit: number): boolean {
  const NbRd = Math.min(resistance.NbYRd, resistance.NbZRd)
  return bench.situations.some((situation, n) => (forces.axial[n]![length]! + situation.permanent * weight) / NbRd > limit)
}

interface BucklingLengths { y: number, z: number }

function verifyLength(
  bench: Bench, forces: ColumnForces, section: Section, resistance: ColumnResistance, length: number, above: Section | null, weight: number,
  Lcr: BucklingLengths,
): ColumnLength {
  let worst: ColumnLength | null = null
  for (let n = 0; n < bench.situations.length; n++) {
    const verified = underSituation(bench, forces, n, section, resistance, length, above, weight, Lcr)
    if (!worst || verified.utilisation > worst.utilisation) worst = verified
  }
  return worst!
}

function underSituation(
  bench: Bench, forces: ColumnForces, n: number, section: Section, resistance: ColumnResistance, length: number, above: Section | null,
  weight: number, Lcr: BucklingLengths,
): ColumnLength {
  const { rules } = bench
  const { demand: { unheldFloors } } = forces
  const situation = bench.situations[n]!
  const NEd = forces.axial[n]![length]! + situation.permanent * weight
  const { top, foot } = endMoments(bench, forces, n, section, length, above)
  const verified: ColumnLength = {
    fromLevel: length - 1, NEd,
    MyEd: Math.max(Math.abs(top.y), Math.abs(foot.y)), MzEd: Math.max(Math.abs(top.z), Math.abs(foot.z)),
    LcrY: Lcr.y, LcrZ: Lcr.z, NbYRd: resistance.NbYRd, NbZRd: resistance.NbZRd,
    MbRd: resistance.MbRd, MczRd: resistance.MczRd, combination: situation.name,
    method: 'simple construction', parts: [0, 0, 0], utilisation: 0,
  }
  const isHeld = unheldFloors.x === 0 && unheldFloors.y === 0
  if (isHeld) simpleConstruction(verified, length === 1)
  else annexB(rules, verified, resistance, top, foot)
  return verified
}

/** Moments that a length takes at its ends, signed, Nmm. */
export function endMoments(
  { rules, lengths }: Bench, { demand: { web }, floor, roof }: ColumnForces, n: number, section: Section, length: number, above: Section | null,
): { top: EndMoments, foot: EndMoments } {
  const [eY, eZ] = [section.h / 2 + REACTION_OFFSET, section.tw / 2 + REACTION_OFFSET]
  const isTop = length === lengths
  const level = (length > rules.storeys ? roof : floor)[n]!
  const below = (length - 1 > rules.storeys ? roof : floor)[n]!
  const top = {
    y: level[web] * eY * shareBelow(section.Iy, isTop ? null : (above ?? section).Iy),
    z: level[across(web)] * eZ * shareBelow(section.Iz, isTop ? null : (above ?? section).Iz),
  }
  const foot = length === 1 ? { y: 0, z: 0 } : { y: below[web] * eY / 2, z: below[across(web)] * eZ / 2 }
  return { top, foot }
}

/** Share of a level's moment that goes to the length below it. */
export function shareBelow(below: number, above: number | null): number {
  if (above === null) return 1
  const ratio = Math.max(below, above) / Math.min(below, above)
  return ratio <= EQUAL_SHARE_RATIO ? 0.5 : below / (below + above)
}

/** N/Nb,min,Rd + My/Mb,Rd + 1.5 Mz/Mc,z,Rd ≤ 1 (NCCI SN048), and at a pinned base N/Nb,y,Rd ≤ 0.83. */
function simpleConstruction(length: ColumnLength, isBase: boolean): void {
  const { parts } = length
  parts[0] = length.NEd / Math.min(length.NbYRd, length.NbZRd)
  parts[1] = length.MyEd / length.MbRd
  parts[2] = MINOR_AXIS_FACTOR * length.MzEd / length.MczRd
  const sum = parts[0] + parts[1] + parts[2]
  const pinned = isBase ? length.NEd / (PINNED_BASE_LIMIT * length.NbYRd) : 0
  length.utilisation = Math.max(sum, pinned)
}

export interface EndMoments { y: number, z: number }

/**
 * (6.61), (6.62) with Annex B, and the section at the ends by 6.2.1(7). Moments of one sense at both
 * ends bend the length in two curves: ψ is the negative of their ratio. Along an axis that a level
 * leaves unheld the moment enters inside the buckling length: Cm = 1.
 */
function annexB(rules: ColumnRules, length: ColumnLength, resistance: ColumnResistance, top: EndMoments, foot: EndMoments): void {
  const { Cmy, Cmz, CmLT } = uniformMoments(rules, length, top, foot)
  const interaction = interactionAnnexB({
    NEd: length.NEd, MyEd: length.MyEd, MzEd: length.MzEd,
    NRk: resistance.NplRk, MyRk: resistance.McyRk, MzRk: resistance.MczRk,
    chiY: resistance.chiY, chiZ: resistance.chiZ, chiLT: resistance.chiLT, lambdaY: resistance.lambdaY, lambdaZ: resistance.lambdaZ,
    Cmy, Cmz, CmLT,
    gammaM1: rules.choice.gammaM1, sectionClass: resistance.sectionClass,
  })
  const { gammaM0 } = rules.choice
  const section = length.NEd * gammaM0 / resistance.NplRk + length.MyEd * gammaM0 / resistance.McyRk + length.MzEd / resistance.MczRd
  const isMinor = interaction.eq662 >= interaction.eq661
  const axial = length.NEd / (isMinor ? length.NbZRd : length.NbYRd)
  const y = (isMinor ? interaction.kzy : interaction.kyy) * length.MyEd / resistance.MbRd
  const z = (isMinor ? interaction.kzz : interaction.kyz) * length.MzEd * rules.choice.gammaM1 / resistance.MczRk
  length.method = '6.3.3 Annex B'
  length.parts = [axial, y, z]
  length.utilisation = Math.max(interaction.eq661, interaction.eq662, section)
}

/** Factors of equivalent uniform moment, Table B.3; 1 along an axis that a level leaves unheld. */
export function uniformMoments(
  { storeyHeight }: ColumnRules, { LcrY, LcrZ }: Pick<ColumnLength, 'LcrY' | 'LcrZ'>, top: EndMoments, foot: EndMoments,
): { Cmy: number, Cmz: number, CmLT: number } {
  const cm = (axis: 'y' | 'z', Lcr: number) => Lcr > storeyHeight ? 1 : cmLinear(endRatio(top[axis], foot[axis]))
  const Cmy = cm('y', LcrY)
  return { Cmy, Cmz: cm('z', LcrZ), CmLT: LcrZ > storeyHeight ? 1 : Cmy }
}

export function endRatio(top: number, foot: number): number {
  const [small, large] = Math.abs(top) < Math.abs(foot) ? [top, foot] : [foot, top]
  return large === 0 ? 1 : -small / large
}

function baseLoads(bench: Bench, demand: ColumnDemand, weight: number): SizedColumn['base'] {
  const { rules, situations } = bench
  let permanent = weight
  let variable = 0
  for (const part of [demand.direct, ...demand.ends]) {
    permanent += rules.storeys * part.permanent + (rules.roof ? part.area * 1000 * rules.roof.permanent : 0)
    variable += rules.storeys * part.variable.reduce((sum, value) => sum + value, 0) + (rules.roof ? part.area * 1000 * rules.roof.variable : 0)
  }
  const ultimate = Math.max(...situations.map(s => axialForce(demand, rules, s, rules.storeys) + s.permanent * weight))
  return { permanent, variable, ultimate }
}
