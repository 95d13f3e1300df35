/**
 * A change of the plate as a reversible patch: the top-level fields that change, with their new
 * values. Undo, redo, reloads and gestures all go through `applyPatch`.
 */
import type { Plate } from '#shared/schemas/plate'

export type PlatePatch = { readonly [Field in keyof Plate]?: Plate[Field] | undefined }

/** What an intent wants done; the label reads after "Undo": "move of line D". */
export interface Step { label: string, patch: PlatePatch }

/** Why an intent cannot be carried out, as a sentence with what to do. */
export interface Refusal { refusal: string }

export type Outcome = Step | Refusal

export function isRefusal(outcome: Outcome): outcome is Refusal {
  return 'refusal' in outcome
}

type Draft = { -readonly [Field in keyof Plate]?: Plate[Field] | undefined }

function copyField<Field extends keyof Plate>(into: Draft, from: PlatePatch, field: Field) {
  into[field] = from[field]
}

/**
 * The plate after the patch and the patch that takes it back. A field given as `undefined` is
 * taken out of the document (an optional one: `roof`).
 */
export function applyPatch(plate: Plate, patch: PlatePatch): { plate: Plate, inverse: PlatePatch } {
  const inverse: Draft = {}
  for (const field of Object.keys(patch) as (keyof Plate)[]) copyField(inverse, plate, field)
  const fields = Object.entries({ ...plate, ...patch }).filter(([, value]) => value !== undefined)
  return { plate: Object.fromEntries(fields) as Plate, inverse }
}

/** The patch that turns one document into the other: only the fields that differ. */
export function patchBetween(from: Plate, to: Plate): PlatePatch {
  const patch: Draft = {}
  const fields = new Set([...Object.keys(from), ...Object.keys(to)]) as Set<keyof Plate>
  for (const field of fields) {
    if (JSON.stringify(from[field]) !== JSON.stringify(to[field])) copyField(patch, to, field)
  }
  return patch
}

/** True where the patch would leave the document as it is. */
export function changesNothing(plate: Plate, patch: PlatePatch): boolean {
  return (Object.keys(patch) as (keyof Plate)[])
    .every(field => JSON.stringify(plate[field]) === JSON.stringify(patch[field]))
}
