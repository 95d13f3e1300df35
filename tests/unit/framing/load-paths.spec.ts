/** Load paths worked out by hand from load to reaction: lengths in m, loads in kN, kN/m, kN/m²; steel without weight. */
import { describe, expect, it } from 'vitest'
import { nationalChoice } from '#shared/engine/actions'
import { verifyBeam } from '#shared/engine/members'
import { findSection } from '#shared/engine/sections'
import type { PlateInput } from '#shared/schemas/plate'
import { basisOf, plateOf } from '../search/inputs'
import { type Loads, framed, rejectionOf } from './framed'

/** 4 kN/m² permanent, 3 kN/m² variable. */
const office = {
  floorLoad: { permanent: 4, variable: 3, category: 'B' }, slab: { system: 'deck', depth: 130, weight: 2.75, maxSpan: 8500 },
} as const
const plate = (baysX: number[], baysY: number[], change: Partial<PlateInput> = {}) => plateOf(baysX, baysY, { ...office, ...change })
const cladding = (permanent: number) => ({ name: 'Cladding', on: 'outline' as const, permanent, variable: 0 })

function expectLoads(found: Loads, permanent: number, variable: number): void {
  expect(found.permanent).toBeCloseTo(permanent, 8)
  expect(found.variable).toBeCloseTo(variable, 8)
}

function expectRows(found: number[][], expected: number[][]): void {
  expect(found.length).toBe(expected.length)
  found.flat().forEach((value, n) => expect(value).toBeCloseTo(expected.flat()[n]!, 8))
}

describe('one bay of 6 × 7.5 m, primaries along x', () => {
  it('in two divisions loads the secondary with 3 m, the edge with 1.5 m of slab', () => {
    const f = framed(plate([6000], [7500]), 'x', 2)
    const secondary = f.beam('y', 3000)
    // 3 m · 4 = 12, 3 m · 3 = 9 kN/m; 12 · 7.5/2 = 45, 9 · 7.5/2 = 33.75 kN at each end
    expectRows(f.lines(secondary), [[0, 7.5, 12, 9]])
    expectLoads(f.reactions(secondary)[0], 45, 33.75)
    // the primary carries 45 and 33.75 kN at mid-span: half at each end
    const primary = f.beam('x', 0)
    expectRows(f.lines(primary), [])
    expect(primary.carries.map(c => c.at)).toEqual([3000])
    expectLoads(f.reactions(primary)[1], 22.5, 16.875)
    // edge beam: 1.5 m · 4 · 7.5/2 = 22.5 kN; corner column: 22.5 + 22.5 = 45 = 6 · 7.5 · 4 / 4
    expectLoads(f.reactions(f.beam('y', 0))[0], 22.5, 16.875)
    expectLoads(f.column(6000, 7500), 45, 33.75)
  })

  it('in one division spans the slab to the primaries and leaves the beams across unloaded', () => {
    const f = framed(plate([6000], [7500]), 'x', 1)
    // half of 7.5 m: 3.75 · 4 = 15, 3.75 · 3 = 11.25 kN/m; 15 · 6/2 = 45, 11.25 · 6/2 = 33.75 kN
    expectRows(f.lines(f.beam('x', 7500)), [[0, 6, 15, 11.25]])
    expectLoads(f.reactions(f.beam('x', 7500))[0], 45, 33.75)
    expectRows(f.lines(f.beam('y', 0)), [])
    expect(f.frame.beams.map(b => b.kind)).toEqual(['edge', 'edge', 'edge', 'edge'])
  })

  it('holds the beams that the slab bears on along their length, the primary at the secondary only', () => {
    const f = framed(plate([6000], [7500]), 'x', 2)
    expect(f.demand(f.beam('y', 3000)).service.restraint).toEqual({ held: [{ from: 0, to: 7500 }], points: [] })
    expect(f.demand(f.beam('x', 0)).service.restraint).toEqual({ held: [], points: [3000] })
  })
})

