/** What a role may change on a plate, checked before a step is carried out; the server checks again. */
import { may } from '#shared/utils/permissions'
import type { ProjectRole } from '#shared/schemas/api'
import type { GridLine, Plate } from '#shared/schemas/plate'
import type { PlatePatch } from './steps'

/** `constraints`: keep-clear zones and pinned grid lines only. */
export type PlateRights = 'all' | 'constraints' | 'none'

export function rightsOf(role: ProjectRole): PlateRights {
  if (may(role, 'plate.edit')) return 'all'
  return may(role, 'plate.edit-constraints') ? 'constraints' : 'none'
}

/** The sentence that refuses a patch to these rights; null where it is allowed. */
export function forbiddenBy(rights: PlateRights, plate: Plate, patch: PlatePatch): string | null {
  if (rights === 'all') return null
  if (rights === 'none') return 'Your role reads the plate. Changes to it are the scheme engineer\'s.'
  const isConstraint = (Object.keys(patch) as (keyof Plate)[]).every((field) => {
    if (field === 'keepClear') return true
    if (field === 'gridX' || field === 'gridY') return differsInPinsOnly(plate[field], patch[field] ?? [])
    return JSON.stringify(plate[field]) === JSON.stringify(patch[field])
  })
  return isConstraint ? null : 'Architects change keep-clear zones and pinned grid lines. The rest is the scheme engineer\'s.'
}

function differsInPinsOnly(before: readonly GridLine[], after: readonly GridLine[]): boolean {
  return before.length === after.length
    && before.every((line, i) => line.label === after[i]?.label && line.at === after[i]?.at)
}
