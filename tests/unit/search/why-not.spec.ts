import { describe, expect, it } from 'vitest'
import { examineRange, prepareStudy, rankRows, study, whyNot } from '#shared/engine/search'
import type { PlateInput } from '#shared/schemas/plate'
import type { Range } from '#shared/schemas/range'
import { StudyInputSchema } from '#shared/schemas/study'
import { basisOf, plateOf, rangeOf } from './inputs'

function prepared(range: Partial<Range>, plate: Partial<PlateInput> = {}, baysX = [15_000], baysY = [12_000]) {
  const ready = prepareStudy(StudyInputSchema.parse({ plate: plateOf(baysX, baysY, plate), basis: basisOf(), range: rangeOf(range) }))
  return { ready, rows: rankRows(examineRange(ready, 0, ready.total)) }
}

const MODULES: Partial<Range> = {
  x: { kind: 'module', module: 1500, min: 4500, max: 7500 }, y: { kind: 'equal', min: 5000, max: 12_000 }, divisions: [1, 2, 3],
}

describe('the way back from bays to the number of an arrangement', () => {
  it('finds every arrangement of the range by its bays, direction and divisions', () => {
    const { ready } = prepared(MODULES)
    for (let number = 1; number <= ready.total; number++) {
      const { grid, regions: [framing] } = ready.arrangements.at(number)
      const bays = (lines: readonly number[]) => lines.slice(1).map((at, n) => at - lines[n]!)
      const answer = whyNot(ready, { baysX: bays(grid.xs), baysY: bays(grid.ys), primaryDirection: framing!.direction, divisions: framing!.divisions }, [])
      expect(answer).toMatchObject({ kind: 'inside', matching: 1, arrangements: [{ number }] })
    }
  })

  it('finds orders of bays between pinned lines', () => {
    const pinned = { gridX: [0, 12_000, 27_000].map((at, n) => ({ label: String(n + 1), at, pinned: n === 1 })) }
    const { ready } = prepared({ x: { kind: 'module', module: 1500, min: 4500, max: 7500 }, divisions: [3], primaryDirections: ['x'] }, pinned, [12_000, 15_000], [6000])
    for (let number = 1; number <= ready.total; number++) {
      const { xs } = ready.arrangements.at(number).grid
      expect(ready.arrangements.x.find(xs)).toEqual({ index: number - 1 })
    }
    // 12 m: 6 + 6, 4.5 + 7.5 both ways; 15 m: 7.5 + 7.5, 4.5 + 4.5 + 6 in three orders.
    expect(ready.total).toBe(3 * 4)
  })
})

describe('an arrangement outside the range', () => {
  const { ready } = prepared(MODULES)
  it.each([
    [{ baysX: [7500, 6000] }, 'range.x', 'The bays along x add up to 13500 mm; between the outer grid lines there are 15000 mm.'],
    [{ baysX: [9000, 6000] }, 'range.x', 'A bay along x is 9000 mm long; the range goes up to 7500 mm.'],
    [{ baysX: [3000, 6000, 6000] }, 'range.x', 'A bay along x is 3000 mm long; the range begins at 4500 mm.'],
    [{ baysX: [7000, 8000] }, 'range.x', 'A bay along x is 8000 mm long; the range goes up to 7500 mm.'],
    [{ baysX: [5000, 5000, 5000] }, 'range.x', 'A bay along x is 5000 mm long, which is no multiple of the module of 1500 mm.'],
    [{ baysY: [5500, 6500] }, 'range.y', 'The range takes equal bays along y between 0 and 12000 mm; these are not.'],
    [{ baysY: [4000, 4000, 4000] }, 'range.y', 'A bay along y is 4000 mm long; the range begins at 5000 mm.'],
    [{ divisions: 7 }, 'range.divisions', '7 divisions are not in the range.'],
    [{ slab: 1 }, 'range.slabs', 'The range has one slab system; there is none with index 1.'],
    [{ number: 10_000 }, 'number', `The range holds ${ready.total} arrangements; there is no number 10000.`],
  ])('names the limit that leaves out %j', (question, path, detail) => {
    expect(whyNot(ready, question, [])).toEqual({ kind: 'outside', path, detail })
  })

  it('names a third bay length and a direction that is not tried', () => {
    const three = prepared({ x: { kind: 'module', module: 1500, min: 4500, max: 7500 }, primaryDirections: ['x'] }, {}, [18_000], [6000])
    expect(whyNot(three.ready, { baysX: [4500, 6000, 7500] }, [])).toMatchObject({ kind: 'outside', detail: 'Between two fixed lines along x at most two different bays are tried; here there are 3.' })
    expect(whyNot(three.ready, { primaryDirection: 'y' }, [])).toEqual({ kind: 'outside', path: 'range.primaryDirections', detail: 'Primary beams along y are not in the range.' })
  })

  it('names a pinned line that it misses, and lines that stay as drawn', () => {
    const pinned = { gridX: [0, 6000, 15_000].map((at, n) => ({ label: String(n + 1), at, pinned: n === 1 })) }
    const { ready: kept } = prepared({ x: { kind: 'equal', min: 3000, max: 9000 } }, pinned)
    expect(whyNot(kept, { baysX: [7500, 7500] }, [])).toMatchObject({ detail: 'A grid line along x stays at 6000 mm; this arrangement has none there.' })
    expect(whyNot(kept, { baysY: [6000, 6000] }, [])).toMatchObject({ detail: 'The range keeps the grid lines along y as they are drawn.' })
  })
})