describe('an interior bay of 9 × 7.5 m with 3.6 and 3.8 kN/m² (practice, two checks by hand)', () => {
  const s1 = plateOf([9000, 9000, 9000], [7500, 7500, 7500], { slab: { system: 'deck', depth: 130, weight: 2.75, maxSpan: 3300 } })
  const f = framed(s1, 'x', 3)
  const rules = { ...basisOf(), choice: nationalChoice('UK') }
  const section = findSection('UB 533x210x92')!

  it('gives the secondary 31.68 kN/m, 222.8 kNm and 118.8 kN', () => {
    // u = 1.35 · 3.6 + 1.5 · 3.8 = 10.56 kN/m²; w = 10.56 · 3 = 31.68; M = 31.68 · 7.5²/8 = 222.75; V = 31.68 · 7.5/2 = 118.8
    const secondary = f.beam('y', 12_000, 7500)
    expect(secondary.kind).toBe('secondary')
    const verified = verifyBeam({ ...f.demand(secondary), selfWeight: false }, section, 'S355', rules)
    expect(verified.cases[0]!.MEd / 1e6).toBeCloseTo(222.75, 6)
    expect(verified.cases[0]!.VEd / 1e3).toBeCloseTo(118.8, 6)
  })

  it('gives the primary two points of 237.6 kN and 712.8 kNm', () => {
    // from both sides 2 · 118.8 = 237.6 kN at 3 and 6 m; V = 237.6; M = 237.6 · 3 = 712.8
    const primary = f.beam('x', 7500, 9000)
    expect(primary.kind).toBe('primary')
    const verified = verifyBeam({ ...f.demand(primary), selfWeight: false }, section, 'S355', rules)
    expect(verified.cases[0]!.VEd / 1e3).toBeCloseTo(237.6, 6)
    expect(verified.cases[0]!.MEd / 1e6).toBeCloseTo(712.8, 6)
  })
})

describe('an L of three bays of 6 × 6 m', () => {
  const outline: [number, number][] = [[0, 0], [12_000, 0], [12_000, 6000], [6000, 6000], [6000, 12_000], [0, 12_000]]
  const f = framed(plate([6000, 6000], [6000, 6000], { outline, lineLoads: [cladding(5)] }), 'x', 2)

  it('has a column at the re-entrant corner and none in the notch', () => {
    expect(f.frame.columns.length).toBe(8)
    expect(f.frame.columns.some(c => c.x === 12_000 && c.y === 12_000)).toBe(false)
  })

  it('brings three quarters of a bay and two halves of cladding to the re-entrant column', () => {
    // along x at y = 6: left beam carries 36 kN from below and above at mid-span: (36 + 36)/2 = 36
    //   right beam carries 36 from below only: 18, and 5 kN/m · 6/2 = 15 of cladding
    // along y at x = 6: below 3 m of slab: 12 · 6/2 = 36; above 1.5 m: 6 · 6/2 = 18, and 15 of cladding
    // 36 + 18 + 15 + 36 + 18 + 15 = 138; variable 27 m² · 3 = 81
    expectLoads(f.column(6000, 6000), 138, 81)
    expectLoads(f.reactions(f.beam('x', 6000, 0))[1], 36, 27)
    expectLoads(f.reactions(f.beam('x', 6000, 6000))[0], 18 + 15, 13.5)
    expectLoads(f.reactions(f.beam('y', 6000, 6000))[0], 18 + 15, 13.5)
  })

  it('calls the beams on the notch edge beams and the one between full bays a primary', () => {
    expect(f.beam('x', 6000, 6000).kind).toBe('edge')
    expect(f.beam('y', 6000, 6000).kind).toBe('edge')
    expect(f.beam('x', 6000, 0).kind).toBe('primary')
    expect(f.beam('y', 6000, 0).kind).toBe('secondary')
  })
})

