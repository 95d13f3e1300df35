/** From the frame to the single beam: its loads with what its carried beams bring, and what holds it. */
import type { Category, NationalChoice } from '../actions'
import { areaReduction, psi } from '../actions'
import type { Beam, BeamLineLoad, BeamPointLoad, LoadCase, LoadParts } from '../members'
import { type Interval, type LoadKinds, PERMANENT, addScaled, distinctRising, unionOf } from '../plate'
import type { FrameBeam, SpotLoad, StretchLoad } from './types'

export interface DemandRules {
  kinds: LoadKinds
  choice: NationalChoice
  /** Whether imposed loads are reduced for the area that a beam carries (αA). */
  reducesByArea: boolean
  constructionStage: boolean
}

/** Loads of a beam without its own weight, ready to be added up; positions from its `from` end. */
export interface BeamLoads {
  stretches: { from: number, to: number, load: number[] }[]
  spots: SpotLoad[]
}

/** A load to eleven figures or more: equal beams get equal numbers, whatever order their parts were added in. */
function rounded(value: number): number {
  const scale = Math.abs(value) < 1e4 ? 1e11 : 1e6
  return Math.round(value * scale) / scale
}

function roundedPlace(value: number): number {
  return Math.round(value * 1e6) / 1e6
}

/** The stretches of one or both sides as rising, disjoint pieces of constant load; equal neighbours become one. */
export function mergedStretches(stretches: readonly StretchLoad[], size: number): BeamLoads['stretches'] {
  const stations = distinctRising(endsOf(stretches))
  const pieces: BeamLoads['stretches'] = []
  for (let n = 0; n + 1 < stations.length; n++) {
    const m = (stations[n]! + stations[n + 1]!) / 2
    const load = new Array<number>(size).fill(0)
    for (const stretch of stretches) {
      if (stretch.from < m && stretch.to > m) addScaled(load, stretch.load, 1)
    }
    const figures = load.map(rounded)
    if (figures.every(value => value === 0)) continue
    const from = roundedPlace(stations[n]!)
    const to = roundedPlace(stations[n + 1]!)
    const last = pieces[pieces.length - 1]
    if (last && last.to === from && last.load.every((value, k) => value === figures[k])) last.to = to
    else pieces.push({ from, to, load: figures })
  }
  return pieces
}

/** All ends of stretches; one pair where they all run alike. */
function endsOf(stretches: readonly StretchLoad[]): number[] {
  const first = stretches[0]
  if (first && stretches.every(({ from, to }) => from === first.from && to === first.to)) return [first.from, first.to]
  const ends: number[] = []
  for (const { from, to } of stretches) ends.push(from, to)
  return ends
}

/** Spot loads with those at one place added up. */
export function mergedSpots(spots: readonly SpotLoad[], size: number): SpotLoad[] {
  const places = distinctRising(spots.map(spot => spot.at))
  return places.map((at) => {
    const load = new Array<number>(size).fill(0)
    for (const spot of spots) if (Math.abs(spot.at - at) < 1e-6) addScaled(load, spot.load, 1)
    return { at: roundedPlace(at), load: load.map(rounded) }
  })
}

/** End reactions by kind, N, of loads without own weight: left, right. */
export function reactionsOf(span: number, loads: BeamLoads, reactions: readonly SpotLoad[], size: number): [number[], number[]] {
  const left = new Array<number>(size).fill(0)
  const right = new Array<number>(size).fill(0)
  const put = (load: readonly number[], amount: number, at: number) => {
    addScaled(left, load, amount * (span - at) / span)
    addScaled(right, load, amount * at / span)
  }
  for (const { from, to, load } of loads.stretches) put(load, to - from, (from + to) / 2)
  for (const { at, load } of loads.spots) put(load, 1, at)
  for (const { at, load } of reactions) put(load, 1, at)
  return [left, right]
}

/** Area whose load a beam carries, m². */
export function carriedArea(kinds: LoadKinds, loads: BeamLoads, reactions: readonly SpotLoad[]): number {
  const k = kinds.area
  return (loads.stretches.reduce((sum, s) => sum + s.load[k]! * (s.to - s.from), 0)
    + loads.spots.reduce((sum, s) => sum + s.load[k]!, 0)
    + reactions.reduce((sum, s) => sum + s.load[k]!, 0)) / 1e6
}

interface Factors { variable: number[], accompanying: number[] }

