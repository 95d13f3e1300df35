import { ProjectPersonSchema, type ProjectPerson } from '#shared/schemas/api'
import { setPerson } from '../../../../database/queries/people'

/** Adds a person of the practice to a project (201); who is on it already gets the role given (200). */
export default apiHandler(async (event): Promise<ProjectPerson> => {
  const access = await requirePeople(event)
  const wish = await readDocument(event, ProjectPersonSchema)
  // Being administrator alone is no engineering right, so it must not lead to one either.
  if (access.role !== 'engineer' && wish.email === access.account.email) {
    throw refusal('not-allowed', 'As practice administrator you choose the roles of others, not your own. Ask a scheme engineer of the project.')
  }
  const result = await setPerson(useDb(), access, wish)
  if (result === 'no-account') {
    throw refusal('not-found', `Your practice has no account of ${wish.email}. Whoever keeps the server makes one with “npm run account”; then add the person again.`, { path: 'email' })
  }
  if (result === 'last-engineer') throw lastEngineer()
  setResponseStatus(event, result.isNew ? 201 : 200)
  return result.person
})
