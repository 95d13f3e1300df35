import type { BasisRecord } from '#shared/schemas/api'
import { findBasis } from '../../../database/queries/bases'

/** The basis of design in force; version 0 is the default that nobody has saved yet. */
export default apiHandler(async (event): Promise<BasisRecord> => {
  const { projectId } = await requireProject(event, 'project.read')
  return await findBasis(useDb(), projectId)
})
