import { describe, expect, it } from 'vitest'
import { baysInWords, commonest, designationInWords, designationParts, linesOfBays, metres, typicalBay } from '~~/app/utils/scheme/bays'

describe('bays in words', () => {
  it('counts equal bays that stand together', () => {
    expect(baysInWords([9000, 9000, 9000, 9000, 9000, 9000])).toBe('6 @ 9.0')
    expect(baysInWords([7500, 7500, 6000, 7500, 7500])).toBe('2 @ 7.5, 6.0, 2 @ 7.5')
    expect(baysInWords([])).toBe('')
  })

  it('keeps every millimetre', () => {
    expect(metres(7333)).toBe('7.333')
    expect(metres(6250)).toBe('6.25')
    expect(metres(10_000)).toBe('10.0')
  })

  it('names the commonest bay, of equals the longer', () => {
    expect(commonest([7500, 7500, 6000])).toBe(7500)
    expect(commonest([6000, 9000])).toBe(9000)
    expect(typicalBay([9000, 9000], [7500, 6000, 7500])).toBe('mostly 9.0 × 7.5 m bays')
    expect(typicalBay([9000, 9000], [7500, 7500])).toBe('9.0 × 7.5 m bays')
  })

  it('sets out the lines', () => {
    expect(linesOfBays([9000, 7500], 250)).toEqual([250, 9250, 16_750])
  })
})

describe('designations', () => {
  it('parts family and size, also where the family has two words', () => {
    expect(designationParts('UB 457x191x67')).toEqual({ family: 'UB', size: '457×191×67' })
    expect(designationParts('IPE A 300')).toEqual({ family: 'IPE A', size: '300' })
    expect(designationParts('HEAA 200')).toEqual({ family: 'HEAA', size: '200' })
    expect(designationInWords('UC 305x305x97')).toBe('UC 305×305×97')
  })
})
