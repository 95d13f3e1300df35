import type { ProjectRole } from '#shared/schemas/api'

/** What can be done on a project. Reading is an action like the others, so that no route is without a line. */
export const PROJECT_ACTIONS = [
  'project.read',
  'plate.create',
  'plate.edit',
  'plate.edit-constraints',
  'basis.edit',
  'basis.edit-allowances',
  'study.run',
  'study.cancel',
  'people.edit',
] as const
export type ProjectAction = typeof PROJECT_ACTIONS[number]

/**
 * Who may do what: the one table that routes, pages and tests read.
 * `plate.edit-constraints`: keep-clear zones and pinned grid lines only; `basis.edit-allowances`: the
 * allowances for connections and bracing only.
 */
const TABLE: Record<ProjectRole, readonly ProjectAction[]> = {
  'engineer': PROJECT_ACTIONS,
  'architect': ['project.read', 'plate.edit-constraints'],
  'cost-planner': ['project.read', 'basis.edit-allowances'],
  'checker': ['project.read'],
}

/** Whether a role may do that on its project. */
export function may(role: ProjectRole, action: ProjectAction): boolean {
  return TABLE[role].includes(action)
}

/**
 * Whether an account may say who is on a project and as what: an engineer of it, or an administrator of its
 * practice, who need not be on it (`role` null).
 */
export function mayEditPeople(role: ProjectRole | null, isAdministrator: boolean): boolean {
  return isAdministrator || (role !== null && may(role, 'people.edit'))
}

/** Whether an account of this role in the practice may make a project; being administrator alone is no engineering right. */
export function mayCreateProjects(role: ProjectRole | null): boolean {
  return role === 'engineer'
}
