import { describe, expect, it } from 'vitest'
import { examineRange, prepareStudy, rankRows, robustness, study } from '#shared/engine/search'
import type { PlateInput } from '#shared/schemas/plate'
import type { Range } from '#shared/schemas/range'
import { type StudyInput, StudyInputSchema } from '#shared/schemas/study'
import { basisOf, plateOf, rangeOf } from './inputs'

const zone = { name: 'Store', x: 0, y: 0, width: 6000, height: 3000, permanent: 3.6, variable: 7.5, category: 'E1' as const }

function inputOf(range: Partial<Range>, plate: Partial<PlateInput> = {}): StudyInput {
  return StudyInputSchema.parse({ plate: plateOf([18_000], [12_000], plate), basis: basisOf(), range: rangeOf(range) })
}

function asked(input: StudyInput, count = 4) {
  const ready = prepareStudy(input)
  const rows = rankRows(examineRange(ready, 0, ready.total))
  const result = robustness(ready, rows, count)
  return { rows, result, entries: (name: string) => result.cases.find(one => one.name === name)?.entries ?? [] }
}

const RANGE: Partial<Range> = { x: { kind: 'module', module: 1500, min: 6000, max: 9000 }, y: { kind: 'equal', min: 6000, max: 12_000 }, divisions: [2, 3] }

describe('the robustness of a ranking', () => {
  it('asks about the lightest scheme of each of the first arrangements', () => {
    const { rows, result } = asked(inputOf(RANGE))
    const first = [...new Set(rows.map(row => row.number))].slice(0, 4)
    for (const { entries } of result.cases) expect(entries.map(entry => entry.number)).toEqual(first)
    expect(result.cases.map(one => one.name)).toEqual(['as-searched', 'imposed-load', 'moved-line', 'depth-cap'])
  })

  it('gives under more load what a study of the plate with that load gives', () => {
    const input = inputOf(RANGE, { zones: [zone], lineLoads: [{ name: 'Wall', on: { from: [1000, 3000], to: [5000, 3000] }, permanent: 3, variable: 1 }] })
    const heavier = inputOf(RANGE, {
      floorLoad: { permanent: 3.6, variable: 3.8 * 1.1, category: 'B' }, zones: [{ ...zone, variable: 7.5 * 1.1 }],
      lineLoads: [{ name: 'Wall', on: { from: [1000, 3000], to: [5000, 3000] }, permanent: 3, variable: 1.1 }],
    })
    const { schemes } = study(heavier)
    for (const { number, massPerArea } of asked(input).entries('imposed-load')) {
      expect(massPerArea).toBeCloseTo(schemes.find(s => s.number === number && s.depthCap === null)!.massPerArea, 9)
    }
  })

  it('gives under less depth what a study with that cap gives', () => {
    const { rows, entries } = asked(inputOf(RANGE))
    const { schemes } = study(inputOf({ ...RANGE, depthCap: rows[0]!.depth - 50 }))
    for (const { number, massPerArea, depth } of entries('depth-cap')) {
      const same = schemes.find(s => s.number === number && s.depthCap === null)
      expect(massPerArea).toBe(same?.massPerArea ?? null)
      if (depth !== null) expect(depth).toBeLessThanOrEqual(rows[0]!.depth - 50)
    }
  })

  it('takes the heaviest of all moves of one line by one module', () => {
    const input = inputOf({ ...RANGE, y: { kind: 'fixed' }, primaryDirections: ['x'], divisions: [3] })
    const { rows, entries } = asked(input, 1)
    const xs = rows[0]!.baysX.reduce((lines, bay) => [...lines, lines[lines.length - 1]! + bay], [0])
    const moved = xs.slice(1, -1).flatMap((_, n) => [-1500, 1500].map(step => xs.map((at, k) => k === n + 1 ? at + step : at)))
    const masses = moved.map((lines) => {
      const fixed = { ...input, plate: plateOf(lines.slice(1).map((at, n) => at - lines[n]!), [12_000]), range: { ...input.range, x: { kind: 'fixed' as const } } }
      return study(StudyInputSchema.parse(fixed)).schemes[0]?.massPerArea ?? null
    })
    const [entry] = entries('moved-line')
    expect(entry!.moves).toEqual({ tried: moved.length, failed: masses.filter(mass => mass === null).length })
    expect(entry!.massPerArea).toBeCloseTo(Math.max(...masses.map(mass => mass ?? 0)), 9)
  })

  it('leaves the moved lines out where every line is fixed', () => {
    const { result } = asked(StudyInputSchema.parse({ plate: plateOf([9000], [7500]), basis: basisOf(), range: rangeOf() }))
    expect(result.cases.map(one => one.name)).toEqual(['as-searched', 'imposed-load', 'depth-cap'])
  })

  it('has in front what is lightest in its case or less than 3 % heavier, and always in front what is so in all', () => {
    const { result } = asked(inputOf(RANGE), 8)
    for (const { entries } of result.cases) {
      const lightest = Math.min(...entries.map(entry => entry.massPerArea ?? Infinity))
      for (const entry of entries) {
        expect(entry.isInFront, entry.key).toBe(entry.massPerArea !== null && entry.massPerArea < 1.03 * lightest)
        expect(entry.reason === null).toBe(entry.massPerArea !== null)
      }
    }
    const keys = result.cases[0]!.entries.map(entry => entry.key)
    expect(result.alwaysInFront).toEqual(keys.filter((_, n) => result.cases.every(({ entries }) => entries[n]!.isInFront)))
  })

  it('has nothing to say of a study without schemes', () => {
    const none = asked(inputOf({ ...RANGE, divisions: [1] }))
    expect(none.result).toEqual({ cases: [], alwaysInFront: [] })
  })
})
