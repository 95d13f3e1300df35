import { JOB_ATTEMPTS, type StudyJob } from '~~/server/database/queue'
import { failStudy } from '~~/server/database/queries/studies'
import type { Worker } from './worker'

/** Ends the study of a job that used up its attempts, with a sentence for its page. */
export async function giveUpStudy(worker: Worker, job: StudyJob): Promise<void> {
  const what = job.kind === 'part' ? `Part ${job.number + 1} of the study` : 'The study'
  const sentence = `${what} stopped the worker ${JOB_ATTEMPTS} times and was given up. Run it again; should it stop once more, narrow the range or report the plate.`
  if (await failStudy(worker.db, job.studyId, sentence)) {
    worker.log.error({ studyId: job.studyId, kind: job.kind }, 'study given up')
  }
}
