import type { ProjectSummary } from '#shared/schemas/api'
import { listProjects } from '../../database/queries/projects'

/** The projects of whoever asks, last changed first. */
export default apiHandler((event): Promise<ProjectSummary[]> => listProjects(useDb(), requireAccount(event).id))
