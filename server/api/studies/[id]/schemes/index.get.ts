import { SchemeQuerySchema, type SchemePage } from '#shared/schemas/api'
import { decodePlace, listSchemes } from '../../../../database/queries/schemes'

/** One page of the ranked table. */
export default apiHandler(async (event): Promise<SchemePage> => {
  const { studyId } = await requireStudy(event, 'project.read')
  const query = readQuery(event, SchemeQuerySchema)
  const after = query.after === undefined ? undefined : decodePlace(query.after)
  if (query.after !== undefined && !after) {
    throw refusal('malformed', 'after: this is not the end of a page. Begin with the first page again.', { path: 'after' })
  }
  return await listSchemes(useDb(), studyId, query, after)
})
