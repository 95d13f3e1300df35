/** The slab systems of a study: those that its range tries, or the plate's own. */
import type { Plate, Slab } from '#shared/schemas/plate'
import type { Range } from '#shared/schemas/range'

const SYSTEMS = { deck: 'deck slab', planks: 'planks', solid: 'solid slab' } as const

export function slabsOf(study: { range: Range, plate: Plate }): Slab[] {
  return study.range.slabs ?? [study.plate.slab]
}

/** "Composite deck 130/60", or "deck slab 130" where it has no name. */
export function slabName(slab: Slab): string {
  return slab.name ?? `${SYSTEMS[slab.system]} ${slab.depth}`
}

export function isSameSlab(a: Slab, b: Slab): boolean {
  return a.system === b.system && a.depth === b.depth && a.weight === b.weight && a.maxSpan === b.maxSpan
    && a.fixedToTopFlange === b.fixedToTopFlange && a.span === b.span
}

/** The plate's own slab first, then those of the library and of an earlier range that differ from all before. */
export function slabChoices(own: Slab, ...more: readonly (readonly Slab[])[]): Slab[] {
  const choices = [own]
  for (const slab of more.flat()) if (!choices.some(known => isSameSlab(known, slab))) choices.push(slab)
  return choices
}

/** The systems with one taken in or left out, in the order of the choices; null where the plate's own stands alone. */
export function toggleSlab(choices: readonly Slab[], chosen: readonly Slab[] | null, slab: Slab): Slab[] | null {
  const own = choices[0]
  const now = chosen ?? (own ? [own] : [])
  const isIn = now.some(each => isSameSlab(each, slab))
  const next = choices.filter(each => isSameSlab(each, slab) ? !isIn : now.some(known => isSameSlab(known, each)))
  return own && next.length === 1 && next[0] && isSameSlab(next[0], own) ? null : next
}
