/** The form of a range: what is typed for each choice is kept, also while another choice is shown. */
import { formatNumber } from '#shared/utils/format'
import type { Slab } from '#shared/schemas/plate'
import type { Bays, Range } from '#shared/schemas/range'

export interface BaysForm { kind: Bays['kind'], min: number, max: number, module: number }

export interface RangeForm {
  x: BaysForm
  y: BaysForm
  alongX: boolean
  alongY: boolean
  divisions: number[]
  /** Slab systems to try; null = the plate's own. */
  slabs: Slab[] | null
  /** Deepest beam allowed, mm. */
  depthCap: number | null
  /** The cap leaves the edge beams free. */
  edgeBeamsFree: boolean
}

export const DIVISIONS = [1, 2, 3, 4, 5] as const

const OPEN_BAYS: BaysForm = { kind: 'fixed', min: 6000, max: 12_000, module: 1500 }

export function openRange(): RangeForm {
  return {
    x: { ...OPEN_BAYS }, y: { ...OPEN_BAYS }, alongX: true, alongY: true, divisions: [...DIVISIONS], slabs: null,
    depthCap: null, edgeBeamsFree: false,
  }
}

export function rangeForm(range: Range): RangeForm {
  const bays = (from: Bays): BaysForm => from.kind === 'fixed'
    ? { ...OPEN_BAYS }
    : { ...OPEN_BAYS, ...from }
  const interior = range.depthCapInterior ?? null
  return {
    x: bays(range.x),
    y: bays(range.y),
    alongX: range.primaryDirections.includes('x'),
    alongY: range.primaryDirections.includes('y'),
    divisions: [...range.divisions].sort((a, b) => a - b),
    slabs: range.slabs ?? null,
    depthCap: range.depthCap ?? interior,
    edgeBeamsFree: range.depthCap === null && interior !== null,
  }
}

function bays({ kind, min, max, module }: BaysForm): Bays {
  if (kind === 'fixed') return { kind }
  return kind === 'equal' ? { kind, min, max } : { kind, module, min, max }
}

/** The range that the form makes; parts of `kept` that the form does not show stay as they are. */
export function rangeOf(form: RangeForm, kept?: Range): Range {
  return {
    ...(kept?.regions ? { regions: kept.regions } : {}),
    ...(form.slabs ? { slabs: form.slabs } : {}),
    maxDistinctSections: kept?.maxDistinctSections ?? null,
    x: bays(form.x),
    y: bays(form.y),
    primaryDirections: [...(form.alongX ? ['x' as const] : []), ...(form.alongY ? ['y' as const] : [])],
    divisions: [...form.divisions].sort((a, b) => a - b),
    depthCap: form.edgeBeamsFree ? null : form.depthCap,
    ...(form.edgeBeamsFree && form.depthCap !== null ? { depthCapInterior: form.depthCap } : {}),
  }
}

/** The first thing that the form itself lacks, in a sentence; null where it can be counted. */
export function formProblem(form: RangeForm): string | null {
  if (!form.alongX && !form.alongY) return 'No direction for the primary beams is chosen. Choose one or both.'
  if (form.divisions.length === 0) return 'No number of panels in a bay is chosen. Choose at least one.'
  if (form.slabs?.length === 0) return 'No slab system is chosen. Choose at least one.'
  for (const each of [form.x, form.y]) {
    if (each.kind !== 'fixed' && each.min > each.max) return 'The shortest bay is longer than the longest. Exchange the two.'
  }
  return null
}

/** The factors of a range as a product: "144 × 6 × 2 × 4 × 2". Where regions multiply, their product is one factor. */
export function rangeProduct(
  count: { layoutsX: number, layoutsY: number, directionsAndDivisions: number, slabs: number }, directions: number, divisions: number,
): string {
  const framing = directions * divisions === count.directionsAndDivisions ? [directions, divisions] : [count.directionsAndDivisions]
  return [count.layoutsX, count.layoutsY, ...framing, ...(count.slabs > 1 ? [count.slabs] : [])]
    .map(factor => formatNumber(factor)).join(' × ')
}
