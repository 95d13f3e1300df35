export { CHOICE_CODES, nationalChoice } from './choices'
export { applyOverrides } from './overrides'
export { categoryGroup, psi } from './psi'
export { areaReduction, storeyReduction } from './reductions'
export { combinationFactors } from './combinations'
export type { CombinationFactors, CombinationName } from './combinations'
export type {
  AreaReduction, BucklingCurve, Category, CategoryGroup, ChoiceCode, ChoiceOverrides, ChoiceValueName, CurveBand,
  DeflectionAdvice, ImposedLoad, LtbRules, NationalChoice, Override, Psi, StoreyReduction, ValueSource,
} from './types'
