/**
 * The members of a scheme in groups of like ones, each with the sections that pass for it at the
 * loads of the lightest sizes. Heavier sections only add weight, so no choice of sections, whatever
 * the loads it brings with it, is lighter than the best choice from these.
 */
import { type ColumnDemand, liftChoices } from '../columns'
import { GRAVITY } from '../materials'
import type { Axis } from '../plate'
import type { Section } from '../sections'
import type { PreparedStudy } from './prepare'
import { type Scheme, capsUnder, columnDemand } from './schemes'
import { type PreparedFrame, type SizedFrame, capOf, isUnsized, sizeFrame } from './sizedFrame'

/** `plate`: so many sections in all; `kind`: so many for secondaries, for primaries, for columns … each. */
export type SelectionScope = 'plate' | 'kind'

export interface MemberGroup {
  /** Which list of sections it takes from. */
  list: string
  /** First beam of the class, or first column of the class and its lift counted from the base. */
  member: { beam: number } | { column: number, lift: number }
  /** Metres of steel on one floor; columns over all storeys ÷ storeys. */
  weight: number
  lightest: Section
  /** Sections that pass and are at most `extra` kg heavier than the lightest over the whole group. */
  candidates: (extra: number) => Section[]
  /** Of these sections those that pass. */
  passingOf: (sections: readonly Section[]) => Section[]
}

/** kg/m, for every lift. */
const NO_LIMIT: readonly number[] = new Array<number>(100).fill(Infinity)

export function listOf(scope: SelectionScope, kind: string): string {
  return scope === 'plate' ? 'plate' : kind
}

/**
 * The groups when all of them together may be `extra` kg heavier than their lightest: that may ease
 * the moments of columns. With 0 the columns are asked for the scheme's own sections alone.
 */
export type MemberGroups = (extra: number) => MemberGroup[]

export function memberGroups(study: PreparedStudy, scheme: Scheme, scope: SelectionScope): MemberGroups {
  const { prepared } = scheme
  const base = sizedAlone(study, scheme)
  const beams = beamGroups(study, scheme, base, scope)
  const shares = ownWeightShares(prepared, beams)
  const eased = (column: number, extra: number): ColumnDemand => ({
    ...columnDemand(prepared, base, column), relief: reliefOf(prepared, column, beams, shares, extra),
  })
  const own = study.columns.among(scheme.columns.flatMap(column => column.lifts.map(lift => lift.section)))
  return extra => [
    ...beams,
    ...extra === 0
      ? columnGroups(study, prepared, scope, Infinity, column => liftChoices(own, columnDemand(prepared, base, column), NO_LIMIT))
      : columnGroups(study, prepared, scope, extra, (column, heavier) => liftChoices(study.columns, eased(column, extra), heavier)),
  ]
}

/** The lightest sizes with no rule between beams: at most as heavy as the scheme itself. */
function sizedAlone(study: PreparedStudy, { prepared, sized, depthCap }: Scheme): SizedFrame {
  const { limits, buildability } = study.input.basis
  if (limits.floorFrequency === null && !buildability.secondaryNotDeeper) return sized
  const alone = sizeFrame(prepared, study.sizer, capsUnder(study.caps, depthCap))
  return isUnsized(alone) ? sized : alone
}

function beamGroups(study: PreparedStudy, { prepared, depthCap }: Scheme, base: SizedFrame, scope: SelectionScope): MemberGroup[] {
  const { frame, alike, needs } = prepared
  const metres = new Map<number, number>()
  frame.beams.forEach((beam, b) => metres.set(alike[b]!, (metres.get(alike[b]!) ?? 0) + (beam.to - beam.from) / 1000))
  const caps = capsUnder(study.caps, depthCap)
  return [...metres].map(([b, weight]): MemberGroup => {
    const cap = capOf(frame.beams[b]!, caps)
    const { section: lightest } = base.sections[b]!
    const all = study.sizer.rules.sections[needs[b]!.role].filter(section => section.h <= cap && section.mass >= lightest.mass)
    const passingOf = (sections: readonly Section[]) =>
      study.passing.passing(base.demands[b]!, needs[b]!, sections).map(sized => sized.section)
    return {
      list: listOf(scope, frame.beams[b]!.kind), member: { beam: b }, weight, lightest,
      candidates: extra => passingOf(all.filter(section => (section.mass - lightest.mass) * weight <= extra)),
      passingOf: sections => passingOf(all.filter(section => sections.includes(section))),
    }
  })
}

