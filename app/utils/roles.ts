import type { ProjectRole } from '#shared/schemas/api'
import { may, type ProjectAction } from '#shared/utils/permissions'

export const ROLE_NAMES: Record<ProjectRole, string> = {
  'engineer': 'Scheme engineer',
  'architect': 'Architect',
  'cost-planner': 'Cost planner',
  'checker': 'Checker',
}

/** Why this role may not do that; null where it may. */
export function readingOnly(role: ProjectRole | undefined, action: ProjectAction): string | null {
  if (!role) return 'Your role on this project is not known; sign in again.'
  return may(role, action) ? null : `The scheme engineer does this; as ${ROLE_NAMES[role].toLowerCase()} you read it.`
}
