/** Choices of few sections against every choice tried, on made-up problems. */
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { type SelectionProblem, leastMassSelections } from '#shared/engine/selection'
import { proposeSections } from '#shared/optimise'

const MOST = 5

const problems: fc.Arbitrary<SelectionProblem> = fc.integer({ min: 1, max: 9 }).chain(sections => fc.record({
  masses: fc.array(fc.integer({ min: 100, max: 2000 }).map(n => n / 10), { minLength: sections, maxLength: sections }),
  groups: fc.array(fc.record({
    weight: fc.integer({ min: 1, max: 4000 }).map(n => n / 10),
    passing: fc.uniqueArray(fc.integer({ min: 0, max: sections - 1 }), { minLength: 1, maxLength: sections }).map(list => list.sort((a, b) => a - b)),
  }), { minLength: 1, maxLength: 12 }),
}))

/** Least cost of every number of sections, by trying all sets of them. */
function tried({ masses, groups }: SelectionProblem): number[] {
  const least = new Array<number>(MOST + 1).fill(Infinity)
  for (let set = 1; set < 2 ** masses.length; set++) {
    const used = masses.flatMap((_, s) => set & (1 << s) ? [s] : [])
    if (used.length > MOST) continue
    const cost = groups.reduce((sum, { weight, passing }) =>
      sum + weight * Math.min(Infinity, ...passing.filter(s => used.includes(s)).map(s => masses[s]!)), 0)
    for (let k = used.length; k <= MOST; k++) least[k] = Math.min(least[k]!, cost)
  }
  return least.slice(1)
}

describe('a choice of few sections', () => {
  it('costs what the best of all choices costs, and is proved', () => {
    fc.assert(fc.property(problems, (problem) => {
      const found = leastMassSelections(problem, MOST)
      tried(problem).forEach((least, n) => {
        const choice = found[n]
        if (least === Infinity) return expect(choice).toBeNull()
        expect(choice!.cost).toBeCloseTo(least, 6)
        expect(choice!.isOptimal).toBe(true)
        expect(choice!.sections.length).toBeLessThanOrEqual(n + 1)
      })
    }), { numRuns: 300 })
  })

  it('gives each group a section that passes, of those it names', () => {
    fc.assert(fc.property(problems, fc.integer({ min: 1, max: MOST }), (problem, most) => {
      const choice = leastMassSelections(problem, most)[most - 1]
      if (!choice) return
      expect([...new Set(choice.choice)].sort((a, b) => a - b)).toEqual(choice.sections)
      choice.choice.forEach((s, g) => expect(problem.groups[g]!.passing).toContain(s))
    }), { numRuns: 200 })
  })

  it('is the same whatever is proposed to it', () => {
    fc.assert(fc.property(problems, fc.infiniteStream(fc.nat()), (problem, numbers) => {
      const any = () => [numbers.next().value as number % problem.masses.length]
      const [plain, proposed, solved] = [{}, { proposal: any }, { proposal: proposeSections }]
        .map(options => leastMassSelections(problem, MOST, options).map(choice => choice && Math.round(choice.cost * 1000)))
      expect(proposed).toEqual(plain)
      expect(solved).toEqual(plain)
    }), { numRuns: 100 })
  })

  it('keeps its bound below the best where it may not look', () => {
    fc.assert(fc.property(problems, (problem) => {
      const least = tried(problem)
      leastMassSelections(problem, MOST, { work: 0 }).forEach((choice, n) => {
        if (choice) expect(choice.bound).toBeLessThanOrEqual(least[n]! + 1e-6)
        else expect(least[n]).toBe(Infinity)
      })
    }), { numRuns: 200 })
  })
})

describe('the integer programme', () => {
  it('answers with the optimum or with nothing', () => {
    fc.assert(fc.property(problems, fc.integer({ min: 1, max: MOST }), (problem, most) => {
      const proposed = proposeSections(problem, most)
      const least = tried(problem)[most - 1]!
      if (!proposed) return
      const cost = problem.groups.reduce((sum, { weight, passing }) =>
        sum + weight * Math.min(...passing.filter(s => proposed.includes(s)).map(s => problem.masses[s]!)), 0)
      expect(cost).toBeCloseTo(least, 6)
    }), { numRuns: 200 })
  })
})
