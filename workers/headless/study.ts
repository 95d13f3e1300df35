/** `study`: a plate, a basis and a range in, counts and ranked schemes out. */
import { study as runStudy } from '#shared/engine/search'
import { StudyInputSchema } from '#shared/schemas/study'

export function study(document: unknown): unknown {
  return runStudy(StudyInputSchema.parse(document))
}
