/** What cost and erection ask of the pieces: fire-protection area, heaviest and longest piece. */
import type { Section } from '../sections'

export interface Piece {
  section: Section
  /** mm */
  length: number
  /** Sides exposed to fire: three under a slab, four for columns and beams without slab. */
  sides: 3 | 4
}

/** Surface to protect, m²: perimeter, less the flange under the slab where three sides are exposed. */
export function protectionArea(pieces: readonly Piece[]): number {
  return pieces.reduce((sum, { section, length, sides }) =>
    sum + (section.perimeter - (sides === 3 ? section.b : 0)) * length / 1e6, 0)
}

/** kg */
export function heaviestPiece(pieces: readonly Piece[]): number {
  return pieces.reduce((most, { section, length }) => Math.max(most, section.mass * length / 1000), 0)
}

/** mm */
export function longestPiece(pieces: readonly Piece[]): number {
  return pieces.reduce((most, { length }) => Math.max(most, length), 0)
}
