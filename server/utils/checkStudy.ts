import { EngineError } from '#shared/engine/errors'
import { prepareStudy } from '#shared/engine/search'
import { StudyInputSchema, type StudyInput } from '#shared/schemas/study'
import { pathOf } from './body'
import { refusal } from './refusal'

/** The inputs of a study as the engine takes them, and its number of arrangements; 422 with sentence and path where it cannot. */
export function checkStudy(wish: { [K in keyof StudyInput]: unknown }): { inputs: StudyInput, total: number } {
  const read = StudyInputSchema.safeParse(wish)
  if (!read.success) {
    const issue = read.error.issues[0]
    throw refusal('cannot-be-framed', issue?.message ?? 'The inputs are not valid.', { path: pathOf(issue?.path ?? []) })
  }
  try {
    return { inputs: read.data, total: prepareStudy(read.data).total }
  } catch (error) {
    if (error instanceof EngineError) throw refusal('cannot-be-framed', error.message, { path: error.path, reason: error.code })
    throw error
  }
}
