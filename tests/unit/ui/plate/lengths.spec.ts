import { describe, expect, it } from 'vitest'
import { describeBays, parseBays, parseLength } from '~~/app/utils/plate/lengths'

describe('a length as it is typed', () => {
  it.each([
    ['9000', 9000], ['9 000', 9000], ['9\u202F000 mm', 9000], ['7.5 m', 7500], ['7,5m', 7500],
    ['-250', -250], ['\u2212250 mm', -250], ['.5 m', 500], ['0', 0], ['7500.0', 7500],
  ])('reads %s as %i mm', (text, value) => {
    expect(parseLength(text)).toEqual({ value })
  })

  it('asks for the unit where a figure has decimals and none', () => {
    expect(parseLength('7.5')).toEqual({ problem: '7.5 has no unit. Write 7.5 m, or whole millimetres.' })
  })

  it('refuses parts of a millimetre and words', () => {
    expect(parseLength('7.5005 m')).toHaveProperty('problem', expect.stringContaining('finer than a millimetre'))
    expect(parseLength('wide')).toHaveProperty('problem', expect.stringContaining('is no length'))
    expect(parseLength('')).toHaveProperty('problem')
  })
})

describe('bays as they are typed', () => {
  it.each([
    ['6@9000', [9000, 9000, 9000, 9000, 9000, 9000]],
    ['7500, 7500, 6000', [7500, 7500, 6000]],
    ['7500,7500,6000', [7500, 7500, 6000]],
    ['2 @ 7.5 m, 6 m, 2@7.5m', [7500, 7500, 6000, 7500, 7500]],
    ['7,2 m; 2@3,6 m', [7200, 3600, 3600]],
    ['9000', [9000]],
  ])('reads %s', (text, value) => {
    expect(parseBays(text)).toEqual({ value })
  })

  it('says what is wrong, and how to write it', () => {
    expect(parseBays('')).toEqual({ problem: 'Write the bays: 6@9000, or 7500, 7500, 6000.' })
    expect(parseBays('6@')).toHaveProperty('problem')
    expect(parseBays('0@9000')).toHaveProperty('problem', expect.stringContaining('makes no bay'))
    expect(parseBays('200@100')).toHaveProperty('problem', expect.stringContaining('More than 199 bays'))
  })

  it('writes bays as they can be read again', () => {
    const bays = [7500, 7500, 6000, 7500, 7500]
    expect(describeBays(bays)).toBe('2@7500, 6000, 2@7500')
    expect(parseBays(describeBays(bays))).toEqual({ value: bays })
  })
})
