import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { frameMadeUp, transformFaults } from './framing-checks'
import { type Wishes, wishes } from './framing-plates'
import { TRANSFORMS } from './plate-transforms'

const PLATES = 2000

/** The plainest wishes; named tests change what once failed. */
const PLAIN: Wishes = {
  baysX: [3000], baysY: [3000], shape: 'rectangle', cut: [0, 0, 0], turned: false, overhangs: [0], voids: [], zones: [], outlineLoad: 0,
  lines: [], voidLoads: 0, omitted: [], split: null, framing: [{ direction: 'x', divisions: 1 }, { direction: 'x', divisions: 1 }], fixed: false,
}
const small = { x: 0, y: 0, w: 0, h: 0, size: 'bay', gap: 0 } as const

describe('any plate', () => {
  it('is framed soundly and in equilibrium, or rejected for a reason of the list', () => {
    let framed = 0
    fc.assert(fc.property(wishes, (w) => {
      const { outcome, faults } = frameMadeUp(w)
      if (outcome === 'framed') framed++
      expect(faults).toEqual([])
    }), { numRuns: PLATES })
    expect(framed).toBeGreaterThan(PLATES / 3)
  }, 300_000)

  it.each(TRANSFORMS)('has the same loads on its columns and the same beams: $name', (transform) => {
    fc.assert(fc.property(wishes, (w) => {
      expect(transformFaults(w, transform)).toEqual([])
    }), { numRuns: 60 })
  }, 120_000)
})

describe('plates that once failed', () => {
  it.each<[string, Partial<Wishes>]>([
    ['two voids side by side, the second up to 600 mm from the beam beyond the first', {
      voids: [{ ...small, place: 'free' }, { ...small, x: 0.501, place: 'beside' }],
    }],
    ['a beam without load under reduction by area', {}],
    ['an overhang on two sides with cladding', { baysY: [5797], overhangs: [250, 0], outlineLoad: 4 }],
  ])('are framed soundly: %s', (_, change) => {
    const wish = { ...PLAIN, ...change }
    expect(frameMadeUp(wish)).toEqual({ outcome: 'framed', faults: [] })
    for (const transform of TRANSFORMS) expect(transformFaults(wish, transform)).toEqual([])
  })
})
