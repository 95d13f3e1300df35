import type { YieldRule } from '../materials'

export type ChoiceCode = 'EN' | 'UK' | 'IE' | 'DE' | 'FR' | 'NL' | 'SE'

/** Categories of use, EN 1991-1-1 Tables 6.1, 6.3, 6.7, 6.9. */
export type Category
  = 'A' | 'B' | 'C' | 'C1' | 'C2' | 'C3' | 'C4' | 'C5' | 'D' | 'D1' | 'D2' | 'E' | 'E1' | 'E2' | 'F' | 'G' | 'H'
/** Categories that share one row of ψ factors (EN 1990 Table A1.1). */
export type CategoryGroup = 'A' | 'B' | 'C' | 'D' | 'E' | 'F' | 'G' | 'H'

export interface Psi { psi0: number, psi1: number, psi2: number }

/** qk kN/m², Qk kN (EN 1991-1-1 Table 6.2 or its national form); null = not given there. */
export interface ImposedLoad { qk: number | null, Qk: number | null }

export type BucklingCurve = 'a0' | 'a' | 'b' | 'c' | 'd'

/** Curve for h/b up to `upTo` (inclusive); the last band is open (null). */
export interface CurveBand { upTo: number | null, curve: BucklingCurve }

export interface LtbRules {
  /** 6.3.2.3, rolled sections: λ̄LT,0, β and the curves by h/b. */
  rolled: { plateau: number, beta: number, curves: readonly CurveBand[] }
  /** 6.3.2.2, general case: the curves of Table 6.4; plateau 0.2. */
  general: { plateau: number, curves: readonly CurveBand[] }
  /** kc of 6.3.2.3(2). */
  kcRule: 'table-6.6' | '1/sqrt(C1)'
}

/** 5/7 ψ0 + A0/A ≤ 1, at least `leastForCAndD` for C and D (EN 1991-1-1 (6.1)). */
interface AreaReductionEn { kind: 'en', psi0Factor: number, referenceArea: number, leastForCAndD: number, categories: readonly CategoryGroup[] }
/** 1 − A/`perArea` ≥ `least`. */
interface AreaReductionLinear { kind: 'linear', perArea: number, least: number, categories: readonly CategoryGroup[] }
/** base + A0/A ≤ 1, base by category. */
interface AreaReductionHyperbola { kind: 'hyperbola', referenceArea: number, bases: readonly { categories: readonly CategoryGroup[], base: number }[] }

/** αA by loaded area (m²); 1 for categories not named. */
export type AreaReduction = AreaReductionEn | AreaReductionLinear | AreaReductionHyperbola | { kind: 'none' }

/** (2 + (n − 2) ψ0)/n for n > 2 (EN 1991-1-1 (6.2)). */
interface StoreyReductionEn { kind: 'en', categories: readonly CategoryGroup[] }
/** 1.1 − n/10 to n = 5, 0.6 to n = 10, 0.5 above. */
interface StoreyReductionSteps { kind: 'steps', categories: readonly CategoryGroup[] }
/** base + numerator/n ≤ 1 for n > 2. */
interface StoreyReductionHyperbola { kind: 'hyperbola', base: number, numerator: number, categories: readonly CategoryGroup[] }

/** αn by number of loaded storeys above; 1 for categories not named. */
export type StoreyReduction = StoreyReductionEn | StoreyReductionSteps | StoreyReductionHyperbola | { kind: 'none' }

/** One advisory deflection limit: span / `ratio`. */
export interface DeflectionAdvice { what: string, load: 'variable' | 'total', ratio: number }

/** Where a value comes from. `from-memory`: not read in a source; the user is told to confirm it. */
export interface ValueSource { source: string, status: 'sourced' | 'from-memory' }

/** Names of the values of a national choice, as sources and overrides use them. */
export type ChoiceValueName
  = 'gammaM0' | 'gammaM1' | 'eta' | 'yieldRule' | 'gammaG' | 'gammaQ' | 'xi' | 'combinations' | 'ltbRolled'
    | 'ltbGeneral' | 'kcRule' | 'psi' | 'imposed' | 'areaReduction' | 'storeyReduction' | 'deflection' | 'tiePsi'

/** A set of national choices for EN 1990, EN 1991-1-1, EN 1991-1-7, EN 1993-1-1 and -1-5. */
export interface NationalChoice {
  code: ChoiceCode
  name: string
  gammaM0: number
  gammaM1: number
  /** η of shear area and shear buckling (EN 1993-1-1 6.2.6(3), EN 1993-1-5 5.1). */
  eta: number
  yieldRule: YieldRule
  gammaG: number
  gammaQ: number
  /** ξ of 6.10b; not rounded. */
  xi: number
  combinations: readonly ('6.10' | '6.10ab')[]
  ltb: LtbRules
  psi: Readonly<Record<CategoryGroup, Psi>>
  imposed: Readonly<Partial<Record<Category, ImposedLoad>>>
  areaReduction: AreaReduction
  storeyReduction: StoreyReduction
  deflection: readonly DeflectionAdvice[]
  /** Which ψ goes with qk in the tie force of EN 1991-1-7 A.5. */
  tiePsi: 'psi1' | 'psi2'
  sources: Readonly<Record<ChoiceValueName, ValueSource>>
}

/** Values that a basis of design may set in place of the national ones. */
export interface ChoiceOverrides {
  gammaM0?: number
  gammaM1?: number
  eta?: number
  yieldRule?: YieldRule
  gammaG?: number
  gammaQ?: number
  xi?: number
  ltbPlateau?: number
  ltbBeta?: number
  kcRule?: LtbRules['kcRule']
  tiePsi?: NationalChoice['tiePsi']
  psi?: Partial<Record<CategoryGroup, Psi>>
}

/** One override, in words for the page: "γM1: 1.1 instead of 1.0". */
export interface Override { name: string, from: string, to: string }
