import { NewPlateSchema, type PlateRecord } from '#shared/schemas/api'
import { createPlate, findPlate } from '../../../database/queries/plates'

/** Stores a new floor plate as version 1; also the import of a plate file. */
export default apiHandler(async (event): Promise<PlateRecord> => {
  const access = await requireProject(event, 'plate.create')
  const { document } = await readDocument(event, NewPlateSchema)
  const plate = await findPlate(useDb(), await createPlate(useDb(), access, document))
  if (!plate) throw notFound('plate')
  setResponseStatus(event, 201)
  return plate
})
