import { NewStudySchema, type StudyRecord } from '#shared/schemas/api'
import { ENGINE_VERSION } from '#shared/engine/search'
import { findBasis } from '../../../database/queries/bases'
import { findPlate } from '../../../database/queries/plates'
import { findStudy, startStudy } from '../../../database/queries/studies'

/** Starts a grid study: freezes plate, basis and range, and hands them to the workers. */
export default apiHandler(async (event): Promise<StudyRecord> => {
  const { account, projectId } = await requireProject(event, 'study.run')
  const { plateId, range } = await readDocument(event, NewStudySchema)
  const [plate, basis] = await Promise.all([findPlate(useDb(), plateId), findBasis(useDb(), projectId)])
  if (plate?.projectId !== projectId) {
    throw refusal('not-found', 'This project has no such plate. Choose one of its plates.', { path: 'plateId' })
  }
  if (basis.version === 0) {
    throw refusal('cannot-be-framed', 'The basis of design has not been saved yet. Choose the national annex there and save it; the study rests on it.', { path: 'basis.nationalChoice' })
  }
  const { inputs, total } = checkStudy({ plate: plate.document, basis: basis.document, range })
  const id = await startStudy(useDb(), account, {
    projectId, plateId, plateVersion: plate.version, basisVersion: basis.version, inputs, engineVersion: ENGINE_VERSION, total,
  })
  const study = await findStudy(useDb(), id)
  if (!study) throw notFound('study')
  setResponseStatus(event, 201)
  return study
})
