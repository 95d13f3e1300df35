/**
 * Rules that tie beams to one another: secondary beams not deeper than the primary beam that they
 * frame into, and the frequency of the floor as a whole. Without such a rule in force every beam is
 * sized alone.
 */
import { type Caps, type PreparedFrame, type SizedFrame, type Unsized, capOf, carriedLoads, isUnsized, sizeFrame } from './sizedFrame'
import { leastCostLabels } from './minimumCut'
import { beamDemand } from '../framing'
import type { SectionNeeds, Sizer } from './sizer'

export interface CannotCouple { coupled: string }

/** Rounds in which new sizes may change the loads of the beams below before the answer is given up. */
const MOST_ROUNDS = 12

/** Shares of the floor's deflection that the secondary beams may have, tried one by one. */
const DEFLECTION_SHARES = Array.from({ length: 17 }, (_, n) => 0.1 + n * 0.05)

/** 18/√δ, f in Hz and δ in mm. */
const FREQUENCY_FACTOR = 18

export function sizeCoupled(prepared: PreparedFrame, sizer: Sizer, caps: Caps): SizedFrame | Unsized | CannotCouple {
  const { limits, buildability } = sizer.rules.basis
  if (limits.floorFrequency === null) return sizeUnderDepthRule(prepared, sizer, caps, prepared.needs, buildability.secondaryNotDeeper)
  const free = sizeUnderDepthRule(prepared, sizer, caps, prepared.needs, buildability.secondaryNotDeeper)
  if ('coupled' in free || isUnsized(free)) return free
  if (floorFrequency(prepared, sizer, free) >= limits.floorFrequency) return free
  return lightestWithFloorFrequency(prepared, sizer, caps, limits.floorFrequency)
}

/** The lightest of the splits of the floor's deflection between secondary and primary beams. */
function lightestWithFloorFrequency(prepared: PreparedFrame, sizer: Sizer, caps: Caps, least: number): SizedFrame | Unsized | CannotCouple {
  let best: SizedFrame | null = null
  for (const share of DEFLECTION_SHARES) {
    const needs = prepared.needs.map((need, b): SectionNeeds => {
      const beam = prepared.frame.beams[b]!
      if (beam.kind === 'tie') return need
      const part = beam.carries.length > 0 ? 1 - share : beam.supports.some(s => s.kind === 'beam') ? share : 1
      return { ...need, frequency: least / Math.sqrt(part) }
    })
    const sized = sizeUnderDepthRule(prepared, sizer, caps, needs, sizer.rules.basis.buildability.secondaryNotDeeper)
    if ('coupled' in sized || isUnsized(sized)) continue
    if (floorFrequency(prepared, sizer, sized) < least - 1e-9) continue
    if (!best || sized.beamMass < best.beamMass) best = sized
  }
  return best ?? { coupled: `No sizes under the caps bring the floor to ${least} Hz.` }
}

/** Frequency of the floor, Hz: the least 18/√(δ + largest δ of its carriers) of all beams carried by others. */
export function floorFrequency(prepared: PreparedFrame, sizer: Sizer, sized: SizedFrame): number {
  const deflections = prepared.frame.beams.map((_, b) => {
    const f = sizer.frequency(sized.demands[b]!, sized.sections[b]!)
    return f === null ? 0 : (FREQUENCY_FACTOR / f) ** 2
  })
  let largest = 0
  prepared.frame.beams.forEach((beam, b) => {
    const under = beam.supports.map(support => support.kind === 'beam' ? deflections[support.beam]! : 0)
    largest = Math.max(largest, deflections[b]! + Math.max(...under))
  })
  return largest === 0 ? Infinity : FREQUENCY_FACTOR / Math.sqrt(largest)
}

function sizeUnderDepthRule(
  prepared: PreparedFrame, sizer: Sizer, caps: Caps, needs: readonly SectionNeeds[], isInForce: boolean,
): SizedFrame | Unsized | CannotCouple {
  let sized = sizeFrame(prepared, sizer, caps, needs, undefined, needs !== prepared.needs)
  if (!isInForce || isUnsized(sized)) return sized
  const pairs = depthPairs(prepared)
  for (let round = 0; round < MOST_ROUNDS; round++) {
    if (pairs.every(({ low, high }) => depthOf(sized, low) <= depthOf(sized, high))) return sized
    const labels = leastMassLabels(prepared, sizer, caps, needs, sized, pairs)
    if (!labels) return { coupled: 'No sizes keep every secondary beam as shallow as the primary beam that it frames into.' }
    const next = sizeFrame(prepared, sizer, caps, labels.needs, labels.caps, true)
    if (isUnsized(next)) return { coupled: 'No sizes keep every secondary beam as shallow as the primary beam that it frames into.' }
    sized = next
  }
  return { coupled: 'Secondary and primary beams find no common depth.' }
}

function depthOf(sized: SizedFrame | Unsized, beam: number): number {
  return isUnsized(sized) ? Infinity : sized.sections[beam]!.section.h
}

/** Beams that frame into a primary beam (or an edge beam parallel to the primaries), each with its carrier. */
function depthPairs({ frame }: PreparedFrame): { low: number, high: number }[] {
  return frame.beams.flatMap((beam, high) =>
    beam.isParallelToPrimaries && !beam.isTrimmer ? beam.carries.map(({ beam: low }) => ({ low, high })) : [])
}

/**
 * The depths that keep the rule at the least total mass: a carried beam may be up to its label deep,
 * its carrier must be at least its own label deep.
 */
function leastMassLabels(
  prepared: PreparedFrame, sizer: Sizer, caps: Caps, needs: readonly SectionNeeds[], sized: SizedFrame, pairs: { low: number, high: number }[],
): { needs: SectionNeeds[], caps: Map<number, number> } | null {
  const { frame, loads } = prepared
  const lows = [...new Set(pairs.map(pair => pair.low))]
  const highs = [...new Set(pairs.map(pair => pair.high))]
  const demandOf = (b: number) => beamDemand(frame.beams[b]!, loads[b]!, carriedLoads(frame.beams[b]!, sized.reactions), sizer.rules.demand)
  const stairs = new Map(lows.map(b => [b, sizer.staircase(demandOf(b), needs[b]!).filter(s => s.section.h <= capOf(frame.beams[b]!, caps))]))
  const depths = [...new Set([...stairs.values()].flatMap(list => list.map(s => s.section.h)))].sort((a, b) => a - b)
  const length = (b: number) => frame.beams[b]!.to - frame.beams[b]!.from
  const lowCosts = lows.map(b => depths.map(depth => length(b) * (stairs.get(b)!.find(s => s.section.h <= depth)?.section.mass ?? Infinity)))
  const highCosts = highs.map((b) => {
    const lightest = sizer.withinDepths(demandOf(b), needs[b]!)
    const cap = capOf(frame.beams[b]!, caps)
    return depths.map(depth => length(b) * (lightest(depth, cap)?.section.mass ?? Infinity))
  })
  const labels = leastCostLabels({
    costs: [...lowCosts, ...highCosts],
    rules: pairs.map(({ low, high }) => ({ low: lows.indexOf(low), high: lows.length + highs.indexOf(high) })),
  })
  if (!labels) return null
  const asked = [...needs]
  highs.forEach((b, n) => {
    asked[b] = { ...needs[b]!, depth: depths[labels[lows.length + n]!]! }
  })
  return { needs: asked, caps: new Map(lows.map((b, n) => [b, depths[labels[n]!]!])) }
}
