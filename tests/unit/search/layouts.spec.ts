import { describe, expect, it } from 'vitest'
import { EngineError } from '#shared/engine/errors'
import { countRange, pinnedLines, prepareStudy } from '#shared/engine/search'
import { layoutsAlong } from '#shared/engine/search/layouts'
import type { Plate, PlateInput } from '#shared/schemas/plate'
import type { Bays } from '#shared/schemas/range'
import { basisOf, plateOf, rangeOf } from './inputs'

const equal = (min: number, max: number): Bays => ({ kind: 'equal', min, max })
const module = (step: number, min: number, max: number): Bays => ({ kind: 'module', module: step, min, max })
const lines = (...at: (number | [number, 'pinned'])[]): PlateInput['gridX'] =>
  at.map((place, n) => ({ label: String(n + 1), ...(typeof place === 'number' ? { at: place } : { at: place[0], pinned: true }) }))

function all(plate: Plate, bays: Bays, axis: 'x' | 'y' = 'x'): number[][] {
  const layouts = layoutsAlong(plate, axis, bays)
  return Array.from({ length: layouts.count }, (_, index) => layouts.lines(index))
}

/** A plate of one length along x. */
const long = (length: number, change: Partial<PlateInput> = {}) => plateOf([length], [6000], change)

describe('equal bays', () => {
  it('are every number of bays within the limits, fewest first', () => {
    // 18 m with bays of 4 to 9 m: 2 × 9, 3 × 6, 4 × 4.5
    expect(all(long(18_000), equal(4000, 9000))).toEqual([
      [0, 9000, 18_000], [0, 6000, 12_000, 18_000], [0, 4500, 9000, 13_500, 18_000],
    ])
  })

  it('count the whole length as one bay and reach both limits exactly', () => {
    // 9 m with 3 to 9 m: 1, 2 and 3 bays
    expect(all(long(9000), equal(3000, 9000)).map(layout => layout.length - 1)).toEqual([1, 2, 3])
    // 1 mm more of the least, 1 mm less of the most: 2 bays only
    expect(all(long(9000), equal(3001, 8999)).map(layout => layout.length - 1)).toEqual([2])
  })

  it('round lines half up to the millimetre', () => {
    // 10 001/2 = 5000.5 → 5001; 10 000/3 = 3333.33, 6666.67
    expect(all(long(10_001), equal(5000, 6000))).toEqual([[0, 5001, 10_001]])
    expect(all(long(10_000), equal(3000, 3500))).toEqual([[0, 3333, 6667, 10_000]])
  })

  it('round half up between negative places too', () => {
    // from −10 001 to 0: −10 001 + 5000.5 = −5000.5 → half up −5000
    const plate = plateOf([6000], [6000], { gridX: lines(-10_001, 0), outline: [[-10_001, 0], [0, 0], [0, 6000], [-10_001, 6000]] })
    expect(all(plate, equal(5000, 6000))).toEqual([[-10_001, -5000, 0]])
  })

  it('drop the drawn lines that nothing pins', () => {
    const plate = plateOf([6000, 6000, 6000], [6000])
    expect(all(plate, equal(9000, 9000))).toEqual([[0, 9000, 18_000]])
  })
})

describe('module bays', () => {
  it('are every order of at most two different multiples', () => {
    // 12 m in steps of 1.5 from 3 to 6: 3 + 3 + 3 + 3; 4.5 + 4.5 + 3 in 3 orders; 6 + 3 + 3 in 3 orders; 6 + 6
    const found = all(long(12_000), module(1500, 3000, 6000)).map(layout => layout.slice(1).map((at, n) => at - layout[n]!).join('+'))
    expect(found.sort()).toEqual([
      '3000+3000+3000+3000', '3000+3000+6000', '3000+4500+4500', '3000+6000+3000', '4500+3000+4500', '4500+4500+3000', '6000+3000+3000', '6000+6000',
    ].sort())
  })

  it('count orders as binomials', () => {
    // 21 m of 3 and 6 m: a bays of 3, b of 6 with a + 2b = 7: b 0…3 → C(7,0) + C(6,1) + C(5,2) + C(4,3) = 1 + 6 + 10 + 4 = 21
    expect(layoutsAlong(long(21_000), 'x', module(3000, 3000, 6000)).count).toBe(21)
  })

  it('are multiples of the module, not steps from the least', () => {
    // from 3.1 m in steps of 1.5: 4.5 and 6 only; 9 m = 4.5 + 4.5
    expect(all(long(9000), module(1500, 3100, 6000))).toEqual([[0, 4500, 9000]])
  })
})

