/** One arrangement framed: beams with their loads and supports, columns with what meets them. mm, N. */
import type { Axis, BayGrid, Grid, Interval } from '../plate'

export interface RegionFraming { direction: Axis, divisions: number }

/** Grid lines and the framing of each region, in the order of the plate's regions (one without regions). */
export interface Arrangement { grid: Grid, regions: RegionFraming[] }

export type BeamKind = 'trimmer' | 'edge' | 'tie' | 'primary' | 'secondary'

/** Load on a stretch of a beam; positions from the beam's `from` end. */
export interface StretchLoad {
  from: number
  to: number
  load: number[]
  /** Slab on the side of smaller (−1) or larger (+1) coordinates; 0 for line loads and strips. */
  side: -1 | 0 | 1
}

export interface SpotLoad { at: number, load: number[] }

export type Support
  = { kind: 'column', column: number }
    | { kind: 'beam', beam: number, at: number }

export interface FrameBeam {
  axis: Axis
  /** Coordinate across the beam. */
  at: number
  from: number
  to: number
  /** Parallel to the primary beams of a region beside it. */
  isParallelToPrimaries: boolean
  isOnOutline: boolean
  isTrimmer: boolean
  kind: BeamKind
  stretches: StretchLoad[]
  spots: SpotLoad[]
  /** Places from `from` where a fixed slab bears, in service and in the construction stage. */
  held: Interval[]
  heldInConstruction: Interval[]
  /** On how many sides a slab bears that spans to another beam, and its system. */
  slabSides: number
  hasSlab: boolean
  supports: [Support, Support]
  /** Beams that end on it, with the place from `from`. */
  carries: { beam: number, at: number, end: 0 | 1 }[]
  /** Distance to the next parallel column line before and behind, for ties; mm. */
  tieSpacing: number
}

export interface FrameColumn {
  i: number
  j: number
  x: number
  y: number
  /** Beam ends that the column carries. */
  ends: { beam: number, end: 0 | 1 }[]
  /** Slab and line load that stands on the column itself. */
  direct: number[]
  /** Direction of the primary beams around; x where they differ. */
  web: Axis
  /**
   * Floors, from the lowest, on which no beam along the axis meets the column: 0 = held on every
   * floor; Infinity = no beam along it on any floor.
   */
  unheldFloors: Record<Axis, number>
}

export interface Frame {
  bays: BayGrid
  beams: FrameBeam[]
  columns: FrameColumn[]
  /** Beams in an order in which each comes after all that it carries. */
  order: number[]
  /** Longest slab span between two beams, mm. */
  longestSlabSpan: number
}

export type FramingRejection
  = 'column-in-keep-clear' | 'void-cuts-beam' | 'column-unheld' | 'slab-direction' | 'slab-span' | 'secondary-spacing' | 'piece-length'

/** An arrangement that cannot be built as asked, with the first reason and its place in words. */
export interface Rejected { rejection: FramingRejection, detail: string }

/** A stretch before its loads: what the steps of the framing pass on. */
export interface BeamLine {
  axis: Axis
  at: number
  from: number
  to: number
  isParallelToPrimaries: boolean
  isOnOutline: boolean
  isTrimmer: boolean
}
