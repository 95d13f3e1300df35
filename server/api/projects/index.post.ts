import { NewProjectSchema, type ProjectDetail } from '#shared/schemas/api'
import { mayCreateProjects } from '#shared/utils/permissions'
import { createProject, findProject } from '../../database/queries/projects'

/** Makes a project; its maker is its first engineer. */
export default apiHandler(async (event): Promise<ProjectDetail> => {
  const account = requireAccount(event)
  if (!mayCreateProjects(account.role)) {
    throw refusal('not-allowed', 'Projects are made by scheme engineers. Ask one of your practice.')
  }
  const wish = await readDocument(event, NewProjectSchema)
  const id = await createProject(useDb(), account, wish)
  if (!id) throw refusal('malformed', `number: your practice has a project ${wish.number} already; choose another number.`, { path: 'number' })
  setResponseStatus(event, 201)
  const project = await findProject(useDb(), account.id, id)
  if (!project) throw notFound('project')
  return project
})
