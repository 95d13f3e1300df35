import { nationalChoice } from '#shared/engine/actions'
import type { Beam, BeamRules, LoadCase, LoadHeight, Restraint } from '#shared/engine/members'

export const NO_LIMITS = { variable: null, total: null, frequency: null, variableShare: 0.1 }

export function rulesOf(parts: Partial<BeamRules> = {}): BeamRules {
  return {
    choice: nationalChoice('UK'),
    combination: '6.10',
    criticalMoment: 'by-segment',
    ltbMethod: '6.3.2.3',
    useF: false,
    limits: { variable: 360, total: 200, frequency: null, variableShare: 0.1 },
    utilisationLimit: 1,
    ...parts,
  }
}

export const line = (from: number, to: number, permanent: number, variable: number, height: LoadHeight = 'shear-centre') =>
  ({ from, to, permanent, variable, accompanying: 0.7 * variable, height })

export const point = (at: number, permanent: number, variable: number, height: LoadHeight = 'shear-centre') =>
  ({ at, permanent, variable, accompanying: 0.7 * variable, height })

export const FREE: Restraint = { held: [], points: [] }
export const heldOver = (span: number): Restraint => ({ held: [{ from: 0, to: span }], points: [] })

export function beamOf(span: number, service: Partial<LoadCase>, construction: LoadCase[] = [], selfWeight = true): Beam {
  return { span, selfWeight, service: { name: 'in service', line: [], point: [], restraint: FREE, ...service }, construction }
}