describe('a stair void in a bay of 9 × 7.5 m, primaries along x, secondaries at 3 and 6 m', () => {
  const stair = { name: 'Stair', x: 2000, y: 2000, width: 2500, height: 3000 }
  const f = framed(plate([9000], [7500], { voids: [stair] }), 'x', 3)

  it('cuts the secondary at 3 m and puts heads between the uncut beams, sides between the heads', () => {
    const lines = f.frame.beams.filter(b => b.kind === 'trimmer').map(b => [b.axis, b.at, b.from, b.to])
    expect(lines).toEqual([['x', 2000, 0, 6000], ['x', 5000, 0, 6000], ['y', 2000, 2000, 5000], ['y', 4500, 2000, 5000]])
    expect(f.frame.beams.filter(b => b.axis === 'y' && b.at === 3000).map(b => [b.from, b.to])).toEqual([[0, 2000], [5000, 7500]])
  })

  it('carries the load from the sides over the heads to the beams beside', () => {
    // side at 2 m: slab 0–2, half of it: 1 · 4 = 4 kN/m · 3 m, 6 kN at each end
    expectLoads(f.reactions(f.beam('y', 2000))[0], 6, 4.5)
    // side at 4.5 m: slab 4.5–6: 0.75 · 4 = 3 kN/m · 3 m, 4.5 kN at each end
    expectLoads(f.reactions(f.beam('y', 4500))[0], 4.5, 3.375)
    // pieces of the cut secondary: 12 kN/m · 2 m, 12 kN at each end; 12 · 2.5 m, 15 kN
    expectLoads(f.reactions(f.beam('y', 3000, 0))[1], 12, 9)
    expectLoads(f.reactions(f.beam('y', 3000, 5000))[0], 15, 11.25)
    // lower head of 6 m: 6 at 2, 12 at 3, 4.5 at 4.5: left (6·4 + 12·3 + 4.5·1.5)/6 = 11.125, right 22.5 − 11.125 = 11.375
    const lower = f.reactions(f.beam('x', 2000))
    expectLoads(lower[0], 11.125, 8.34375)
    expectLoads(lower[1], 11.375, 8.53125)
    // upper head: 6, 15, 4.5: left (24 + 45 + 6.75)/6 = 12.625, right 12.875
    const upper = f.reactions(f.beam('x', 5000))
    expectLoads(upper[0], 12.625, 9.46875)
    expectLoads(upper[1], 12.875, 9.65625)
  })

  it('loads the secondary at 6 m with the heads and less slab beside the void', () => {
    // 12 kN/m, beside the void (0.75 + 1.5) · 4 = 9; heads 11.375 at 2 m and 12.875 at 5 m
    // about y = 0: 24·1 + 27·3.5 + 30·6.25 + 11.375·2 + 12.875·5 = 393.125; far 393.125/7.5 = 52.41667; near 105.25 − 52.41667
    const beam = f.beam('y', 6000)
    expectRows(f.lines(beam), [[0, 2, 12, 9], [2, 5, 9, 6.75], [5, 7.5, 12, 9]])
    const [near, far] = f.reactions(beam)
    expectLoads(far, 393.125 / 7.5, 393.125 / 7.5 * 0.75)
    expectLoads(near, 105.25 - 393.125 / 7.5, (105.25 - 393.125 / 7.5) * 0.75)
  })

  it('holds the sides by their slab, the heads at the beams that end on them', () => {
    expect(f.demand(f.beam('y', 2000)).service.restraint.held).toEqual([{ from: 0, to: 3000 }])
    expect(f.demand(f.beam('x', 2000)).service.restraint).toEqual({ held: [], points: [2000, 3000, 4500] })
    expect(f.beam('x', 2000).isParallelToPrimaries).toBe(true)
    expect(f.beam('y', 2000).isParallelToPrimaries).toBe(false)
  })

  it('puts a line load of the void on its four edges', () => {
    const walled = framed(plate([9000], [7500], { voids: [stair], lineLoads: [{ name: 'Wall', on: { void: 'Stair' }, permanent: 3, variable: 0 }] }), 'x', 3)
    expectRows(walled.lines(walled.beam('x', 2000)), [[2, 4.5, 3, 0]])
    expectRows(walled.lines(walled.beam('x', 5000)), [[2, 4.5, 3, 0]])
    expectRows(walled.lines(walled.beam('y', 2000)), [[0, 3, 7, 3]])
    expectRows(walled.lines(walled.beam('y', 4500)), [[0, 3, 6, 2.25]])
  })
})

