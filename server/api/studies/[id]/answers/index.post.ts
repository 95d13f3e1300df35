import { StudyQuestionSchema, questionName, type AnswerRecord } from '#shared/schemas/answers'
import { askQuestion } from '../../../../database/queries/answers'
import { findScheme } from '../../../../database/queries/schemes'

/** Asks what takes the engine longer: 202 until a worker has answered, 200 with the record after that. */
export default apiHandler(async (event): Promise<AnswerRecord> => {
  const { account, studyId } = await requireRankedStudy(event)
  const question = await readDocument(event, StudyQuestionSchema)
  if (question.kind === 'repetition' && !await findScheme(useDb(), studyId, question.key)) {
    throw refusal('not-found', `The study keeps no scheme ${question.key}. Choose one of its ranked table.`, { path: 'key' })
  }
  const record = await askQuestion(useDb(), studyId, questionName(question), account)
  if (record.state === 'queued' || record.state === 'running') setResponseStatus(event, 202)
  return record
})
