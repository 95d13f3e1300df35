/** The range of a grid study: what may vary. */
import { z } from 'zod'
import { SlabSchema } from './plate'

const bay = z.int().min(1000).max(60_000)

const BaysSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('fixed') }),
  z.strictObject({ kind: z.literal('equal'), min: bay, max: bay }),
  z.strictObject({
    kind: z.literal('module'), module: z.int().min(50).max(20_000), min: bay, max: bay,
  }),
], 'The bays are of kind fixed, equal or module.').refine(bays => bays.kind === 'fixed' || bays.min <= bays.max, {
  message: 'The shortest bay is longer than the longest one.', path: ['min'],
})

const DirectionsSchema = z.array(z.enum(['x', 'y'])).min(1).max(2)
  .refine(list => new Set(list).size === list.length, 'A direction stands in the list twice.')
const DivisionsSchema = z.array(z.int().min(1).max(20)).min(1).max(20)
  .refine(list => new Set(list).size === list.length, 'A number of divisions stands in the list twice.')

export const RangeSchema = z.strictObject({
  x: BaysSchema,
  y: BaysSchema,
  primaryDirections: DirectionsSchema,
  divisions: DivisionsSchema,
  /** By region name, in place of the two lists above. */
  regions: z.record(z.string(), z.strictObject({
    primaryDirections: DirectionsSchema.optional(),
    divisions: DivisionsSchema.optional(),
  })).optional(),
  /** Slab systems to try in place of the plate's own. */
  slabs: z.array(SlabSchema).min(1).max(10).optional(),
  /** Deepest beam allowed, mm. */
  depthCap: z.number().min(50).max(2000).nullable(),
  /** The same for all beams but edge beams. */
  depthCapInterior: z.number().min(50).max(2000).nullable().optional(),
  maxDistinctSections: z.int().min(1).max(50).nullable(),
})

export type Range = z.infer<typeof RangeSchema>
export type Bays = Range['x']
