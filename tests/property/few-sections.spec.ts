/** Schemes with few different sections against every choice of sections tried the long way, and laws that they keep. */
import { describe, expect, it, vi } from 'vitest'
import { mergeParts, prepareStudy, priceOfRepetition, examineRange, emptyPart, rankRows, study } from '#shared/engine/search'
import type { BasisInput } from '#shared/schemas/basis'
import type { PlateInput } from '#shared/schemas/plate'
import type { Range } from '#shared/schemas/range'
import { type StudyInput, StudyInputSchema } from '#shared/schemas/study'
import { basisOf, plateOf, rangeOf } from '../unit/search/inputs'
import { leastMassOfFew } from './search-brute-force'

vi.setConfig({ testTimeout: 120_000 })

type Families = BasisInput['secondary']['families']

const basis = (beams: Families, columns: Families, change: Partial<BasisInput> = {}): Partial<BasisInput> => ({
  secondary: { grade: 'S355', families: beams }, primary: { grade: 'S355', families: beams }, column: { grade: 'S355', families: columns }, ...change,
})
const cladding: Partial<PlateInput> = { lineLoads: [{ name: 'Cladding', on: 'outline', permanent: 4, variable: 0 }] }

interface Case { name: string, baysX: number[], baysY: number[], plate?: Partial<PlateInput>, basis: Partial<BasisInput>, direction: 'x' | 'y', divisions: number }

const CASES: Case[] = [
  { name: 'one bay', baysX: [6000], baysY: [7500], basis: basis(['IPE'], ['HEB']), direction: 'x', divisions: 2 },
  { name: 'unequal bays with cladding', baysX: [6000, 4500], baysY: [6000], plate: cladding, basis: basis(['IPE'], ['HEB']), direction: 'x', divisions: 2 },
  { name: 'primaries along y', baysX: [7500, 6000], baysY: [6000, 9000], basis: basis(['IPE'], ['HEB']), direction: 'y', divisions: 3 },
  { name: 'wide flanges with the construction stage', baysX: [9000], baysY: [7500, 4500], plate: cladding,
    basis: basis(['HEA'], ['HEM'], { constructionStage: true }), direction: 'x', divisions: 3 },
  { name: 'one division with ties', baysX: [6000, 7200], baysY: [3000, 3600], basis: basis(['IPE'], ['HEB']), direction: 'x', divisions: 1 },
  { name: 'five storeys and a roof', baysX: [7500, 9000], baysY: [6000], plate: { ...cladding, storeys: 5, roof: { permanent: 4, variable: 0.75 } },
    basis: basis(['IPE'], ['HEB']), direction: 'x', divisions: 3 },
]

function inputOf({ baysX, baysY, plate, basis: change, direction, divisions }: Case, range: Partial<Range> = {}): StudyInput {
  return StudyInputSchema.parse({
    plate: plateOf(baysX, baysY, plate), basis: basisOf(change),
    range: rangeOf({ primaryDirections: [direction], divisions: [divisions], ...range }),
  })
}

const grams = (kg: number) => Math.round(kg * 1000 + 1e-4)

