import { prepareStudy, type PreparedStudy } from '#shared/engine/search'
import { findStudyInputs } from '../database/queries/studies'
import { useDb } from './db'
import { notFound } from './refusal'

/** Studies whose plate, tables and demands are kept ready for opening schemes. */
const MOST_KEPT = 8

const kept = new Map<string, PreparedStudy>()

/** The study made ready for the engine. Inputs never change, so what is kept is never stale. */
export async function preparedStudy(studyId: string): Promise<PreparedStudy> {
  const known = kept.get(studyId)
  if (known) {
    kept.delete(studyId)
    kept.set(studyId, known)
    return known
  }
  const study = await findStudyInputs(useDb(), studyId)
  if (!study) throw notFound('study')
  const prepared = prepareStudy(study.inputs)
  kept.set(studyId, prepared)
  for (const oldest of kept.keys()) {
    if (kept.size <= MOST_KEPT) break
    kept.delete(oldest)
  }
  return prepared
}
