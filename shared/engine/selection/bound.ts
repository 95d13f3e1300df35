/**
 * Lower bounds of a selection by Lagrangian relaxation: the rule that every group has exactly one
 * section is priced by multipliers; what is left is solved by taking the best sections (Cornuéjols,
 * Fisher and Nemhauser 1977). The multipliers are raised by subgradient steps.
 */
import { type CostTable, HALF_A_GRAM } from './types'

export const UNDECIDED = 0
export const OPEN = 1
export const CLOSED = 2

export interface Relaxation {
  /** kg; no selection that keeps the decisions is lighter. */
  bound: number
  multipliers: Float64Array
  /** What each section saves at these multipliers, ≤ 0, kg. */
  savings: Float64Array
  /** Sections that the relaxation takes. */
  taken: number[]
}

/** Steps without a better bound before they are halved, and the share at which they end. */
const PATIENCE = 8
const SMALLEST_STEP = 0.01

/** Multipliers to begin with: what the second lightest section costs each group. */
export function firstMultipliers({ groups, sections, costs }: CostTable): Float64Array {
  const multipliers = new Float64Array(groups)
  for (let g = 0; g < groups; g++) {
    let [least, second] = [Infinity, Infinity]
    for (let s = 0; s < sections; s++) {
      const cost = costs[s * groups + g]!
      if (cost < least) [least, second] = [cost, least]
      else if (cost < second) second = cost
    }
    multipliers[g] = second === Infinity ? least : second
  }
  return multipliers
}

function relaxation(table: CostTable, decided: Uint8Array, most: number, multipliers: Float64Array): Relaxation {
  const { groups, sections, costs } = table
  const savings = new Float64Array(sections)
  const free: number[] = []
  const taken: number[] = []
  let bound = 0
  for (let g = 0; g < groups; g++) bound += multipliers[g]!
  for (let s = 0; s < sections; s++) {
    if (decided[s] === CLOSED) continue
    let saving = 0
    for (let g = 0, at = s * groups; g < groups; g++, at++) {
      const difference = costs[at]! - multipliers[g]!
      if (difference < 0) saving += difference
    }
    savings[s] = saving
    if (decided[s] === OPEN) {
      taken.push(s)
      bound += saving
    } else if (saving < 0) {
      free.push(s)
    }
  }
  free.sort((a, b) => savings[a]! - savings[b]! || a - b)
  for (const s of free.slice(0, most - taken.length)) {
    taken.push(s)
    bound += savings[s]!
  }
  return { bound, multipliers, savings, taken }
}

/** How often each group is served by what the relaxation takes, less one, with the sign of the step. */
function missing({ groups, costs }: CostTable, { taken, multipliers }: Relaxation, into: Float64Array): number {
  into.fill(1)
  for (const s of taken) {
    for (let g = 0, at = s * groups; g < groups; g++, at++) if (costs[at]! < multipliers[g]!) into[g]!--
  }
  let square = 0
  for (let g = 0; g < groups; g++) square += into[g]! * into[g]!
  return square
}

/**
 * The best bound of so many steps, from `start`. Ends early once it reaches `best`, above which no
 * selection is wanted.
 */
export function raisedBound(
  table: CostTable, decided: Uint8Array, most: number, best: number, start: Float64Array, steps: number,
): Relaxation {
  let highest = relaxation(table, decided, most, Float64Array.from(start))
  let current = highest
  let share = 1
  let waited = 0
  const slope = new Float64Array(table.groups)
  for (let n = 0; n < steps && highest.bound < best - HALF_A_GRAM && share > SMALLEST_STEP; n++) {
    const square = missing(table, current, slope)
    if (square === 0) break
    const step = share * Math.max(best - current.bound, 1e-6 * best) / square
    const next = current.multipliers.map((value, g) => Math.max(0, value + step * slope[g]!))
    current = relaxation(table, decided, most, next)
    if (current.bound > highest.bound) {
      highest = current
      waited = 0
    } else if (++waited >= PATIENCE) {
      share /= 2
      waited = 0
      current = highest
    }
  }
  return highest
}
