import { whyNot, type WhyNot } from '#shared/engine/search'
import { WhyNotQuestionSchema } from '#shared/schemas/answers'
import { listKeptSchemes } from '../../../database/queries/schemes'

/** What excluded an arrangement of the range, or what beats it: rebuilt from its number. */
export default apiHandler(async (event): Promise<WhyNot> => {
  const { studyId } = await requireRankedStudy(event)
  const question = await readDocument(event, WhyNotQuestionSchema)
  const [prepared, rows] = await Promise.all([preparedStudy(studyId), listKeptSchemes(useDb(), studyId)])
  return whyNot(prepared, question, rows)
})