describe('a void up to 600 mm beside a beam', () => {
  it('is trimmed by the secondary, which alone carries the strip between', () => {
    // void 3.0–5.6 × 1–5: its left edge on the secondary at 3, its right edge 0.4 m before the one at 6
    const f = framed(plate([9000], [7500], { voids: [{ name: 'Riser', x: 3000, y: 1000, width: 2600, height: 4000 }] }), 'x', 3)
    expect(f.frame.beams.filter(b => b.kind === 'trimmer').map(b => [b.axis, b.at, b.from, b.to]))
      .toEqual([['x', 1000, 3000, 6000], ['x', 5000, 3000, 6000]])
    // beside the void: 0.4 + 1.5 = 1.9 m · 4 = 7.6; left of it 1.5 · 4 = 6
    expectRows(f.lines(f.beam('y', 6000)), [[0, 1, 12, 9], [1, 5, 7.6, 5.7], [5, 7.5, 12, 9]])
    expectRows(f.lines(f.beam('y', 3000)), [[0, 1, 12, 9], [1, 5, 6, 4.5], [5, 7.5, 12, 9]])
    // 12 · 7.5 − 4.4 · 4 = 72.4; about y = 0: 337.5 − 17.6 · 3 = 284.7; far 37.96, near 34.44
    expectLoads(f.reactions(f.beam('y', 6000))[1], 37.96, 28.47)
    expectLoads(f.reactions(f.beam('y', 6000))[0], 34.44, 25.83)
  })

  it('is trimmed by the primary parallel to the slab span, loaded but not held by the strip', () => {
    // void 3.0–6.0 × 0.5–4: 0.5 m of slab between the primary at 0 and the void; both sides on secondaries
    const f = framed(plate([9000], [7500], { voids: [{ name: 'Riser', x: 3000, y: 500, width: 3000, height: 3500 }] }), 'x', 3)
    expect(f.frame.beams.filter(b => b.kind === 'trimmer').map(b => [b.axis, b.at])).toEqual([['x', 4000]])
    // strip 0.5 · 4 = 2 kN/m over 3–6 m of the primary; the secondaries carry 1.5 m there
    expectRows(f.lines(f.beam('x', 0)), [[3, 6, 2, 1.5]])
    expect(f.demand(f.beam('x', 0)).service.restraint).toEqual({ held: [], points: [3000, 6000] })
    expectRows(f.lines(f.beam('y', 3000)), [[0, 4, 6, 4.5], [4, 7.5, 12, 9]])
  })

  it('gets a trimmer of its own at 601 mm', () => {
    const f = framed(plate([9000], [7500], { voids: [{ name: 'Riser', x: 3000, y: 1000, width: 2399, height: 4000 }] }), 'x', 3)
    expect(f.beam('y', 5399).kind).toBe('trimmer')
    const near = framed(plate([9000], [7500], { voids: [{ name: 'Riser', x: 3000, y: 1000, width: 2400, height: 4000 }] }), 'x', 3)
    expect(near.frame.beams.some(b => b.axis === 'y' && b.kind === 'trimmer')).toBe(false)
  })
})

describe('two voids side by side', () => {
  it('are parted by a trimmer where a void lies between an edge and the beam', () => {
    // voids 0–0.4 and 0.4–0.8 at the corner of a bay of 3 × 3 m: the beam at x = 0 lies within 600 mm of 0.4, but beyond the first void
    const f = framed(plate([3000], [3000], { voids: [{ name: 'A', x: 0, y: 0, width: 400, height: 400 }, { name: 'B', x: 400, y: 0, width: 400, height: 400 }] }), 'x', 2)
    // one head for both at y = 0.4, from the edge to the secondary at 1.5; sides at 0.4 and 0.8
    expect(f.frame.beams.filter(b => b.kind === 'trimmer').map(b => [b.axis, b.at, b.from, b.to]))
      .toEqual([['x', 400, 0, 1500], ['y', 400, 0, 400], ['y', 800, 0, 400]])
    // 9 − 0.32 = 8.68 m² · 4 = 34.72 kN
    expect(f.frame.columns.reduce((sum, c) => sum + f.column(c.x, c.y).permanent, 0)).toBeCloseTo(34.72, 8)
    // slab 0.8–1.5 between the side and the secondary: 0.35 · 4 = 1.4 kN/m
    expectRows(f.lines(f.beam('y', 800)), [[0, 0.4, 1.4, 1.05]])
    expectRows(f.lines(f.beam('y', 400)), [])
  })
})

