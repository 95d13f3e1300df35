import type { BucklingCurve, CurveBand } from '../actions'

/** Imperfection factors by curve. EN 1993-1-1:2005 Tables 6.1 and 6.3. */
export const IMPERFECTION: Readonly<Record<BucklingCurve, number>> = { a0: 0.13, a: 0.21, b: 0.34, c: 0.49, d: 0.76 }

/** The curve of the first band that h/b does not exceed. Tables 6.4, 6.5 or their national forms. */
export function curveFor(hOverB: number, bands: readonly CurveBand[]): BucklingCurve {
  for (const { upTo, curve } of bands) {
    if (upTo === null || hOverB <= upTo) return curve
  }
  return 'd'
}
