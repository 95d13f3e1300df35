import { removePerson } from '../../../../database/queries/people'

/** Takes a person off a project; what they did there stays. */
export default apiHandler(async (event) => {
  const access = await requirePeople(event)
  const accountId = getRouterParam(event, 'accountId')
  if (!isId(accountId)) throw missing('person', 'project')
  const result = await removePerson(useDb(), access, accountId)
  if (result === 'not-there') throw missing('person', 'project')
  if (result === 'last-engineer') throw lastEngineer()
  setResponseStatus(event, 204)
  return null
})
