import { PlateSchema, type Plate } from '#shared/schemas/plate'

export type PlateReading = { plate: Plate, problems: [] } | { plate: null, problems: { where: string, what: string }[] }

/** How many faults of a file are listed; the first are the ones to mend. */
const MOST_PROBLEMS = 8

/** `["gridX", 0, "at"]` → `gridX[0].at`, as the file's own errors name it. */
export function pathInWords(path: readonly PropertyKey[]): string {
  return path.reduce<string>((words, step) =>
    typeof step === 'number' ? `${words}[${step}]` : words ? `${words}.${String(step)}` : String(step), '') || 'the file'
}

/** Reads a plate file; every fault with its place. */
export function readPlateFile(text: string): PlateReading {
  let document: unknown
  try {
    document = JSON.parse(text)
  } catch {
    return { plate: null, problems: [{ where: 'the file', what: 'It is no JSON document: nothing of it could be read.' }] }
  }
  const checked = PlateSchema.safeParse(document)
  if (checked.success) return { plate: checked.data, problems: [] }
  const problems = checked.error.issues.slice(0, MOST_PROBLEMS).map(issue => ({ where: pathInWords(issue.path), what: issue.message }))
  return { plate: null, problems }
}
