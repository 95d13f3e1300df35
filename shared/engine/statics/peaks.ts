import type { Effects } from './effects'

/** A value and its place, mm from the left support. */
export interface Peak { value: number, at: number }

/** Moment at distance s inside interval i, Nmm. */
export function momentIn({ M, V, q }: Effects, i: number, s: number): number {
  return M[i]! + s * (V[i]! - q[i]! * s / 2)
}

/** Largest |M| with its sign kept away: its size and place, from the stations and the exact places of zero shear. */
export function largestMoment(x: Float64Array, effects: Effects, from = 0, to = x.length - 1): Peak {
  const { V, M, q } = effects
  let value = Math.abs(M[from]!)
  let at = x[from]!
  for (let i = from; i < to; i++) {
    const end = Math.abs(M[i + 1]!)
    if (q[i]! !== 0) {
      const s = V[i]! / q[i]!
      if (s > 0 && s < x[i + 1]! - x[i]!) {
        const inside = Math.abs(momentIn(effects, i, s))
        if (inside > value) {
          value = inside
          at = x[i]! + s
        }
      }
    }
    if (end > value) {
      value = end
      at = x[i + 1]!
    }
  }
  return { value, at }
}

/** Largest |V| on both sides of every station. */
export function largestShear(x: Float64Array, { V, q }: Effects): Peak {
  let value = 0
  let at = 0
  for (let i = 0; i < x.length - 1; i++) {
    const start = Math.abs(V[i]!)
    const end = Math.abs(V[i]! - q[i]! * (x[i + 1]! - x[i]!))
    if (start > value) {
      value = start
      at = x[i]!
    }
    if (end > value) {
      value = end
      at = x[i + 1]!
    }
  }
  return { value, at }
}

/** Largest E·I·w, Nmm³, at the place of zero slope. Downward loads: there is one. */
export function largestSag(x: Float64Array, effects: Effects): Peak {
  const { slope, sag } = effects
  for (let i = 0; i < x.length - 1; i++) {
    if (!(slope[i]! >= 0 && slope[i + 1]! <= 0)) continue
    const s = zeroSlope(effects, i, x[i + 1]! - x[i]!)
    const { M, V, q } = effects
    const value = sag[i]! + s * (slope[i]! - s * (M[i]! / 2 + s * (V[i]! / 6 - q[i]! * s / 24)))
    return { value, at: x[i]! + s }
  }
  return { value: 0, at: x[x.length - 1]! / 2 }
}

/** Root of the slope in interval i, by Newton's steps kept inside a shrinking bracket. */
function zeroSlope({ M, V, q, slope }: Effects, i: number, h: number): number {
  const s0 = slope[i]!
  if (s0 === 0) return 0
  let low = 0
  let high = h
  let s = h * s0 / (s0 - slope[i + 1]!)
  for (let step = 0; step < 60; step++) {
    const f = s0 - s * (M[i]! + s * (V[i]! / 2 - q[i]! * s / 6))
    if (f > 0) low = s
    else high = s
    const moment = M[i]! + s * (V[i]! - q[i]! * s / 2)
    let next = moment > 0 ? s + f / moment : (low + high) / 2
    if (!(next >= low && next <= high)) next = (low + high) / 2
    if (Math.abs(next - s) <= 1e-13 * h) return next
    s = next
  }
  return s
}

/** E·I·w at any place, Nmm³. */
export function sagAt(x: Float64Array, { M, V, q, slope, sag }: Effects, place: number): number {
  let i = 0
  while (i < x.length - 2 && place > x[i + 1]!) i++
  const s = place - x[i]!
  return sag[i]! + s * (slope[i]! - s * (M[i]! / 2 + s * (V[i]! / 6 - q[i]! * s / 24)))
}

/** f1 = 18/√δ, Hz, δ in mm under the load that vibrates. 18 is the rounded constant of a uniformly loaded beam. */
export function fundamentalFrequency(deflection: number): number {
  return 18 / Math.sqrt(deflection)
}
