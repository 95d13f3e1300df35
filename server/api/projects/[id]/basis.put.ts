import { SaveBasisSchema, type BasisRecord } from '#shared/schemas/api'
import { may } from '#shared/utils/permissions'
import { findBasis, saveBasis } from '../../../database/queries/bases'

/** Saves the basis over the version that was read; 409 with the one in force where that is another. */
export default apiHandler(async (event): Promise<BasisRecord> => {
  const access = await requireProject(event, 'basis.edit', 'basis.edit-allowances')
  const wish = await readDocument(event, SaveBasisSchema)
  const inForce = await findBasis(useDb(), access.projectId)
  if (!may(access.role, 'basis.edit') && !changesAllowancesOnly(inForce.document, wish.document)) {
    throw refusal('not-allowed', 'A cost planner changes the allowances for connections and bracing only; the rest of the basis is the engineer\'s.')
  }
  const isSaved = await saveBasis(useDb(), access, wish)
  const current = await findBasis(useDb(), access.projectId)
  if (!isSaved) throw staleVersion('basis of design', wish.version, current)
  return current
})
