import type { Category } from '#shared/schemas/plate'

/** Categories of use in a word or two, EN 1991-1-1 Tables 6.1, 6.3, 6.7 and 6.9. */
export const CATEGORY_WORDS: Record<Category, string> = {
  A: 'residential', B: 'offices', C: 'people may gather', C1: 'with tables', C2: 'with fixed seats',
  C3: 'free to move about', C4: 'physical activities', C5: 'large crowds', D: 'shopping', D1: 'retail shops',
  D2: 'department stores', E: 'storage', E1: 'storage, libraries', E2: 'industrial use', F: 'vehicles to 30 kN',
  G: 'vehicles to 160 kN', H: 'roofs',
}
