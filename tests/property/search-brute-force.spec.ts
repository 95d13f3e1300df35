import { describe, expect, it, vi } from 'vitest'
import { study } from '#shared/engine/search'
import type { BasisInput } from '#shared/schemas/basis'
import type { PlateInput } from '#shared/schemas/plate'
import type { Range } from '#shared/schemas/range'
import { StudyInputSchema } from '#shared/schemas/study'
import { basisOf, plateOf, rangeOf } from '../unit/search/inputs'
import { bruteStudy } from './search-brute-force'

vi.setConfig({ testTimeout: 120_000 })

const families = (...list: ('IPE' | 'HEA' | 'HEB' | 'UB' | 'UC' | 'HEAA' | 'IPE A')[]): Partial<BasisInput> => ({
  secondary: { grade: 'S355', families: list }, primary: { grade: 'S355', families: list },
})
const deck = { system: 'deck', depth: 130, weight: 2.75, maxSpan: 3600 } as const
const planks = { system: 'planks', depth: 250, weight: 4.1, maxSpan: 8500 } as const
const equal = (min: number, max: number) => ({ kind: 'equal', min, max }) as const
const modules = (module: number, min: number, max: number) => ({ kind: 'module', module, min, max }) as const
const cladding: Partial<PlateInput> = { lineLoads: [{ name: 'Cladding', on: 'outline', permanent: 4, variable: 0 }] }
const pinnedAt = (...at: [number, boolean][]) => at.map(([place, pinned], n) => ({ label: String(n + 1), at: place, pinned }))

interface Case { name: string, baysX: number[], baysY: number[], plate?: Partial<PlateInput>, basis?: Partial<BasisInput>, range?: Partial<Range> }

