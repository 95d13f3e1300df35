import { emptyEffects, largestSag } from '../statics'
import type { Effects, Peak } from '../statics'
import type { PreparedBeam } from './prepare'
import type { Resistances } from './resistances'

/** Deflections, mm. */
export interface Sags { variable: number, total: number, vibrating: number, atVariable: number, atTotal: number }

let room: Effects = emptyEffects(0)

/** base + weight · self, in reused room: what deflection needs. */
function withOwnWeight(base: Effects, self: Effects, weight: number): Effects {
  const n = base.M.length
  if (room.M.length !== n) room = emptyEffects(n)
  for (let i = 0; i < n; i++) {
    room.q[i] = base.q[i]! + weight * self.q[i]!
    room.V[i] = base.V[i]! + weight * self.V[i]!
    room.M[i] = base.M[i]! + weight * self.M[i]!
    room.slope[i] = base.slope[i]! + weight * self.slope[i]!
    room.sag[i] = base.sag[i]! + weight * self.sag[i]!
  }
  return room
}

/** E·I·w at its largest under permanent + variable with own weight, Nmm³. */
export function characteristicSag({ cases, characteristic }: PreparedBeam, weight: number): Peak {
  const { x, self } = cases[0]!
  return largestSag(x, withOwnWeight(characteristic, self, weight))
}

/** E·I·w at its largest under the load that vibrates, Nmm³. */
export function vibratingSag({ cases, vibrating }: PreparedBeam, weight: number): Peak {
  const { x, self } = cases[0]!
  return largestSag(x, withOwnWeight(vibrating, self, weight))
}

/** Largest deflections with own weight, at their true places. E I constant along the beam. */
export function sagsOf(prepared: PreparedBeam, { EIy }: Resistances, weight: number): Sags {
  const total = characteristicSag(prepared, weight)
  return {
    variable: prepared.sagVariable.value / EIy,
    atVariable: prepared.sagVariable.at,
    total: total.value / EIy,
    atTotal: total.at,
    vibrating: vibratingSag(prepared, weight).value / EIy,
  }
}
