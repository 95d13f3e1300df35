/** Modulus of elasticity, N/mm² (EN 1993-1-1:2005 3.2.6). */
export const E = 210_000
/** Shear modulus, N/mm² (EN 1993-1-1:2005 3.2.6). */
export const G = 81_000
/** Poisson's ratio (EN 1993-1-1:2005 3.2.6). */
export const POISSON = 0.3
/** m/s²: N per kg of nominal mass. */
export const GRAVITY = 9.81
/** kg/m³ (EN 1991-1-1 Table A.4). */
export const STEEL_DENSITY = 7850

export type Grade = 'S235' | 'S275' | 'S355' | 'S460'
export const GRADES: readonly Grade[] = ['S235', 'S275', 'S355', 'S460']

/** `product-standard`: EN 10025-2 and -4 by thickness; `en-1993`: Table 3.1 of EN 1993-1-1. */
export type YieldRule = 'product-standard' | 'en-1993'

type Steps = readonly (readonly [thickness: number, fy: number])[]

const PRODUCT_STANDARD: Record<Grade, Steps> = {
  S235: [[16, 235], [40, 225], [63, 215], [80, 215], [100, 215], [150, 195]],
  S275: [[16, 275], [40, 265], [63, 255], [80, 245], [100, 235], [150, 225]],
  S355: [[16, 355], [40, 345], [63, 335], [80, 325], [100, 315], [150, 295]],
  S460: [[16, 460], [40, 440], [63, 430], [80, 410], [100, 400], [120, 385]],
}

const EN_1993_TABLE_3_1: Record<Grade, Steps> = {
  S235: [[40, 235], [80, 215]],
  S275: [[40, 275], [80, 255]],
  S355: [[40, 355], [80, 335]],
  S460: [[40, 460], [80, 430]],
}

/**
 * Yield strength fy, N/mm², for the thickness (mm) of the thickest element.
 * EN 10025-2 (S235 … S355), EN 10025-4 (S460 M/ML), or EN 1993-1-1:2005 Table 3.1.
 * `null` where the grade is not offered at that thickness.
 */
export function yieldStrength(grade: Grade, thickness: number, rule: YieldRule): number | null {
  const steps = (rule === 'en-1993' ? EN_1993_TABLE_3_1 : PRODUCT_STANDARD)[grade]
  for (const [limit, fy] of steps) {
    if (thickness <= limit) return fy
  }
  return null
}
