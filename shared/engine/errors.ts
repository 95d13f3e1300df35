/**
 * The one error of the engine: a caller's mistake, named by a code of this closed list, a sentence
 * and the path of the wrong value (`loads.point[2].at`). A member that fails is a value, no error.
 */
export type EngineErrorCode
  = 'not-a-number' | 'negative' | 'not-positive' | 'outside-span' | 'empty-stretch' | 'overlap'
    | 'unknown-section' | 'unknown-grade' | 'unknown-choice' | 'out-of-range' | 'invalid'
    | 'empty-interval' | 'unknown-reference' | 'too-many' | 'cannot-be-framed'

export class EngineError extends Error {
  readonly code: EngineErrorCode
  readonly path: string

  constructor(code: EngineErrorCode, message: string, path: string) {
    super(message)
    this.name = 'EngineError'
    this.code = code
    this.path = path
  }
}
