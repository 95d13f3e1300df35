import type { Plate } from '#shared/schemas/plate'
import type { Range } from '#shared/schemas/range'
import { EngineError } from '#shared/engine/errors'
import { countRange } from '#shared/engine/search'

export type ArrangementCount = ReturnType<typeof countRange>

/** How many arrangements a range makes on a plate, by the engine's own count, or why it cannot be counted. */
export function useArrangementCount(plate: () => Plate | null, range: () => Range | null) {
  return computed<{ count: ArrangementCount | null, problem: string | null }>(() => {
    const drawn = plate()
    const asked = range()
    if (!drawn || !asked) return { count: null, problem: null }
    try {
      return { count: countRange(drawn, asked), problem: null }
    } catch (error) {
      if (error instanceof EngineError) return { count: null, problem: error.message }
      throw error
    }
  })
}
