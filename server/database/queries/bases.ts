import type { BasisRecord } from '#shared/schemas/api'
import type { Basis } from '#shared/schemas/basis'
import { DEFAULT_BASIS } from '#shared/utils/defaultBasis'
import type { Db } from '../client'
import type { Account } from './accounts'
import { recordActivity } from './activity'

/** The basis of design in force; version 0 with the default document where none was saved. */
export async function findBasis(db: Db, projectId: string): Promise<BasisRecord> {
  const row = await db.selectFrom('bases as basis').innerJoin('accounts as account', 'account.id', 'basis.saved_by')
    .select(['basis.version', 'basis.document', 'basis.saved_at', 'account.name as savedBy'])
    .where('basis.project_id', '=', projectId).orderBy('basis.version', 'desc').executeTakeFirst()
  if (!row) return { projectId, version: 0, document: DEFAULT_BASIS, savedAt: null, savedBy: null }
  return { projectId, version: row.version, document: row.document, savedAt: row.saved_at.toISOString(), savedBy: row.savedBy }
}

/** Saves over version `version`; false, and nothing stored, where another version is in place by now. */
export async function saveBasis(
  db: Db, { projectId, account }: { projectId: string, account: Account }, basis: { version: number, document: Basis },
): Promise<boolean> {
  return await db.transaction().execute(async (trx) => {
    // The project's row is the lock: two first versions at once would both see none.
    await trx.selectFrom('projects').select('id').where('id', '=', projectId).forUpdate().executeTakeFirstOrThrow()
    const inForce = await findBasis(trx, projectId)
    if (inForce.version !== basis.version) return false
    await trx.insertInto('bases').values({
      project_id: projectId, version: basis.version + 1, document: JSON.stringify(basis.document), saved_by: account.id,
    }).execute()
    await recordActivity(trx, {
      practiceId: account.practiceId, projectId, accountId: account.id,
      action: 'basis.saved', subject: { version: basis.version + 1 },
    })
    return true
  })
}
