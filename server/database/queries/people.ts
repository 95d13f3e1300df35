import type { ProjectPerson, ProjectRole } from '#shared/schemas/api'
import type { Db } from '../client'
import type { Account } from './accounts'
import { recordActivity } from './activity'
import { addMember } from './projects'

/** Who changes the people of which project. */
export interface PeopleChange { account: Account, projectId: string }

/** Whether the project is one of that practice. */
export async function isOfPractice(db: Db, projectId: string, practiceId: string): Promise<boolean> {
  const found = await db.selectFrom('projects').select('id')
    .where('id', '=', projectId).where('practice_id', '=', practiceId).executeTakeFirst()
  return found !== undefined
}

/** The project's practice; until the transaction ends nobody else changes the project's people. */
async function lockPeople(trx: Db, projectId: string): Promise<string> {
  const project = await trx.selectFrom('projects').select('practice_id')
    .where('id', '=', projectId).forNoKeyUpdate().executeTakeFirstOrThrow()
  return project.practice_id
}

async function roleOf(trx: Db, projectId: string, accountId: string): Promise<ProjectRole | undefined> {
  const member = await trx.selectFrom('project_members').select('role')
    .where('project_id', '=', projectId).where('account_id', '=', accountId).executeTakeFirst()
  return member?.role
}

/** Whether an engineer who can sign in stays on the project without this account. */
async function hasOtherEngineer(trx: Db, projectId: string, accountId: string): Promise<boolean> {
  const other = await trx.selectFrom('project_members as member')
    .innerJoin('accounts as account', 'account.id', 'member.account_id').select('account.id')
    .where('member.project_id', '=', projectId).where('member.role', '=', 'engineer')
    .where('account.id', '!=', accountId).where('account.deactivated_at', 'is', null)
    .executeTakeFirst()
  return other !== undefined
}

/**
 * Puts the account of `email` on the project, or gives it another role there, and records it.
 * @returns the person and whether the project has them newly; or why it cannot be
 */
export async function setPerson(
  db: Db, { account, projectId }: PeopleChange, { email, role }: { email: string, role: ProjectRole },
): Promise<{ person: ProjectPerson, isNew: boolean } | 'no-account' | 'last-engineer'> {
  return await db.transaction().execute(async (trx) => {
    const practiceId = await lockPeople(trx, projectId)
    const found = await trx.selectFrom('accounts').select(['id', 'name', 'email'])
      .where('email', '=', email).where('practice_id', '=', practiceId).where('deactivated_at', 'is', null)
      .executeTakeFirst()
    if (!found) return 'no-account'
    const before = await roleOf(trx, projectId, found.id)
    const answer = { person: { ...found, role }, isNew: before === undefined }
    if (before === role) return answer
    if (before === 'engineer' && !await hasOtherEngineer(trx, projectId, found.id)) return 'last-engineer'
    await addMember(trx, projectId, found.id, role)
    await recordActivity(trx, {
      practiceId, projectId, accountId: account.id,
      action: before ? 'person.role-changed' : 'person.added',
      subject: { accountId: found.id, role, ...(before ? { before } : {}) },
    })
    return answer
  })
}

/** Takes an account off the project and records it; says why where it cannot be. */
export async function removePerson(
  db: Db, { account, projectId }: PeopleChange, accountId: string,
): Promise<'removed' | 'not-there' | 'last-engineer'> {
  return await db.transaction().execute(async (trx) => {
    const practiceId = await lockPeople(trx, projectId)
    const role = await roleOf(trx, projectId, accountId)
    if (!role) return 'not-there'
    if (role === 'engineer' && !await hasOtherEngineer(trx, projectId, accountId)) return 'last-engineer'
    await trx.deleteFrom('project_members').where('project_id', '=', projectId).where('account_id', '=', accountId).execute()
    await recordActivity(trx, {
      practiceId, projectId, accountId: account.id, action: 'person.removed', subject: { accountId, role },
    })
    return 'removed'
  })
}
