/**
 * The plate file: millimetres (integers), kN/m², kN/m. The same schema checks what the application
 * stores, imports and exports and what `headless study` reads.
 */
import { z } from 'zod'
import './words'

/** Farthest coordinate of a plate, mm: a kilometre either way. */
const LIMIT_MM = 1_000_000
const LIMIT_LOAD = 1_000

export const millimetres = z.int().min(-LIMIT_MM).max(LIMIT_MM)
export const lengthMm = z.int().min(1).max(LIMIT_MM)
const load = z.number().min(0).max(LIMIT_LOAD)
const name = z.string().trim().min(1).max(120)
const label = z.string().trim().min(1).max(8)

export const CATEGORIES = [
  'A', 'B', 'C', 'C1', 'C2', 'C3', 'C4', 'C5', 'D', 'D1', 'D2', 'E', 'E1', 'E2', 'F', 'G', 'H',
] as const
export const CategorySchema = z.enum(CATEGORIES)
export type Category = z.infer<typeof CategorySchema>

export const GridLineSchema = z.strictObject({
  label,
  at: millimetres,
  /** A pinned line stays when a study sets out the bays anew. */
  pinned: z.boolean().default(false),
})

export const SlabSchema = z.strictObject({
  system: z.enum(['deck', 'planks', 'solid']),
  name: name.optional(),
  /** Overall depth, mm. */
  depth: z.int().min(1).max(2000),
  /** What lies on the beams before the slab is stiff, kN/m². */
  weight: load.optional(),
  /** Longest span between beams, mm. */
  maxSpan: lengthMm,
  fixedToTopFlange: z.boolean().default(true),
  span: z.enum(['x', 'y', 'free']).default('free'),
})

export const FloorLoadSchema = z.strictObject({
  permanent: load,
  variable: load,
  category: CategorySchema,
})

const rectangle = { x: millimetres, y: millimetres, width: lengthMm, height: lengthMm }

export const VoidSchema = z.strictObject({
  name,
  ...rectangle,
  /** On how many floors it repeats, from the lowest up; all of them by default. */
  floors: z.int().min(1).max(200).optional(),
})

export const ZoneSchema = z.strictObject({
  name,
  ...rectangle,
  permanent: load,
  variable: load,
  category: CategorySchema,
  slab: SlabSchema.optional(),
  reducible: z.boolean().default(false),
})

export const KeepClearSchema = z.strictObject({ name, ...rectangle })
export const RegionSchema = z.strictObject({ name, ...rectangle })

export const OmittedColumnSchema = z.strictObject({
  x: label,
  y: label,
  /** The beam line in this direction runs through and carries the crossing beams. */
  line: z.enum(['x', 'y']),
})

const point = z.tuple([millimetres, millimetres])

/** Where a line load stands: on the outline, along a grid-parallel line, or on a void's edges. */
export const LineLoadPlaceSchema = z.union([
  z.literal('outline'),
  z.strictObject({ from: point, to: point }),
  z.strictObject({ void: name }),
], 'A line load stands on "outline", on { from, to } or on { void }.')

export const LineLoadSchema = z.strictObject({
  name,
  on: LineLoadPlaceSchema,
  permanent: load,
  variable: load,
})

export const RoofSchema = z.strictObject({ permanent: load, variable: load })

export const PlateSchema = z.strictObject({
  format: z.literal('baywright-plate'),
  version: z.literal(1),
  name,
  gridX: z.array(GridLineSchema).min(2).max(200),
  gridY: z.array(GridLineSchema).min(2).max(200),
  outline: z.array(point).min(4).max(400),
  voids: z.array(VoidSchema).max(200).default([]),
  omittedColumns: z.array(OmittedColumnSchema).max(500).default([]),
  keepClear: z.array(KeepClearSchema).max(200).default([]),
  slab: SlabSchema,
  floorLoad: FloorLoadSchema,
  zones: z.array(ZoneSchema).max(200).default([]),
  lineLoads: z.array(LineLoadSchema).max(200).default([]),
  regions: z.array(RegionSchema).max(50).default([]),
  storeys: z.int().min(1).max(200),
  storeyHeight: z.int().min(1000).max(50_000),
  roof: RoofSchema.optional(),
  overhang: z.int().min(0).max(10_000).default(600),
  servicesZone: z.int().min(0).max(10_000).default(0),
  ceiling: z.int().min(0).max(10_000).default(0),
  finish: z.int().min(0).max(10_000).default(0),
})

export type Plate = z.infer<typeof PlateSchema>
export type PlateInput = z.input<typeof PlateSchema>
export type GridLine = z.infer<typeof GridLineSchema>
export type Slab = z.infer<typeof SlabSchema>
export type PlateVoid = z.infer<typeof VoidSchema>
export type LoadZone = z.infer<typeof ZoneSchema>
export type LineLoad = z.infer<typeof LineLoadSchema>
