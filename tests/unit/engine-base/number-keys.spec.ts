import { describe, expect, it } from 'vitest'
import { numberMap } from '#shared/engine/numberKeys'

function labelled(rows: readonly (readonly number[])[]): number[] {
  const map = numberMap<number>()
  return rows.map((row, n) => {
    map.begin()
    for (const value of row) map.add(value)
    return map.end(() => n)
  })
}

describe('what is known by rows of numbers', () => {
  it('gives equal rows the label of the first', () => {
    expect(labelled([[1, 2], [2, 1], [1, 2], [1, 2, 0], [], [1], []])).toEqual([0, 1, 0, 3, 4, 5, 4])
  })

  it('tells apart what differs in the last digit alone', () => {
    expect(labelled([[0.1 + 0.2], [0.3], [0.30000000000000004]])).toEqual([0, 1, 0])
  })

  it('takes minus zero for zero and keeps infinity', () => {
    expect(labelled([[0], [-0], [Infinity], [-Infinity], [Infinity]])).toEqual([0, 0, 2, 3, 2])
  })

  it('holds rows of any length', () => {
    const long = Array.from({ length: 1000 }, (_, n) => n)
    expect(labelled([long, [...long, 0], [...long]])).toEqual([0, 1, 0])
  })

  it('keeps thousands of rows apart', () => {
    const rows = Array.from({ length: 20_000 }, (_, n) => [n % 7, Math.floor(n / 7), n / 3])
    expect(labelled(rows)).toEqual(rows.map((_, n) => n))
  })
})
