/** Questions about a study that has been ranked, and what is kept of their answers. */
import { z } from 'zod'

const bay = z.int('A bay is a whole number of millimetres.').min(1, 'A bay is longer than 0 mm.').max(1_000_000, 'A bay is at most 1 000 m.')
const bays = z.array(bay).min(1, 'At least one bay is needed.').max(199, 'At most 199 bays each way.')

/** One arrangement by its number, or all that have these bays (mm), direction and divisions; what is left out may be anything. */
export const WhyNotQuestionSchema = z.strictObject({
  number: z.int('Arrangements have whole numbers.').min(1, 'Arrangements are numbered from 1.').optional(),
  baysX: bays.optional(),
  baysY: bays.optional(),
  primaryDirection: z.enum(['x', 'y']).optional(),
  divisions: z.int().min(1).max(20).optional(),
}).superRefine((question, context) => {
  const asked = Object.values(question).filter(value => value !== undefined).length
  if (asked === 0) {
    context.addIssue({ code: 'custom', path: [], message: 'Ask for bays, a direction, a number of panels, or for an arrangement by its number' })
  }
  if (question.number !== undefined && asked > 1) {
    context.addIssue({ code: 'custom', path: ['number'], message: 'An arrangement is asked for by its number or by its bays, not by both.' })
  }
})
export type WhyNotQuestion = z.infer<typeof WhyNotQuestionSchema>

/** Questions that take the engine longer: a worker answers them. `scope`: so many sections in all, or for each kind of member. */
export const StudyQuestionSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('robustness') }),
  z.strictObject({ kind: z.literal('repetition'), key: z.string().min(1).max(40), scope: z.enum(['plate', 'kind']).default('plate') }),
])
export type StudyQuestion = z.infer<typeof StudyQuestionSchema>

/** The name under which a study keeps the answer: `robustness`, `repetition/plate/35222`. */
export function questionName(question: StudyQuestion): string {
  return question.kind === 'robustness' ? question.kind : `${question.kind}/${question.scope}/${question.key}`
}

/** null where the text is the name of no question. */
export function parseQuestionName(name: string): StudyQuestion | null {
  const [kind, scope, key] = name.split('/')
  const { data } = StudyQuestionSchema.safeParse(kind === 'repetition' ? { kind, scope, key } : { kind })
  return data !== undefined && questionName(data) === name ? data : null
}

export const AnswersQuerySchema = z.strictObject({
  /** A question's name; without it all answers of the study. */
  question: z.string().max(100).optional(),
})

export const ANSWER_STATES = ['queued', 'running', 'finished', 'failed'] as const
export type AnswerState = typeof ANSWER_STATES[number]

/** The one record of a question on a study. */
export interface AnswerRecord<Result = unknown> {
  question: string
  state: AnswerState
  /** null until it is finished. */
  result: Result | null
  /** In words, where it failed. */
  failure: string | null
  engineVersion: string | null
  askedAt: string
  answeredAt: string | null
}
