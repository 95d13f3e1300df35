import { sql } from 'kysely'
import type { StudyProgress, StudyRecord, StudySummary } from '#shared/schemas/api'
import type { StudyInput } from '#shared/schemas/study'
import type { Db } from '../client'
import { CANCEL_CHANNEL, PROGRESS_CHANNEL, dropJobs, notify, sendJobs } from '../queue'
import type { Account } from './accounts'
import { recordActivity } from './activity'

const emptyProgress = (total: number): StudyProgress => ({
  state: 'queued',
  examined: 0,
  total,
  counts: { range: total, examined: 0, cut: 0, rejected: {}, feasible: 0 },
  best: null,
  history: [],
  secondsLeft: null,
  failure: null,
})

function summaries(db: Db) {
  return db.selectFrom('studies as study').innerJoin('accounts as account', 'account.id', 'study.started_by')
    .select([
      'study.id', 'study.number', 'study.plate_id as plateId', 'study.plate_name as plateName',
      'study.plate_version as plateVersion', 'study.basis_version as basisVersion', 'study.state',
      'study.total', 'study.progress', 'study.lightest', 'account.name as startedBy',
      'study.created_at', 'study.finished_at',
    ])
}

type SummaryRow = Awaited<ReturnType<ReturnType<typeof summaries>['executeTakeFirstOrThrow']>>

function toSummary({ created_at, finished_at, progress, state, ...row }: SummaryRow): StudySummary {
  return {
    ...row,
    state,
    counts: state === 'finished' ? progress.counts : null,
    createdAt: created_at.toISOString(),
    finishedAt: finished_at?.toISOString() ?? null,
  }
}

/** The studies of a project, newest first. */
export async function listStudies(db: Db, projectId: string): Promise<StudySummary[]> {
  const rows = await summaries(db).where('study.project_id', '=', projectId).orderBy('study.number', 'desc').execute()
  return rows.map(toSummary)
}

/** A study with its frozen inputs and how far it is. */
export async function findStudy(db: Db, id: string): Promise<StudyRecord | undefined> {
  const row = await summaries(db)
    .innerJoin('plates as plate', 'plate.id', 'study.plate_id')
    .select(({ selectFrom }) => [
      'study.project_id as projectId', 'study.inputs', 'study.engine_version as engineVersion', 'study.started_at',
      'plate.version as plateNow',
      selectFrom('bases').select(({ fn }) => fn.max('version').as('v'))
        .whereRef('bases.project_id', '=', 'study.project_id').as('basisNow'),
    ])
    .where('study.id', '=', id).executeTakeFirst()
  if (!row) return undefined
  const { inputs, started_at, plateNow, basisNow, projectId, engineVersion, ...summary } = row
  const basisInForce = basisNow ?? 0
  return {
    ...toSummary(summary),
    projectId,
    engineVersion,
    ...inputs,
    startedAt: started_at?.toISOString() ?? null,
    progress: { ...row.progress, state: row.state },
    stale: {
      plate: plateNow === row.plateVersion ? null : plateNow,
      basis: basisInForce === row.basisVersion ? null : basisInForce,
    },
  }
}

/** The project of a study, for the check of access. */
export async function findStudyProject(db: Db, id: string): Promise<string | undefined> {
  const row = await db.selectFrom('studies').select('project_id').where('id', '=', id).executeTakeFirst()
  return row?.project_id
}

/** How far a study is. */
export async function findProgress(db: Db, id: string): Promise<StudyProgress | undefined> {
  const row = await db.selectFrom('studies').select(['progress', 'state']).where('id', '=', id).executeTakeFirst()
  return row && { ...row.progress, state: row.state }
}

/** What the engine is asked, and how many arrangements that makes. */
export async function findStudyInputs(db: Db, id: string): Promise<{ inputs: StudyInput, engineVersion: string } | undefined> {
  const row = await db.selectFrom('studies').select(['inputs', 'engine_version']).where('id', '=', id).executeTakeFirst()
  return row && { inputs: row.inputs, engineVersion: row.engine_version }
}

