import { describe, expect, it } from 'vitest'
import { apiError, apiSentence, apiStatus } from '../../../app/utils/apiError'
import { newPlate } from '../../../app/utils/newPlate'
import { commonScale, outlinePath } from '../../../app/utils/outlineScale'
import { readPlateFile } from '../../../app/utils/plateFile'
import { returnPath } from '../../../app/utils/returnPath'

const slab = { system: 'deck', depth: 130, weight: 2.75, maxSpan: 3300 } as const
const floorLoad = { permanent: 3.6, variable: 3.8, category: 'B' } as const

describe('a new plate from typed bays', () => {
  const plate = newPlate({
    name: 'Level 1', baysX: [9000, 9000], baysY: Array(9).fill(6000), slab, floorLoad, storeys: 3, storeyHeight: 3800,
  })
  it('has numbers one way and letters the other, without I', () => {
    expect(plate.gridX).toEqual([{ label: '1', at: 0, pinned: false }, { label: '2', at: 9000, pinned: false }, { label: '3', at: 18_000, pinned: false }])
    expect(plate.gridY.map(line => line.label).join('')).toBe('ABCDEFGHJK')
  })
  it('is a rectangle on the outer grid lines', () => {
    expect(plate.outline).toEqual([[0, 0], [18_000, 0], [18_000, 54_000], [0, 54_000]])
  })
})

describe('reading a plate file', () => {
  const plate = newPlate({ name: 'L', baysX: [9000], baysY: [7500], slab, floorLoad, storeys: 1, storeyHeight: 4000 })
  it('takes what the application writes', () => {
    expect(readPlateFile(JSON.stringify(plate))).toEqual({ plate, problems: [] })
  })
  it('names the place of each fault', () => {
    const reading = readPlateFile(JSON.stringify({ ...plate, storeys: 0, gridX: [{ label: '1', at: 0.5 }, ...plate.gridX.slice(1)] }))
    expect(reading.problems.map(({ where }) => where)).toEqual(['gridX[0].at', 'storeys'])
  })
  it('says when it is no document at all', () => {
    expect(readPlateFile('{').problems).toHaveLength(1)
  })
})

describe('outlines at one scale', () => {
  it('fits the largest into the box, either way', () => {
    const wide = { outline: [[0, 0], [54_000, 0], [54_000, 36_000], [0, 36_000]] as [number, number][] }
    const tall = { outline: [[0, 0], [10_000, 0], [10_000, 76_000], [0, 76_000]] as [number, number][] }
    expect(commonScale([wide, { outline: null }], 54, 38)).toBeCloseTo(0.001, 10)
    expect(commonScale([wide, tall], 54, 38)).toBeCloseTo(0.0005, 10)
    expect(commonScale([], 54, 38)).toBe(0)
  })
  it('draws y upwards from any origin', () => {
    expect(outlinePath([[1000, 1000], [3000, 1000], [3000, 2000], [1000, 2000]], 0.01)).toBe('M0 10L20 10L20 0L0 0Z')
  })
})

describe('the way back after signing in', () => {
  it('stays inside the application', () => {
    expect(returnPath('/projects/1?x=2')).toBe('/projects/1?x=2')
    for (const wanted of ['//evil.example', '/\\evil.example', 'https://evil.example', '/sign-in', undefined, ['/a']]) {
      expect(returnPath(wanted)).toBe('/projects')
    }
  })
})

describe('refusals of the API', () => {
  const refusal = { statusCode: 409, data: { statusCode: 409, data: { code: 'stale-version', message: 'Version 8 is in force.', path: 'version' } } }
  it('are told in their own sentence', () => {
    expect(apiSentence(refusal)).toBe('Version 8 is in force.')
    expect(apiError(refusal)?.path).toBe('version')
    expect(apiStatus(refusal)).toBe(409)
  })
  it('without an answer say that nothing is lost', () => {
    expect(apiError(new TypeError('fetch failed'))).toBeNull()
    expect(apiSentence(new TypeError('fetch failed'))).toContain('does not answer')
  })
})
