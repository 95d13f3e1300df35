import { describe, expect, it } from 'vitest'
import { checkPlate } from '#shared/engine/plate'
import { EngineError } from '#shared/engine/errors'
import { study } from '#shared/engine/search'
import type { PlateInput } from '#shared/schemas/plate'
import type { Range } from '#shared/schemas/range'
import { basisOf, plateOf, rangeOf } from '../search/inputs'

const box = (name: string, x: number, y: number, width: number, height: number) => ({ name, x, y, width, height })
const load = { permanent: 3.6, variable: 5, category: 'B' } as const
const wall = (from: [number, number], to: [number, number]) => ({ name: 'Wall', on: { from, to }, permanent: 3, variable: 0 })

/** A plate of 2 × 2 bays of 6 × 6 m with one fault. */
const plate = (change: Partial<PlateInput>) => plateOf([6000, 6000], [6000, 6000], change)

const FAULTS: [string, Partial<PlateInput>, string, RegExp][] = [
  ['an outline that crosses itself', { outline: [[0, 0], [12_000, 0], [12_000, 6000], [6000, 6000], [6000, 12_000], [9000, 12_000], [9000, 3000], [0, 3000]] },
    'outline[5]', /crosses or touches itself/],
  ['an outline that touches itself at a corner', { outline: [[0, 0], [6000, 0], [6000, 6000], [12_000, 6000], [12_000, 12_000], [6000, 12_000], [6000, 6000], [0, 6000]] },
    'outline[5]', /crosses or touches itself/],
  ['an askew side', { outline: [[0, 0], [12_000, 0], [12_000, 12_000], [100, 12_000]] }, 'outline[3]', /runs askew from \(100, 12000\) to \(0, 0\)/],
  ['two corners at one point', { outline: [[0, 0], [0, 0], [12_000, 0], [12_000, 12_000], [0, 12_000]] }, 'outline[0]', /the same point/],
  ['an outline that turns back on itself', { outline: [[0, 0], [12_000, 0], [6000, 0], [6000, 12_000], [0, 12_000]] }, 'outline[1]', /crosses or touches itself/],
  ['grid lines out of order', { gridX: [{ label: '1', at: 0 }, { label: '2', at: 12_000 }, { label: '3', at: 6000 }] }, 'gridX[2].at', /rising order/],
  ['two grid lines of one name', { gridY: [{ label: 'A', at: 0 }, { label: 'A', at: 6000 }, { label: 'C', at: 12_000 }] }, 'gridY[1].label', /Two grid lines are called A/],
  ['zones that overlap', { zones: [{ ...box('Plant', 0, 0, 4000, 4000), ...load }, { ...box('Store', 3999, 0, 3000, 3000), ...load }] }, 'zones[1]', /Plant and Store overlap/],
  ['a zone off the plate', { zones: [{ ...box('Plant', 12_000, 0, 4000, 4000), ...load }] }, 'zones[0]', /lies on no slab/],
  ['a void that reaches outside', { voids: [box('Stair', 10_000, 0, 3000, 2000)] }, 'voids[0]', /Void Stair reaches outside/],
  ['voids that overlap', { voids: [box('Stair', 1000, 1000, 3000, 2000), box('Lift', 3999, 1000, 500, 500)] }, 'voids[1]', /Stair and Lift overlap/],
  ['voids of one name', { voids: [box('Stair', 1000, 1000, 1000, 1000), box('Stair', 4000, 1000, 500, 500)] }, 'voids[1].name', /Two voids are called Stair/],
  ['voids that leave no slab', { voids: [box('All', 0, 0, 12_000, 12_000)] }, 'voids', /leave no slab/],
  ['a line load over a void', { voids: [box('Stair', 1000, 1000, 3000, 2000)], lineLoads: [wall([0, 2000], [6000, 2000])] }, 'lineLoads[0].on', /3000 mm of line load Wall stand on no slab/],
  ['a line load beyond the plate', { lineLoads: [wall([10_000, 3000], [14_000, 3000])] }, 'lineLoads[0].on', /2000 mm of line load Wall/],
  ['an askew line load', { lineLoads: [wall([0, 0], [4000, 3000])] }, 'lineLoads[0].on', /parallel to the grid/],
  ['a line load without length', { lineLoads: [wall([2000, 2000], [2000, 2000])] }, 'lineLoads[0].on', /have a length/],
  ['a line load on an unknown void', { lineLoads: [{ name: 'Wall', on: { void: 'Shaft' }, permanent: 3, variable: 0 }] }, 'lineLoads[0].on.void', /void Shaft, which is not on the plate/],
  ['an omitted column on an unknown line', { omittedColumns: [{ x: '9', y: 'B', line: 'x' }] }, 'omittedColumns[0].x', /no grid line 9/],
  ['an omitted column on another unknown line', { omittedColumns: [{ x: '2', y: 'Q', line: 'x' }] }, 'omittedColumns[0].y', /no grid line Q/],
  ['a column omitted twice', { omittedColumns: [{ x: '2', y: 'B', line: 'x' }, { x: '2', y: 'B', line: 'y' }] }, 'omittedColumns[1]', /omitted twice/],
  ['an omitted corner column', { omittedColumns: [{ x: '1', y: 'A', line: 'x' }] }, 'omittedColumns[0]', /corner column cannot be omitted/],
  ['an omitted column across the only beam line', { omittedColumns: [{ x: '2', y: 'A', line: 'y' }] }, 'omittedColumns[0].line', /No beam line along y runs through 2\/A/],
  ['a region that cuts a bay', { regions: [box('West', 0, 0, 5000, 12_000), box('East', 5000, 0, 7000, 12_000)] }, 'regions', /cuts the bay at 1–2 \/ A–B/],
  ['a bay in no region', { regions: [box('West', 0, 0, 6000, 12_000)] }, 'regions', /bay at 2–3 \/ A–B belongs to no region/],
  ['regions that overlap', { regions: [box('West', 0, 0, 6000, 12_000), box('East', 5999, 0, 6001, 12_000)] }, 'regions[1]', /West and East overlap/],
  ['an edge beyond the overhang', { outline: [[0, 0], [12_601, 0], [12_601, 12_000], [0, 12_000]] }, 'outline', /12000…12601.*no beam line within 600 mm.*grid line/],
  ['a bay cut by the outline', { outline: [[0, 0], [12_000, 0], [12_000, 9000], [0, 9000]] }, 'outline', /6000…9000.*no beam line within 600 mm/],
]

