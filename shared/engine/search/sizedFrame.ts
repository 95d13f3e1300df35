/**
 * A frame with a section on every beam: sized from the beams that carry nothing down to the columns.
 * Beams with the same loads, holds and carried beams are one class and are sized once.
 */
import {
  type BeamLoads, type Frame, type FrameBeam, type SpotLoad, beamDemand, mergedSpots, mergedStretches, reactionsOf,
} from '../framing'
import { GRAVITY } from '../materials'
import type { Beam, SizedSection } from '../members'
import { PERMANENT, type PlateModel, addScaled, appliedLoad } from '../plate'
import { type NumberMap, numberMap } from '../numberKeys'
import { type SectionNeeds, type Sizer, needsOf } from './sizer'

/** A frame with what does not change while caps and sections do. */
export interface PreparedFrame {
  frame: Frame
  model: PlateModel
  loads: BeamLoads[]
  needs: SectionNeeds[]
  /** First beam of the class of each beam: beams of a class are alike in all that decides their size. */
  alike: number[]
  /** First columns of each class of columns, by what ends on them. */
  alikeColumns: number[]
  /** Demands of beams that carry no other, which no section changes. */
  fixedDemands: (Beam | null)[]
  /** The sections of those, once asked for. */
  fixedStairs: (readonly SizedSection[] | undefined)[]
}

export interface Caps {
  /** Deepest section, mm; Infinity = none. */
  interior: number
  edge: number
}

export const NO_CAPS: Caps = { interior: Infinity, edge: Infinity }

export interface SizedFrame {
  sections: SizedSection[]
  demands: Beam[]
  /** End reactions of each beam by kind, own weights included, N: left, right. */
  reactions: [number[], number[]][]
  /** Beams of one floor, kg. */
  beamMass: number
  /** Deepest beam, mm. */
  depth: number
}

/** A beam for which nothing passes under the cap, and whether anything passes without one. */
export interface Unsized { beam: number, reason: 'no-section' | 'depth-cap', demand: Beam }

export function isUnsized(result: SizedFrame | Unsized): result is Unsized {
  return 'reason' in result
}

export function prepareFrame(frame: Frame, model: PlateModel, sizer: Sizer): PreparedFrame {
  const { size } = model.kinds
  const loads = frame.beams.map(beam => ({ stretches: mergedStretches(beam.stretches, size), spots: mergedSpots(beam.spots, size) }))
  const needs = frame.beams.map(beam => needsOf(beam, model, sizer.rules))
  const alike = beamClasses(frame, loads, needs)
  return {
    frame, model, loads, needs, alike,
    alikeColumns: columnClasses(frame, alike),
    fixedDemands: frame.beams.map((beam, b) =>
      beam.carries.length > 0 || alike[b] !== b ? null : beamDemand(beam, loads[b]!, [], sizer.rules.demand)),
    fixedStairs: [],
  }
}

/** Parts a row of numbers into its lists: no length is ever that. */
const MARK = -1e300

function beamClasses(frame: Frame, loads: readonly BeamLoads[], needs: readonly SectionNeeds[]): number[] {
  const classes = numberMap<number>()
  const { add } = classes
  const alike = new Array<number>(frame.beams.length)
  for (const b of frame.order) {
    const { from, to, carries, held, heldInConstruction, isOnOutline, isTrimmer, slabSides } = frame.beams[b]!
    const { stretches, spots } = loads[b]!
    const need = needs[b]!
    classes.begin()
    add(Math.round((to - from) * 1e6))
    add(need.role === 'primary' ? 1 : 0)
    add(need.flangeWidth)
    add(need.tieForce)
    add(Number(isOnOutline) + 2 * Number(isTrimmer) + 4 * slabSides)
    for (const stretch of stretches) addLoad(add, stretch.from, stretch.to, stretch.load)
    add(MARK)
    for (const spot of spots) addLoad(add, spot.at, 0, spot.load)
    add(MARK)
    for (const h of held) addPair(add, h.from, h.to)
    add(MARK)
    for (const h of heldInConstruction) addPair(add, h.from, h.to)
    add(MARK)
    for (const c of carries) {
      addPair(add, alike[c.beam]!, Math.round(c.at * 1e6))
      add(c.end)
    }
    alike[b] = classes.end(() => b)
  }
  return alike
}

function addPair(add: NumberMap<number>['add'], a: number, b: number): void {
  add(a)
  add(b)
}

function addLoad(add: NumberMap<number>['add'], from: number, to: number, load: readonly number[]): void {
  addPair(add, from, to)
  for (const value of load) add(value)
}

