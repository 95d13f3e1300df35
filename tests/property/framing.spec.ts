import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { frameMadeUp, transformFaults } from './framing-checks'
import { wishes } from './framing-plates'
import { TRANSFORMS } from './plate-transforms'

const PLATES = 2000

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
