import { describe, expect, it } from 'vitest'
import {
  effectsOf, emptyEffects, fundamentalFrequency, largestMoment, largestSag, largestShear, sagAt, stationsOf, superpose,
} from '#shared/engine/statics'

const L = 8000

describe('a simply supported beam', () => {
  it('carries a uniform load as wL/2, wL²/8, 5wL⁴/384', () => {
    const x = stationsOf(L, [])
    const effects = effectsOf(x, [{ from: 0, to: L, q: 10 }], [])
    expect([effects.left, effects.right]).toEqual([40_000, 40_000])
    expect(largestMoment(x, effects)).toEqual({ value: 80e6, at: 4000 })
    expect(largestShear(x, effects).value).toBe(40_000)
    expect(largestSag(x, effects).value / (5 * 10 * L ** 4 / 384)).toBeCloseTo(1, 12)
    expect(largestSag(x, effects).at).toBeCloseTo(4000, 6)
  })

  it('carries an eccentric point load as Pab/L and deflects most at √((L² − b²)/3)', () => {
    const [P, a] = [50_000, 5500]
    const b = L - a
    const x = stationsOf(L, [a])
    const effects = effectsOf(x, [], [{ at: a, P }])
    expect(effects.left).toBeCloseTo(P * b / L, 6)
    expect(largestMoment(x, effects).value).toBeCloseTo(P * a * b / L, 3)
    expect(largestMoment(x, effects).at).toBe(a)
    const peak = largestSag(x, effects)
    expect(peak.at).toBeCloseTo(Math.sqrt((L * L - b * b) / 3), 6)
    expect(peak.value / (P * b * (L * L - b * b) ** 1.5 / (9 * Math.sqrt(3) * L))).toBeCloseTo(1, 12)
  })

  it('finds the largest moment of a partial load where the shear is zero', () => {
    const x = stationsOf(L, [1000, 4000])
    const effects = effectsOf(x, [{ from: 1000, to: 4000, q: 12 }], [])
    const R = 12 * 3000 * (L - 2500) / L
    const peak = largestMoment(x, effects)
    expect(peak.at).toBeCloseTo(1000 + R / 12, 9)
    expect(peak.value).toBeCloseTo(R * peak.at - 12 * (R / 12) ** 2 / 2, 3)
  })

  it('passes a load on a support straight into the reaction', () => {
    const x = stationsOf(L, [0, L])
    const effects = effectsOf(x, [], [{ at: 0, P: 7 }, { at: L, P: 9 }])
    expect([effects.left, effects.right, largestMoment(x, effects).value, largestShear(x, effects).value]).toEqual([7, 9, 0, 0])
  })

  it('agrees with numerical integration of the curvature for an unsymmetrical load', () => {
    const line = [{ from: 0, to: L, q: 3 }, { from: 2500, to: 6100, q: 9 }]
    const point = [{ at: 1200, P: 20_000 }, { at: 6900, P: 35_000 }]
    const x = stationsOf(L, [2500, 6100, 1200, 6900])
    const effects = effectsOf(x, line, point)
    const steps = 16_000
    const dx = L / steps
    const moment = (s: number) => effects.left * s
      - point.reduce((sum, { at, P }) => sum + P * Math.max(0, s - at), 0)
      - line.reduce((sum, { from, to, q }) => sum + q / 2 * (Math.max(0, s - from) ** 2 - Math.max(0, s - to) ** 2), 0)
    const unit = (s: number, at: number) => s < at ? s * (L - at) / L : at * (L - s) / L
    for (const at of [1000, 3700, 6500]) {
      let sum = 0
      for (let i = 0; i < steps; i++) sum += moment((i + 0.5) * dx) * unit((i + 0.5) * dx, at) * dx
      expect(sagAt(x, effects, at) / sum).toBeCloseTo(1, 6)
    }
  })

  it('superposes load sets', () => {
    const x = stationsOf(L, [3000])
    const a = effectsOf(x, [{ from: 0, to: L, q: 2 }], [])
    const b = effectsOf(x, [], [{ at: 3000, P: 1000 }])
    const both = effectsOf(x, [{ from: 0, to: L, q: 2.7 }], [{ at: 3000, P: 1500 }])
    const sum = superpose(emptyEffects(x.length), [[1.35, a], [1.5, b]])
    expect(Array.from(sum.M)).toEqual(Array.from(both.M, value => expect.closeTo(value, 3)))
    expect(sum.left).toBeCloseTo(both.left, 6)
  })

  it('merges stations that are the same place', () => {
    expect(Array.from(stationsOf(L, [3000, 3000 + 1e-9, 0, L, 5000]))).toEqual([0, 3000, 5000, L])
    expect(Array.from(stationsOf(L, [3000, 3000.01]))).toEqual([0, 3000, 3000.01, L])
  })

  it('takes 18/√δ as frequency', () => {
    expect(fundamentalFrequency(9)).toBe(6)
  })
})
