/** The lightest selections of at most 1, 2, 3 … sections. */
import { type BranchOptions, type PartSelection, lightestSelection } from './branch'
import { smallestCover } from './cover'
import { reducedParts } from './reduce'
import { HALF_A_GRAM, type Proposal, type Selection, type SelectionProblem, costTable, costWith } from './types'

export interface SelectionOptions {
  /** Places of the search tree per part and number of sections; beyond, the answer is the best found. */
  work?: number
  proposal?: Proposal
}

const DEFAULT_WORK = 20_000

/**
 * For each number of sections from 1 to `most` the least cost with at most so many; null where so few
 * cannot serve every group, which is proved. Never heavier with more sections.
 */
export function leastMassSelections(problem: SelectionProblem, most: number, options: SelectionOptions = {}): (Selection | null)[] {
  if (problem.groups.some(group => group.passing.length === 0)) return new Array<null>(most).fill(null)
  const branching: BranchOptions = { work: options.work ?? DEFAULT_WORK, proposal: options.proposal }
  const parts = reducedParts(problem)
  let together: (PartSelection | null)[] = [{ sections: [], cost: 0, bound: 0 }, ...new Array<null>(most).fill(null)]
  for (const { problem: part, sections } of parts) {
    const room = most - (parts.length - 1)
    const own = partCurve(part, room, branching).map(found => found && { ...found, sections: found.sections.map(s => sections[s]!) })
    together = combined(together, own, most)
  }
  const best: (Selection | null)[] = []
  for (let k = 1; k <= most; k++) {
    const before = best[k - 2] ?? null
    const found = together[k] ?? null
    best.push(found && (!before || found.cost < before.cost - HALF_A_GRAM) ? selection(problem, found) : found && before && { ...before, ...proof(before.cost, found.bound) })
  }
  return best
}

/** The lightest selection of at most `most` sections, or null where so few cannot serve every group. */
export function leastMassSelection(problem: SelectionProblem, most: number, options: SelectionOptions = {}): Selection | null {
  return leastMassSelections(problem, most, options)[most - 1] ?? null
}

/** Index k: the part with at most k sections. */
function partCurve(problem: SelectionProblem, most: number, options: BranchOptions): (PartSelection | null)[] {
  const curve: (PartSelection | null)[] = new Array<null>(most + 1).fill(null)
  let from = smallestCover(problem, most)
  if (!from) return curve
  const table = costTable(problem)
  const least = costWith(table, problem.masses.map((_, s) => s))
  for (let k = from.length; k <= most; k++) {
    const last = curve[k - 1]
    if (last && last.cost <= least + HALF_A_GRAM) {
      curve[k] = last
      continue
    }
    const found = lightestSelection(problem, k, from, options)
    curve[k] = { ...found, bound: Math.max(found.bound, least) }
    from = found.sections
  }
  return curve
}

/** Two independent parts share the number of sections as is lightest. */
function combined(a: readonly (PartSelection | null)[], b: readonly (PartSelection | null)[], most: number): (PartSelection | null)[] {
  return Array.from({ length: most + 1 }, (_, k) => {
    let best: PartSelection | null = null
    let bound = Infinity
    for (let n = 0; n <= k; n++) {
      const [left, right] = [a[n], b[k - n]]
      if (!left || !right) continue
      bound = Math.min(bound, left.bound + right.bound)
      const cost = left.cost + right.cost
      if (!best || cost < best.cost) best = { sections: [...left.sections, ...right.sections], cost, bound }
    }
    return best && { ...best, bound }
  })
}

function proof(cost: number, bound: number): Pick<Selection, 'bound' | 'isOptimal'> {
  return { bound: Math.min(bound, cost), isOptimal: cost - bound <= HALF_A_GRAM }
}

/** The choice of every group, and the cost counted anew from it. */
function selection({ masses, groups }: SelectionProblem, { sections, bound }: PartSelection): Selection {
  const lightest = [...sections].sort((a, b) => masses[a]! - masses[b]! || a - b)
  const choice = groups.map(({ passing }) => {
    const passes = new Set(passing)
    return lightest.find(s => passes.has(s))!
  })
  const cost = groups.reduce((sum, { weight }, g) => sum + weight * masses[choice[g]!]!, 0)
  return { sections: [...new Set(choice)].sort((a, b) => a - b), choice, cost, ...proof(cost, bound) }
}
