import { combinationFactors } from '../actions'
import type { CombinationFactors } from '../actions'
import { buildMesh } from '../ec3'
import type { BucklingMesh } from '../ec3'
import { effectsOf, emptyEffects, largestMoment, largestSag, largestShear, stationAt, stationsOf, superpose } from '../statics'
import type { Effects, Peak } from '../statics'
import type { Beam, BeamRules, LoadCase, LoadParts } from './types'

type Part = 'permanent' | 'variable' | 'accompanying'

/** A stretch between restraints (or a run between held stretches), by station. */
export interface Stretch {
  from: number
  to: number
  held: boolean
  /** Restraints inside (whole-beam only). */
  inside: number
  /** Built when first asked for by `meshOf`. */
  mesh: BucklingMesh | null
}

/** The mesh of a free stretch. */
export function meshOf(stretch: Stretch, { x, restrained }: PreparedCase): BucklingMesh {
  return stretch.mesh ??= buildMesh(x, stretch.from, stretch.to, restrained)
}

/** One load case under one combination, without own weight. */
export interface PreparedCombination {
  factors: CombinationFactors
  base: Effects
  qTop: Float64Array
  PTop: Float64Array
  raised: boolean
  /** Lower bounds for any section: own weight only adds. */
  baseMoment: number
  baseShear: number
}

export interface PreparedCase {
  name: string
  stage: 'service' | 'construction'
  x: Float64Array
  permanent: Effects
  variable: Effects
  accompanying: Effects
  /** Effects of 1 N/mm over the whole span. */
  self: Effects
  /** 1 at stations where a restraint lies in a free length. */
  restrained: Uint8Array
  stretches: Stretch[]
  continuous: boolean
  combinations: PreparedCombination[]
  /** Room for base + own weight. */
  total: Effects
}

export interface PreparedBeam {
  span: number
  selfWeight: boolean
  cases: PreparedCase[]
  /** Service: E·I·w under variable; under permanent + variable and permanent + share · variable without own weight. */
  sagVariable: Peak
  characteristic: Effects
  vibrating: Effects
  sagCharacteristic: number
  sagVibrating: number
}

function effectsOfPart(x: Float64Array, { line, point }: LoadCase, part: Part): Effects {
  return effectsOf(
    x,
    line.map(load => ({ from: load.from, to: load.to, q: load[part] })),
    point.map(load => ({ at: load.at, P: load[part] })),
  )
}

function isContinuous(loads: LoadCase, span: number): boolean {
  let reached = 0
  for (const { from, to } of loads.restraint.held) {
    if (from > reached) return false
    reached = Math.max(reached, to)
  }
  return reached >= span
}

/** Stretches between forks. `whole-beam` keeps the restraints of a free run inside it. */
function stretchesOf(x: Float64Array, loads: LoadCase, method: BeamRules['criticalMoment'], restrained: Uint8Array): Stretch[] {
  const last = x.length - 1
  const heldInterval = new Uint8Array(last)
  for (const { from, to } of loads.restraint.held) {
    const end = stationAt(x, to)
    for (let i = stationAt(x, from); i < end; i++) heldInterval[i] = 1
  }
  for (const at of loads.restraint.points) {
    const i = stationAt(x, at)
    if (i > 0 && i < last && !(heldInterval[i - 1] === 1 && heldInterval[i] === 1)) restrained[i] = 1
  }
  const stretches: Stretch[] = []
  let from = 0
  for (let i = 1; i <= last; i++) {
    const held = heldInterval[i - 1] === 1
    const changes = i === last || (heldInterval[i] === 1) !== held
    const cut = !held && method === 'by-segment' && restrained[i] === 1
    if (!changes && !cut) continue
    let inside = 0
    for (let k = from + 1; k < i; k++) inside += held ? 0 : restrained[k]!
    stretches.push({ from, to: i, held, inside, mesh: null })
    from = i
  }
  return stretches
}

