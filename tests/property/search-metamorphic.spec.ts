import fc from 'fast-check'
import { describe, expect, it, vi } from 'vitest'
import { checkPlate } from '#shared/engine/plate'
import { emptyPart, examineRange, mergeParts, prepareStudy, rankRows, study } from '#shared/engine/search'
import type { Basis, BasisInput } from '#shared/schemas/basis'
import type { Plate } from '#shared/schemas/plate'
import type { Range } from '#shared/schemas/range'
import type { StudyResult } from '#shared/schemas/study'
import { basisOf, plateOf, rangeOf } from '../unit/search/inputs'
import { type Wishes, plateFrom, wishes } from './framing-plates'
import { TRANSFORMS } from './plate-transforms'

vi.setConfig({ testTimeout: 120_000 })

/** To the gram; exact halves all to one side. */
const grams = (kg: number) => Math.round(kg * 1000 + 1e-4)
const IPE: Partial<BasisInput> = { secondary: { grade: 'S355', families: ['IPE'] }, primary: { grade: 'S355', families: ['IPE'] } }

/** What must not change: counts, and mass, depth, pieces and sections of every lightest scheme and of the trade-off line. */
function essence(result: StudyResult): object {
  const list = (schemes: StudyResult['schemes']) => schemes.map(s =>
    `${grams(s.mass)} ${grams(s.beamMass)} ${grams(s.columnMass)} ${s.depth} ${s.pieces} ${s.distinctSections}`).sort()
  return {
    counts: result.counts,
    lightest: list(result.schemes.filter(s => s.depthCap === null)),
    tradeOff: list(result.schemes.filter(s => result.tradeOff.includes(s.rank))),
  }
}

/** Small plates of all shapes: up to two bays each way, one region. */
const small = wishes.map((w): Wishes => ({
  ...w, baysX: w.baysX.slice(0, 2).map(bay => Math.min(bay, 9000)), baysY: w.baysY.slice(0, 2).map(bay => Math.min(bay, 9000)), split: null,
}))

function run(plate: Plate, basis: Basis, range: Partial<Range>): StudyResult {
  const result = study({ plate, basis, range: rangeOf({ divisions: [1, 3], ...range }) })
  expect(Math.max(0, ...result.schemes.map(scheme => scheme.residual))).toBeLessThan(1e-9)
  return result
}

describe('a plate seen otherwise', () => {
  it.each(TRANSFORMS)('gives the same schemes: $name', ({ apply, transposes }) => {
    let feasible = 0
    fc.assert(fc.property(small, (w) => {
      const made = plateFrom(w)
      if (!made) return
      expect(checkPlate(apply(made.plate))).toEqual([])
      const basis = basisOf({ ...IPE, constructionStage: true })
      const directions = transposes ? [['x'], ['y']] as const : [['x', 'y'], ['x', 'y']] as const
      const before = run(made.plate, basis, { primaryDirections: [...directions[0]] })
      const after = run(apply(made.plate), basis, { primaryDirections: [...directions[1]] })
      expect(essence(after)).toEqual(essence(before))
      feasible += before.counts.feasible
    }), { numRuns: 6 })
    expect(feasible).toBeGreaterThan(0)
  })

  it('does not change where a zone is cut in two equal ones', () => {
    const zone = { name: 'Plant', x: 1500, y: 1000, width: 5000, height: 4000, permanent: 5, variable: 7.5, category: 'E1' } as const
    const whole = plateOf([6000, 6000], [6000], { zones: [zone] })
    const halves = [
      plateOf([6000, 6000], [6000], { zones: [{ ...zone, width: 2345 }, { ...zone, name: 'Plant 2', x: 1500 + 2345, width: 5000 - 2345 }] }),
      plateOf([6000, 6000], [6000], { zones: [{ ...zone, height: 1234 }, { ...zone, name: 'Plant 2', y: 2234, height: 4000 - 1234 }] }),
    ]
    for (const half of halves) expect(essence(run(half, basisOf(IPE), { divisions: [2, 3, 4] }))).toEqual(essence(run(whole, basisOf(IPE), { divisions: [2, 3, 4] })))
  })
})

