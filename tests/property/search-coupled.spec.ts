import { describe, expect, it, vi } from 'vitest'
import { verifyBeam } from '#shared/engine/members'
import { examineRange, prepareStudy, rankRows, study } from '#shared/engine/search'
import { rebuildScheme } from '#shared/engine/search/rebuild'
import type { BasisInput } from '#shared/schemas/basis'
import type { PlateInput } from '#shared/schemas/plate'
import { StudyInputSchema } from '#shared/schemas/study'
import { basisOf, plateOf, rangeOf } from '../unit/search/inputs'
import { leastMassNotDeeper } from './search-brute-force'

vi.setConfig({ testTimeout: 120_000 })

type Families = BasisInput['primary']['families']
const rule = (secondary: Families, primary: Families): Partial<BasisInput> => ({
  secondary: { grade: 'S355', families: secondary }, primary: { grade: 'S355', families: primary },
  buildability: { secondaryNotDeeper: true, minFlangeWidth: null, maxPiece: null },
})
const cladding: Partial<PlateInput> = { lineLoads: [{ name: 'Cladding', on: 'outline', permanent: 4, variable: 0 }] }

/** Long secondaries on short primaries: the rule costs something. */
const CASES: [string, number[], number[], 'x' | 'y', number, Families, Families, Partial<PlateInput>?][] = [
  ['two secondaries, two primaries', [6000], [9000], 'x', 3, ['IPE'], ['IPE']],
  ['two secondaries, two families', [5400], [10_500], 'x', 3, ['IPE', 'IPE A'], ['IPE', 'IPE A'], cladding],
  ['a shared primary between unequal bays', [4500], [9000, 6000], 'x', 2, ['IPE'], ['IPE']],
  ['a shared primary, two families', [4000], [8000, 9000], 'x', 2, ['IPE', 'HEA'], ['IPE'], cladding],
  ['primaries of another family', [6000], [9000], 'x', 2, ['IPE'], ['HEA', 'HEB']],
  ['two bays along the primaries', [4000, 6000], [9000], 'x', 2, ['IPE', 'HEA'], ['IPE', 'HEA']],
  ['primaries along y', [9000], [5000], 'y', 2, ['UB'], ['UB']],
]

describe('secondary beams not deeper than the primary beam that carries them', () => {
  it.each(CASES)('is met at the least total mass: %s', (_, baysX, baysY, direction, n, secondary, primary, plate) => {
    const input = StudyInputSchema.parse({
      plate: plateOf(baysX, baysY, plate), basis: basisOf(rule(secondary, primary)), range: rangeOf({ primaryDirections: [direction], divisions: [n] }),
    })
    const free = StudyInputSchema.parse({ ...input, basis: { ...input.basis, buildability: { ...input.basis.buildability, secondaryNotDeeper: false } } })
    const least = leastMassNotDeeper(input, direction, n)
    const [found] = study(input).schemes
    const [unruled] = study(free).schemes
    expect(least).not.toBeNull()
    expect(found!.beamMass).toBeCloseTo(least!, 3)
    expect(found!.beamMass).toBeGreaterThanOrEqual(unruled!.beamMass - 1e-6)
    const { prepared, sized } = rebuildScheme(prepareStudy(input), String(found!.number))
    prepared.frame.beams.forEach((beam, high) => beam.carries.forEach(({ beam: low }) =>
      expect(sized.sections[low]!.section.h).toBeLessThanOrEqual(sized.sections[high]!.section.h)))
  })

  it('is in force at least once here', () => {
    const costs = CASES.map(([, baysX, baysY, direction, n, secondary, primary, plate]) => {
      const run = (secondaryNotDeeper: boolean) => study(StudyInputSchema.parse({
        plate: plateOf(baysX, baysY, plate),
        basis: basisOf({ ...rule(secondary, primary), buildability: { secondaryNotDeeper, minFlangeWidth: null, maxPiece: null } }),
        range: rangeOf({ primaryDirections: [direction], divisions: [n] }),
      })).schemes[0]!.beamMass
      return run(true) - run(false)
    })
    expect(costs.filter(cost => cost > 1).length).toBeGreaterThan(3)
  })

  it('rebuilds every kept scheme from its key as it stands in the row', () => {
    const prepared = prepareStudy({
      plate: plateOf([9000], [10_500, 7500], cladding), basis: basisOf(rule(['UB'], ['UB'])), range: rangeOf({ divisions: [2, 3, 4] }),
    })
    const rows = rankRows(examineRange(prepared, 0, prepared.total))
    expect(rows.length).toBeGreaterThan(5)
    for (const row of rows) {
      const scheme = rebuildScheme(prepared, row.key)
      expect([scheme.mass.mass, scheme.sized.depth]).toEqual([row.mass, row.depth])
    }
  })
})

describe('a least frequency of the floor', () => {
  const limits = { variable: 360, total: 200, frequency: null, variableShare: 0.1, floorFrequency: 4 }
  const plate = plateOf([7500, 7500], [9000], cladding)
  const range = rangeOf({ divisions: [2, 3, 4] })

  it('is kept by every scheme, and no arrangement is lost that is feasible with a further rule', () => {
    const prepared = prepareStudy({ plate, basis: basisOf({ ...rule(['IPE', 'HEB'], ['IPE', 'HEB']), buildability: { secondaryNotDeeper: false, minFlangeWidth: null, maxPiece: null }, limits }), range })
    const part = examineRange(prepared, 0, prepared.total)
    const both = prepareStudy({ plate, basis: basisOf({ ...rule(['IPE', 'HEB'], ['IPE', 'HEB']), limits }), range })
    expect(part.counts.feasible).toBeGreaterThanOrEqual(examineRange(both, 0, both.total).counts.feasible)
    const rows = rankRows(part)
    expect(rows.length).toBeGreaterThan(2)
    for (const row of rows) {
      const { prepared: frame, sized } = rebuildScheme(prepared, row.key)
      // δ = (18/f)²: each beam's own and that of the softer of its carriers, from the plain verification
      const sags = sized.demands.map((demand, b) => {
        const { frequency } = verifyBeam(demand, sized.sections[b]!.section, 'S355', prepared.sizer.rules.beam)
        return frequency === null ? 0 : (18 / frequency) ** 2
      })
      frame.frame.beams.forEach((beam, b) => {
        const carriers = beam.supports.map(support => support.kind === 'beam' ? sags[support.beam]! : 0)
        expect(18 / Math.sqrt(sags[b]! + Math.max(...carriers))).toBeGreaterThan(4 - 1e-6)
      })
    }
  })
})
