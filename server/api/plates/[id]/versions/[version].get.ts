import type { PlateRecord } from '#shared/schemas/api'
import { findPlateVersion } from '../../../../database/queries/plates'

/** A plate as it was in one version. */
export default apiHandler(async (event): Promise<PlateRecord> => {
  const { plate } = await requirePlate(event, 'project.read')
  const text = getRouterParam(event, 'version') ?? ''
  const version = /^\d{1,9}$/.test(text) ? await findPlateVersion(useDb(), plate.id, Number(text)) : undefined
  if (!version) throw missing('version', 'plate')
  return version
})
