import { parseQuestionName } from '#shared/schemas/answers'
import { EngineError } from '#shared/engine/errors'
import { beginAnswer, failAnswer, saveAnswer } from '~~/server/database/queries/answers'
import { listKeptSchemes } from '~~/server/database/queries/schemes'
import { findStudyInputs } from '~~/server/database/queries/studies'
import { JOB_ATTEMPTS, type AnswerJob } from '~~/server/database/queue'
import type { Worker } from './worker'

/** Answers a question about a ranked study and keeps the answer. Done twice it changes nothing. */
export async function answerQuestion(worker: Worker, { studyId, question: name }: AnswerJob): Promise<void> {
  const { db, log } = worker
  const question = parseQuestionName(name)
  const study = await findStudyInputs(db, studyId)
  if (!study || !await beginAnswer(db, studyId, name)) return
  if (!question) {
    await failAnswer(db, studyId, name, `“${name}” is no question that can be answered.`)
    return
  }
  const rows = question.kind === 'robustness' ? await listKeptSchemes(db, studyId) : []
  const began = performance.now()
  try {
    const { result, engineVersion } = await worker.answer({ inputs: study.inputs, question, rows })
    await saveAnswer(db, studyId, name, result, engineVersion)
    log.info({ studyId, question: name, ms: Math.round(performance.now() - began) }, 'question answered')
  } catch (error) {
    if (!(error instanceof EngineError)) throw error
    await failAnswer(db, studyId, name, `The engine gives no answer. ${error.message}`)
  }
}

/** Ends a question whose job used up its attempts, with a sentence for its page. */
export async function giveUpAnswer(worker: Worker, { studyId, question }: AnswerJob): Promise<void> {
  await failAnswer(worker.db, studyId, question, `The answer was begun ${JOB_ATTEMPTS} times and not brought to its end. Ask again.`)
  worker.log.error({ studyId, question }, 'question given up')
}
