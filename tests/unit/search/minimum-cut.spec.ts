import fc from 'fast-check'
import { describe, expect, it, vi } from 'vitest'
import { leastCostLabels } from '#shared/engine/search/minimumCut'

vi.setConfig({ testTimeout: 120_000 })

interface Problem { costs: number[][], rules: { low: number, high: number }[] }

/** Least cost over every labelling; Infinity where none is allowed. */
function leastByTrying({ costs, rules }: Problem): number {
  const labels = costs[0]!.length
  let least = Infinity
  for (let code = 0; code < labels ** costs.length; code++) {
    const chosen = costs.map((_, v) => Math.floor(code / labels ** v) % labels)
    if (rules.some(({ low, high }) => chosen[high]! < chosen[low]!)) continue
    least = Math.min(least, chosen.reduce((sum, k, v) => sum + costs[v]![k]!, 0))
  }
  return least
}

const problem: fc.Arbitrary<Problem> = fc.tuple(fc.integer({ min: 1, max: 5 }), fc.integer({ min: 1, max: 4 })).chain(([variables, labels]) => fc.record({
  costs: fc.array(fc.array(fc.oneof({ weight: 6, arbitrary: fc.integer({ min: 0, max: 40 }) }, { weight: 1, arbitrary: fc.constant(Infinity) }),
    { minLength: labels, maxLength: labels }), { minLength: variables, maxLength: variables }),
  rules: fc.array(fc.record({ low: fc.integer({ min: 0, max: variables - 1 }), high: fc.integer({ min: 0, max: variables - 1 }) }), { maxLength: 6 }),
}))

describe('labels of least cost under order rules', () => {
  it('cost what trying every labelling finds', () => {
    fc.assert(fc.property(problem, (p) => {
      const least = leastByTrying(p)
      const found = leastCostLabels(p)
      if (found === null) {
        expect(least).toBe(Infinity)
        return
      }
      expect(p.rules.every(({ low, high }) => found[high]! >= found[low]!)).toBe(true)
      expect(found.reduce((sum, k, v) => sum + p.costs[v]![k]!, 0)).toBeCloseTo(least, 6)
    }), { numRuns: 2000 })
  })

  it('follow a chain of rules to one common label where that is cheapest', () => {
    // low wants label 0, high wants 0 too but may not be below it; the middle is forced to 2
    const costs = [[1, 9, 9], [Infinity, Infinity, 5], [0, 4, 6]]
    expect(leastCostLabels({ costs, rules: [{ low: 0, high: 1 }, { low: 1, high: 2 }] })).toEqual([0, 2, 2])
  })
})
