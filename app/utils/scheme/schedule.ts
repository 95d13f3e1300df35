/** Schedules of a scheme: by section and the sums beneath. Masses in kg. */
import type { SchemeMemberDetail } from '#shared/schemas/api'

export interface SectionRow {
  section: string
  kinds: string[]
  pieces: number
  mass: number
  /** The member with the highest utilisation of this section. */
  highest: { mark: string, utilisation: number, governing: string }
}

/** Sections by falling mass per member kind of use: the beams' or the columns' schedule. */
export function scheduleBySection(members: readonly SchemeMemberDetail[]): SectionRow[] {
  const rows = new Map<string, SectionRow>()
  for (const member of members) {
    const highest = { mark: member.mark, utilisation: member.utilisation, governing: member.governing }
    const row = rows.get(member.section)
    if (!row) {
      rows.set(member.section, { section: member.section, kinds: [member.kind], pieces: 1, mass: member.mass, highest })
      continue
    }
    row.pieces += 1
    row.mass += member.mass
    if (!row.kinds.includes(member.kind)) row.kinds.push(member.kind)
    if (member.utilisation > row.highest.utilisation) row.highest = highest
  }
  return [...rows.values()].sort((a, b) => perPiece(b) - perPiece(a) || a.section.localeCompare(b.section))
}

function perPiece(row: SectionRow): number {
  return row.mass / row.pieces
}

/** Parts of a total rounded so that they still add up to the rounded total (largest remainders). */
export function roundedParts(parts: readonly number[], step: number): number[] {
  const total = Math.round(parts.reduce((sum, part) => sum + part, 0) / step)
  const floors = parts.map(part => Math.floor(part / step + 1e-9))
  let missing = total - floors.reduce((sum, part) => sum + part, 0)
  const order = parts.map((part, i) => ({ i, rest: part / step - (floors[i] ?? 0) })).sort((a, b) => b.rest - a.rest)
  for (const { i } of order) {
    if (missing <= 0) break
    floors[i] = (floors[i] ?? 0) + 1
    missing -= 1
  }
  return floors.map(part => part * step)
}
