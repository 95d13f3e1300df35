import type { CombinationName } from '../actions'
import type { Section } from '../sections'
import type { CheckName } from './types'

export interface SegmentVerification {
  from: number
  to: number
  /** Under a slab that is fixed to the flange: no lateral-torsional buckling. */
  held: boolean
  /** Nmm, largest in the segment. */
  MEd: number
  /** Nmm; null where held or without moment. */
  Mcr: number | null
  /** Mcr over the closed form for uniform moment and the segment's length; null for a run with restraints inside. */
  C1: number | null
  lambdaLT: number | null
  chiLT: number
  /** kc where f is used, and the C1 that it comes from (null: Table 6.6, or restraints inside). */
  kc: number | null
  kcC1?: number | null
  MbRd: number
  utilisation: number | null
}

/** One load case under one combination. N, mm. */
export interface CaseVerification {
  name: string
  stage: 'service' | 'construction'
  combination: CombinationName
  MEd: number
  /** Where MEd acts, mm from the left end. */
  MEdAt: number
  VEd: number
  McRd: number
  VplRd: number
  /** Shear buckling, N; null where hw/tw ≤ 72ε/η. */
  VbwRd: number | null
  /** Of the governing segment (highest utilisation). */
  Mcr: number | null
  lambdaLT: number | null
  chiLT: number
  MbRd: number
  /** Index of the governing segment; null under continuous restraint. */
  governingSegment: number | null
  segments: SegmentVerification[]
  /** Place and values of the highest M/M_V,Rd. */
  bendingAt: { x: number, M: number, V: number, rho: number, MvRd: number }
  utilisation: { bending: number, shear: number, buckling: number | null }
}

export interface EndReaction { permanent: number, variable: number, accompanying: number, ultimate: number }

export interface BeamVerification {
  fy: number
  class: 1 | 2 | 3 | 4
  /** Service under each combination, then each construction case. */
  cases: CaseVerification[]
  /** Index in `cases` of the service combination with the larger MEd: what is shown. */
  shown: number
  reactions: { left: EndReaction, right: EndReaction }
  /** mm, at the place where each is largest. */
  deflection: { variable: number, total: number, atVariable: number, atTotal: number }
  /** Hz, 18/√δ under permanent + share · variable; null without any load. */
  frequency: number | null
  /** mm, the δ of the frequency. */
  frequencyDeflection: number
  /** Of the shown combination; null = no such limit. `construction`: the highest of its cases. */
  utilisation: {
    bending: number
    shear: number
    buckling: number | null
    deflectionVariable: number | null
    deflectionTotal: number | null
    frequency: number | null
    construction: number | null
  }
  /** Highest of all checks under all combinations, and its name. */
  largest: number
  governing: CheckName
  /** largest ≤ utilisation limit, and class 1, 2 or 3. */
  passes: boolean
  notes: string[]
}

export interface SizedSection { section: Section, utilisation: number, governing: CheckName }
