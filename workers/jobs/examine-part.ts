import { findCut, mergeParts, savePart } from '~~/server/database/queries/parts'
import { findStudyInputs } from '~~/server/database/queries/studies'
import { mergeTexts } from './merge-parts'
import type { Worker } from './worker'

/** Examines one part of a study and hands it in. */
export async function examinePart(worker: Worker, studyId: string, number: number): Promise<void> {
  const [study, cut] = await Promise.all([findStudyInputs(worker.db, studyId), findCut(worker.db, studyId)])
  if (!study || !cut) return
  const from = number * cut.partSize
  const to = Math.min(cut.total, from + cut.partSize)
  if (from >= to) return
  const answer = await worker.search({ studyId, inputs: study.inputs, from, to, budgetMs: null })
  // A part that was stopped is not whole: it is not handed in.
  if (worker.isEnded(studyId)) return
  const saved = await worker.db.transaction().execute(trx => savePart(trx, studyId, { ...answer, number }))
  if (saved === 'saved') await mergeParts(worker.db, studyId, mergeTexts)
}