describe('a plate that cannot be framed', () => {
  it.each(FAULTS)('is refused with a sentence and the path: %s', (_, change, path, words) => {
    const found = checkPlate(plate(change))
    expect(found.length).toBeGreaterThan(0)
    expect(found[0]!.path).toBe(path)
    expect(found[0]!.message).toMatch(words)
  })

  it.each(FAULTS)('is refused by a study on its grid, the path within the input: %s', (_, change, path, words) => {
    const run = () => study({ plate: plate(change), basis: basisOf(), range: rangeOf({ divisions: [2] }) })
    expect(run).toThrow(EngineError)
    expect(run).toThrow(words)
    try {
      run()
    } catch (error) {
      expect(error).toMatchObject({ code: 'cannot-be-framed', path: `plate.${path}` })
    }
  })

  it('offers the grid line that mends an edge without a beam line', () => {
    const outline: [number, number][] = [[0, 0], [12_000, 0], [12_000, 9000], [0, 9000]]
    const [problem] = checkPlate(plate({ outline }))
    expect(problem?.offers?.map(offer => offer.addGridLine)).toEqual([{ axis: 'y', at: 9000 }])
  })
})

describe('a sound plate', () => {
  it.each<[string, Partial<PlateInput>]>([
    ['an overhang of just the limit', { outline: [[-600, 0], [12_600, 0], [12_600, 12_000], [-600, 12_000]] }],
    ['voids and zones that touch', {
      voids: [box('Stair', 1000, 1000, 1000, 1000), box('Lift', 2000, 1000, 500, 500)],
      zones: [{ ...box('Plant', 0, 0, 4000, 4000), ...load }, { ...box('Store', 4000, 0, 3000, 3000), ...load }],
    }],
    ['a line load along a void\'s edge', { voids: [box('Stair', 1000, 1000, 3000, 2000)], lineLoads: [wall([0, 1000], [6000, 1000])] }],
    ['an omitted column on a line that runs through', { omittedColumns: [{ x: '2', y: 'A', line: 'x' }] }],
    ['regions that meet on a grid line', { regions: [box('West', 0, 0, 6000, 12_000), box('East', 6000, 0, 6000, 12_000)] }],
  ])('has no problem: %s', (_, change) => {
    expect(checkPlate(plate(change))).toEqual([])
  })
})

describe('a range that is no range', () => {
  const run = (change: Partial<Range>, plateChange: Partial<PlateInput> = {}) => () => study({ plate: plate(plateChange), basis: basisOf(), range: rangeOf(change) })

  it.each<[string, Partial<Range>, string, string]>([
    ['an interval that no equal bays fill', { x: { kind: 'equal', min: 7000, max: 9000 } }, 'empty-interval', 'range.x'],
    ['an interval that no module bays fill', { y: { kind: 'module', module: 900, min: 2000, max: 5000 } }, 'empty-interval', 'range.y'],
    ['a region that is not on the plate', { regions: { Annex: { divisions: [2] } } }, 'unknown-reference', 'range.regions.Annex'],
    ['a range too large to be searched', { x: { kind: 'module', module: 50, min: 1000, max: 6000 }, y: { kind: 'module', module: 50, min: 1000, max: 6000 } }, 'too-many', 'range'],
  ])('is refused: %s', (_, change, code, path) => {
    expect(run(change)).toThrow(expect.objectContaining({ code, path }))
  })
})
