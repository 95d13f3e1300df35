import type { StudyRecord } from '#shared/schemas/api'
import { findStudy } from '../../../database/queries/studies'

/** A study with its frozen inputs and how far it is. */
export default apiHandler(async (event): Promise<StudyRecord> => {
  const { studyId } = await requireStudy(event, 'project.read')
  const study = await findStudy(useDb(), studyId)
  if (!study) throw notFound('study')
  return study
})