/** What each kind counts as variable and as accompanying (ψ0) load of a beam with this area. */
function factorsOf(rules: DemandRules, area: number): Factors {
  const variable: number[] = []
  const accompanying: number[] = []
  for (const { category, reducible } of rules.kinds.variable) {
    const alpha = rules.reducesByArea && reducible && area > 0 ? areaReduction(rules.choice, category, area) : 1
    variable.push(alpha)
    accompanying.push(alpha * psi0(rules.choice, category))
  }
  return { variable, accompanying }
}

function psi0(choice: NationalChoice, category: Category): number {
  return psi(choice, category).psi0
}

function servicePart(load: readonly number[], factors: Factors): LoadParts {
  let variable = 0
  let accompanying = 0
  factors.variable.forEach((factor, k) => {
    variable += factor * load[k + 1]!
    accompanying += factors.accompanying[k]! * load[k + 1]!
  })
  return { permanent: load[PERMANENT]!, variable: rounded(variable), accompanying: rounded(accompanying) }
}

function constructionPart(kinds: LoadKinds, load: readonly number[]): LoadParts {
  const variable = load[kinds.constructionVariable]!
  return { permanent: load[kinds.constructionPermanent]!, variable, accompanying: variable }
}

function isLoaded({ permanent, variable }: LoadParts): boolean {
  return permanent !== 0 || variable !== 0
}

/**
 * The beam as the verification takes it. `reactions` are the loads of the carried beams at their
 * places, own weights included. Slab and line loads act on the top flange, beams at the shear centre.
 */
export function beamDemand(beam: FrameBeam, loads: BeamLoads, reactions: readonly SpotLoad[], rules: DemandRules): Beam {
  const span = roundedPlace(beam.to - beam.from)
  const factors = factorsOf(rules, rules.reducesByArea ? carriedArea(rules.kinds, loads, reactions) : 0)
  const points = distinctRising(beam.carries.map(carried => roundedPlace(carried.at)))
  const service = loadCase('in service', beam.held, points, loads, reactions, load => servicePart(load, factors))
  const construction = rules.constructionStage
    ? [loadCase('all of the slab', beam.heldInConstruction, points, loads, reactions, load => constructionPart(rules.kinds, load))]
    : []
  return { span, selfWeight: true, service, construction }
}

/**
 * The construction stage with the slab on one side only, once for each side: for slabs laid piece by
 * piece. What the carried beams bring stays whole.
 */
export function oneSidedCases(beam: FrameBeam, spots: readonly SpotLoad[], reactions: readonly SpotLoad[], rules: DemandRules): LoadCase[] {
  const points = distinctRising(beam.carries.map(carried => roundedPlace(carried.at)))
  return ([[-1, 'one side'], [1, 'the other side']] as const).map(([side, words]) => {
    const stretches = mergedStretches(beam.stretches.filter(stretch => stretch.side === side), rules.kinds.size)
    const loads: BeamLoads = { stretches, spots: [...spots] }
    return loadCase(`slab on ${words} only`, beam.heldInConstruction, points, loads, reactions, load => constructionPart(rules.kinds, load))
  })
}

function loadCase(
  name: string, held: readonly Interval[], points: number[], loads: BeamLoads, reactions: readonly SpotLoad[],
  part: (load: readonly number[]) => LoadParts,
): LoadCase {
  const line: BeamLineLoad[] = []
  for (const { from, to, load } of loads.stretches) {
    const parts = part(load)
    if (isLoaded(parts)) line.push({ from, to, ...parts, height: 'top' })
  }
  const point: BeamPointLoad[] = []
  for (const { at, load } of loads.spots) {
    const parts = part(load)
    if (isLoaded(parts)) point.push({ at, ...parts, height: points.includes(at) ? 'shear-centre' : 'top' })
  }
  for (const { at, load } of reactions) {
    const parts = part(load)
    if (isLoaded(parts)) point.push({ at, ...parts, height: 'shear-centre' })
  }
  point.sort((a, b) => a.at - b.at)
  const stretches = unionOf(held).map(({ from, to }) => ({ from: roundedPlace(from), to: roundedPlace(to) }))
  return { name, line: joined(line), point, restraint: { held: stretches, points } }
}

/** Neighbouring line loads that differ in nothing but their place become one. */
function joined(line: BeamLineLoad[]): BeamLineLoad[] {
  const result: BeamLineLoad[] = []
  for (const load of line) {
    const last = result[result.length - 1]
    if (last && last.to === load.from && last.permanent === load.permanent && last.variable === load.variable
      && last.accompanying === load.accompanying && last.height === load.height) last.to = load.to
    else result.push({ ...load })
  }
  return result
}
