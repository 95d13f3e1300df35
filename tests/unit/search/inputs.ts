/** Study inputs for tests: one short form for the basis, the plate and the range. mm, kN/m², kN/m. */
import { type Basis, type BasisInput, BasisSchema } from '#shared/schemas/basis'
import { type Plate, type PlateInput, PlateSchema } from '#shared/schemas/plate'
import { type Range, RangeSchema } from '#shared/schemas/range'

const BASIS: BasisInput = {
  nationalChoice: 'UK', combination: '6.10', criticalMoment: 'by-segment', ltbMethod: '6.3.2.3', useF: false, constructionStage: false,
  secondary: { grade: 'S355', families: ['UB'] },
  primary: { grade: 'S355', families: ['UB'] },
  column: { grade: 'S355', families: ['UC'] },
  limits: { variable: 360, total: 200, frequency: null, variableShare: 0.1 },
  buildability: { secondaryNotDeeper: false, minFlangeWidth: null, maxPiece: null },
  connectionAllowance: 0, bracingAllowance: 0,
}

export function basisOf(change: Partial<BasisInput> = {}): Basis {
  return BasisSchema.parse({ ...BASIS, ...change })
}

/** A rectangle of bays from the origin, office load on a deck slab. */
export function plateOf(baysX: readonly number[], baysY: readonly number[], change: Partial<PlateInput> = {}): Plate {
  const lines = (bays: readonly number[]) => bays.reduce((all, bay) => [...all, all[all.length - 1]! + bay], [0])
  const [xs, ys] = [lines(baysX), lines(baysY)]
  const [width, height] = [xs[xs.length - 1]!, ys[ys.length - 1]!]
  return PlateSchema.parse({
    format: 'baywright-plate', version: 1, name: 'Test',
    gridX: xs.map((at, n) => ({ label: String(n + 1), at })),
    gridY: ys.map((at, n) => ({ label: 'ABCDEFGHJKLMN'[n]!, at })),
    outline: [[0, 0], [width, 0], [width, height], [0, height]],
    slab: { system: 'deck', depth: 130, weight: 2.75, maxSpan: 3600 },
    floorLoad: { permanent: 3.6, variable: 3.8, category: 'B' },
    storeys: 3, storeyHeight: 4000,
    ...change,
  })
}

export function rangeOf(change: Partial<Range> = {}): Range {
  return RangeSchema.parse({
    x: { kind: 'fixed' }, y: { kind: 'fixed' }, primaryDirections: ['x', 'y'], divisions: [1, 2, 3, 4], depthCap: null, maxDistinctSections: null,
    ...change,
  })
}
