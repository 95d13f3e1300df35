import type { ProjectDetail } from '#shared/schemas/api'
import { findProject } from '../../../database/queries/projects'

/** A project with its people, plates and studies. */
export default apiHandler(async (event): Promise<ProjectDetail> => {
  const { account, projectId } = await requireProject(event, 'project.read')
  const project = await findProject(useDb(), account.id, projectId)
  if (!project) throw notFound('project')
  return project
})