describe('intervals', () => {
  it('between pinned lines combine freely, the last one fastest', () => {
    const plate = plateOf([6000], [6000], { gridX: lines(0, [6000, 'pinned'], 18_000), outline: [[0, 0], [18_000, 0], [18_000, 6000], [0, 6000]] })
    // 6 m: 1 or 2 bays; 12 m: 2, 3 or 4 bays
    expect(all(plate, equal(3000, 6000)).map(layout => layout.join(' '))).toEqual([
      '0 6000 12000 18000', '0 6000 10000 14000 18000', '0 6000 9000 12000 15000 18000',
      '0 3000 6000 12000 18000', '0 3000 6000 10000 14000 18000', '0 3000 6000 9000 12000 15000 18000',
    ])
  })

  it('shorter than the least bay stay one bay', () => {
    const plate = plateOf([6000], [6000], { gridX: lines(0, [2400, 'pinned'], 14_400), outline: [[0, 0], [14_400, 0], [14_400, 6000], [0, 6000]] })
    expect(all(plate, equal(5000, 7000))).toEqual([[0, 2400, 8400, 14_400]])
    expect(all(plate, module(600, 6000, 6000))).toEqual([[0, 2400, 8400, 14_400]])
  })

  it('without a solution are an input error that names the range', () => {
    expect(() => all(long(10_000), equal(6000, 9000))).toThrow(expect.objectContaining({ code: 'empty-interval', path: 'range.x' }))
    expect(() => all(long(10_000), module(1500, 3000, 6000))).toThrow(EngineError)
    expect(() => layoutsAlong(plateOf([6000], [10_000]), 'y', equal(6000, 9000))).toThrow(expect.objectContaining({ path: 'range.y' }))
  })
})

describe('pinned lines', () => {
  const L: [number, number][] = [[0, 0], [18_000, 0], [18_000, 6000], [9000, 6000], [9000, 12_000], [0, 12_000]]

  it('are the first, the last, those marked, and those at an edge of the outline', () => {
    const plate = plateOf([6000], [6000, 6000], { gridX: lines(0, [3000, 'pinned'], 6000, 9000, 18_000), outline: L })
    expect(pinnedLines(plate, 'x')).toEqual([0, 3000, 9000, 18_000])
    expect(pinnedLines(plate, 'y')).toEqual([0, 6000, 12_000])
  })

  it('lie within the overhang limit inside an edge', () => {
    const plate = plateOf([6000], [6000, 6000], { gridX: lines(0, 8400, 18_000), outline: L })
    expect(pinnedLines(plate, 'x')).toEqual([0, 8400, 18_000])
  })

  it('are added on an edge without one', () => {
    const plate = plateOf([6000], [6000, 6000], { gridX: lines(0, 8399, 18_000), outline: L })
    expect(pinnedLines(plate, 'x')).toEqual([0, 9000, 18_000])
  })

  it('are not added to a fixed grid, which is refused', () => {
    const plate = plateOf([6000], [6000, 6000], { gridX: lines(0, 8399, 18_000), outline: L })
    const prepare = (x: Bays) => prepareStudy({ plate, basis: basisOf(), range: rangeOf({ x }) })
    expect(() => prepare({ kind: 'fixed' })).toThrow(expect.objectContaining({ code: 'cannot-be-framed' }))
    expect(prepare(equal(9000, 9000)).arrangements.at(1).grid.xs).toEqual([0, 9000, 18_000])
  })
})

describe('the numbering of arrangements', () => {
  const slab = { system: 'deck', depth: 130, weight: 2.75, maxSpan: 3600 } as const
  const range = rangeOf({ x: equal(4000, 6000), y: equal(5000, 10_000), primaryDirections: ['y', 'x'], divisions: [3, 2], slabs: [slab, { ...slab, depth: 150 }] as never })
  const plate = plateOf([12_000], [10_000])

  it('counts layouts × layouts × directions and divisions × slab systems', () => {
    // x: 2 or 3 bays; y: 1 or 2; 2 directions × 2 divisions; 2 slabs
    expect(countRange(plate, range)).toEqual({ total: 32, layoutsX: 2, layoutsY: 2, directionsAndDivisions: 4, slabs: 2 })
  })

  it('runs x, y, direction with x first, divisions rising, slab system', () => {
    const { arrangements, total } = prepareStudy({ plate, basis: basisOf(), range })
    const found = Array.from({ length: total }, (_, n) => {
      const { number, grid, regions, slab: s } = arrangements.at(n + 1)
      return `${number} ${grid.xs.length - 1}/${grid.ys.length - 1} ${regions[0]!.direction}${regions[0]!.divisions} ${s}`
    })
    const expected: string[] = []
    for (const x of [2, 3]) for (const y of [1, 2]) for (const d of ['x2', 'x3', 'y2', 'y3']) for (const s of [0, 1]) expected.push(`${expected.length + 1} ${x}/${y} ${d} ${s}`)
    expect(found).toEqual(expected)
  })

  it('multiplies directions and divisions over the regions, the last region fastest', () => {
    const regions = [{ name: 'West', x: 0, y: 0, width: 6000, height: 6000 }, { name: 'East', x: 6000, y: 0, width: 6000, height: 6000 }]
    const { arrangements, total } = prepareStudy({
      plate: plateOf([6000, 6000], [6000], { regions }), basis: basisOf(),
      range: rangeOf({ primaryDirections: ['x'], divisions: [2, 3], regions: { East: { primaryDirections: ['y', 'x'], divisions: [4] } } }),
    })
    const found = Array.from({ length: total }, (_, n) => arrangements.at(n + 1).regions.map(r => `${r.direction}${r.divisions}`).join(' '))
    expect(found).toEqual(['x2 x4', 'x2 y4', 'x3 x4', 'x3 y4'])
  })
})