/**
 * What each kg/m more in each group of beams adds to the end reactions of every beam, N: rows by
 * beam, left then right. Own weights may ease the unbalanced moment of a column, and no bound may forget it.
 */
function ownWeightShares({ frame, alike }: PreparedFrame, groups: readonly MemberGroup[]): [Float64Array, Float64Array][] {
  const groupOf = new Map(groups.map(({ member }, g) => ['beam' in member ? member.beam : -1, g]))
  const shares: [Float64Array, Float64Array][] = new Array(frame.beams.length)
  for (const b of frame.order) {
    const beam = frame.beams[b]!
    const length = beam.to - beam.from
    const ends: [Float64Array, Float64Array] = [new Float64Array(groups.length), new Float64Array(groups.length)]
    for (const end of ends) end[groupOf.get(alike[b]!)!] = GRAVITY * length / 1000 / 2
    for (const { beam: carried, at, end } of beam.carries) {
      shares[carried]![end].forEach((share, g) => {
        ends[0][g]! += share * (length - at) / length
        ends[1][g]! += share * at / length
      })
    }
    shares[b] = ends
  }
  return shares
}

/** The most that `extra` kg more steel in the beams may add to a column's reactions along each axis, N. */
function reliefOf({ frame }: PreparedFrame, column: number, groups: readonly MemberGroup[], shares: readonly [Float64Array, Float64Array][], extra: number): Record<Axis, number> {
  const relief = { x: 0, y: 0 }
  if (extra === 0) return relief
  for (const axis of ['x', 'y'] as const) {
    const ends = frame.columns[column]!.ends.filter(({ beam }) => frame.beams[beam]!.axis === axis)
    groups.forEach(({ weight }, g) => {
      const share = ends.reduce((sum, { beam, end }) => sum + shares[beam]![end][g]!, 0)
      if (share > 0) relief[axis] = Math.max(relief[axis], share * extra / weight)
    })
  }
  return relief
}

/** @param choicesOf for a column the sections of each lift, from the base up, at most so much heavier than the lightest, kg/m */
function columnGroups(
  study: PreparedStudy, { alikeColumns }: PreparedFrame, scope: SelectionScope, extra: number,
  choicesOf: (column: number, heavier: number[]) => Section[][],
): MemberGroup[] {
  const counts = new Map<number, number>()
  for (const twin of alikeColumns) counts.set(twin, (counts.get(twin) ?? 0) + 1)
  const { storeys, storeyHeight, roof } = study.input.plate
  const { liftStoreys } = study.input.basis
  const lengths = storeys + (roof ? 1 : 0)
  const lifts = Array.from({ length: Math.ceil(lengths / liftStoreys) }, (_, lift) => Math.min(liftStoreys, lengths - lift * liftStoreys))
  return [...counts].flatMap(([column, count]) => {
    const weights = lifts.map(levels => levels * storeyHeight / 1000 * count / storeys)
    return choicesOf(column, weights.map(weight => extra / weight)).map((choices, lift): MemberGroup => ({
      list: listOf(scope, 'column'), member: { column, lift }, weight: weights[lift]!,
      lightest: choices.reduce((a, b) => b.mass < a.mass ? b : a),
      candidates: () => choices,
      passingOf: sections => choices.filter(section => sections.includes(section)),
    }))
  })
}
