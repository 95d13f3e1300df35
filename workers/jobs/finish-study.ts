import { rankRows, type StudyPart } from '#shared/engine/search'
import { collectParts } from '~~/server/database/queries/parts'
import { finishStudy as storeRanking } from '~~/server/database/queries/schemes'
import { mergeTexts } from './merge-parts'
import type { Worker } from './worker'

/** The study's counts do not add up: arrangements were lost or counted twice. */
export class IncompleteStudyError extends Error {}

function demandCompleteness({ counts }: StudyPart, total: number): void {
  const rejected = Object.values(counts.rejected).reduce((sum, count) => sum + count, 0)
  if (counts.examined + counts.cut === total && counts.examined === counts.feasible + rejected) return
  throw new IncompleteStudyError(
    `The counts of the study do not add up: ${counts.examined} examined and ${counts.cut} cut of ${total}, ${counts.feasible} feasible, ${rejected} left out.`,
  )
}

/** Ranks a study all of whose parts are in. One transaction; done twice it changes nothing. */
export async function finishStudy(worker: Worker, studyId: string): Promise<void> {
  await worker.db.transaction().execute(async (trx) => {
    const collected = await collectParts(trx, studyId, mergeTexts)
    if (!collected) return
    const part = JSON.parse(collected.result) as StudyPart
    demandCompleteness(part, collected.total)
    const ranked = rankRows(part)
    await storeRanking(trx, studyId, ranked, { ...part.counts, range: collected.total })
    worker.log.info({ studyId, total: collected.total, schemes: ranked.length }, 'study finished')
  })
}
