/** Branch and bound over the sections of one part: exact unless it meets its limit of work. */
import { CLOSED, OPEN, type Relaxation, UNDECIDED, firstMultipliers, raisedBound } from './bound'
import { type CostTable, HALF_A_GRAM, type Proposal, type SelectionProblem, costTable, costWith } from './types'

export interface PartSelection {
  sections: number[]
  cost: number
  bound: number
}

export interface BranchOptions {
  /** Places of the tree that may be looked at. */
  work: number
  proposal?: Proposal
}

const ROOT_STEPS = 300
const LATER_STEPS = 30

interface Search {
  table: CostTable
  most: number
  best: { sections: number[], cost: number }
  workLeft: number
  /** Least bound of the places that were left unexamined. */
  leftBound: number
}

interface Place { decided: Uint8Array, multipliers: Float64Array }

/** The lightest selection of at most `most` sections, from a selection that serves every group. */
export function lightestSelection(problem: SelectionProblem, most: number, first: readonly number[], options: BranchOptions): PartSelection {
  const table = costTable(problem)
  const start = exchanged(table, [...first], most)
  const search: Search = { table, most, best: { sections: start, cost: costWith(table, start) }, workLeft: options.work, leftBound: Infinity }
  const decided = new Uint8Array(table.sections)
  const root = raisedBound(table, decided, most, search.best.cost, firstMultipliers(table), ROOT_STEPS)
  take(search, exchanged(table, root.taken, most))
  if (root.bound < search.best.cost - HALF_A_GRAM) {
    const proposed = options.proposal?.(problem, most)
    if (proposed && proposed.length <= most) take(search, proposed)
    branch(search, { decided, multipliers: root.multipliers }, root)
  }
  const { sections, cost } = search.best
  return { sections, cost, bound: Math.min(cost, search.leftBound) }
}

function take(search: Search, sections: number[]): void {
  const cost = costWith(search.table, sections)
  if (cost < search.best.cost) search.best = { sections: [...sections], cost }
}

/** Looks at one place after another, the more promising half first; `root` is the bound of the first. */
function branch(search: Search, first: Place, root: Relaxation): void {
  const stack: Place[] = [first]
  for (let isRoot = true; stack.length > 0; isRoot = false) {
    const place = stack.pop()!
    const { decided } = place
    const relaxed = isRoot ? root : raisedBound(search.table, decided, search.most, search.best.cost, place.multipliers, LATER_STEPS)
    take(search, relaxed.taken)
    if (relaxed.bound >= search.best.cost - HALF_A_GRAM) continue
    if (search.workLeft-- <= 0) {
      search.leftBound = Math.min(search.leftBound, relaxed.bound)
      continue
    }
    decide(search, decided, relaxed)
    const free = undecided(decided)
    if (isFull(search, decided, free)) continue
    const pick = free.reduce((a, b) => relaxed.savings[b]! < relaxed.savings[a]! ? b : a)
    for (const state of [CLOSED, OPEN]) {
      const next = decided.slice()
      next[pick] = state
      stack.push({ decided: next, multipliers: relaxed.multipliers })
    }
  }
}

/** Whether nothing is left to decide; the selection that then stands is taken. */
function isFull(search: Search, decided: Uint8Array, free: number[]): boolean {
  const open = opened(decided)
  if (open.length < search.most && open.length + free.length > search.most) return false
  take(search, open.length >= search.most ? open : [...open, ...free])
  return true
}

function undecided(decided: Uint8Array): number[] {
  return Array.from(decided.keys()).filter(s => decided[s] === UNDECIDED)
}

function opened(decided: Uint8Array): number[] {
  return Array.from(decided.keys()).filter(s => decided[s] === OPEN)
}

/** Penalty tests: a section whose taking, or leaving, alone lifts the bound over the best cost is decided. */
function decide(search: Search, decided: Uint8Array, { bound, savings, taken }: Relaxation): void {
  const inside = new Set(taken)
  const room = search.best.cost - HALF_A_GRAM - bound
  const free = undecided(decided)
  const last = taken.length < search.most ? 0 : Math.max(...taken.filter(s => decided[s] === UNDECIDED).map(s => savings[s]!), -Infinity)
  const next = Math.min(0, ...free.filter(s => !inside.has(s)).map(s => savings[s]!))
  for (const s of free) {
    if (inside.has(s)) {
      if (next - savings[s]! >= room) decided[s] = OPEN
    } else if (last > -Infinity && savings[s]! - last >= room) {
      decided[s] = CLOSED
    }
  }
}

/** Better by exchanging one section after another while that makes it lighter, and filled up to `most`. */
function exchanged(table: CostTable, sections: number[], most: number): number[] {
  let chosen = sections
  let cost = costWith(table, chosen)
  for (;;) {
    const better = bestExchange(table, chosen, most, cost)
    if (!better) return chosen
    chosen = better.chosen
    cost = better.cost
  }
}

function bestExchange(table: CostTable, chosen: readonly number[], most: number, cost: number): { chosen: number[], cost: number } | null {
  const { groups, sections, costs } = table
  let best: { chosen: number[], cost: number } | null = null
  const least = new Float64Array(groups)
  for (const out of chosen.length < most ? [-1, ...chosen] : chosen) {
    const rest = chosen.filter(s => s !== out)
    least.fill(Infinity)
    for (const s of rest) for (let g = 0; g < groups; g++) least[g] = Math.min(least[g]!, costs[s * groups + g]!)
    for (let s = 0; s < sections; s++) {
      let sum = 0
      for (let g = 0, at = s * groups; g < groups; g++, at++) sum += Math.min(least[g]!, costs[at]!)
      if (sum < (best?.cost ?? cost) - HALF_A_GRAM && !chosen.includes(s)) best = { chosen: [...rest, s], cost: sum }
    }
  }
  return best
}