describe('a stair and a lift beside each other in one bay', () => {
  // stair 0.4–2.6 × 1–6, lift 2.9–4.9 × 2–4.2 in a bay of 9 × 7.5 m, secondary at 4.5 m cut by the lift
  const voids = [{ name: 'Stair', x: 400, y: 1000, width: 2200, height: 5000 }, { name: 'Lift', x: 2900, y: 2000, width: 2000, height: 2200 }]
  const f = framed(plate([9000], [7500], { voids }), 'x', 2)

  it('ends the lift\'s heads on the stair\'s side, the stair\'s heads on no beam that leans on it', () => {
    const trimmers = f.frame.beams.filter(b => b.kind === 'trimmer').map(b => [b.axis, b.at, b.from, b.to])
    // the stair's left edge is trimmed by the beam at x = 0 (0.4 m); its heads run to x = 9, past the cut secondary at 4.5
    expect(trimmers).toEqual([
      ['x', 1000, 0, 9000], ['x', 6000, 0, 9000], ['x', 2000, 2600, 9000], ['x', 4200, 2600, 9000],
      ['y', 2600, 1000, 6000], ['y', 2900, 2000, 4200], ['y', 4900, 2000, 4200],
    ])
    expect(f.frame.beams.filter(b => b.axis === 'y' && b.at === 4500).map(b => [b.from, b.to]).sort((a, b) => a[0]! - b[0]!))
      .toEqual([[0, 1000], [1000, 2000], [4200, 6000], [6000, 7500]])
  })

  it('carries the slab between them half by either side', () => {
    // 0.3 m between 2.6 and 2.9 from y = 2 to 4.2: 0.15 · 4 = 0.6 kN/m; above and below the lift the side of the stair takes (4.5 − 2.6)/2 = 0.95 m
    expectRows(f.lines(f.beam('y', 2600)), [[0, 1, 3.8, 2.85], [1, 3.2, 0.6, 0.45], [3.2, 5, 3.8, 2.85]])
    expectRows(f.lines(f.beam('y', 2900)), [[0, 2.2, 0.6, 0.45]])
    // slab 67.5 − 11 − 4.4 = 52.1 m²
    expect(f.frame.columns.reduce((sum, c) => sum + f.column(c.x, c.y).permanent, 0)).toBeCloseTo(52.1 * 4, 8)
  })

  it('is framed in both directions with any divisions', () => {
    for (const direction of ['x', 'y'] as const) {
      for (const divisions of [1, 2, 3, 4]) expect(rejectionOf(plate([9000], [7500], { voids, slab: { system: 'deck', depth: 130, maxSpan: 9000 } }), direction, divisions)).toBe('framed')
    }
  })
})

describe('two voids corner to corner', () => {
  it('are rejected where the trimmers of one would cross those of the other', () => {
    // the head of A at y = 0.4 would cross the sides of B, which reach down to the beam at y = 0
    const voids = [{ name: 'A', x: 0, y: 0, width: 400, height: 400 }, { name: 'B', x: 400, y: 400, width: 400, height: 400 }]
    expect(rejectionOf(plate([3000], [2000], { voids }), 'x', 1)).toBe('void-cuts-beam')
  })
})

describe('a void at the corner of the plate', () => {
  it('leaves the edge beams on its edges, trims the others and takes a line load on all four', () => {
    // void 0–2 × 0–2.5 in a bay of 6 × 6, secondary at 3 m
    const f = framed(plate([6000], [6000], {
      voids: [{ name: 'Stair', x: 0, y: 0, width: 2000, height: 2500 }],
      lineLoads: [{ name: 'Wall', on: { void: 'Stair' }, permanent: 3, variable: 0 }],
    }), 'x', 2)
    expect(f.frame.beams.filter(b => b.kind === 'trimmer').map(b => [b.axis, b.at, b.from, b.to])).toEqual([['x', 2500, 0, 3000], ['y', 2000, 0, 2500]])
    expectRows(f.lines(f.beam('x', 0)), [[0, 2, 3, 0]])
    expectRows(f.lines(f.beam('x', 2500)), [[0, 2, 3, 0]])
    // edge at x = 0: wall beside the void, beyond it 1.5 m of slab
    expectRows(f.lines(f.beam('y', 0)), [[0, 2.5, 3, 0], [2.5, 6, 6, 4.5]])
    // side at 2 m: wall 3 and half of the slab 2–3: 0.5 · 4 = 2, 0.5 · 3 = 1.5
    expectRows(f.lines(f.beam('y', 2000)), [[0, 2.5, 5, 1.5]])
    // wall 9 m · 3 = 27; slab (36 − 5) · 4 = 124
    const total = f.frame.columns.reduce((sum, c) => sum + f.column(c.x, c.y).permanent, 0)
    expect(total).toBeCloseTo(27 + 124, 8)
  })
})

