import { EngineError } from '#shared/engine/errors'
import { memberSheet } from '#shared/engine/search'

/** The calculation sheet of a member of a scheme. */
export default apiHandler(async (event) => {
  const { studyId, row } = await requireScheme(event)
  const prepared = await preparedStudy(studyId)
  try {
    return memberSheet(prepared, row.key, getRouterParam(event, 'mark', { decode: true }) ?? '')
  } catch (error) {
    if (error instanceof EngineError && error.code === 'unknown-reference') throw missing('member', 'scheme')
    throw error
  }
})
