/** What runs in the thread of answers: one question about a ranked study. Knows neither queue nor database. */
import { EngineError } from '#shared/engine/errors'
import { ENGINE_VERSION, prepareStudy, priceOfRepetition, robustness } from '#shared/engine/search'
import type { StudyQuestion } from '#shared/schemas/answers'
import type { SchemeRow } from '#shared/schemas/api'
import type { StudyInput } from '#shared/schemas/study'
import type { SearchRefusal } from './search'

export interface AnswerTask {
  inputs: StudyInput
  question: StudyQuestion
  /** The kept schemes, ranked. */
  rows: SchemeRow[]
}

/** The engine's answer as JSON. */
export interface EngineAnswer { result: string, engineVersion: string }

export default function answer({ inputs, question, rows }: AnswerTask): EngineAnswer | SearchRefusal {
  try {
    const study = prepareStudy(inputs)
    const result = question.kind === 'robustness' ? robustness(study, rows) : priceOfRepetition(study, question.key, question.scope)
    return { result: JSON.stringify(result), engineVersion: ENGINE_VERSION }
  } catch (error) {
    if (!(error instanceof EngineError)) throw error
    const { code, message, path } = error
    return { refusal: { code, message, path } }
  }
}
