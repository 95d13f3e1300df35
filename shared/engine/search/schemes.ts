/** Schemes of one arrangement: the lightest sizes, and the lightest under each lower depth cap that may matter. */
import type { Rejection } from '#shared/schemas/study'
import type { ColumnDemand, SizedColumn } from '../columns'
import { isRejected } from '../framing'
import { type SteelMass, grams, steelMass } from '../quantities'
import type { NumberedArrangement } from './arrangements'
import { sizeCoupled } from './coupled'
import { type PreparedStudy, frameOf } from './prepare'
import {
  type Caps, NO_CAPS, type PreparedFrame, type SizedFrame, capOf, equilibriumResidual, isUnsized, prepareFrame, sizeFrame,
} from './sizedFrame'

export interface Scheme {
  arrangement: NumberedArrangement
  /** Cap below those of the range under which the sizes were chosen, mm; null = the lightest of the arrangement. */
  depthCap: number | null
  prepared: PreparedFrame
  sized: SizedFrame
  columns: SizedColumn[]
  mass: SteelMass
  residual: number
}

export interface NoScheme { rejection: Rejection, detail: string }

export function isNoScheme(result: Scheme | NoScheme | PreparedFrame): result is NoScheme {
  return 'rejection' in result
}

/** Equilibrium that a result must keep to be shown, relative. */
const LARGEST_RESIDUAL = 1e-9

export function frameForSizing(study: PreparedStudy, arrangement: NumberedArrangement): PreparedFrame | NoScheme {
  const frame = frameOf(study, arrangement)
  return isRejected(frame) ? frame : prepareFrame(frame, study.models[arrangement.slab]!, study.sizer)
}

/** The lightest scheme of a framed arrangement under the caps of the range and `depthCap`. */
export function sizeScheme(
  study: PreparedStudy, arrangement: NumberedArrangement, prepared: PreparedFrame, depthCap: number | null,
): Scheme | NoScheme {
  const caps = capsUnder(study.caps, depthCap)
  const sized = sizeCoupled(prepared, study.sizer, caps)
  if ('coupled' in sized) return { rejection: 'buildability', detail: sized.coupled }
  if (isUnsized(sized)) {
    const beam = prepared.frame.beams[sized.beam]!
    return unsized(study, prepared, depthCap, noSectionWords(beam.kind), noSectionWords(beam.kind, capOf(beam, caps)))
  }
  const columns = sizeColumns(study, prepared, sized)
  if (!columns) return unsized(study, prepared, depthCap, 'No section passes for a column.')
  return completeScheme(study, arrangement, prepared, depthCap, sized, columns)
}

function noSectionWords(kind: string, cap = Infinity): string {
  const piece = kind === 'trimmer' ? kind : `${kind} beam`
  const depth = cap === Infinity ? '' : ` up to ${cap} mm deep`
  return `No section${depth} passes for ${kind === 'edge' ? 'an' : 'a'} ${piece}.`
}

/** The scheme of sized beams and columns, with its mass; it must be in equilibrium. */
export function completeScheme(
  study: PreparedStudy, arrangement: NumberedArrangement, prepared: PreparedFrame, depthCap: number | null,
  sized: SizedFrame, columns: SizedColumn[],
): Scheme {
  const residual = equilibriumResidual(prepared, sized)
  if (residual > LARGEST_RESIDUAL) {
    throw new Error(`Arrangement ${arrangement.number}: column reactions miss the applied load by ${residual.toExponential(1)} of it.`)
  }
  const columnMass = columns.reduce((sum, column) => sum + column.mass, 0) / study.input.plate.storeys
  const mass = steelMass(sized.beamMass, columnMass, prepared.model.slabArea / 1e6, study.input.basis)
  return { arrangement, depthCap, prepared, sized, columns, mass, residual }
}

/**
 * The reason where sections are missing: `depth-cap` if they are not without a cap, `buildability` if
 * the flange width alone leaves none, else `no-section`. A cap beside the range's is to blame itself.
 */
function unsized(study: PreparedStudy, prepared: PreparedFrame, depthCap: number | null, detail: string, underCap = detail): NoScheme {
  if (depthCap !== null) return { rejection: 'depth-cap', detail: underCap }
  if (isSizedFreely(study, prepared, prepared.needs)) return { rejection: 'depth-cap', detail: underCap }
  if (study.input.basis.buildability.minFlangeWidth === null) return { rejection: 'no-section', detail }
  const narrow = prepared.needs.map(need => ({ ...need, flangeWidth: 0 }))
  return isSizedFreely(study, prepared, narrow)
    ? { rejection: 'buildability', detail: `${detail} The least flange width leaves none.` }
    : { rejection: 'no-section', detail }
}

function isSizedFreely(study: PreparedStudy, prepared: PreparedFrame, needs: PreparedFrame['needs']): boolean {
  const free = sizeFrame(prepared, study.sizer, NO_CAPS, needs)
  return !isUnsized(free) && sizeColumns(study, prepared, free) !== null
}

export function capsUnder(caps: Caps, depthCap: number | null): Caps {
  if (depthCap === null) return caps
  return { edge: Math.min(caps.edge, depthCap), interior: Math.min(caps.interior, depthCap) }
}