describe('an arrangement inside the range', () => {
  it('gives the first reason that excluded it, with its figures', () => {
    const { ready, rows } = prepared(MODULES)
    const answer = whyNot(ready, { baysX: [7500, 7500], baysY: [6000, 6000], primaryDirection: 'x', divisions: 2 }, rows)
    expect(answer).toMatchObject({
      matching: 1, arrangements: [{ rejected: { rejection: 'slab-span', detail: 'The slab spans 3.75 m; its limit is 3.60 m.' }, schemes: [] }],
    })
  })

  it('names the place of a member for which nothing passes, and what the strongest section reaches', () => {
    const { ready, rows } = prepared({ depthCap: 150, primaryDirections: ['x'], divisions: [3] }, {}, [9000], [9000])
    const answer = whyNot(ready, { number: 1 }, rows)
    if (answer.kind !== 'inside') throw new Error('number 1 is in the range')
    const { rejected } = answer.arrangements[0]!
    expect(rejected?.rejection).toBe('depth-cap')
    expect(rejected?.place).toMatch(/^[12AB+0-9. m]+ \/ [12AB]–[12AB] \(UB 127x76x13: [a-z -]+ \d+\.\d\d\)$/)
  })

  it('names what beats it by how much, and nothing for what lies on the trade-off line', () => {
    const { ready, rows } = prepared(MODULES)
    for (const row of rows.filter(one => one.depthCap === null)) {
      const answer = whyNot(ready, { number: row.number }, rows)
      if (answer.kind !== 'inside') throw new Error('a kept scheme is in the range')
      const [lightest] = answer.arrangements[0]!.schemes
      expect(lightest).toMatchObject({ key: row.key, massPerArea: row.massPerArea, depth: row.depth })
      expect(lightest!.beatenBy.length === 0).toBe(row.onTradeOffLine)
      for (const other of lightest!.beatenBy) {
        const beater = rows.find(one => one.key === other.key)!
        expect(other.lighter).toBeCloseTo(row.massPerArea - beater.massPerArea, 9)
        expect(other.shallower).toBeCloseTo(row.depth - beater.depth, 9)
        expect(other.lighter >= 0 && other.shallower >= 0 && other.lighter + other.shallower > 0).toBe(true)
      }
    }
    expect(rows.some(row => !row.onTradeOffLine)).toBe(true)
  })

  it('answers for all that match what was asked, and counts those beyond', () => {
    const { ready, rows } = prepared(MODULES)
    const answer = whyNot(ready, { divisions: 3 }, rows)
    if (answer.kind !== 'inside') throw new Error('3 divisions are in the range')
    expect(answer.matching).toBe(ready.arrangements.count.layoutsX * ready.arrangements.count.layoutsY * 2)
    expect(answer.arrangements.every(({ regions }) => regions[0]!.divisions === 3)).toBe(true)
    expect(answer.arrangements.length).toBe(Math.min(24, answer.matching))
  })

  it('agrees with the counts of the study', () => {
    const { ready, rows } = prepared(MODULES)
    const reasons: Record<string, number> = {}
    for (let number = 1; number <= ready.total; number++) {
      const answer = whyNot(ready, { number }, rows)
      if (answer.kind !== 'inside') throw new Error('every number is in the range')
      const reason = answer.arrangements[0]!.rejected?.rejection
      if (reason) reasons[reason] = (reasons[reason] ?? 0) + 1
    }
    expect(reasons).toEqual(study(ready.input).counts.rejected)
  })
})
