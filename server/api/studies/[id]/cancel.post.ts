import type { StudyRecord } from '#shared/schemas/api'
import { cancelStudy, findStudy } from '../../../database/queries/studies'

/** Ends a study that waits or runs; one that has ended stays as it is. */
export default apiHandler(async (event): Promise<StudyRecord> => {
  const { account, studyId } = await requireStudy(event, 'study.cancel')
  await cancelStudy(useDb(), studyId, account)
  const study = await findStudy(useDb(), studyId)
  if (!study) throw notFound('study')
  return study
})
