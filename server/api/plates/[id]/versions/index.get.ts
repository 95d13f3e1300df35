import type { PlateVersionSummary } from '#shared/schemas/api'
import { listPlateVersions } from '../../../../database/queries/plates'

/** Every version of a plate, newest first. */
export default apiHandler(async (event): Promise<PlateVersionSummary[]> => {
  const { plate } = await requirePlate(event, 'project.read')
  return await listPlateVersions(useDb(), plate.id)
})
