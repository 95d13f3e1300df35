import { beginStudy, cutStudy, savePart } from '~~/server/database/queries/parts'
import { findStudyInputs } from '~~/server/database/queries/studies'
import type { Worker } from './worker'

/** ms of work in a part: long beside the queue's 1–2 ms a job, short enough to lose. */
const PART_MS = 120
/** Parts of the largest study. */
const MOST_PARTS = 4_000

/**
 * Cuts a study into parts. As much of it as goes into one part's time is examined first: that measures
 * how fast arrangements go and is the first part itself. A small study is done with it.
 */
export async function planStudy(worker: Worker, studyId: string): Promise<void> {
  const { db, log } = worker
  const [study, begun] = await Promise.all([findStudyInputs(db, studyId), beginStudy(db, studyId)])
  if (!study || !begun || begun.partsTotal !== null) return
  const { total } = begun
  const sample = await worker.search({ studyId, inputs: study.inputs, from: 0, to: total, budgetMs: PART_MS })
  if (worker.isEnded(studyId)) return
  const partSize = Math.max(1, sample.examined, Math.ceil(total / MOST_PARTS))
  const isFirstPart = sample.examined === Math.min(partSize, total)
  await db.transaction().execute(async (trx) => {
    await cutStudy(trx, studyId, partSize, isFirstPart ? [0] : [])
    if (isFirstPart) await savePart(trx, studyId, { ...sample, number: 0 })
  })
  log.info({ studyId, total, partSize, parts: Math.ceil(total / partSize), ms: Math.round(sample.ms) }, 'study cut')
}
