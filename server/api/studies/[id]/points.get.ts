import type { SchemePoints } from '#shared/schemas/api'
import { listPoints } from '../../../database/queries/schemes'

/** The chart of a study: every kept scheme as columns, in order of rank. */
export default apiHandler(async (event): Promise<SchemePoints> => {
  const { studyId } = await requireStudy(event, 'project.read')
  return await listPoints(useDb(), studyId)
})
