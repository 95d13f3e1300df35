import { SavePlateSchema, type PlateRecord } from '#shared/schemas/api'
import { may } from '#shared/utils/permissions'
import { findPlate, savePlate } from '../../../database/queries/plates'

/** Saves a plate over the version that was read; 409 with the present one where that is another. */
export default apiHandler(async (event): Promise<PlateRecord> => {
  const { plate, role, ...access } = await requirePlate(event, 'plate.edit', 'plate.edit-constraints')
  const wish = await readDocument(event, SavePlateSchema)
  if (!may(role, 'plate.edit') && !changesConstraintsOnly(plate.document, wish.document)) {
    throw refusal('not-allowed', 'An architect changes keep-clear zones and pinned grid lines only; the rest of the plate is the engineer\'s.')
  }
  const isSaved = await savePlate(useDb(), access, { id: plate.id, ...wish })
  const current = await findPlate(useDb(), plate.id)
  if (!current) throw notFound('plate')
  if (!isSaved) throw staleVersion('plate', wish.version, current)
  return current
})