/** The part of the design loads that acts on the top flange, by interval and station. */
function topLoads(x: Float64Array, loads: LoadCase, factors: CombinationFactors): { qTop: Float64Array, PTop: Float64Array, any: boolean } {
  const qTop = new Float64Array(x.length)
  const PTop = new Float64Array(x.length)
  let any = false
  const design = (load: LoadParts) =>
    factors.permanent * load.permanent + factors.variable * load.variable + factors.accompanying * load.accompanying
  for (const load of loads.line) {
    if (load.height !== 'top') continue
    any = true
    const end = stationAt(x, load.to)
    for (let i = stationAt(x, load.from); i < end; i++) qTop[i] = qTop[i]! + design(load)
  }
  for (const load of loads.point) {
    if (load.height !== 'top') continue
    any = true
    const i = stationAt(x, load.at)
    PTop[i] = PTop[i]! + design(load)
  }
  return { qTop, PTop, any }
}

function isRaised(stretches: readonly Stretch[], qTop: Float64Array, PTop: Float64Array): boolean {
  return stretches.some(({ from, to, held }) => {
    for (let i = from; i < to && !held; i++) if (qTop[i]! > 0 || (i > from && PTop[i]! > 0)) return true
    return false
  })
}

function prepareCombination(prepared: Omit<PreparedCase, 'combinations'>, loads: LoadCase, factors: CombinationFactors): PreparedCombination {
  const { x, permanent, variable, accompanying, stretches } = prepared
  const base = superpose(emptyEffects(x.length), [
    [factors.permanent, permanent], [factors.variable, variable], [factors.accompanying, accompanying],
  ])
  const { qTop, PTop, any } = topLoads(x, loads, factors)
  return {
    factors, base, qTop, PTop,
    raised: any && isRaised(stretches, qTop, PTop),
    baseMoment: largestMoment(x, base).value,
    baseShear: largestShear(x, base).value,
  }
}

function prepareCase(beam: Beam, loads: LoadCase, stage: 'service' | 'construction', rules: BeamRules): PreparedCase {
  const places = [
    ...loads.line.flatMap(load => [load.from, load.to]),
    ...loads.point.map(load => load.at),
    ...loads.restraint.points,
    ...loads.restraint.held.flatMap(stretch => [stretch.from, stretch.to]),
  ]
  const x = stationsOf(beam.span, places)
  const restrained = new Uint8Array(x.length)
  const prepared = {
    name: loads.name,
    stage, x, restrained,
    permanent: effectsOfPart(x, loads, 'permanent'),
    variable: effectsOfPart(x, loads, 'variable'),
    accompanying: effectsOfPart(x, loads, 'accompanying'),
    self: effectsOf(x, [{ from: 0, to: beam.span, q: 1 }], []),
    stretches: stretchesOf(x, loads, rules.criticalMoment, restrained),
    continuous: isContinuous(loads, beam.span),
    total: emptyEffects(x.length),
  }
  const rule = stage === 'construction' ? '6.10' : rules.combination
  return {
    ...prepared,
    combinations: combinationFactors(rules.choice, rule).map(factors => prepareCombination(prepared, loads, factors)),
  }
}

/** Everything about a beam that does not depend on its section. */
export function prepareBeam(beam: Beam, rules: BeamRules): PreparedBeam {
  const service = prepareCase(beam, beam.service, 'service', rules)
  const { x, permanent, variable } = service
  const characteristic = superpose(emptyEffects(x.length), [[1, permanent], [1, variable]])
  const vibrating = superpose(emptyEffects(x.length), [[1, permanent], [rules.limits.variableShare, variable]])
  return {
    span: beam.span,
    selfWeight: beam.selfWeight,
    cases: [service, ...beam.construction.map(loads => prepareCase(beam, loads, 'construction', rules))],
    sagVariable: largestSag(x, variable),
    characteristic,
    vibrating,
    sagCharacteristic: largestSag(x, characteristic).value,
    sagVibrating: largestSag(x, vibrating).value,
  }
}
