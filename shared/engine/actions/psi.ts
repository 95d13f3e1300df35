import type { Category, CategoryGroup, NationalChoice, Psi } from './types'

/** The row of EN 1990 Table A1.1 that a category of use belongs to. */
export function categoryGroup(category: Category): CategoryGroup {
  return category.charAt(0) as CategoryGroup
}

/** ψ0, ψ1, ψ2 of a category of use (EN 1990 Table A1.1 or its national form). */
export function psi(choice: NationalChoice, category: Category): Psi {
  return choice.psi[categoryGroup(category)]
}