const CASES: Case[] = [
  { name: 'one bay', baysX: [6000], baysY: [7500], basis: families('IPE') },
  { name: 'one bay with HEA', baysX: [6000], baysY: [7500], basis: families('HEA') },
  { name: 'two families', baysX: [6000, 6000], baysY: [7500], basis: families('IPE', 'HEA') },
  { name: 'different families for secondary and primary beams', baysX: [9000], baysY: [6000],
    basis: { secondary: { grade: 'S275', families: ['IPE'] }, primary: { grade: 'S355', families: ['HEB'] } } },
  { name: 'British sections', baysX: [9000], baysY: [7500], basis: families('UB'), range: { divisions: [3] } },
  { name: 'cladding', baysX: [6000, 4500], baysY: [6000], plate: cladding, basis: families('IPE') },
  { name: 'a cap on depth', baysX: [8000], baysY: [6000, 6000], plate: cladding, basis: families('IPE', 'HEA'), range: { depthCap: 330 } },
  { name: 'a cap that few keep', baysX: [9000], baysY: [9000], basis: families('IPE'), range: { depthCap: 300 } },
  { name: 'a cap on interior beams only', baysX: [9000], baysY: [6000, 6000], plate: cladding, basis: families('IPE'), range: { depthCapInterior: 330 } },
  { name: 'equal bays along x', baysX: [18_000], baysY: [6000], basis: families('IPE'), range: { x: equal(5000, 9500) } },
  { name: 'equal bays along both', baysX: [12_000], baysY: [13_000], basis: families('IPE'), range: { x: equal(4000, 6500), y: equal(6000, 7000), divisions: [2, 3] } },
  { name: 'module bays', baysX: [15_000], baysY: [6000], basis: families('IPE'), range: { x: modules(1500, 4500, 7500), divisions: [2, 3] } },
  { name: 'module bays with a pinned line', baysX: [6000, 9000], baysY: [6000],
    plate: { gridX: pinnedAt([0, false], [6000, true], [15_000, false]) }, basis: families('HEA'), range: { x: modules(1500, 3000, 6000), divisions: [2] } },
  { name: 'keep-clear zone', baysX: [12_000], baysY: [6000, 6000],
    plate: { keepClear: [{ name: 'Foyer', x: 5000, y: 5000, width: 2000, height: 2000 }] }, basis: families('IPE'), range: { x: equal(4000, 6000), divisions: [2] } },
  { name: 'planks', baysX: [7200, 7200], baysY: [7500], plate: { slab: planks, floorLoad: { permanent: 4.7, variable: 4, category: 'C1' } },
    basis: { ...families('UB'), buildability: { secondaryNotDeeper: false, minFlangeWidth: 180, maxPiece: null } }, range: { divisions: [1, 2] } },
  { name: 'a slab that spans one way', baysX: [6000], baysY: [6000, 3000], plate: { slab: { ...deck, span: 'y' } }, basis: families('IPE') },
  { name: 'a slab that holds nothing', baysX: [6000], baysY: [6000], plate: { slab: { ...deck, fixedToTopFlange: false } }, basis: families('HEA'), range: { divisions: [2, 3] } },
  { name: 'construction stage', baysX: [9000], baysY: [7500], plate: cladding, basis: { ...families('IPE'), constructionStage: true } },
  { name: '6.10a and 6.10b', baysX: [6000, 6000], baysY: [6000], basis: { ...families('IPE'), combination: '6.10ab', nationalChoice: 'EN' } },
  { name: 'whole-beam critical moment, least spacing, longest piece', baysX: [9000], baysY: [6000, 3000], plate: cladding,
    basis: { ...families('IPE'), criticalMoment: 'whole-beam', minSecondarySpacing: 2500, buildability: { secondaryNotDeeper: false, minFlangeWidth: null, maxPiece: 8000 } },
    range: { divisions: [1, 2, 3, 4] } },
  { name: 'roof, allowances, utilisation limit', baysX: [7500], baysY: [6000], plate: { roof: { permanent: 4, variable: 0.75 } },
    basis: { ...families('IPE', 'HEAA'), connectionAllowance: 0.1, bracingAllowance: 2.5, utilisationLimit: 0.9 } },
  { name: 'no section at all', baysX: [16_000], baysY: [15_000], plate: { slab: { ...deck, maxSpan: 20_000 }, floorLoad: { permanent: 8, variable: 10, category: 'B' } },
    basis: families('IPE A'), range: { divisions: [1, 4] } },
  { name: 'frequency limit', baysX: [9000], baysY: [9000], basis: { ...families('IPE', 'HEA'), limits: { variable: 360, total: 250, frequency: 5, variableShare: 0.1 } }, range: { divisions: [3] } },
]

const grams = (kg: number) => Math.round(kg * 1000 + 1e-4)

describe('a study against the same study done the long way', () => {
  it.each(CASES)('agrees in counts, masses and trade-off line: $name', ({ baysX, baysY, plate, basis, range }) => {
    const input = StudyInputSchema.parse({ plate: plateOf(baysX, baysY, plate), basis: basisOf(basis), range: rangeOf(range) })
    const found = study(input)
    const expected = bruteStudy(input)
    expect(found.counts).toEqual({
      range: expected.range, examined: expected.range, cut: 0, rejected: expected.rejected, feasible: expected.lightest.length,
    })
    const lightest = [...expected.lightest].sort((a, b) => grams(a.mass) - grams(b.mass) || a.depth - b.depth || a.pieces - b.pieces || a.number - b.number)
    expect(found.schemes.filter(s => s.depthCap === null).map(s => [grams(s.mass), s.depth, s.pieces]))
      .toEqual(lightest.map(s => [grams(s.mass), s.depth, s.pieces]))
    const front = found.schemes.filter(s => found.tradeOff.includes(s.rank))
    const points = [...new Map(front.map(s => [`${grams(s.mass)}/${s.depth}`, { mass: grams(s.mass) / 1000, depth: s.depth }])).values()]
    expect(points).toEqual(expected.front)
    expect(Math.max(0, ...found.schemes.map(s => s.residual))).toBeLessThan(1e-9)
  })
})
