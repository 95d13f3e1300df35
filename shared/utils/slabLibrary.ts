/** Slab systems to start from: each figure with where it comes from, each to be confirmed with the supplier. */
import type { Slab } from '../schemas/plate'

export interface SlabEntry {
  /** The slab as it goes into the plate file; beams under it are bare steel, whatever the slab. */
  slab: Slab & { name: string, weight: number }
  /** Where weight and span limit come from. */
  source: string
}

export const SLAB_LIBRARY: readonly SlabEntry[] = [
  {
    slab: { system: 'deck', name: 'Composite deck 130/60', depth: 130, weight: 2.75, maxSpan: 3300, fixedToTopFlange: true, span: 'free' },
    source: 'Common practice: 130 mm on 60 mm deck weighs 2.6 to 2.8 kN/m²; unpropped spans 2.5 to 3.6 m.',
  },
  {
    slab: { system: 'deck', name: 'Composite deck 150/60', depth: 150, weight: 3.2, maxSpan: 3300, fixedToTopFlange: true, span: 'free' },
    source: 'Common practice: 150 mm on 60 mm deck; unpropped spans 2.5 to 3.6 m.',
  },
  {
    slab: { system: 'planks', name: 'Planks 200 + 50 topping', depth: 250, weight: 4.1, maxSpan: 8500, fixedToTopFlange: true, span: 'free' },
    source: 'Common practice: hollow planks 200 mm weigh 2.9 to 3.0 kN/m², topping 1.2 kN/m² for 50 mm; spans to 8.5 m.',
  },
  {
    slab: { system: 'planks', name: 'Planks 200 + 75 topping', depth: 275, weight: 4.7, maxSpan: 8500, fixedToTopFlange: true, span: 'free' },
    source: 'Common practice: hollow planks 200 mm weigh 2.9 to 3.0 kN/m², topping 1.2 kN/m² for 50 mm; spans to 8.5 m.',
  },
  {
    slab: { system: 'solid', name: 'Solid slab 200', depth: 200, weight: 5, maxSpan: 5600, fixedToTopFlange: false, span: 'free' },
    source: 'Reinforced concrete at 25 kN/m³; common practice for one-way spans is 28 times the depth, 6 m at most.',
  },
]

/** The entry that a slab was taken from unchanged but for its span direction and fixing, if any. */
export function slabEntryOf(slab: Slab): SlabEntry | null {
  return SLAB_LIBRARY.find(({ slab: known }) => (
    known.system === slab.system && known.depth === slab.depth
    && known.weight === slab.weight && known.maxSpan === slab.maxSpan
  )) ?? null
}
