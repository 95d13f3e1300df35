/** What a scheme weighs and counts: steel of one floor, allowances on their own lines. kg, m², mm. */
import type { Basis } from '#shared/schemas/basis'

export interface SteelMass {
  /** Beams of one floor, without allowances, kg. */
  beamMass: number
  /** All columns over all storeys ÷ storeys, kg. */
  columnMass: number
  /** Beams and columns with the connection allowance, and the bracing allowance, kg. */
  mass: number
  /** kg/m² of slab area */
  massPerArea: number
}

/** (beams + columns) × (1 + connection allowance) + bracing allowance × slab area (m²). */
export function steelMass(beamMass: number, columnMass: number, slabArea: number, basis: Basis): SteelMass {
  const mass = (beamMass + columnMass) * (1 + basis.connectionAllowance) + basis.bracingAllowance * slabArea
  return { beamMass, columnMass, mass, massPerArea: mass / slabArea }
}

/** Exact halves of a gram are common (0.1 kg/m times whole millimetres): this lifts them all to the same side. */
const HALF_GRAM_MARGIN = 1e-4

/** Masses are compared to the gram, so that the order of adding up decides nothing. */
export function grams(mass: number): number {
  return Math.round(mass * 1000 + HALF_GRAM_MARGIN)
}

export { type Piece, heaviestPiece, longestPiece, protectionArea } from './pieces'
