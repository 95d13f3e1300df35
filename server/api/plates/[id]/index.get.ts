import type { PlateRecord } from '#shared/schemas/api'

/** A floor plate in its present version. */
export default apiHandler(async (event): Promise<PlateRecord> => {
  const { plate } = await requirePlate(event, 'project.read')
  return plate
})
