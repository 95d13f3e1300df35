import { describe, expect, it } from 'vitest'
import type { SchemeMemberDetail } from '#shared/schemas/api'
import { loadPath } from '~~/app/utils/scheme/loadPath'
import { roundedParts, scheduleBySection } from '~~/app/utils/scheme/schedule'
import { durationInWords, governingInShort, REJECTION_WORDS } from '~~/app/utils/scheme/words'
import { REJECTIONS } from '#shared/schemas/study'

const member = (mark: string, section: string, mass: number, utilisation: number): SchemeMemberDetail => ({
  mark, kind: 'secondary', section, mass, utilisation, governing: 'bending', place: mark, length: 7500, grade: 'S355',
  utilisations: {}, carriedBy: [], carries: [], reactions: null, frequency: null, alike: 1,
})

describe('schedule by section', () => {
  it('counts pieces, adds mass and keeps the highest utilisation, heaviest section first', () => {
    const rows = scheduleBySection([member('a', 'light', 300, 0.4), member('b', 'heavy', 900, 0.7), member('c', 'light', 310, 0.9)])
    expect(rows.map(row => row.section)).toEqual(['heavy', 'light'])
    expect(rows[1]).toMatchObject({ pieces: 2, mass: 610, highest: { mark: 'c', utilisation: 0.9 } })
  })

  it('rounds parts so that they still add up', () => {
    const parts = roundedParts([54.994, 14.694, 5.575], 0.01)
    expect(parts.reduce((sum, part) => sum + part, 0)).toBeCloseTo(75.26, 9)
    expect(roundedParts([1 / 3, 1 / 3, 1 / 3], 0.1).reduce((sum, part) => sum + part, 0)).toBeCloseTo(1, 9)
  })
})

describe('load path', () => {
  const members = new Map([
    ['S', { mark: 'S', carriedBy: ['P'], carries: [] }],
    ['P', { mark: 'P', carriedBy: ['C1', 'C2'], carries: ['S', 'T'] }],
    ['T', { mark: 'T', carriedBy: ['P'], carries: ['U'] }],
    ['U', { mark: 'U', carriedBy: ['T'], carries: [] }],
    ['C1', { mark: 'C1', carriedBy: [], carries: ['P'] }],
    ['C2', { mark: 'C2', carriedBy: [], carries: ['P'] }],
  ])

  it('follows load up to all that is carried and down to the columns', () => {
    const path = loadPath(members, 'P')
    expect([...path.carries].sort()).toEqual(['S', 'T', 'U'])
    expect([...path.carriedBy].sort()).toEqual(['C1', 'C2'])
  })

  it('is empty without a selection', () => {
    expect(loadPath(members, null).carries.size).toBe(0)
    expect(loadPath(members, 'unknown').carriedBy.size).toBe(0)
  })
})

describe('words', () => {
  it('has a trade word for every reason of the search', () => {
    for (const reason of REJECTIONS) expect(REJECTION_WORDS[reason]).toMatch(/^[A-Z][a-z ]/)
  })

  it('names the governing checks by number of beams', () => {
    expect(governingInShort({ buckling: 36, deflectionTotal: 94, tie: 0 })).toBe('94 δ total, 36 LTB')
  })

  it('says how long in seconds, minutes or hours', () => {
    expect([2.96, 45.2, 119.6, 1421, 7800].map(durationInWords)).toEqual(['3.0 s', '45 s', '2 min', '24 min', '2 h 10 min'])
  })
})