export interface NewStudy {
  projectId: string
  plateId: string
  plateVersion: number
  basisVersion: number
  inputs: StudyInput
  engineVersion: string
  total: number
}

/** Stores the study with its inputs frozen. */
export async function insertStudy(db: Db, account: Pick<Account, 'id' | 'practiceId'>, study: NewStudy): Promise<string> {
  // The project's row is the lock under which studies are numbered.
  await db.selectFrom('projects').select('id').where('id', '=', study.projectId).forUpdate().executeTakeFirstOrThrow()
  const { id, number } = await db.insertInto('studies').values({
    project_id: study.projectId,
    number: sql<number>`(select coalesce(max(number), 0) + 1 from studies where project_id = ${study.projectId})`,
    plate_id: study.plateId,
    plate_name: study.inputs.plate.name,
    plate_version: study.plateVersion,
    basis_version: study.basisVersion,
    inputs: JSON.stringify(study.inputs),
    engine_version: study.engineVersion,
    total: study.total,
    progress: JSON.stringify(emptyProgress(study.total)),
    started_by: account.id,
  }).returning(['id', 'number']).executeTakeFirstOrThrow()
  await recordActivity(db, {
    practiceId: account.practiceId, projectId: study.projectId, accountId: account.id,
    action: 'study.started', subject: { studyId: id, number, arrangements: study.total },
  })
  return id
}

/** Stores the study and its first job in one transaction: there is never one without the other. */
export async function startStudy(db: Db, account: Account, study: NewStudy): Promise<string> {
  return await db.transaction().execute(async (trx) => {
    const id = await insertStudy(trx, account, study)
    await sendJobs(trx, [{ kind: 'plan', studyId: id }])
    return id
  })
}

/** Ends a study that waits or runs; false where it has ended already. Workers and watchers hear of it at once. */
export async function cancelStudy(db: Db, id: string, account: Account): Promise<boolean> {
  const isEnded = await db.transaction().execute(async (trx) => {
    const ended = await endStudy(trx, id, { state: 'cancelled', failure: null })
    if (!ended) return false
    await recordActivity(trx, {
      practiceId: account.practiceId, projectId: ended.projectId, accountId: account.id,
      action: 'study.cancelled', subject: { studyId: id, number: ended.number },
    })
    return true
  })
  if (isEnded) await clearAway(db, id)
  return isEnded
}

/** Ends a study that cannot be brought to its end, with the sentence that its page shows. */
export async function failStudy(db: Db, id: string, sentence: string): Promise<boolean> {
  const ended = await db.transaction().execute(trx => endStudy(trx, id, { state: 'failed', failure: sentence }))
  if (ended) await clearAway(db, id)
  return ended !== undefined
}

/** After the end is known: thousands of jobs and parts may lie there, and nobody should wait for them to go. A job left over does nothing. */
async function clearAway(db: Db, id: string): Promise<void> {
  await dropJobs(db, id)
  await db.deleteFrom('study_parts').where('study_id', '=', id).execute()
}

async function endStudy(
  trx: Db, id: string, end: { state: 'cancelled' | 'failed', failure: string | null },
): Promise<{ projectId: string, number: number } | undefined> {
  const ended = await trx.updateTable('studies').set({
    state: end.state,
    finished_at: sql`now()`,
    progress: sql`progress || jsonb_build_object('state', ${end.state}::text, 'failure', ${end.failure}::text, 'secondsLeft', null)`,
  }).where('id', '=', id).where('state', 'in', ['queued', 'running'])
    .returning(['project_id as projectId', 'number']).executeTakeFirst()
  if (!ended) return undefined
  await notify(trx, CANCEL_CHANNEL, id)
  await notify(trx, PROGRESS_CHANNEL, id)
  return ended
}
