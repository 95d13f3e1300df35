import type { H3Event } from 'h3'
import { may, mayEditPeople, type ProjectAction } from '#shared/utils/permissions'
import type { ProjectRole } from '#shared/schemas/api'
import type { Account } from '../database/queries/accounts'
import { isOfPractice } from '../database/queries/people'
import { findPlate } from '../database/queries/plates'
import { findProjectAccess } from '../database/queries/projects'
import { findScheme } from '../database/queries/schemes'
import { findProgress, findStudyProject } from '../database/queries/studies'
import { useDb } from './db'
import { missing, notFound, refusal } from './refusal'

const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/i

const ROLE_NAMES: Record<ProjectRole, string> = {
  'engineer': 'scheme engineer', 'architect': 'architect', 'cost-planner': 'cost planner', 'checker': 'checker',
}

/** The account that is signed in; server/middleware put it there. */
export function requireAccount(event: H3Event): Account {
  const { account } = event.context
  if (!account) throw refusal('not-signed-in', 'You are not signed in, or your session has ended. Sign in again.')
  return account
}

/** Whether a text can be an id at all. */
export const isId = (text: string | undefined): text is string => text !== undefined && UUID.test(text)

/** A route parameter that is an id; what is none cannot exist. */
function idOf(event: H3Event, what: string): string {
  const id = getRouterParam(event, 'id')
  if (!isId(id)) throw notFound(what)
  return id
}

export interface Access { account: Account, projectId: string, role: ProjectRole }

/** Whether one of `actions` is allowed; 403 with the role where none is. */
function demand(role: ProjectRole, actions: readonly ProjectAction[]): void {
  if (actions.some(action => may(role, action))) return
  throw refusal('not-allowed', `On this project you are ${ROLE_NAMES[role]}; this is for others to do. Ask a scheme engineer of the project.`)
}

async function accessTo(event: H3Event, projectId: string, what: string, actions: readonly ProjectAction[]): Promise<Access> {
  const account = requireAccount(event)
  const access = await findProjectAccess(useDb(), account.id, projectId)
  if (!access) throw notFound(what)
  demand(access.role, actions)
  return { account, projectId, role: access.role }
}

/** For routes under /api/projects/:id. */
export async function requireProject(event: H3Event, ...actions: ProjectAction[]): Promise<Access> {
  return await accessTo(event, idOf(event, 'project'), 'project', actions)
}

/** For routes under /api/projects/:id/people; `role` is null for an administrator who is not on the project. */
export async function requirePeople(event: H3Event) {
  const account = requireAccount(event)
  const projectId = idOf(event, 'project')
  const access = await findProjectAccess(useDb(), account.id, projectId)
  const administers = account.isAdministrator && await isOfPractice(useDb(), projectId, account.practiceId)
  if (!access && !administers) throw notFound('project')
  const role = access?.role ?? null
  if (role && !mayEditPeople(role, administers)) demand(role, ['people.edit'])
  return { account, projectId, role }
}

/** For routes under /api/plates/:id: the plate in its present version too. */
export async function requirePlate(event: H3Event, ...actions: ProjectAction[]) {
  requireAccount(event)
  const plate = await findPlate(useDb(), idOf(event, 'plate'))
  if (!plate) throw notFound('plate')
  return { ...await accessTo(event, plate.projectId, 'plate', actions), plate }
}

/** For routes under /api/studies/:id. */
export async function requireStudy(event: H3Event, ...actions: ProjectAction[]) {
  requireAccount(event)
  const studyId = idOf(event, 'study')
  const projectId = await findStudyProject(useDb(), studyId)
  if (!projectId) throw notFound('study')
  return { ...await accessTo(event, projectId, 'study', actions), studyId }
}

/** For questions that rest on a study's ranking: whoever may read may ask. */
export async function requireRankedStudy(event: H3Event) {
  const access = await requireStudy(event, 'project.read')
  const progress = await findProgress(useDb(), access.studyId)
  if (progress?.state === 'finished') return access
  const isToCome = progress?.state === 'queued' || progress?.state === 'running'
  throw refusal('not-ready', isToCome
    ? 'The answer rests on the ranking, which is not there yet. Ask when the study has examined every arrangement.'
    : 'The study ended without a ranking, and the answer rests on that. Run its range again.')
}

/** For routes under /api/studies/:id/schemes/:key. */
export async function requireScheme(event: H3Event) {
  const { studyId } = await requireStudy(event, 'project.read')
  const key = getRouterParam(event, 'key', { decode: true }) ?? ''
  // PostgreSQL takes no NUL in a text.
  const row = key.includes('\0') ? undefined : await findScheme(useDb(), studyId, key)
  if (!row) throw missing('scheme', 'study')
  return { studyId, row }
}
