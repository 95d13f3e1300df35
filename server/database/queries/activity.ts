import type { Db } from '../client'

export interface Act {
  practiceId: string
  projectId?: string
  accountId: string | null
  /** noun.verb, e.g. `plate.saved`. */
  action: string
  subject?: Record<string, string | number>
}

/** Adds to the append-only log who did what; a project's "changed at" moves with it. */
export async function recordActivity(db: Db, act: Act): Promise<void> {
  await db.insertInto('activity').values({
    practice_id: act.practiceId,
    project_id: act.projectId ?? null,
    account_id: act.accountId,
    action: act.action,
    subject: JSON.stringify(act.subject ?? {}),
  }).execute()
  if (act.projectId) {
    await db.updateTable('projects').set({ changed_at: new Date() }).where('id', '=', act.projectId).execute()
  }
}
