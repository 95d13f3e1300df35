import type { SectionClass } from './classification'

/** N, Nmm. χ and λ̄ of 6.3.1 and 6.3.2; Cm of Table B.3. Moments as absolute values. */
export interface InteractionInput {
  NEd: number
  MyEd: number
  MzEd: number
  NRk: number
  MyRk: number
  MzRk: number
  chiY: number
  chiZ: number
  chiLT: number
  lambdaY: number
  lambdaZ: number
  Cmy: number
  Cmz: number
  CmLT: number
  gammaM1: number
  sectionClass: SectionClass
}

export interface Interaction { kyy: number, kyz: number, kzy: number, kzz: number, eq661: number, eq662: number }

/** Cm of a linear diagram, ψ = ratio of the end moments: 0.6 + 0.4ψ ≥ 0.4. EN 1993-1-1:2005 Table B.3. */
export function cmLinear(psi: number): number {
  return Math.max(0.4, 0.6 + 0.4 * psi)
}

/** kzy of members susceptible to torsional deformations. EN 1993-1-1:2005 Table B.2. */
function kzyTorsional(lambdaZ: number, nz: number, CmLT: number, factor: number): number {
  const least = 1 - factor / (CmLT - 0.25) * nz
  if (factor === 0.1 && lambdaZ < 0.4) return Math.min(0.6 + lambdaZ, 1 - factor * lambdaZ / (CmLT - 0.25) * nz)
  return Math.max(1 - factor * lambdaZ / (CmLT - 0.25) * nz, least)
}

/**
 * (6.61) and (6.62) with the interaction factors of Annex B (Tables B.1 and B.2), rolled I sections
 * susceptible to torsional deformations, classes 1 to 3. EN 1993-1-1:2005 6.3.3(4). eq ≤ 1 passes.
 */
export function interactionAnnexB(input: InteractionInput): Interaction {
  const { NEd, MyEd, MzEd, NRk, MyRk, MzRk, chiY, chiZ, chiLT, lambdaY, lambdaZ, Cmy, Cmz, CmLT, gammaM1 } = input
  const ny = NEd / (chiY * NRk / gammaM1)
  const nz = NEd / (chiZ * NRk / gammaM1)
  const plastic = input.sectionClass <= 2
  const kyy = plastic
    ? Math.min(Cmy * (1 + (lambdaY - 0.2) * ny), Cmy * (1 + 0.8 * ny))
    : Math.min(Cmy * (1 + 0.6 * lambdaY * ny), Cmy * (1 + 0.6 * ny))
  const kzz = plastic
    ? Math.min(Cmz * (1 + (2 * lambdaZ - 0.6) * nz), Cmz * (1 + 1.4 * nz))
    : Math.min(Cmz * (1 + 0.6 * lambdaZ * nz), Cmz * (1 + 0.6 * nz))
  const kyz = plastic ? 0.6 * kzz : kzz
  const kzy = kzyTorsional(lambdaZ, nz, CmLT, plastic ? 0.1 : 0.05)
  const y = MyEd / (chiLT * MyRk / gammaM1)
  const z = MzEd / (MzRk / gammaM1)
  return { kyy, kyz, kzy, kzz, eq661: ny + kyy * y + kyz * z, eq662: nz + kzy * y + kzz * z }
}
