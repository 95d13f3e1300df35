import { describe, expect, it } from 'vitest'
import { nationalChoice } from '#shared/engine/actions'
import { beamDemand, mergedStretches, oneSidedCases } from '#shared/engine/framing'
import { plateModel } from '#shared/engine/plate'
import { needsOf, sizingRules, tieForceOf } from '#shared/engine/search/sizer'
import type { PlateInput } from '#shared/schemas/plate'
import { basisOf, plateOf } from '../search/inputs'
import { framed, rejectionOf } from './framed'

const deck = { system: 'deck', depth: 130, weight: 2.75, maxSpan: 8500 } as const
const plate = (baysX: number[], baysY: number[], change: Partial<PlateInput> = {}) => plateOf(baysX, baysY, { slab: deck, ...change })
const box = (name: string, x: number, y: number, width: number, height: number) => ({ name, x, y, width, height })

describe('kinds of beams', () => {
  it('in one division are edges, primaries and ties', () => {
    const f = framed(plate([6000, 6000], [6000, 6000]), 'x', 1)
    expect(f.beam('x', 6000, 0).kind).toBe('primary')
    expect(f.beam('y', 6000, 0).kind).toBe('tie')
    expect(f.beam('y', 0, 0).kind).toBe('edge')
  })

  it('stay a tie under a line load alone, which it then carries', () => {
    const f = framed(plate([6000, 6000], [6000], { lineLoads: [{ name: 'Wall', on: { from: [6000, 0], to: [6000, 6000] }, permanent: 5, variable: 0 }] }), 'x', 1)
    expect(f.beam('y', 6000).kind).toBe('tie')
    expect(f.lines(f.beam('y', 6000))).toEqual([[0, 6, 5, 0]])
  })

  it('are no tie where a trimmer ends on it', () => {
    // void 2–4 × 2–4 in the left bay, one division along x: heads along x end on the beams across
    const f = framed(plate([6000, 6000], [6000], { voids: [box('Lift', 2000, 2000, 2000, 2000)] }), 'x', 1)
    expect(f.beam('y', 6000).carries.map(c => c.at)).toEqual([2000, 4000])
    expect(f.beam('y', 6000).kind).toBe('secondary')
  })

  it('put a secondary column to column on the lines across, loading no primary', () => {
    const f = framed(plate([6000, 6000], [6000]), 'x', 2)
    expect(f.beam('y', 6000).supports.map(s => s.kind)).toEqual(['column', 'column'])
    expect(f.beam('y', 3000).supports.map(s => s.kind)).toEqual(['beam', 'beam'])
  })

  it('stand at exact fractions of the bay', () => {
    const f = framed(plate([10_000], [6000]), 'x', 3)
    expect(f.frame.beams.filter(b => b.axis === 'y').map(b => b.at).sort((a, b) => a - b)).toEqual([0, 10_000 / 3, 20_000 / 3, 10_000])
  })
})

describe('the spacing of ties and their force', () => {
  it('is the mean of the bays on both sides inside, the whole bay at the edge', () => {
    const p = plate([6000, 9000], [7500])
    const f = framed(p, 'x', 1)
    expect(f.beam('y', 6000).tieSpacing).toBe(7500)
    expect(f.beam('y', 0).tieSpacing).toBe(6000)
    // EN 1991-1-7 A.5, UK ψ1 = 0.5: inside 0.8 (3.6 + 0.5 · 3.8) · 7.5 · 7.5 = 247.5 kN; edge 0.4 · 5.5 · 6 · 7.5 = 99 kN
    const model = plateModel(p)
    expect(tieForceOf(f.beam('y', 6000), model, nationalChoice('UK')) / 1e3).toBeCloseTo(247.5, 9)
    expect(tieForceOf(f.beam('y', 0), model, nationalChoice('UK')) / 1e3).toBeCloseTo(99, 9)
    // EN ψ2 = 0.3: 0.8 · 4.74 · 56.25 = 213.3
    expect(tieForceOf(f.beam('y', 6000), model, nationalChoice('EN')) / 1e3).toBeCloseTo(213.3, 9)
  })

  it('is asked of ties and of beams without any load, whatever their kind', () => {
    const p = plate([6000, 9000], [7500])
    const f = framed(p, 'x', 1)
    const needs = (axis: 'x' | 'y', at: number, from?: number) => needsOf(f.beam(axis, at, from), plateModel(p), sizingRules(plateModel(p), basisOf()))
    expect(needs('y', 6000).tieForce).toBeGreaterThan(0)
    expect(needs('y', 0).tieForce).toBeGreaterThan(0)
    expect(needs('x', 0, 0).tieForce).toBe(0)
    expect([needs('x', 0, 0).role, needs('y', 0).role]).toEqual(['primary', 'secondary'])
  })
})

