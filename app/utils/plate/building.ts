/** Intents on the whole plate: name, slab, floor load, storeys, roof, outline corners. */
import type { Plate, Slab } from '#shared/schemas/plate'
import type { Axis } from './outline'
import type { Outcome, Step } from './steps'
import { formatMm } from './words'

/** Loads are kept to a tenth of a newton per square metre, so that sums stay clean. */
function rounded(value: number): number {
  return Math.round(value * 10_000) / 10_000
}

/**
 * Another slab, the finishes on it kept: the permanent load of the floor, and of zones on the
 * plate's slab, changes by the difference of the two weights.
 */
export function setSlab(plate: Plate, slab: Slab): Step {
  const by = (slab.weight ?? 0) - (plate.slab.weight ?? 0)
  const knowsBoth = slab.weight !== undefined && plate.slab.weight !== undefined
  const label = slab.name === plate.slab.name ? 'slab' : `slab ${slab.name ?? slab.system}`
  if (!knowsBoth || by === 0) return { label, patch: { slab } }
  const heavier = (permanent: number) => Math.max(0, rounded(permanent + by))
  return {
    label,
    patch: {
      slab,
      floorLoad: { ...plate.floorLoad, permanent: heavier(plate.floorLoad.permanent) },
      zones: plate.zones.map(zone => (zone.slab ? zone : { ...zone, permanent: heavier(zone.permanent) })),
    },
  }
}

/** Finishes and services on the slab, kN/m²: permanent load less the slab's weight. */
export function finishesOf(plate: Plate): number | null {
  return plate.slab.weight === undefined ? null : rounded(plate.floorLoad.permanent - plate.slab.weight)
}

export function setFinishes(plate: Plate, finishes: number): Outcome {
  const { weight } = plate.slab
  if (weight === undefined) return { refusal: 'The slab has no weight yet. Give its weight, or the permanent load as a whole.' }
  return {
    label: 'finishes and services',
    patch: { floorLoad: { ...plate.floorLoad, permanent: rounded(weight + finishes) } },
  }
}

export function setFloorLoad(plate: Plate, change: Partial<Plate['floorLoad']>): Step {
  return { label: 'floor load', patch: { floorLoad: { ...plate.floorLoad, ...change } } }
}

type Measure = 'storeys' | 'storeyHeight' | 'overhang' | 'servicesZone' | 'ceiling' | 'finish'

const MEASURES: Record<Measure, { word: string, least: number, most: number, unit: string }> = {
  storeys: { word: 'Storeys', least: 1, most: 200, unit: '' },
  storeyHeight: { word: 'The storey height', least: 1000, most: 50_000, unit: ' mm' },
  overhang: { word: 'The overhang limit', least: 0, most: 10_000, unit: ' mm' },
  servicesZone: { word: 'The services zone', least: 0, most: 10_000, unit: ' mm' },
  ceiling: { word: 'The ceiling', least: 0, most: 10_000, unit: ' mm' },
  finish: { word: 'The finish', least: 0, most: 10_000, unit: ' mm' },
}

export function setMeasure(plate: Plate, measure: Measure, value: number): Outcome {
  const { word, least, most, unit } = MEASURES[measure]
  if (!Number.isInteger(value) || value < least || value > most) {
    return { refusal: `${word} ${measure === 'storeys' ? 'are' : 'is'} a whole number from ${least} to ${most}${unit}.` }
  }
  return { label: word.replace(/^The /, '').toLowerCase(), patch: { [measure]: value } }
}

export function setRoof(plate: Plate, roof: Plate['roof']): Step {
  return { label: roof ? 'roof load' : 'roof taken off', patch: { roof } }
}

export function setName(plate: Plate, typed: string): Outcome {
  const name = typed.trim()
  if (name.length < 1 || name.length > 120) return { refusal: 'A name has 1 to 120 characters.' }
  return { label: `name ${name}`, patch: { name } }
}

/** Moves the outline's edge that runs across `axis` and starts at a corner; right angles are kept. */
export function moveOutlineEdge(plate: Plate, axis: Axis, corner: number, at: number): Outcome {
  const { outline } = plate
  const count = outline.length
  const a = outline[corner]
  const b = outline[(corner + 1) % count]
  const part = axis === 'x' ? 0 : 1
  if (!a || !b || a[part] !== b[part]) return { refusal: 'This edge is no longer there.' }
  const before = outline[(corner + count - 1) % count]
  const after = outline[(corner + 2) % count]
  if (at === before?.[part] || at === after?.[part]) {
    return { refusal: `At ${formatMm(at)} this edge would close up on its neighbour.` }
  }
  const moved = outline.map((point, i): [number, number] => {
    if (i !== corner && i !== (corner + 1) % count) return point
    return axis === 'x' ? [at, point[1]] : [point[0], at]
  })
  return { label: 'move of the outline', patch: { outline: moved } }
}
