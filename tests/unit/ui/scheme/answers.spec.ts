import { describe, expect, it } from 'vitest'
import { differenceInWords, robustnessInWords, standingInWords, stepProof, whyNotQuestion, type WhyNotForm } from '../../../../app/utils/scheme/answers'
import type { RationalisedScheme, RobustnessCase } from '#shared/engine/search'

const empty: WhyNotForm = { by: 'bays', number: null, baysX: '', baysY: '', direction: 'any', divisions: 'any' }

describe('the question of the form', () => {
  it('holds only what was filled in', () => {
    expect(whyNotQuestion({ ...empty, baysX: '2@7500, 6 m', divisions: 3 })).toEqual({ question: { baysX: [7500, 7500, 6000], divisions: 3 } })
    expect(whyNotQuestion({ ...empty, direction: 'y' })).toEqual({ question: { primaryDirection: 'y' } })
    expect(whyNotQuestion({ ...empty, by: 'number', number: 35, baysX: 'nonsense' })).toEqual({ question: { number: 35 } })
  })

  it('lacks something, at the field that lacks it', () => {
    expect(whyNotQuestion(empty)).toMatchObject({ problem: { field: 'form' } })
    expect(whyNotQuestion({ ...empty, by: 'number' })).toMatchObject({ problem: { field: 'number' } })
    expect(whyNotQuestion({ ...empty, baysY: 'wide' })).toMatchObject({ problem: { field: 'baysY' } })
  })
})

describe('words of an answer', () => {
  it('a difference names what is less, and never rounds a difference to nothing', () => {
    expect(differenceInWords({ lighter: 2.14, shallower: 30 })).toBe('2.1 kg/m² lighter, 30 mm shallower')
    expect(differenceInWords({ lighter: 0.02, shallower: 0 })).toBe('less than 0.1 kg/m² lighter')
    expect(differenceInWords({ lighter: 0, shallower: 0.3 })).toBe('less than 1 mm shallower')
  })

  it('a mass is called optimal only where that is the engine\'s word', () => {
    const step = (status: RationalisedScheme['status'], gap: number) =>
      stepProof({ status, gap, found: { mass: 4000, massPerArea: 40 } } as unknown as RationalisedScheme)
    expect(step('optimal', 0)).toBe('optimal')
    expect(step('best-found', 30)).toBe('best found, gap 0.3')
    expect(step('best-found', 2)).toBe('best found, gap under 0.1')
    expect(stepProof({ status: 'not-found', found: null, gap: 0 } as RationalisedScheme)).toBe('none found')
    expect(stepProof({ status: 'impossible', found: null, gap: 0 } as RationalisedScheme)).toBe('proved impossible')
  })

  it('a scheme is the lightest, equal to it, heavier or none', () => {
    const entry = (massPerArea: number | null, isInFront: boolean) => ({ key: 'k', number: 1, massPerArea, depth: 500, reason: null, isInFront })
    const entries = [entry(40, true), entry(41.1, true), entry(43, false), entry(null, false)]
    const all: RobustnessCase = { name: 'as-searched', change: '', entries }
    expect(entries.map(each => standingInWords(each, all))).toEqual(['lightest', 'equal', '+3.0', 'no scheme'])
  })

  it('the ranking is summed up in a sentence', () => {
    const entries = [1, 2, 3].map(number => ({ key: String(number), number, massPerArea: 40, depth: 500, reason: null, isInFront: true }))
    const cases: RobustnessCase[] = [{ name: 'as-searched', change: '', entries }]
    expect(robustnessInWords({ cases, alwaysInFront: ['1', '3'] })).toBe('Schemes 1 and 3 stay in front in every case.')
    expect(robustnessInWords({ cases, alwaysInFront: ['2'] })).toBe('Scheme 2 stays in front in every case.')
    expect(robustnessInWords({ cases, alwaysInFront: [] })).toContain('No scheme stays in front')
  })
})