describe('a scheme with few different sections', () => {
  it.each(CASES)('weighs what the best of all choices of sections weighs: $name', (one) => {
    const input = inputOf(one)
    const { steps } = priceOfRepetition(prepareStudy(input), '1', 'plate', 1, 4)
    expect(steps[0]).toMatchObject({ most: 1, found: null, status: 'impossible' })
    for (const step of steps.slice(1, one.name === 'one bay' ? 4 : 3)) {
      const least = leastMassOfFew(input, one.direction, one.divisions, step.most)
      expect(step.found && grams(step.found.beamMass + step.found.columnMass), `${step.most} sections`).toBe(least === null ? null : grams(least))
      expect(step.found?.distinctSections ?? 0).toBeLessThanOrEqual(step.most)
    }
  })

  it.each(CASES)('is never heavier with more sections allowed, and never lighter than without a limit: $name', (one) => {
    for (const scope of ['plate', 'kind'] as const) {
      const { steps, free } = priceOfRepetition(prepareStudy(inputOf(one)), '1', scope)
      const masses = steps.map(step => step.found ? grams(step.found.mass) : Infinity)
      expect([...masses].sort((a, b) => b - a)).toEqual(masses)
      expect(masses[masses.length - 1]).toBeGreaterThanOrEqual(grams(free.mass))
      for (const { found, bound, gap, status } of steps) {
        if (!found) continue
        expect(bound!).toBeLessThanOrEqual(found.mass + 1e-9)
        expect(status).toBe(gap === 0 ? 'optimal' : 'best-found')
      }
    }
  })

  it('allows so many for each kind of member', () => {
    const { steps } = priceOfRepetition(prepareStudy(inputOf(CASES[2]!)), '1', 'kind', 1, 3)
    for (const { most, found } of steps) {
      expect(found!.sections.map(({ list }) => list).sort()).toEqual(['column', 'edge', 'primary', 'secondary'])
      for (const { designations } of found!.sections) expect(designations.length).toBeLessThanOrEqual(most)
    }
  })

  it('keeps the rule that secondary beams are not deeper', () => {
    const rule = { secondaryNotDeeper: true, minFlangeWidth: null, maxPiece: null }
    const input = inputOf({ name: '', baysX: [4500, 6000], baysY: [9000], basis: basis(['IPE', 'HEA'], ['HEB'], { buildability: rule }), direction: 'x', divisions: 2 }, { maxDistinctSections: 4 })
    const [scheme] = study(input).schemes
    const depth = (section: string) => Number(/\d+/.exec(section)![0])
    expect(scheme!.distinctSections).toBeLessThanOrEqual(4)
    const alongX = scheme!.members.filter(({ from, to }) => from && to && from[1] === to[1])
    const pairs = scheme!.members.filter(({ kind }) => kind === 'secondary').flatMap(low =>
      alongX.filter(high => high.from![0] < low.from![0] && high.to![0] > low.from![0]).map(high => [low, high] as const))
    // One intermediate secondary in each of two bays, each on the beams before and behind it.
    expect(pairs).toHaveLength(4)
    for (const [low, high] of pairs) expect(depth(low.section)).toBeLessThanOrEqual(depth(high.section))
  })
})

describe('a study with a limit on different sections', () => {
  const wide = (most: number | null): StudyInput => inputOf(
    { name: '', baysX: [15_000], baysY: [6000], plate: cladding, basis: basis(['IPE', 'HEA'], ['HEB']), direction: 'x', divisions: 2 },
    { x: { kind: 'module', module: 1500, min: 4500, max: 7500 }, primaryDirections: ['x', 'y'], divisions: [2, 3], maxDistinctSections: most },
  )

  it('keeps it in every scheme and adds up its counts', () => {
    const { counts, schemes } = study(wide(3))
    expect(schemes.length).toBeGreaterThan(5)
    for (const { members, distinctSections } of schemes) {
      expect(distinctSections).toBeLessThanOrEqual(3)
      // Columns show their lowest lift, so members never name more sections than there are.
      expect(new Set(members.map(member => member.section)).size).toBeLessThanOrEqual(distinctSections)
    }
    const rejected = Object.values(counts.rejected).reduce((sum, count) => sum + count, 0)
    expect(counts.feasible + rejected).toBe(counts.examined)
    expect(counts.examined).toBe(counts.range)
  })

  it('is never heavier with more sections, arrangement by arrangement', () => {
    const masses = [2, 3, 4, 6, null].map(most => new Map(study(wide(most)).schemes.filter(s => s.depthCap === null).map(s => [s.number, grams(s.mass)])))
    for (let n = 1; n < masses.length; n++) {
      for (const [number, mass] of masses[n - 1]!) expect(masses[n]!.get(number), `arrangement ${number}`).toBeLessThanOrEqual(mass)
    }
  })

  it('rejects for buildability what so few sections cannot serve', () => {
    const { counts, schemes } = study(wide(1))
    expect(schemes).toEqual([])
    expect(counts.rejected).toMatchObject({ buildability: expect.any(Number) })
  })

  it('gives the same however it is cut, and every row is rebuilt from its key', () => {
    const whole = prepareStudy(wide(3))
    const result = JSON.stringify(rankRows(examineRange(whole, 0, whole.total)))
    for (const size of [1, 3, 7]) {
      let merged = emptyPart()
      for (let from = 0; from < whole.total; from += size) {
        merged = mergeParts(merged, examineRange(prepareStudy(wide(3)), from, Math.min(from + size, whole.total)))
      }
      expect(JSON.stringify(rankRows(merged))).toBe(result)
    }
    for (const { massPerArea, mass, depth, rank } of study(wide(3)).schemes) {
      expect(JSON.parse(result)[rank - 1]).toMatchObject({ massPerArea, mass, depth })
    }
  })
})
