/** What a grid study takes and gives: the contract of `headless study` and of the stored study. */
import { z } from 'zod'
import { BasisSchema } from './basis'
import { PlateSchema } from './plate'
import { RangeSchema } from './range'

export const StudyInputSchema = z.strictObject({
  plate: PlateSchema,
  basis: BasisSchema,
  range: RangeSchema,
}).superRefine((input, context) => {
  if (!input.basis.constructionStage) return
  const systems = [
    { slab: input.plate.slab, path: ['plate', 'slab'] },
    ...input.plate.zones.map((zone, i) => ({ slab: zone.slab, path: ['plate', 'zones', i, 'slab'] })),
    ...(input.range.slabs ?? []).map((slab, i) => ({ slab, path: ['range', 'slabs', i] })),
  ]
  for (const { slab, path } of systems) {
    if (slab && slab.weight === undefined) {
      context.addIssue({
        code: 'custom',
        path: [...path, 'weight'],
        message: 'The construction stage needs the weight of the slab before it is stiff, kN/m².',
      })
    }
  }
})

export type StudyInput = z.infer<typeof StudyInputSchema>

/** First reason that left an arrangement out, in the order in which they are asked. */
export const REJECTIONS = [
  'column-in-keep-clear', 'void-cuts-beam', 'column-unheld', 'slab-direction', 'slab-span',
  'secondary-spacing', 'piece-length', 'no-section', 'depth-cap', 'buildability',
] as const
export type Rejection = typeof REJECTIONS[number]

export type MemberKind = 'secondary' | 'primary' | 'edge' | 'trimmer' | 'tie' | 'column'
export type Direction = 'x' | 'y'

export interface StudyCounts {
  range: number
  examined: number
  cut: number
  rejected: Partial<Record<Rejection, number>>
  feasible: number
}

/** One member of a scheme; beams carry `from` and `to`, columns `at`; mm. */
export interface SchemeMember {
  mark: string
  kind: MemberKind
  from?: [number, number]
  to?: [number, number]
  at?: [number, number]
  section: string
  governing: string
  utilisation: number
  /** Columns: lifts from the base up, levels counted from 0 at the base. */
  lifts?: { fromLevel: number, toLevel: number, section: string, utilisation: number }[]
  /** Columns: load at the base over all storeys and the roof, own weight included, kN; permanent and variable unfactored. */
  base?: { permanent: number, variable: number, ultimate: number }
}

export interface SchemeResult {
  rank: number
  /** Number of the arrangement in the range, from 1. */
  number: number
  baysX: number[]
  baysY: number[]
  primaryDirection: Direction | 'mixed'
  divisions: number
  regions?: { name: string, primaryDirection: Direction, divisions: number }[]
  /** Index into `range.slabs` where several slab systems were tried. */
  slab?: number
  /** Depth cap under which the sizes were chosen, mm; null = the lightest without a cap. */
  depthCap: number | null
  /** kg */
  beamMass: number
  columnMass: number
  mass: number
  /** kg/m² of slab area */
  massPerArea: number
  /** Deepest beam, mm. */
  depth: number
  pieces: number
  distinctSections: number
  members: SchemeMember[]
  /** Largest relative difference of column reactions and applied load. */
  residual: number
}

export interface StudyResult {
  counts: StudyCounts
  schemes: SchemeResult[]
  /** The first arrangements left out, each with its reason; `place` in grid words where one member is to blame. */
  leftOut: { number: number, rejection: Rejection, detail: string, place: string | null }[]
  /** Ranks of the schemes on the trade-off line. */
  tradeOff: number[]
}
