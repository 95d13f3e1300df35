/** Choosing few sections for many groups of members. Masses in kg/m, weights in m, costs in kg. */

export interface SelectionGroup {
  /** Metres of steel in the group: its mass is this times the mass per metre of its section. */
  weight: number
  /** Sections that pass for every member of the group, by index, rising. */
  passing: readonly number[]
}

export interface SelectionProblem {
  /** kg/m of each section. */
  masses: readonly number[]
  groups: readonly SelectionGroup[]
}

export interface Selection {
  /** Sections chosen and used, by index, rising. */
  sections: number[]
  /** Section of each group: the lightest of those chosen that passes. */
  choice: number[]
  /** kg */
  cost: number
  /** No selection of so many sections is lighter, kg. */
  bound: number
  /** The bound proves the cost, to half a gram. */
  isOptimal: boolean
}

/** Offers a selection of at most `most` sections of a small problem; it is checked, and never believed to be the best. */
export type Proposal = (problem: SelectionProblem, most: number) => number[] | null

/** Costs closer than this are one: masses are compared to the gram. kg */
export const HALF_A_GRAM = 0.0005

/** A problem as numbers side by side: `costs[section · groups + group]`, Infinity where the section does not pass. */
export interface CostTable {
  groups: number
  sections: number
  costs: Float64Array
}

export function costTable({ masses, groups }: SelectionProblem): CostTable {
  const costs = new Float64Array(masses.length * groups.length).fill(Infinity)
  groups.forEach(({ weight, passing }, g) => {
    for (const s of passing) costs[s * groups.length + g] = weight * masses[s]!
  })
  return { groups: groups.length, sections: masses.length, costs }
}

/** kg of the groups with these sections alone; Infinity where a group has none. */
export function costWith({ groups, costs }: CostTable, chosen: readonly number[]): number {
  let sum = 0
  for (let g = 0; g < groups; g++) {
    let least = Infinity
    for (const s of chosen) least = Math.min(least, costs[s * groups + g]!)
    sum += least
  }
  return sum
}