describe('a load zone across a secondary beam', () => {
  it('makes its line load piecewise by true plan area', () => {
    // zone 2–6 × 0–3 with 6 and 7.5 kN/m²; the secondary at 3 m takes 1.5–4.5
    const zone = { name: 'Plant', x: 2000, y: 0, width: 4000, height: 3000, permanent: 6, variable: 7.5, category: 'E' } as const
    const f = framed(plate([6000], [7500], { zones: [zone] }), 'x', 2)
    const beam = f.beam('y', 3000)
    // 0.5 · 4 + 2.5 · 6 = 17; 0.5 · 3 + 2.5 · 7.5 = 20.25
    expectRows(f.lines(beam), [[0, 3, 17, 20.25], [3, 7.5, 12, 9]])
    // permanent 51 + 54 = 105; far (51 · 1.5 + 54 · 5.25)/7.5 = 48; variable 60.75 + 40.5; far 303.75/7.5 = 40.5
    expectLoads(f.reactions(beam)[1], 48, 40.5)
    expectLoads(f.reactions(beam)[0], 57, 60.75)
  })
})

describe('an omitted column of four bays of 6 × 7.5 m', () => {
  it('lets the primary run through 12 m and carry the crossing secondaries', () => {
    const f = framed(plate([6000, 6000], [7500, 7500], { omittedColumns: [{ x: '2', y: 'B', line: 'x' }] }), 'x', 2)
    const transfer = f.beam('x', 7500)
    expect([transfer.from, transfer.to, transfer.kind]).toEqual([0, 12_000, 'primary'])
    // at 3, 6 and 9 m from both sides 2 · 45 = 90 kN; (90·9 + 90·6 + 90·3)/12 = 135
    expect([...new Set(transfer.carries.map(c => c.at))].sort((a, b) => a - b)).toEqual([3000, 6000, 9000])
    expectLoads(f.reactions(transfer)[0], 135, 101.25)
    // with the edge beams, 22.5 kN from either side
    expectLoads(f.column(0, 7500), 180, 135)
    expect(f.frame.columns.length).toBe(8)
  })

  it('lets the secondary line run through 15 m and carry the primaries', () => {
    const f = framed(plate([6000, 6000], [7500, 7500], { omittedColumns: [{ x: '2', y: 'B', line: 'y' }] }), 'x', 2)
    const transfer = f.beam('y', 6000)
    expect([transfer.from, transfer.to]).toEqual([0, 15_000])
    // 12 kN/m · 15/2 = 90; primaries from both sides 45 + 45 = 90 at mid-span: 45
    expectLoads(f.reactions(transfer)[0], 135, 101.25)
  })
})

describe('an overhang of 500 mm round one bay of 6 × 6 m', () => {
  const outline: [number, number][] = [[-500, -500], [6500, -500], [6500, 6500], [-500, 6500]]

  it('loads the edge beams on their length and the columns with the corners', () => {
    const f = framed(plate([6000], [6000], { outline }), 'x', 2)
    // before the primary 0.5 · 4 = 2 kN/m; reaction 36/2 + 2 · 3 = 24
    expectRows(f.lines(f.beam('x', 0)), [[0, 6, 2, 1.5]])
    expectLoads(f.reactions(f.beam('x', 0))[0], 24, 18)
    // edge secondary (1.5 + 0.5) · 4 = 8 kN/m; reaction 24; corner 0.25 m² · 4 = 1: column 49 = 7 · 7 · 4 / 4
    expectRows(f.lines(f.beam('y', 6000)), [[0, 6, 8, 6]])
    expectLoads(f.column(6000, 0), 49, 36.75)
  })

  it('moves the outline\'s line load to the beams, beyond the corners to the column', () => {
    const f = framed(plate([6000], [6000], { outline, lineLoads: [cladding(5)] }), 'x', 2)
    expectRows(f.lines(f.beam('x', 0)), [[0, 6, 7, 1.5]])
    // 49 + 15 + 15 + 2 · 0.5 · 5 = 84, of which the corner's 1 + 5 without passing through a beam
    for (const { x, y, direct } of f.frame.columns) {
      expectLoads(f.column(x, y), 84, 36.75)
      expect(direct[0]! / 1000).toBeCloseTo(6, 8)
    }
    expect(f.frame.beams.flatMap(beam => beam.spots)).toEqual([])
  })
})

