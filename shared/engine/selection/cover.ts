/** The least number of sections with which every group has one that passes. */
import type { SelectionProblem } from './types'

/** Sections of a smallest cover; null where some group has none at all. More than `most` are not looked for. */
export function smallestCover({ groups }: SelectionProblem, most: number): number[] | null {
  if (groups.some(group => group.passing.length === 0)) return null
  const needed = hardestGroups(groups.map(group => group.passing))
  for (let k = 1; k <= most; k++) {
    const found = coverWith(needed, k, [])
    if (found) return found
  }
  return null
}

/** Without those that are served whenever another is. */
function hardestGroups(passing: readonly (readonly number[])[]): Set<number>[] {
  const rising = [...passing].sort((a, b) => a.length - b.length).map(list => new Set(list))
  const kept: Set<number>[] = []
  for (const set of rising) {
    if (!kept.some(smaller => [...smaller].every(s => set.has(s)))) kept.push(set)
  }
  return kept
}

function coverWith(needed: readonly Set<number>[], k: number, chosen: readonly number[]): number[] | null {
  const open = needed.filter(set => !chosen.some(s => set.has(s)))
  if (open.length === 0) return [...chosen]
  if (k === 0 || disjointGroups(open) > k) return null
  const tightest = open.reduce((a, b) => b.size < a.size ? b : a)
  for (const s of tightest) {
    const found = coverWith(open, k - 1, [s])
    if (found) return [...chosen, ...found]
  }
  return null
}

/** Groups no two of which share a section, found greedily: each needs a section of its own. */
function disjointGroups(needed: readonly Set<number>[]): number {
  const taken = new Set<number>()
  let count = 0
  for (const set of needed) {
    if ([...set].some(s => taken.has(s))) continue
    count++
    for (const s of set) taken.add(s)
  }
  return count
}