/** null: nothing passes for some column. */
export function sizeColumns(study: Pick<PreparedStudy, 'columns' | 'input'>, prepared: PreparedFrame, sized: SizedFrame): SizedColumn[] | null {
  const columns: SizedColumn[] = []
  for (const [c, twin] of prepared.alikeColumns.entries()) {
    // A rule that ties beams to one another may size beams of one class apart: then every column is asked for itself.
    const column = twin !== c && !areBeamsSizedApart(study) ? columns[twin]! : study.columns.size(columnDemand(prepared, sized, c))
    if (!column) return null
    columns.push(column)
  }
  return columns
}

function areBeamsSizedApart({ input: { basis } }: Pick<PreparedStudy, 'input'>): boolean {
  return basis.buildability.secondaryNotDeeper || basis.limits.floorFrequency !== null
}

export function columnDemand(prepared: PreparedFrame, sized: SizedFrame, c: number): ColumnDemand {
  const { frame, model: { kinds } } = prepared
  const column = frame.columns[c]!
  const part = (load: readonly number[]) => ({
    permanent: load[0]!, variable: load.slice(1, 1 + kinds.variable.length), area: load[kinds.area]! / 1e6,
  })
  return {
    web: column.web,
    unheldFloors: column.unheldFloors,
    direct: part(column.direct),
    ends: column.ends.map(({ beam, end }) => ({
      axis: frame.beams[beam]!.axis, side: end === 0 ? 1 as const : -1 as const, ...part(sized.reactions[beam]![end]),
    })),
  }
}

/** Mass and depth of schemes that no other beats, for skipping caps that cannot matter. */
export interface Front {
  /** Whether no known scheme is as light or lighter and as shallow or shallower, one of them less. */
  admits: (mass: number, depth: number) => boolean
  /** Depth of the shallowest known scheme that is at most as heavy; Infinity without one. */
  depthAtMostAsHeavy: (mass: number) => number
  add: (mass: number, depth: number) => void
}

export function emptyFront(): Front {
  let points: { mass: number, depth: number }[] = []
  const admits = (mass: number, depth: number) =>
    !points.some(p => p.mass <= mass && p.depth <= depth && (p.mass < mass || p.depth < depth))
  return {
    admits,
    depthAtMostAsHeavy: mass => points.reduce((least, p) => p.mass <= mass ? Math.min(least, p.depth) : least, Infinity),
    add(mass, depth) {
      if (!admits(mass, depth) || points.some(p => p.mass === mass && p.depth === depth)) return
      points = [...points.filter(p => !(mass <= p.mass && depth <= p.depth)), { mass, depth }]
    },
  }
}

/**
 * All schemes of an arrangement that may lie on the trade-off line, the lightest first; or the
 * reason why there is none. A lower cap never makes the arrangement lighter, so caps at which a
 * known scheme is as light and shallower are skipped: that is a proof, not a guess. A scheme is
 * named by its own depth, not by the cap that found it: which caps are asked depends on what is known.
 */
export function schemesOf(study: PreparedStudy, arrangement: NumberedArrangement, front: Front): Scheme[] | NoScheme {
  const prepared = frameForSizing(study, arrangement)
  if (isNoScheme(prepared)) return prepared
  const lightest = sizeScheme(study, arrangement, prepared, null)
  if (isNoScheme(lightest)) return lightest
  const schemes = [lightest]
  front.add(grams(lightest.mass.mass), lightest.sized.depth)
  for (let scheme = lightest; ;) {
    const cap = nextCap(study, scheme, front)
    if (cap === null) return schemes
    const next = schemeUnderCap(study, arrangement, prepared, cap)
    if (isNoScheme(next)) return schemes
    scheme = next
    if (!front.admits(grams(next.mass.mass), next.sized.depth)) continue
    front.add(grams(next.mass.mass), next.sized.depth)
    schemes.push(scheme)
  }
}

/** The lightest scheme under a cap, named by its own depth; asked for again under that depth where sizes are searched, not proved. */
function schemeUnderCap(study: PreparedStudy, arrangement: NumberedArrangement, prepared: PreparedFrame, cap: number): Scheme | NoScheme {
  const scheme = sizeScheme(study, arrangement, prepared, cap)
  if (isNoScheme(scheme)) return scheme
  const { depth } = scheme.sized
  if (!areSizesSearched(study) || depth === cap) return { ...scheme, depthCap: depth }
  const again = schemeUnderCap(study, arrangement, prepared, depth)
  return isNoScheme(again) ? scheme : again
}

/** For the frequency of the floor a lower cap may give a lighter scheme: then every cap is asked. */
function areSizesSearched({ input: { basis } }: PreparedStudy): boolean {
  return basis.limits.floorFrequency !== null
}

function nextCap(study: PreparedStudy, scheme: Scheme, front: Front): number | null {
  const below = study.depths.find(depth => depth < scheme.sized.depth)
  if (below === undefined) return null
  if (areSizesSearched(study)) return below
  return Math.min(below, front.depthAtMostAsHeavy(grams(scheme.mass.mass)))
}
