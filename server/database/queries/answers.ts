/** Questions about a ranked study. Each is kept once; asking it again gives the same record. */
import { sql } from 'kysely'
import type { AnswerRecord } from '#shared/schemas/answers'
import type { Db } from '../client'
import { sendAnswerJob } from '../queue'
import type { Account } from './accounts'

function records(db: Db, studyId: string) {
  return db.selectFrom('answers')
    .select(['question', 'state', 'result', 'failure', 'engine_version as engineVersion', 'asked_at', 'answered_at'])
    .where('study_id', '=', studyId)
}

type Row = Awaited<ReturnType<ReturnType<typeof records>['executeTakeFirstOrThrow']>>

function toRecord({ asked_at, answered_at, ...row }: Row): AnswerRecord {
  return { ...row, askedAt: asked_at.toISOString(), answeredAt: answered_at?.toISOString() ?? null }
}

/** Answers of a study, or the one to `question`, in the order of their names. */
export async function listAnswers(db: Db, studyId: string, question?: string): Promise<AnswerRecord[]> {
  const rows = records(db, studyId).orderBy('question')
  return (await (question === undefined ? rows : rows.where('question', '=', question)).execute()).map(toRecord)
}

/** Stores the question with its job in one transaction. One that is known stays as it is, unless it failed: that is asked anew. */
export async function askQuestion(db: Db, studyId: string, question: string, account: Pick<Account, 'id'>): Promise<AnswerRecord> {
  return await db.transaction().execute(async (trx) => {
    const asked = await trx.insertInto('answers').values({ study_id: studyId, question, asked_by: account.id })
      .onConflict(conflict => conflict.columns(['study_id', 'question'])
        .doUpdateSet({ state: 'queued', failure: null, answered_at: null, asked_at: sql`now()`, asked_by: account.id })
        .where('answers.state', '=', 'failed'))
      .returning('question').executeTakeFirst()
    if (asked) await sendAnswerJob(trx, { kind: 'answer', studyId, question })
    return toRecord(await records(trx, studyId).where('question', '=', question).executeTakeFirstOrThrow())
  })
}

/** Marks a question as being answered; false where it has been already. */
export async function beginAnswer(db: Db, studyId: string, question: string): Promise<boolean> {
  const begun = await db.updateTable('answers').set({ state: 'running' })
    .where('study_id', '=', studyId).where('question', '=', question).where('state', 'in', ['queued', 'running'])
    .returning('question').executeTakeFirst()
  return begun !== undefined
}

/** @param result the answer as JSON text */
export async function saveAnswer(db: Db, studyId: string, question: string, result: string, engineVersion: string): Promise<void> {
  await endAnswer(db, studyId, question, { state: 'finished', result, engine_version: engineVersion })
}

/** @param sentence what the page shows in place of the answer */
export async function failAnswer(db: Db, studyId: string, question: string, sentence: string): Promise<void> {
  await endAnswer(db, studyId, question, { state: 'failed', failure: sentence })
}

async function endAnswer(
  db: Db, studyId: string, question: string,
  end: { state: 'finished', result: string, engine_version: string } | { state: 'failed', failure: string },
): Promise<void> {
  await db.updateTable('answers').set({ ...end, answered_at: sql`now()` })
    .where('study_id', '=', studyId).where('question', '=', question).where('state', 'in', ['queued', 'running']).execute()
}
