import type { SchemeDetail } from '#shared/schemas/api'
import { schemeDetail } from '#shared/engine/search'
import { findStudy } from '../../../../../database/queries/studies'

/** A scheme with every member, rebuilt by the engine from its number. */
export default apiHandler(async (event): Promise<SchemeDetail> => {
  const { studyId, row } = await requireScheme(event)
  const [study, prepared] = await Promise.all([findStudy(useDb(), studyId), preparedStudy(studyId)])
  if (!study) throw notFound('study')
  return {
    ...schemeDetail(prepared, row.key),
    rank: row.rank,
    onTradeOffLine: row.onTradeOffLine,
    studyId,
    projectId: study.projectId,
    studyNumber: study.number,
    total: study.total,
    plate: study.plate,
    basis: study.basis,
    plateVersion: study.plateVersion,
    basisVersion: study.basisVersion,
    engineVersion: study.engineVersion,
  }
})
