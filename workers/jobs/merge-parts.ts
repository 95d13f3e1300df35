import { emptyPart, mergeParts, type StudyPart } from '#shared/engine/search'

/** Merges the engine's parts, read one at a time; their order does not matter. */
export async function mergeTexts(parts: AsyncIterable<string>): Promise<string> {
  let sum = emptyPart()
  for await (const text of parts) sum = mergeParts(sum, JSON.parse(text) as StudyPart)
  return JSON.stringify(sum)
}
