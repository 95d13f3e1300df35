import { describe, expect, it } from 'vitest'
import { THIN_SPACE } from '#shared/utils/format'
import { BasisSchema } from '#shared/schemas/basis'
import { DEFAULT_BASIS } from '#shared/utils/defaultBasis'
import { SLAB_LIBRARY, slabEntryOf } from '#shared/utils/slabLibrary'
import { SlabSchema } from '#shared/schemas/plate'
import { differencesOf } from '~~/app/utils/plate/difference'
import { bayLoad, designLoad, plateFigures } from '~~/app/utils/plate/figures'
import { problemsOf } from '~~/app/utils/plate/problems'
import { forbiddenBy } from '~~/app/utils/plate/rights'
import { setPinned } from '~~/app/utils/plate/grid'
import { applyPatch } from '~~/app/utils/plate/steps'
import { officePlate, schoolPlate } from './plates'

describe('what stands in the way', () => {
  it('is nothing for the office plate, whose columns stand on the edge of the keep-clear zone', () => {
    expect(problemsOf(officePlate())).toEqual([])
  })

  it('names a column inside a keep-clear zone and offers two ways to mend it', () => {
    const plate = officePlate({ keepClear: [{ name: 'Bridge', x: 22500, y: 14845, width: 9000, height: 6155 }] })
    const [problem, ...rest] = problemsOf(plate)
    expect(rest).toEqual([])
    expect(problem?.title).toBe(`Column 4/C stands 155${THIN_SPACE}mm inside a keep-clear zone`)
    expect(problem?.at).toEqual([27000, 15000])
    expect(problem?.isBlocking).toBe(false)
    expect(problem?.offers.map(offer => offer.label)).toEqual([`Draw the edge in by 155${THIN_SPACE}mm`, 'Omit column 4/C'])
    for (const offer of problem?.offers ?? []) {
      const outcome = offer.step(plate)
      if ('refusal' in outcome) throw new Error(outcome.refusal)
      expect(problemsOf(applyPatch(plate, outcome.patch).plate)).toEqual([])
    }
  })

  it('offers a grid line on an edge that has none', () => {
    const plate = officePlate({ outline: [[0, 0], [58000, 0], [58000, 36000], [0, 36000]] })
    const [problem] = problemsOf(plate)
    const outcome = problem?.offers[0]?.step(plate)
    if (!outcome || 'refusal' in outcome) throw new Error('the offer was refused')
    const mended = applyPatch(plate, outcome.patch).plate
    expect(mended.gridX.at(-1)).toEqual({ label: '8', at: 58000, pinned: false })
  })

  it('blocks a study where no grid could frame the plate', () => {
    const plate = officePlate({ voids: [{ name: 'Stair', x: 50000, y: 0, width: 9000, height: 3000 }] })
    expect(problemsOf(plate).map(problem => problem.isBlocking)).toContain(true)
  })
})

describe('figures', () => {
  it('are those of the scenario: 1944 m² gross, 48 columns of the L', () => {
    expect(plateFigures(officePlate())).toEqual({ grossArea: 1944, voidArea: 25, slabArea: 1919, columns: 42 })
    expect(plateFigures(schoolPlate())).toMatchObject({ grossArea: 1503.36, columns: 48 })
  })

  it('give the design load of a bay by hand: 1.35 × 3.6 + 1.5 × 3.8 = 10.56 kN/m² on 67.5 m²', () => {
    const basis = BasisSchema.parse({ ...DEFAULT_BASIS, nationalChoice: 'EN', combination: '6.10' })
    const plate = officePlate()
    expect(designLoad(plate.floorLoad, basis)).toMatchObject({ combination: '6.10', permanent: 1.35, variable: 1.5 })
    expect(designLoad(plate.floorLoad, basis).value).toBeCloseTo(10.56, 9)
    const bay = bayLoad(plate, { x: 27000, y: 21000, width: 9000, height: 7500 }, basis)
    expect(bay?.area).toBe(67.5)
    expect(bay?.design).toBeCloseTo(712.8, 9)
  })

  it('take each zone on its own area: half a bay at 3.25 + 7.5, half at 3.6 + 3.8', () => {
    const plate = officePlate({ zones: [{ name: 'Plant', x: 0, y: 0, width: 4500, height: 7500, permanent: 3.25, variable: 7.5, category: 'E' }] })
    const bay = bayLoad(plate, { x: 0, y: 0, width: 9000, height: 7500 }, null)
    expect(bay?.permanent).toBeCloseTo(33.75 * (3.25 + 3.6), 9)
    expect(bay?.variable).toBeCloseTo(33.75 * (7.5 + 3.8), 9)
    expect(bay?.design).toBeNull()
  })
})

describe('the slab library', () => {
  it('holds slabs that the plate file takes, each found again by its figures', () => {
    for (const entry of SLAB_LIBRARY) {
      expect(SlabSchema.parse(entry.slab)).toEqual(entry.slab)
      expect(slabEntryOf(entry.slab)?.slab.name).toBe(entry.slab.name)
      expect(entry.source.length).toBeGreaterThan(20)
    }
    expect(slabEntryOf({ ...officePlate().slab, maxSpan: 3400 })).toBeNull()
  })
})

describe('two versions', () => {
  it('are told apart in words', () => {
    const mine = officePlate()
    const theirs = officePlate({ storeys: 5, voids: [], gridX: mine.gridX.map((line, i) => (i === 3 ? { ...line, at: 27500 } : line)) })
    expect(differencesOf(mine, theirs)).toEqual([
      { what: 'Storeys', mine: '4', theirs: '5' },
      { what: 'Line 4', mine: `27${THIN_SPACE}000 mm`, theirs: `27${THIN_SPACE}500 mm` },
      { what: 'Void Core east', mine: `5${THIN_SPACE}000 × 5${THIN_SPACE}000 mm at 38${THIN_SPACE}000, 15${THIN_SPACE}500`, theirs: 'none' },
    ])
    expect(differencesOf(mine, officePlate())).toEqual([])
  })
})

describe('rights', () => {
  it('let an architect pin lines and set keep-clear zones, nothing else', () => {
    const plate = officePlate()
    const pin = setPinned(plate, 'x', 2, true)
    if ('refusal' in pin) throw new Error(pin.refusal)
    expect(forbiddenBy('constraints', plate, pin.patch)).toBeNull()
    expect(forbiddenBy('constraints', plate, { keepClear: [] })).toBeNull()
    expect(forbiddenBy('constraints', plate, { storeys: 5 })).toContain('Architects')
    expect(forbiddenBy('constraints', plate, { gridX: plate.gridX.slice(1) })).toContain('Architects')
    expect(forbiddenBy('none', plate, { keepClear: [] })).toContain('reads the plate')
    expect(forbiddenBy('all', plate, { storeys: 5 })).toBeNull()
  })
})
