/** What a problem can do without before it is solved, none of which changes its least cost. */
import type { SelectionGroup, SelectionProblem } from './types'

/** A part of a problem that shares no section with the rest, and where its sections and groups stand in the whole. */
export interface Part {
  problem: SelectionProblem
  sections: number[]
}

/**
 * The independent parts of a problem, reduced: a section goes when a lighter one passes wherever it
 * does, groups with equal passing sections become one; until neither is left.
 */
export function reducedParts(problem: SelectionProblem): Part[] {
  let sections = problem.masses.map((_, s) => s)
  let groups = mergedGroups(problem.groups)
  for (;;) {
    const kept = undominated(problem.masses, groups, sections)
    if (kept.length === sections.length) break
    const stays = new Set(kept)
    groups = mergedGroups(groups.map(({ weight, passing }) => ({ weight, passing: passing.filter(s => stays.has(s)) })))
    sections = kept
  }
  return partsOf(groups).map(part => compactPart(problem.masses, part))
}

function mergedGroups(groups: readonly SelectionGroup[]): SelectionGroup[] {
  const merged = new Map<string, SelectionGroup>()
  for (const { weight, passing } of groups) {
    const key = passing.join(',')
    const known = merged.get(key)
    if (known) known.weight += weight
    else merged.set(key, { weight, passing })
  }
  return [...merged.values()]
}

/** Sections that no lighter one replaces wherever they pass; of equally heavy ones the earlier stays. */
function undominated(masses: readonly number[], groups: readonly SelectionGroup[], sections: readonly number[]): number[] {
  const words = Math.ceil(groups.length / 32)
  const serves = new Map(sections.map(s => [s, new Uint32Array(words)]))
  groups.forEach(({ passing }, g) => {
    for (const s of passing) serves.get(s)![g >> 5]! |= 1 << (g & 31)
  })
  const rising = [...sections].sort((a, b) => masses[a]! - masses[b]! || a - b)
  const kept: number[] = []
  for (const s of rising) {
    const own = serves.get(s)!
    if (own.every(word => word === 0)) continue
    const isReplaced = kept.some((lighter) => {
      const other = serves.get(lighter)!
      return own.every((word, n) => (word & ~other[n]!) === 0)
    })
    if (!isReplaced) kept.push(s)
  }
  return kept.sort((a, b) => a - b)
}

/** Groups joined by the sections that they share. */
function partsOf(groups: readonly SelectionGroup[]): SelectionGroup[][] {
  const root = groups.map((_, g) => g)
  const find = (g: number): number => {
    let at = g
    while (root[at] !== at) at = root[at]!
    return at
  }
  const firstWith = new Map<number, number>()
  groups.forEach(({ passing }, g) => {
    for (const s of passing) {
      const first = firstWith.get(s)
      if (first === undefined) firstWith.set(s, g)
      else root[find(g)] = find(first)
    }
  })
  const parts = new Map<number, SelectionGroup[]>()
  groups.forEach((group, g) => {
    const at = find(g)
    parts.set(at, [...parts.get(at) ?? [], group])
  })
  return [...parts.values()]
}

function compactPart(masses: readonly number[], groups: readonly SelectionGroup[]): Part {
  const sections = [...new Set(groups.flatMap(group => group.passing))].sort((a, b) => a - b)
  const place = new Map(sections.map((s, n) => [s, n]))
  return {
    sections,
    problem: {
      masses: sections.map(s => masses[s]!),
      groups: groups.map(({ weight, passing }) => ({ weight, passing: passing.map(s => place.get(s)!) })),
    },
  }
}
