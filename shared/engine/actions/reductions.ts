import { EngineError } from '../errors'
import { categoryGroup, psi } from './psi'
import type { Category, NationalChoice } from './types'

/**
 * αA, reduction of imposed load with the loaded area (m²): EN 1991-1-1 (6.1) or its national form.
 * Never together with αn on one element (3.3.1(2), 6.2.2). Throws where the area is not positive.
 */
export function areaReduction(choice: NationalChoice, category: Category, areaM2: number): number {
  if (!(areaM2 > 0)) throw new EngineError('not-positive', 'The loaded area must be greater than 0 m².', 'area')
  const rule = choice.areaReduction
  const group = categoryGroup(category)
  switch (rule.kind) {
    case 'none': return 1
    case 'en': {
      if (!rule.categories.includes(group)) return 1
      const value = rule.psi0Factor * psi(choice, category).psi0 + rule.referenceArea / areaM2
      const least = group === 'C' || group === 'D' ? rule.leastForCAndD : 0
      return Math.min(1, Math.max(least, value))
    }
    case 'linear':
      return rule.categories.includes(group) ? Math.max(rule.least, 1 - areaM2 / rule.perArea) : 1
    case 'hyperbola': {
      const band = rule.bases.find(({ categories }) => categories.includes(group))
      return band ? Math.min(1, band.base + rule.referenceArea / areaM2) : 1
    }
  }
}

/**
 * αn, reduction of imposed load with the number of loaded storeys above a column or wall:
 * EN 1991-1-1 (6.2) or its national form. Throws where n is not a whole number of at least 1.
 */
export function storeyReduction(choice: NationalChoice, category: Category, n: number): number {
  if (!Number.isInteger(n) || n < 1) throw new EngineError('not-positive', 'The number of storeys must be a whole number of at least 1.', 'storeys')
  const rule = choice.storeyReduction
  if (rule.kind === 'none' || !rule.categories.includes(categoryGroup(category))) return 1
  switch (rule.kind) {
    case 'en': {
      const { psi0 } = psi(choice, category)
      return n > 2 ? (2 + (n - 2) * psi0) / n : 1
    }
    case 'steps':
      return n <= 5 ? (11 - n) / 10 : n <= 10 ? 0.6 : 0.5
    case 'hyperbola':
      return n > 2 ? Math.min(1, rule.base + rule.numerator / n) : 1
  }
}
