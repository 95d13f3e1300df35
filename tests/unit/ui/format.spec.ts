import { describe, expect, it } from 'vitest'
import {
  formatDateTime, formatDay, formatDifference, formatMetres, formatNumber, formatPercent, formatQuantity, formatTonnes,
  parseNumber, shortestDecimals,
} from '#shared/utils/format'

const THIN = '\u00A0'
const MINUS = '\u2212'

describe('numbers', () => {
  it('parts thousands by a thin space, also in four figures', () => {
    expect(formatNumber(9000)).toBe(`9${THIN}000`)
    expect(formatNumber(1234567.891, 2)).toBe(`1${THIN}234${THIN}567.89`)
    expect(formatNumber(999)).toBe('999')
  })
  it('writes the minus as U+2212 and never before a zero', () => {
    expect(formatNumber(-3.46, 1)).toBe(`${MINUS}3.5`)
    expect(formatNumber(-0.04, 1)).toBe('0.0')
  })
  it('says nothing for what is not there', () => {
    for (const value of [null, undefined, Number.NaN, Number.POSITIVE_INFINITY]) expect(formatNumber(value)).toBe('–')
  })
  it('writes differences with their sign', () => {
    expect(formatDifference(6.74)).toBe('+6.7')
    expect(formatDifference(-6.74)).toBe(`${MINUS}6.7`)
    expect(formatDifference(0.01)).toBe('0.0')
  })
  it('puts a thin space before the unit', () => {
    expect(formatQuantity(38.66, 'kg/m²', 1)).toBe(`38.7${THIN}kg/m²`)
    expect(formatMetres(7500)).toBe(`7.50${THIN}m`)
    expect(formatTonnes(75_250)).toBe(`75.3${THIN}t`)
    expect(formatPercent(0.0815)).toBe(`8.2${THIN}%`)
    expect(formatQuantity(null, 'mm')).toBe('–')
  })
  it('takes as few decimals as a number needs', () => {
    expect([9000, 7.5, 2.75, 0.1 * 100, 1 / 3].map(shortestDecimals)).toEqual([0, 1, 2, 0, 3])
  })
})

describe('reading numbers', () => {
  it('reads what people type', () => {
    expect(parseNumber(' 9 000 ')).toBe(9000)
    expect(parseNumber(`1${THIN}234.5`)).toBe(1234.5)
    expect(parseNumber('2,75')).toBe(2.75)
    expect(parseNumber(`${MINUS}3.5`)).toBe(-3.5)
    expect(parseNumber('.5')).toBe(0.5)
  })
  it('refuses what is no number', () => {
    for (const text of ['', '7.5 m', '1e3', '1.2.3', '--1', '1,2,3']) expect(parseNumber(text)).toBeNull()
  })
  it('gives back what it wrote', () => {
    for (const value of [0, 9000, -12.5, 1234567, 0.005]) expect(parseNumber(formatNumber(value, 3))).toBe(value)
  })
})

describe('dates', () => {
  const now = new Date('2026-12-01T11:00:00Z')
  it('names today and yesterday', () => {
    expect(formatDay('2026-12-01T10:52:00Z', now, 'UTC')).toBe('Today 10:52')
    expect(formatDay('2026-11-30T17:55:00Z', now, 'UTC')).toBe('Yesterday 17:55')
    expect(formatDay('2026-11-27T09:00:00Z', now, 'UTC')).toBe('27 Nov')
    expect(formatDay('2025-11-27T09:00:00Z', now, 'UTC')).toBe('27 Nov 2025')
  })
  it('counts the day by the reader’s own clock', () => {
    expect(formatDay('2026-11-30T23:30:00Z', now, 'Europe/Berlin')).toBe('Today 00:30')
  })
  it('writes midnight as 00:00', () => {
    expect(formatDateTime('2026-12-01T00:00:00Z', 'UTC')).toBe('1 Dec 2026, 00:00')
  })
})
