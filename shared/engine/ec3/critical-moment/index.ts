import { E, G } from '../../materials'
import { criticalFactor } from './eigenvalue'
import { buildMesh } from './mesh'

export { criticalFactor, rayleighFactor } from './eigenvalue'
export type { BucklingLoads } from './eigenvalue'
export { ELEMENTS, buildMesh } from './mesh'
export type { BucklingMesh } from './mesh'

/**
 * A piece of beam with uniform line load: M (Nmm) and V (N) at its start, q N/mm; qTop of it acts at
 * zg, and so does PTop (N) at its start. `restrained`: no sway and no twist at its start.
 */
export interface BucklingPiece {
  length: number
  M: number
  V: number
  q: number
  qTop?: number
  PTop?: number
  restrained?: boolean
}

export interface CriticalMomentInput {
  pieces: readonly BucklingPiece[]
  section: { Iz: number, It: number, Iw: number }
  /** mm, positive above the shear centre (towards the compressed flange of a sagging beam). */
  zg: number
  /** Elements on each piece between restraints; without it the mesh chooses (8, or up to 6 on each of several pieces). */
  elements?: number
  shearModulus?: number
}

export interface CriticalMoment { factor: number, Mcr: number, MEd: number }

/** Largest |M| on a piece, Nmm. */
function largestMoment({ length, M, V, q }: BucklingPiece): number {
  const end = M + length * (V - q * length / 2)
  const turn = q === 0 ? -1 : V / q
  const middle = turn > 0 && turn < length ? M + V * turn / 2 : 0
  return Math.max(Math.abs(M), Math.abs(end), Math.abs(middle))
}

/**
 * Elastic critical moment of a stretch between forks, Nmm: the eigenvalue of the Vlasov beam (see
 * `criticalFactor`) times the largest moment. EN 1993-1-1:2005 6.3.2.2(2) leaves the method open.
 */
export function criticalMoment({ pieces, section, zg, elements, shearModulus = G }: CriticalMomentInput): CriticalMoment {
  const x = [0]
  for (const { length } of pieces) x.push(x[x.length - 1]! + length)
  const held = [...pieces.map(piece => piece.restrained ? 1 : 0), 0]
  const mesh = buildMesh(x, 0, pieces.length, held, elements)
  const loads = {
    M: pieces.map(piece => piece.M),
    V: pieces.map(piece => piece.V),
    q: pieces.map(piece => piece.q),
    qTop: pieces.map(piece => piece.qTop ?? 0),
    PTop: pieces.map(piece => piece.PTop ?? 0),
  }
  const MEd = Math.max(...pieces.map(largestMoment))
  const scale = MEd > 0 ? 1 / MEd : 1
  const Mcr = criticalFactor(mesh, loads, zg, E * section.Iz, shearModulus * section.It, E * section.Iw, scale)
  return { factor: Mcr * scale, MEd, Mcr }
}
