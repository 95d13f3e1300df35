import { AnswersQuerySchema, type AnswerRecord } from '#shared/schemas/answers'
import { listAnswers } from '../../../../database/queries/answers'

/** What has been asked about a study, with the answers as far as they are there. */
export default apiHandler(async (event): Promise<AnswerRecord[]> => {
  const { studyId } = await requireStudy(event, 'project.read')
  const { question } = readQuery(event, AnswersQuerySchema)
  if (question?.includes('\0')) return []
  return await listAnswers(useDb(), studyId, question)
})
