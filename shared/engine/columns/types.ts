/** Columns of simple construction over all storeys. N, mm. */
import type { CombinationFactors, NationalChoice } from '../actions'
import type { VariableKind, Axis } from '../plate'
import type { Grade } from '../materials'
import type { Section } from '../sections'

/** One beam end at a column on one floor: `side` +1 where the beam lies towards larger coordinates. */
export interface BeamEnd {
  axis: Axis
  side: 1 | -1
  permanent: number
  /** By variable kind. */
  variable: number[]
  /** Loaded area, m²: what the roof brings is measured by it. */
  area: number
}

export interface ColumnDemand {
  web: Axis
  /** What stands on the column itself: no moment. */
  direct: Omit<BeamEnd, 'axis' | 'side'>
  ends: BeamEnd[]
  /** Floors, from the lowest, on which nothing holds the column along the axis. */
  unheldFloors: Record<Axis, number>
  /** By how much an unbalanced permanent reaction may be smaller along an axis, N: for bounds only. */
  relief?: Record<Axis, number>
}

export interface ColumnRules {
  choice: NationalChoice
  combinations: CombinationFactors[]
  kinds: VariableKind[]
  grade: Grade
  sections: readonly Section[]
  storeys: number
  /** mm */
  storeyHeight: number
  liftStoreys: number
  /** kN/m² = N/mm² · 1000; null = no roof. */
  roof: { permanent: number, variable: number } | null
  reducesByStoreys: boolean
  ltbMethod: '6.3.2.3' | '6.3.2.2'
  utilisationLimit: number
}

/** One length of the column between two levels, verified. kN-free: N, Nmm. */
export interface ColumnLength {
  /** Level at the foot; the length reaches to the next one. */
  fromLevel: number
  NEd: number
  MyEd: number
  MzEd: number
  LcrY: number
  LcrZ: number
  NbYRd: number
  NbZRd: number
  MbRd: number
  MczRd: number
  combination: string
  method: 'simple construction' | '6.3.3 Annex B'
  /** Parts of the expression: axial, about y, about z. */
  parts: [number, number, number]
  utilisation: number
}

export interface ColumnLift {
  fromLevel: number
  toLevel: number
  section: Section
  utilisation: number
  lengths: ColumnLength[]
}

export interface SizedColumn {
  /** From the base upwards. */
  lifts: ColumnLift[]
  /** All lifts, kg. */
  mass: number
  /** At the base, own weight of the column included, N. */
  base: { permanent: number, variable: number, ultimate: number }
}
