import { describe, expect, it } from 'vitest'
import { study } from '#shared/engine/search'
import { StudyInputSchema } from '#shared/schemas/study'

/** One bay of 6 × 4 m, planks along y on two primaries along x, three floors and no roof. */
function oneBay(range: object = {}) {
  return StudyInputSchema.parse({
    plate: {
      format: 'baywright-plate', version: 1, name: 'One bay',
      gridX: [{ label: '1', at: 0 }, { label: '2', at: 6000 }], gridY: [{ label: 'A', at: 0 }, { label: 'B', at: 4000 }],
      outline: [[0, 0], [6000, 0], [6000, 4000], [0, 4000]],
      slab: { system: 'planks', depth: 200, weight: 3, maxSpan: 5000, span: 'y' },
      floorLoad: { permanent: 4, variable: 2.5, category: 'B' }, storeys: 3, storeyHeight: 3500,
    },
    basis: {
      nationalChoice: 'EN', combination: '6.10', criticalMoment: 'by-segment', ltbMethod: '6.3.2.3', useF: false, constructionStage: false,
      secondary: { grade: 'S355', families: ['IPE'] }, primary: { grade: 'S355', families: ['IPE'] }, column: { grade: 'S355', families: ['HEA'] },
      limits: { variable: 300, total: 250, frequency: null, variableShare: 0.1 },
      buildability: { secondaryNotDeeper: false, minFlangeWidth: null, maxPiece: null }, connectionAllowance: 0, bracingAllowance: 0,
    },
    range: {
      x: { kind: 'fixed' }, y: { kind: 'fixed' }, primaryDirections: ['x'], divisions: [1, 2], depthCap: null, maxDistinctSections: null, ...range,
    },
  })
}

describe('study without the server', () => {
  it('gives the load at the base of each column, permanent and variable apart', () => {
    const { schemes } = study(oneBay())
    const columns = schemes[0]!.members.filter(member => member.kind === 'column')
    expect(columns).toHaveLength(4)
    const sum = (part: 'permanent' | 'variable') => columns.reduce((total, column) => total + column.base![part], 0)
    // variable: 3 floors · 24 m² · 2.5 kN/m² = 180 kN
    expect(sum('variable')).toBeCloseTo(180, 9)
    // permanent: 3 · 24 · 4 = 288 kN of floor and the weight of all steel: 3 floors of beams and the columns of all storeys
    const steel = 3 * (schemes[0]!.beamMass + schemes[0]!.columnMass) * 9.81 / 1000
    expect(sum('permanent')).toBeCloseTo(288 + steel, 9)
    for (const { base } of columns) expect(base!.ultimate).toBeCloseTo(1.35 * base!.permanent + 1.5 * base!.variable, 9)
    expect(columns[0]!.lifts!.map(({ fromLevel, toLevel }) => [fromLevel, toLevel])).toEqual([[0, 2], [2, 3]])
  })

  it('names what was left out and why', () => {
    const { counts, leftOut } = study(oneBay())
    // two panels would turn the slab's span along x; the planks span along y
    expect(counts.rejected).toEqual({ 'slab-direction': 1 })
    expect(leftOut).toHaveLength(1)
    expect(leftOut[0]).toMatchObject({ number: 2, rejection: 'slab-direction', place: null })
  })

  it('names the member that no section under the cap can carry, and by how much', () => {
    const { schemes, leftOut } = study(oneBay({ depthCap: 120, divisions: [1] }))
    expect(schemes).toEqual([])
    expect(leftOut[0]).toMatchObject({ rejection: 'depth-cap', detail: 'No section up to 120 mm deep passes for an edge beam.' })
    expect(leftOut[0]!.place).toMatch(/^A \/ 1–2 \(IPE 120: [a-z -]+ \d+\.\d\d\)$/)
  })
})
