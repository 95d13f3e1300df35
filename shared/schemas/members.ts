/** The `members` document of the headless command: lengths mm, line loads kN/m, point loads kN. */
import { z } from 'zod'
import { GradeSchema, NationalChoiceSchema } from './basis'

/** Beyond these no floor beam lies, and sums of squares stay finite. */
const LONGEST = 1_000_000
const LARGEST_LOAD = 1_000_000
/** Share of the span: on a shorter stretch a line load would be lost. */
const SHORTEST_STRETCH = 1e-9
const MOST_LOADS = 10_000
const MOST_RESTRAINTS = 100

const place = z.number().min(0).max(LONGEST)
const load = z.number().min(0, 'A load acts downwards: it must not be negative.').max(LARGEST_LOAD)
const spanRatio = z.number().min(1).max(1_000_000).nullable()

export const MemberLineLoadSchema = z.strictObject({ from: place, to: place, permanent: load, variable: load })
  .refine(({ from, to }) => to > from, { message: 'A line load must end after its start.', path: ['to'] })

export const MemberPointLoadSchema = z.strictObject({ at: place, permanent: load, variable: load })

export const MemberRestraintSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('continuous') }),
  z.strictObject({ kind: z.literal('points'), at: z.array(place).max(MOST_RESTRAINTS) }),
  z.strictObject({ kind: z.literal('none') }),
])

export const MemberLimitsSchema = z.strictObject({
  variable: spanRatio,
  total: spanRatio,
  /** Hz. */
  frequency: z.number().min(0.01).max(1000).nullable(),
  variableShare: z.number().min(0).max(1),
})

export const MemberSchema = z.strictObject({
  id: z.string(),
  section: z.string(),
  grade: GradeSchema,
  nationalChoice: NationalChoiceSchema,
  combination: z.enum(['6.10', '6.10ab']),
  span: z.number().min(1).max(LONGEST),
  line: z.array(MemberLineLoadSchema).max(MOST_LOADS).default([]),
  point: z.array(MemberPointLoadSchema).max(MOST_LOADS).default([]),
  selfWeight: z.boolean(),
  restraint: MemberRestraintSchema,
  loadHeight: z.enum(['top-flange', 'shear-centre']),
  criticalMoment: z.enum(['by-segment', 'whole-beam']),
  ltbMethod: z.enum(['6.3.2.3', '6.3.2.2']),
  useF: z.boolean(),
  limits: MemberLimitsSchema,
}).check((context) => {
  const { span, line, point, restraint } = context.value
  const outside = (value: number, path: (string | number)[]) => {
    if (value <= span) return
    context.issues.push({
      code: 'custom', input: value, path, params: { code: 'outside-span' },
      message: `This place, ${value} mm, lies outside the beam of 0 to ${span} mm.`,
    })
  }
  line.forEach(({ from, to }, i) => {
    outside(from, ['line', i, 'from'])
    outside(to, ['line', i, 'to'])
    if (to > from && to - from <= SHORTEST_STRETCH * span) {
      context.issues.push({
        code: 'custom', input: to, path: ['line', i, 'to'], params: { code: 'empty-stretch' }, message: 'A line load must end after its start.',
      })
    }
  })
  point.forEach(({ at }, i) => outside(at, ['point', i, 'at']))
  if (restraint.kind === 'points') restraint.at.forEach((at, i) => outside(at, ['restraint', 'at', i]))
})

export const MembersSchema = z.array(MemberSchema)
export type MemberInput = z.infer<typeof MemberSchema>