describe('line loads of 6 kN/m in a bay of 6 × 6 m, slab spanning 3 m along x', () => {
  const wall = (from: [number, number], to: [number, number]) => framed(plate([6000], [6000], {
    floorLoad: { permanent: 0, variable: 0, category: 'B' }, lineLoads: [{ name: 'Wall', on: { from, to }, permanent: 6, variable: 1.5 }],
  }), 'x', 2)

  it('across the span go to both beams as line loads by the lever rule', () => {
    const f = wall([1000, 1000], [1000, 4000])
    // 1 m from the beam at 0, 2 m from the one at 3: 6 · 2/3 = 4, 6/3 = 2
    expectRows(f.lines(f.beam('y', 0)), [[1, 4, 4, 1]])
    expectRows(f.lines(f.beam('y', 3000)), [[1, 4, 2, 0.5]])
  })

  it('along the span go to both beams as point loads by the lever rule', () => {
    const f = wall([1500, 2000], [0, 2000])
    // 9 kN with its middle at 0.75 m: 9 · 2.25/3 = 6.75 and 2.25
    expectRows(f.points(f.beam('y', 0)), [[2, 6.75, 1.6875]])
    expectRows(f.points(f.beam('y', 3000)), [[2, 2.25, 0.5625]])
  })

  it('along the span across a beam are cut at the beam', () => {
    const f = wall([2000, 2000], [4000, 2000])
    // 6 kN at 2.5 m: 1 to the beam at 0, 5 to the one at 3; the other half mirrored
    expectRows(f.points(f.beam('y', 0)), [[2, 1, 0.25]])
    expectRows(f.points(f.beam('y', 3000)), [[2, 10, 2.5]])
    expectRows(f.points(f.beam('y', 6000)), [[2, 1, 0.25]])
  })

  it('on a beam stay on it, crossing none', () => {
    const f = wall([3000, 0], [3000, 6000])
    expectRows(f.lines(f.beam('y', 3000)), [[0, 6, 6, 1.5]])
    expect(f.frame.beams.flatMap(b => b.spots)).toEqual([])
  })

  it('on a primary parallel to the span act at the top between its restraints', () => {
    const f = wall([0, 0], [6000, 0])
    const { line, restraint } = f.demand(f.beam('x', 0)).service
    expect(line).toEqual([{ from: 0, to: 6000, permanent: 6, variable: 1.5, accompanying: 1.05, height: 'top' }])
    expect(restraint).toEqual({ held: [], points: [3000] })
  })
})

describe('two regions of one bay each', () => {
  it('loads the beam on the border with points from one side and a strip from the other', () => {
    // left bay 6 × 6, primaries along y: its secondaries run along x and end on the border at x = 6, at y = 2 and 4
    // right bay 6 × 6, primaries along x: its slab spans along x and bears on the border with 1.5 m
    const regions = [{ name: 'West', x: 0, y: 0, width: 6000, height: 6000 }, { name: 'East', x: 6000, y: 0, width: 6000, height: 6000 }]
    const f = framed(plate([6000, 6000], [6000], { regions }), 'y', 3, { direction: 'x', divisions: 2 })
    const border = f.beam('y', 6000)
    expectRows(f.lines(border), [[0, 6, 6, 4.5]])
    expect(border.carries.map(c => c.at).sort((a, b) => a - b)).toEqual([2000, 4000])
    // secondaries of the left: 2 · 4 = 8 kN/m · 6/2 = 24 kN each; border 24 + 6 · 3 = 42
    expectLoads(f.reactions(border)[0], 42, 31.5)
    expect(border.kind).toBe('primary')
  })
})
