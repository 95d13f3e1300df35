import type { NationalChoice } from './types'

export type CombinationName = '6.10' | '6.10a' | '6.10b'

/** Factors of the permanent, variable and accompanying (Σψ0·Q) parts of an effect. */
export interface CombinationFactors {
  name: CombinationName
  permanent: number
  variable: number
  accompanying: number
}

/**
 * Design combinations of EN 1990 Table A1.2(B) for permanent and imposed load, all imposed loads
 * of a floor being one action (EN 1991-1-1 3.3.1(2)). ξ·γG is not rounded.
 */
export function combinationFactors(choice: NationalChoice, rule: '6.10' | '6.10ab'): CombinationFactors[] {
  if (rule === '6.10') {
    return [{ name: '6.10', permanent: choice.gammaG, variable: choice.gammaQ, accompanying: 0 }]
  }
  return [
    { name: '6.10a', permanent: choice.gammaG, variable: 0, accompanying: choice.gammaQ },
    { name: '6.10b', permanent: choice.xi * choice.gammaG, variable: choice.gammaQ, accompanying: 0 },
  ]
}