describe('what holds the flange', () => {
  it('is a slab only where it is fixed; zones may differ', () => {
    const loose = { ...deck, fixedToTopFlange: false }
    const zone = { ...box('Store', 0, 0, 6000, 2500), permanent: 3.6, variable: 7.5, category: 'E' as const, slab: loose }
    const f = framed(plate([6000], [6000], { zones: [zone] }), 'x', 2)
    expect(f.demand(f.beam('y', 3000)).service.restraint.held).toEqual([{ from: 2500, to: 6000 }])
    const none = framed(plate([6000], [6000], { slab: loose }), 'x', 2)
    expect(none.demand(none.beam('y', 3000)).service.restraint.held).toEqual([])
  })

  it('is the deck, not planks or wet concrete, in the construction stage', () => {
    for (const [system, holds] of [['deck', true], ['planks', false], ['solid', false]] as const) {
      const f = framed(plate([6000], [6000], { slab: { ...deck, system } }), 'x', 2)
      expect(f.beam('y', 3000).heldInConstruction.length > 0).toBe(holds)
      expect(f.beam('y', 3000).held.length).toBeGreaterThan(0)
    }
  })

  it('is not the overhang beside a beam parallel to the slab span', () => {
    const f = framed(plate([6000], [6000], { outline: [[-500, -500], [6500, -500], [6500, 6500], [-500, 6500]] }), 'x', 2)
    expect(f.demand(f.beam('x', 0)).service.restraint).toEqual({ held: [], points: [3000] })
    expect(f.demand(f.beam('y', 0)).service.restraint.held).toEqual([{ from: 0, to: 6000 }])
  })
})

describe('the construction stage', () => {
  it('weighs the wet slab 1 kN/m³ more than the dry one, planks not, and adds 0.75 kN/m²', () => {
    const lineOf = (system: 'deck' | 'planks') => {
      const p = plate([6000], [6000], { slab: { ...deck, system } })
      const beam = framed(p, 'x', 2).beam('y', 3000)
      const { kinds } = plateModel(p)
      const rules = { kinds, choice: nationalChoice('UK'), reducesByArea: false, constructionStage: true }
      const loads = { stretches: mergedStretches(beam.stretches, kinds.size), spots: [] }
      return beamDemand(beam, loads, [], rules).construction[0]!.line
    }
    // 3 m: (2.75 + 0.13) · 3 = 8.64 and 2.75 · 3 = 8.25 kN/m; 0.75 · 3 = 2.25
    expect(lineOf('deck')).toEqual([{ from: 0, to: 6000, permanent: 8.64, variable: 2.25, accompanying: 2.25, height: 'top' }])
    expect(lineOf('planks')).toEqual([{ from: 0, to: 6000, permanent: 8.25, variable: 2.25, accompanying: 2.25, height: 'top' }])
  })

  it('has planks on both sides and on either side alone', () => {
    const p = plate([6000], [6000, 4000], { slab: { ...deck, system: 'planks' } })
    const f = framed(p, 'x', 1)
    const beam = f.beam('x', 6000)
    const { kinds } = plateModel(p)
    const rules = { kinds, choice: nationalChoice('UK'), reducesByArea: false, constructionStage: true }
    // 2.75 · 3 = 8.25 kN/m from the bay of 6 m, 2.75 · 2 = 5.5 from the bay of 4 m; nothing holds the flange
    const sides = oneSidedCases(beam, [], [], rules)
    expect(sides.map(side => side.line.map(l => l.permanent))).toEqual([[8.25], [5.5]])
    expect(sides.map(side => side.restraint)).toEqual([{ held: [], points: [] }, { held: [], points: [] }])
  })
})

