/** Basis of design: what the sizing of every member rests on. */
import { z } from 'zod'
import './words'

export const FAMILIES = ['UB', 'UC', 'IPE', 'IPE A', 'HEAA', 'HEA', 'HEB', 'HEM'] as const
export const FamilySchema = z.enum(FAMILIES)
export const GRADES = ['S235', 'S275', 'S355', 'S460'] as const
export const GradeSchema = z.enum(GRADES)
export const NATIONAL_CHOICES = ['EN', 'UK', 'IE', 'DE', 'FR', 'NL', 'SE'] as const
export const NationalChoiceSchema = z.enum(NATIONAL_CHOICES)

export const MemberBasisSchema = z.strictObject({
  grade: GradeSchema,
  families: z.array(FamilySchema).min(1).max(FAMILIES.length)
    .refine(list => new Set(list).size === list.length, 'A family stands in the list twice.'),
})

/** A span limit: deflection ≤ span / value. */
const spanRatio = z.number().min(50).max(5000).nullable()

export const LimitsSchema = z.strictObject({
  variable: spanRatio,
  total: spanRatio,
  /** Least frequency of each beam alone, Hz. */
  frequency: z.number().min(0.1).max(50).nullable(),
  variableShare: z.number().min(0).max(1),
  /** Least frequency of the floor, 18/√(δ secondary + δ primary), Hz. */
  floorFrequency: z.number().min(0.1).max(50).nullable().default(null),
})

export const BuildabilitySchema = z.strictObject({
  secondaryNotDeeper: z.boolean(),
  /** Least flange width under slab on both sides, mm; 30 mm less with slab on one side. */
  minFlangeWidth: z.number().min(0).max(1000).nullable(),
  /** Longest piece, mm. */
  maxPiece: z.number().min(1000).max(100_000).nullable(),
})

/** A value the user puts in place of the national one; printed wherever results are. */
export const OverridesSchema = z.strictObject({
  gammaM0: z.number().min(0.5).max(2).optional(),
  gammaM1: z.number().min(0.5).max(2).optional(),
  gammaG: z.number().min(0.5).max(2).optional(),
  gammaQ: z.number().min(0.5).max(2.5).optional(),
  xi: z.number().min(0.5).max(1).optional(),
  eta: z.number().min(1).max(1.2).optional(),
})

export const BasisSchema = z.strictObject({
  nationalChoice: NationalChoiceSchema,
  overrides: OverridesSchema.default({}),
  combination: z.enum(['6.10', '6.10ab']),
  criticalMoment: z.enum(['by-segment', 'whole-beam']),
  ltbMethod: z.enum(['6.3.2.3', '6.3.2.2']),
  useF: z.boolean(),
  constructionStage: z.boolean(),
  secondary: MemberBasisSchema,
  primary: MemberBasisSchema,
  column: MemberBasisSchema,
  limits: LimitsSchema,
  buildability: BuildabilitySchema,
  /** Share of the steel's mass, 0.1 = 10 %. */
  connectionAllowance: z.number().min(0).max(1),
  /** kg/m² on the slab area. */
  bracingAllowance: z.number().min(0).max(100).default(0),
  utilisationLimit: z.number().min(0.1).max(1).default(1),
  reductions: z.strictObject({ area: z.boolean(), storeys: z.boolean() })
    .default({ area: false, storeys: false }),
  /** Storeys in one column lift. */
  liftStoreys: z.int().min(1).max(4).default(2),
  /** Least spacing of secondary beams, mm; none by default. */
  minSecondarySpacing: z.number().min(0).max(20_000).nullable().default(null),
  /** How far outside a void's edge a beam line still trims it, mm. */
  trimDistance: z.int().min(0).max(2000).default(600),
})

export type Basis = z.infer<typeof BasisSchema>
export type BasisInput = z.input<typeof BasisSchema>
export type MemberBasis = z.infer<typeof MemberBasisSchema>
