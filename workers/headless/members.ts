import { nationalChoice } from '#shared/engine/actions'
import { EngineError } from '#shared/engine/errors'
import { verifyBeam } from '#shared/engine/members'
import type { Beam, BeamRules, BeamVerification, EndReaction, LoadHeight, Restraint } from '#shared/engine/members'
import { findSection } from '#shared/engine/sections'
import { MembersSchema } from '#shared/schemas/members'
import type { MemberInput } from '#shared/schemas/members'

/** ψ0 of `members`, by contract, whatever the national choice. */
const PSI0 = 0.7

function restraintOf({ restraint, span }: MemberInput): Restraint {
  switch (restraint.kind) {
    case 'continuous': return { held: [{ from: 0, to: span }], points: [] }
    case 'points': return { held: [], points: [...restraint.at] }
    case 'none': return { held: [], points: [] }
  }
}

/** The document's member as the engine's beam. 1 kN/m = 1 N/mm. */
export function beamOf(member: MemberInput): { beam: Beam, rules: BeamRules } {
  const choice = nationalChoice(member.nationalChoice)
  const height: LoadHeight = member.loadHeight === 'top-flange' ? 'top' : 'shear-centre'
  const restraint = restraintOf(member)
  return {
    beam: {
      span: member.span,
      selfWeight: member.selfWeight,
      service: {
        name: 'in service',
        line: member.line.map(({ from, to, permanent, variable }) =>
          ({ from, to, permanent, variable, accompanying: PSI0 * variable, height })),
        point: member.point.map(({ at, permanent, variable }) =>
          ({ at, permanent: 1000 * permanent, variable: 1000 * variable, accompanying: PSI0 * 1000 * variable, height })),
        restraint,
      },
      construction: [],
    },
    rules: {
      choice,
      combination: member.combination,
      criticalMoment: member.criticalMoment,
      ltbMethod: member.ltbMethod,
      useF: member.useF,
      limits: member.limits,
      utilisationLimit: 1,
    },
  }
}

function reaction({ permanent, variable, ultimate }: EndReaction) {
  return { permanent: permanent / 1000, variable: variable / 1000, ultimate: ultimate / 1000 }
}

const kNm = (value: number | null) => value === null ? null : value / 1e6

function answer(member: MemberInput, verified: BeamVerification) {
  const view = verified.cases[verified.shown]!
  const { bending, shear, buckling, deflectionVariable, deflectionTotal, frequency } = verified.utilisation
  const segment = view.governingSegment === null ? null : view.segments[view.governingSegment]!
  return {
    id: member.id,
    fy: verified.fy,
    class: verified.class,
    MEd: kNm(view.MEd),
    VEd: view.VEd / 1000,
    reactions: { left: reaction(verified.reactions.left), right: reaction(verified.reactions.right) },
    McRd: kNm(view.McRd),
    VplRd: view.VplRd / 1000,
    Mcr: kNm(view.Mcr),
    lambdaLT: view.lambdaLT,
    chiLT: view.chiLT,
    MbRd: kNm(view.MbRd),
    deflection: { variable: verified.deflection.variable, total: verified.deflection.total },
    frequency: verified.frequency,
    utilisation: { bending, shear, buckling, deflectionVariable, deflectionTotal, frequency },
    governing: verified.governing,
    passes: verified.passes,
    combination: view.combination,
    VbwRd: view.VbwRd === null ? null : view.VbwRd / 1000,
    governingSegment: segment && { from: segment.from, to: segment.to, MEd: kNm(segment.MEd), C1: segment.C1 },
    notes: verified.notes,
  }
}

/** The `members` command: every check of each member, in the order given. */
export function members(document: unknown): unknown[] {
  const input = MembersSchema.parse(document)
  return input.map((member, i) => {
    const section = findSection(member.section)
    if (!section) throw new EngineError('unknown-section', `There is no section "${member.section}".`, `[${i}].section`)
    const { beam, rules } = beamOf(member)
    try {
      return answer(member, verifyBeam(beam, section, member.grade, rules))
    } catch (error) {
      if (error instanceof EngineError) throw new EngineError(error.code, error.message, `[${i}].${error.path}`)
      throw error
    }
  })
}