describe('a range', () => {
  const plate = plateOf([18_000], [7500], { lineLoads: [{ name: 'Cladding', on: 'outline', permanent: 4, variable: 0 }] })
  const bays = (min: number, max: number) => ({ kind: 'equal', min, max }) as const
  const best = (result: StudyResult) => result.schemes[0]!.mass

  it('that is wider never gives a worse best', () => {
    const ranges: Partial<Range>[] = [
      { x: bays(6000, 6000), primaryDirections: ['x'], divisions: [2] },
      { x: bays(6000, 6000), primaryDirections: ['x'], divisions: [2, 3] },
      { x: bays(6000, 6000), primaryDirections: ['x', 'y'], divisions: [2, 3] },
      { x: bays(6000, 9000), primaryDirections: ['x', 'y'], divisions: [2, 3] },
      { x: bays(4000, 9000), primaryDirections: ['x', 'y'], divisions: [1, 2, 3, 4] },
    ]
    const masses = ranges.map(range => best(run(plate, basisOf(IPE), range)))
    masses.slice(1).forEach((mass, n) => expect(mass).toBeLessThanOrEqual(masses[n]! + 1e-6))
  })

  it('with more families never gives a heavier scheme of the same arrangement', () => {
    const few = run(plate, basisOf({ secondary: { grade: 'S355', families: ['IPE'] }, primary: { grade: 'S355', families: ['HEA'] } }), { x: bays(4000, 9000) })
    const many = run(plate, basisOf({ secondary: { grade: 'S355', families: ['IPE', 'HEA', 'UB'] }, primary: { grade: 'S355', families: ['HEA', 'IPE', 'UB'] } }), { x: bays(4000, 9000) })
    const masses = (result: StudyResult) => new Map(result.schemes.filter(s => s.depthCap === null).map(s => [`${s.baysX.join()} ${s.primaryDirection}${s.divisions}`, s.mass]))
    const lighter = masses(many)
    expect(masses(few).size).toBeGreaterThan(3)
    masses(few).forEach((mass, key) => expect(lighter.get(key)).toBeLessThanOrEqual(mass + 1e-6))
  })

  it('with a lower cap never gives a lighter scheme', () => {
    let before = 0
    for (const depthCap of [null, 600, 500, 450, 400, 360, 330, 300, 270, 240]) {
      const result = run(plate, basisOf(IPE), { x: bays(4000, 9000), depthCap })
      if (result.schemes.length === 0) break
      expect(best(result)).toBeGreaterThanOrEqual(before - 1e-6)
      expect(result.schemes[0]!.depth).toBeLessThanOrEqual(depthCap ?? Infinity)
      before = best(result)
    }
    expect(before).toBeGreaterThan(0)
  })
})

describe('a study in parts', () => {
  const input = {
    plate: plateOf([18_000], [9000, 6000], { lineLoads: [{ name: 'Cladding', on: 'outline', permanent: 4, variable: 0 }] }),
    basis: basisOf(), range: rangeOf({ x: { kind: 'equal', min: 4000, max: 9000 }, divisions: [1, 2, 3] }),
  }
  const whole = (() => {
    const prepared = prepareStudy(input)
    return { total: prepared.total, rows: JSON.stringify(rankRows(examineRange(prepared, 0, prepared.total))) }
  })()

  it.each([1, 2, 5, 7])('of %d arrangements gives the same rows byte for byte, in any order', (size) => {
    const parts = Array.from({ length: Math.ceil(whole.total / size) }, (_, n) =>
      examineRange(prepareStudy(input), n * size, Math.min(whole.total, (n + 1) * size)))
    const orders = [parts, [...parts].reverse(), [...parts.filter((_, n) => n % 2 === 1), ...parts.filter((_, n) => n % 2 === 0)]]
    for (const order of orders) expect(JSON.stringify(rankRows(order.reduce(mergeParts, emptyPart())))).toBe(whole.rows)
  })
})

describe('slab systems tried in one study', () => {
  it('give what each gives alone, its weight in place of the plate\'s', () => {
    const deck = { system: 'deck', depth: 130, weight: 2.75, maxSpan: 3600, fixedToTopFlange: true, span: 'free' } as const
    const planks = { system: 'planks', depth: 250, weight: 4.1, maxSpan: 8500, fixedToTopFlange: true, span: 'free' } as const
    const base = { storeys: 3, lineLoads: [{ name: 'Cladding', on: 'outline' as const, permanent: 4, variable: 0 }] }
    // 3.6 kN/m² with the deck of 2.75: 0.85 beside the slab, so 4.95 with planks of 4.1
    const alone = [
      plateOf([7500, 7500], [6000], { ...base, slab: deck, floorLoad: { permanent: 3.6, variable: 3.8, category: 'B' } }),
      plateOf([7500, 7500], [6000], { ...base, slab: planks, floorLoad: { permanent: 4.95, variable: 3.8, category: 'B' } }),
    ]
    const basis = basisOf({ ...IPE, constructionStage: true })
    const both = study({ plate: alone[0]!, basis, range: rangeOf({ divisions: [1, 2, 3], slabs: [deck, planks] }) })
    const masses = (result: StudyResult, slab?: number) => result.schemes
      .filter(s => s.depthCap === null && (slab === undefined || s.slab === slab)).map(s => `${s.primaryDirection}${s.divisions} ${grams(s.mass)} ${s.depth}`).sort()
    alone.forEach((plate, slab) => {
      const expected = masses(study({ plate, basis, range: rangeOf({ divisions: [1, 2, 3] }) }))
      expect(expected.length).toBeGreaterThan(0)
      expect(masses(both, slab)).toEqual(expected)
    })
  })
})

describe('a plate without load', () => {
  it('is sized for the steel\'s own weight and keeps equilibrium', () => {
    const plate = plateOf([6000, 6000], [6000], { floorLoad: { permanent: 0, variable: 0, category: 'B' } })
    const result = run(plate, basisOf({ ...IPE, limits: { variable: 360, total: 200, frequency: 4, variableShare: 0.1, floorFrequency: 4 } }), { divisions: [2, 3] })
    expect(result.counts.feasible).toBe(4)
    expect(Math.max(...result.schemes.map(s => s.residual))).toBeLessThan(1e-9)
  })
})
