/** What is kept of a scheme: a narrow row; the scheme itself is rebuilt from its number. */
import type { SchemeRow } from '#shared/schemas/api'
import { grams } from '../quantities'
import type { PreparedStudy } from './prepare'
import type { Scheme } from './schemes'

/** The number of the arrangement, and the cap where the sizes were chosen under one: `35222`, `35222-533.1`. */
export function schemeKey(number: number, depthCap: number | null): string {
  return depthCap === null ? String(number) : `${number}-${depthCap}`
}

/** null where the text is no key. */
export function parseSchemeKey(key: string): { number: number, depthCap: number | null } | null {
  const match = /^([1-9]\d{0,15})(?:-(\d{1,4}(?:\.\d{1,3})?))?$/.exec(key)
  if (!match) return null
  return { number: Number(match[1]), depthCap: match[2] === undefined ? null : Number(match[2]) }
}

export function differences(lines: readonly number[]): number[] {
  return lines.slice(1).map((line, n) => line - lines[n]!)
}

export function distinctSectionsOf({ sized, columns }: Scheme): number {
  const different = new Set<number>()
  for (const { section } of sized.sections) different.add(section.catalogueIndex)
  for (const { lifts } of columns) for (const { section } of lifts) different.add(section.catalogueIndex)
  return different.size
}

export function schemeRow(study: PreparedStudy, scheme: Scheme): SchemeRow {
  const { arrangement, depthCap, prepared, sized, columns, mass } = scheme
  const directions = new Set(arrangement.regions.map(region => region.direction))
  return {
    rank: 0,
    number: arrangement.number,
    key: schemeKey(arrangement.number, depthCap),
    baysX: differences(arrangement.grid.xs),
    baysY: differences(arrangement.grid.ys),
    primaryDirection: directions.size === 1 ? [...directions][0]! : 'mixed',
    divisions: Math.max(...arrangement.regions.map(region => region.divisions)),
    slab: arrangement.slab,
    depthCap,
    ...mass,
    depth: sized.depth,
    pieces: prepared.frame.beams.length + columns.length,
    distinctSections: distinctSectionsOf(scheme),
    onTradeOffLine: false,
    lowestFrequency: lowestFrequency(study, scheme),
    governing: governingCounts(scheme),
  }
}

function lowestFrequency(study: PreparedStudy, { prepared, sized }: Scheme): number {
  let lowest = Infinity
  sized.demands.forEach((demand, b) => {
    if (prepared.alike[b] !== b && sized.sections[b] === sized.sections[prepared.alike[b]!]) return
    const f = study.sizer.frequency(demand, sized.sections[b]!)
    if (f !== null && f < lowest) lowest = f
  })
  return lowest
}

export function governingCounts({ sized }: Scheme): Record<string, number> {
  const counts: Record<string, number> = {}
  for (const { governing } of sized.sections) counts[governing] = (counts[governing] ?? 0) + 1
  return counts
}

/** Order of schemes: mass to the gram, depth, pieces, number of the arrangement. */
export function compareRows(a: SchemeRow, b: SchemeRow): number {
  return grams(a.mass) - grams(b.mass) || a.depth - b.depth || a.pieces - b.pieces || a.number - b.number
}

/** Rows that no other row beats on both axes: mass ≤ and depth ≤, one of them less. `rows` in their order. */
export function tradeOffRows(rows: readonly SchemeRow[]): SchemeRow[] {
  const front: SchemeRow[] = []
  let shallowest = Infinity
  let massThere = 0
  for (const row of rows) {
    if (row.depth < shallowest) {
      shallowest = row.depth
      massThere = grams(row.mass)
      front.push(row)
    } else if (row.depth === shallowest && grams(row.mass) === massThere) {
      front.push(row)
    }
  }
  return front
}