function columnClasses(frame: Frame, alike: readonly number[]): number[] {
  const classes = numberMap<number>()
  const { add } = classes
  return frame.columns.map((column, c) => {
    classes.begin()
    add(column.web === 'x' ? 0 : 1)
    addLoad(add, column.unheldFloors.x, column.unheldFloors.y, column.direct)
    for (const { beam, end } of column.ends) {
      addPair(add, frame.beams[beam]!.axis === 'x' ? 0 : 1, alike[beam]!)
      add(end)
    }
    return classes.end(() => c)
  })
}

export function capOf(beam: FrameBeam, caps: Caps): number {
  return beam.isOnOutline ? caps.edge : caps.interior
}

/**
 * The lightest section on every beam under the caps. `needs` may ask more of single beams than the
 * frame's own needs do, `ownCaps` may hold single beams (by index) shallower; both are read at the
 * first beam of each class unless `isEachAlone`.
 */
export function sizeFrame(
  prepared: PreparedFrame, sizer: Sizer, caps: Caps, needs: readonly SectionNeeds[] = prepared.needs,
  ownCaps?: ReadonlyMap<number, number>, isEachAlone = false,
): SizedFrame | Unsized {
  const { frame, model, loads, alike } = prepared
  const count = frame.beams.length
  const result: SizedFrame = { sections: new Array(count), demands: new Array(count), reactions: new Array(count), beamMass: 0, depth: 0 }
  let unsized: Unsized | null = null
  for (const b of frame.order) {
    const beam = frame.beams[b]!
    const length = beam.to - beam.from
    const twin = isEachAlone ? b : alike[b]!
    if (twin === b) {
      const carried = carriedLoads(beam, result.reactions)
      const fixed = prepared.fixedDemands[b]
      const demand = fixed ?? beamDemand(beam, loads[b]!, carried, sizer.rules.demand)
      const stairs = fixed && needs === prepared.needs
        ? prepared.fixedStairs[b] ??= sizer.staircase(fixed, needs[b]!)
        : sizer.staircase(demand, needs[b]!)
      const cap = Math.min(capOf(beam, caps), ownCaps?.get(b) ?? Infinity)
      const chosen = stairs.find(({ section }) => section.h <= cap)
      if (!chosen) {
        if (stairs.length === 0) return { beam: b, reason: 'no-section', demand }
        unsized ??= { beam: b, reason: 'depth-cap', demand }
      }
      const sized = chosen ?? stairs[stairs.length - 1]!
      result.sections[b] = sized
      result.demands[b] = demand
      result.reactions[b] = withOwnWeight(model, reactionsOf(length, loads[b]!, carried, model.kinds.size), sized.section.mass * length / 1000 * GRAVITY)
    } else {
      result.sections[b] = result.sections[twin]!
      result.demands[b] = result.demands[twin]!
      result.reactions[b] = result.reactions[twin]!
    }
    const { section } = result.sections[b]
    result.beamMass += section.mass * length / 1000
    result.depth = Math.max(result.depth, section.h)
  }
  return unsized ?? result
}

/** End reactions of the carried beams as loads on their carrier. */
export function carriedLoads(beam: FrameBeam, reactions: readonly [number[], number[]][]): SpotLoad[] {
  if (beam.carries.length === 0) return []
  return mergedSpots(beam.carries.map(({ beam: b, at, end }) => ({ at, load: reactions[b]![end] })), reactions[beam.carries[0]!.beam]![0].length)
}

/** Half of a beam's own weight to each end, as permanent load of both stages. */
function withOwnWeight(model: PlateModel, ends: [number[], number[]], weight: number): [number[], number[]] {
  for (const end of ends) {
    end[PERMANENT]! += weight / 2
    end[model.kinds.constructionPermanent]! += weight / 2
  }
  return ends
}

/** Load on each column from one floor by kind, N. */
export function columnReactions(prepared: PreparedFrame, reactions: readonly [number[], number[]][]): number[][] {
  return prepared.frame.columns.map((column) => {
    const sum = [...column.direct]
    for (const { beam, end } of column.ends) addScaled(sum, reactions[beam]![end], 1)
    return sum
  })
}

/** Below this a load is rounding, N: what is missing of it counts against this. */
const SMALLEST_LOAD = 1

/** Largest relative difference of the column reactions and all applied load, own weights included, over the kinds. */
export function equilibriumResidual(prepared: PreparedFrame, sized: SizedFrame): number {
  const { model } = prepared
  const applied = appliedLoad(model)
  const weight = sized.beamMass * GRAVITY
  applied[PERMANENT]! += weight
  applied[model.kinds.constructionPermanent]! += weight
  const carried = new Array<number>(model.kinds.size).fill(0)
  for (const column of columnReactions(prepared, sized.reactions)) addScaled(carried, column, 1)
  return applied.reduce((worst, load, k) => {
    const difference = Math.abs(carried[k]! - load)
    return Math.max(worst, difference / Math.max(load, SMALLEST_LOAD))
  }, 0)
}
