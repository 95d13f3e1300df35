/**
 * What a beam is to the engine: one simply supported span with fork ends, the loads on it and
 * what holds its compression flange, in service and while the floor is built.
 * Units: N, mm. 1 kN/m = 1 N/mm.
 */
import type { NationalChoice } from '../actions'

/** Where a load acts: `top` = at zg = +h/2 on a flange free to move; `shear-centre` = zg 0. */
export type LoadHeight = 'top' | 'shear-centre'

/**
 * One load in its three parts. `accompanying` is Σ ψ0,i · variable,i (each load has the ψ0 of its
 * own category); it is what 6.10a counts. Line loads in N/mm, point loads in N.
 */
export interface LoadParts {
  permanent: number
  variable: number
  accompanying: number
}

export interface BeamLineLoad extends LoadParts { from: number, to: number, height: LoadHeight }
export interface BeamPointLoad extends LoadParts { at: number, height: LoadHeight }

/**
 * What holds the compression flange: stretches under a slab that is fixed to the flange, and
 * points (a connected beam: lateral and torsional, a fork). The ends are always forks.
 * Stretches are disjoint and rising; points inside a stretch count for nothing.
 */
export interface Restraint {
  held: { from: number, to: number }[]
  points: number[]
}

export interface LoadCase {
  /** Shown to the user, e.g. "in service", "construction, planks on one side". */
  name: string
  line: BeamLineLoad[]
  point: BeamPointLoad[]
  restraint: Restraint
}

export interface Beam {
  span: number
  /** Own weight = nominal mass × 9.81, at the shear centre, in every case. */
  selfWeight: boolean
  service: LoadCase
  /** Ultimate checks only; partial factors of the construction stage are those of 6.10. */
  construction: LoadCase[]
}

export interface ServiceLimits {
  /** span / value for the variable load; null = no limit. */
  variable: number | null
  total: number | null
  /** Hz, of the beam alone. */
  frequency: number | null
  /** Share of the variable load that vibrates with the permanent load, 0 … 1. */
  variableShare: number
}

export interface BeamRules {
  choice: NationalChoice
  combination: '6.10' | '6.10ab'
  criticalMoment: 'by-segment' | 'whole-beam'
  ltbMethod: '6.3.2.3' | '6.3.2.2'
  useF: boolean
  limits: ServiceLimits
  /** Largest accepted utilisation, 1 by default. */
  utilisationLimit: number
}

/** Names of checks as the contracts use them. */
export type CheckName
  = 'bending' | 'shear' | 'buckling' | 'deflectionVariable' | 'deflectionTotal' | 'frequency'
    | 'construction' | 'tie' | 'stability'
