import { describe, expect, it } from 'vitest'
import { type SelectionProblem, leastMassSelection, leastMassSelections, smallestCover } from '#shared/engine/selection'
import { MOST_ROWS, proposeSections, rowsOf } from '#shared/optimise'

/** Three sections of 10, 20 and 30 kg/m; the heavier ones also carry what the lighter ones carry. */
const NESTED: SelectionProblem = {
  masses: [10, 20, 30],
  groups: [{ weight: 5, passing: [0, 1, 2] }, { weight: 2, passing: [1, 2] }, { weight: 1, passing: [2] }],
}

describe('a choice of few sections', () => {
  it('takes the heaviest for all, then the pair that costs least, then each group its own', () => {
    const found = leastMassSelections(NESTED, 4)
    // By hand: 8 m of 30 kg/m; 5 m of 10 and 3 m of 30; 5 · 10 + 2 · 20 + 1 · 30.
    expect(found.map(choice => choice?.cost)).toEqual([240, 140, 120, 120])
    expect(found.map(choice => choice?.sections)).toEqual([[2], [0, 2], [0, 1, 2], [0, 1, 2]])
    expect(found[1]?.choice).toEqual([0, 2, 2])
    expect(found.every(choice => choice?.isOptimal)).toBe(true)
  })

  it('says that too few sections cannot serve groups that share none', () => {
    const apart: SelectionProblem = { masses: [10, 12, 14], groups: [0, 1, 2].map(s => ({ weight: 1, passing: [s] })) }
    expect(leastMassSelections(apart, 4).map(choice => choice?.cost ?? null)).toEqual([null, null, 36, 36])
  })

  it('gives null where a group has no section at all', () => {
    expect(leastMassSelection({ masses: [10], groups: [{ weight: 1, passing: [] }] }, 3)).toBeNull()
  })

  it('shares the sections between parts as is lightest', () => {
    // Beams 0…2, columns 3…4: a second section saves 90 kg on the beams and 20 kg on the columns.
    const problem: SelectionProblem = {
      masses: [10, 19, 40, 30, 50],
      groups: [{ weight: 10, passing: [0, 1] }, { weight: 1, passing: [1] }, { weight: 1, passing: [3, 4] }, { weight: 1, passing: [4] }],
    }
    expect(leastMassSelection(problem, 2)?.cost).toBe(11 * 19 + 2 * 50)
    expect(leastMassSelection(problem, 3)).toMatchObject({ cost: 100 + 19 + 100, sections: [0, 1, 4], isOptimal: true })
  })

  it('takes the earlier of two sections of the same mass', () => {
    expect(leastMassSelection({ masses: [20, 20], groups: [{ weight: 3, passing: [0, 1] }] }, 1)?.sections).toEqual([0])
  })

  it('calls an answer best found where its work ends before the proof', () => {
    // Groups on the sides of a ring of five, each of whose sections serves two: the relaxation takes halves.
    const ring: SelectionProblem = {
      masses: [10, 10.1, 10.2, 10.3, 10.4, 60],
      groups: [0, 1, 2, 3, 4].map(s => ({ weight: 1, passing: [s, (s + 1) % 5, 5].sort((a, b) => a - b) })),
    }
    const cut = leastMassSelection(ring, 3, { work: 0 })!
    const proved = leastMassSelection(ring, 3)!
    expect(proved.isOptimal).toBe(true)
    expect(cut.cost).toBeGreaterThanOrEqual(proved.cost - 1e-9)
    expect(cut.bound).toBeLessThanOrEqual(proved.cost + 1e-9)
    expect(cut.isOptimal).toBe(cut.cost - cut.bound <= 0.0005)
  })

  it('finds the least number of sections that serves every group', () => {
    const problem: SelectionProblem = {
      masses: [1, 1, 1, 1],
      groups: [{ weight: 1, passing: [0, 1] }, { weight: 1, passing: [1, 2] }, { weight: 1, passing: [2, 3] }, { weight: 1, passing: [0, 3] }],
    }
    expect(smallestCover(problem, 4)).toHaveLength(2)
    expect(smallestCover(problem, 1)).toBeNull()
  })
})

describe('the proposal of the integer programme', () => {
  it('finds the pair of the nested sections', () => {
    expect(proposeSections(NESTED, 2)).toEqual([0, 2])
  })

  it('counts one row for each group, for each passing section and for the number of sections', () => {
    expect(rowsOf(NESTED)).toBe(3 + 6 + 1)
  })

  it('proposes nothing where too few sections are allowed', () => {
    expect(proposeSections({ masses: [10, 12], groups: [{ weight: 1, passing: [0] }, { weight: 1, passing: [1] }] }, 1)).toBeNull()
  })

  it('is not asked for a programme larger than was measured', () => {
    const wide: SelectionProblem = {
      masses: Array.from({ length: 100 }, (_, s) => 10 + s),
      groups: Array.from({ length: 20 }, () => ({ weight: 1, passing: Array.from({ length: 100 }, (_, s) => s) })),
    }
    expect(rowsOf(wide)).toBeGreaterThan(MOST_ROWS)
    expect(proposeSections(wide, 2)).toBeNull()
  })
})