describe('reductions by area', () => {
  it('reduce a loaded beam and leave one without load alone', () => {
    // one division: primary between bays of 7.5 m carries 9 · 7.5 = 67.5 m², αA = 1 − 67.5/1000 = 0.9325 (UK)
    const p = plate([9000], [7500, 7500])
    const f = framed(p, 'x', 1)
    const model = plateModel(p)
    const rules = { kinds: model.kinds, choice: nationalChoice('UK'), reducesByArea: true, constructionStage: false }
    const of = (axis: 'x' | 'y', at: number, from: number) => {
      const beam = f.beam(axis, at, from)
      return beamDemand(beam, { stretches: beam.stretches, spots: [] }, [], rules).service
    }
    expect(of('x', 7500, 0).line.reduce((sum, l) => sum + l.variable, 0)).toBeCloseTo(7.5 * 3.8 * 0.9325, 8)
    expect(of('y', 0, 0).line).toEqual([])
  })
})

describe('an arrangement that cannot be framed', () => {
  const grid = (change: Partial<PlateInput> = {}) => plate([6000, 6000, 6000], [6000, 6000], change)

  it('names its first reason', () => {
    expect(rejectionOf(grid({ keepClear: [box('Foyer', 5000, 5000, 2000, 2000)] }), 'x', 2)).toBe('column-in-keep-clear')
    expect(rejectionOf(grid({ voids: [box('Atrium', 4000, 5000, 2000, 2000)] }), 'x', 2)).toBe('void-cuts-beam')
    expect(rejectionOf(grid({ slab: { ...deck, span: 'y' } }), 'x', 2)).toBe('slab-direction')
    expect(rejectionOf(grid({ slab: { ...deck, maxSpan: 2999 } }), 'x', 2)).toBe('slab-span')
    expect(rejectionOf(grid(), 'x', 2, { minSecondarySpacing: 3001 })).toBe('secondary-spacing')
    expect(rejectionOf(grid(), 'x', 2, { maxPiece: 5999 })).toBe('piece-length')
    expect(rejectionOf(grid({ slab: { ...deck, maxSpan: 3000 } }), 'x', 2, { maxPiece: 6000 })).toBe('framed')
  })

  it('asks for the reasons in their order', () => {
    const all = { keepClear: [box('Foyer', 5000, 5000, 2000, 2000)], voids: [box('Atrium', 8000, 5000, 2000, 2000)], slab: { ...deck, span: 'y' as const, maxSpan: 1000 } }
    expect(rejectionOf(grid(all), 'x', 2)).toBe('column-in-keep-clear')
    expect(rejectionOf(grid({ ...all, keepClear: [] }), 'x', 2)).toBe('void-cuts-beam')
    expect(rejectionOf(grid({ ...all, keepClear: [], voids: [box('Hall', 0, 0, 12_000, 6000)] }), 'y', 2)).toBe('column-unheld')
    expect(rejectionOf(grid({ slab: all.slab }), 'x', 2, { maxPiece: 100 })).toBe('slab-direction')
  })

  it('lets a column stand on the edge of a keep-clear zone', () => {
    expect(rejectionOf(grid({ keepClear: [box('Foyer', 6000, 6000, 2000, 2000)] }), 'x', 2)).toBe('framed')
  })

  it('lets a void take a primary away over its whole length, not between its columns', () => {
    // the void reaches from line 2 to line 3 across the primary on line B; at the façade its columns would be unheld
    expect(rejectionOf(grid({ voids: [box('Atrium', 6000, 5000, 6000, 2000)] }), 'x', 2)).toBe('framed')
    expect(rejectionOf(grid({ voids: [box('Atrium', 6000, 5000, 5999, 2000)] }), 'x', 2)).toBe('void-cuts-beam')
    expect(rejectionOf(grid({ voids: [box('Atrium', 0, 5000, 6000, 2000)] }), 'x', 2)).toBe('column-unheld')
  })

  it('takes away a column strictly inside a void, unless a beam still needs it', () => {
    // void from line 2 to line 4 over the column on line 3
    const four = (voids: PlateInput['voids']) => plate([6000, 6000, 6000, 6000], [6000, 6000], { voids })
    const f = framed(four([box('Atrium', 6000, 3000, 12_000, 6000)]), 'x', 2)
    expect(f.frame.columns.some(c => c.x === 12_000 && c.y === 6000)).toBe(false)
    expect(f.frame.columns.length).toBe(14)
    expect(rejectionOf(four([box('Atrium', 11_000, 5000, 2000, 2000)]), 'x', 2)).toBe('void-cuts-beam')
  })
})
