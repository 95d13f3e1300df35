/** Framings refused by their slab without being framed are refused with the same words as when framed. */
import { describe, expect, it } from 'vitest'
import { frameArrangement, isRejected } from '#shared/engine/framing'
import { frameOf, prepareStudy } from '#shared/engine/search/prepare'
import type { PlateInput } from '#shared/schemas/plate'
import { StudyInputSchema } from '#shared/schemas/study'
import { basisOf, plateOf, rangeOf } from './inputs'

const deck = { system: 'deck', depth: 130, weight: 2.75, maxSpan: 3200 } as const
const zone = { name: 'Plant', x: 3000, y: 2000, width: 4000, height: 6000, permanent: 4.2, variable: 7.5, category: 'E1' as const }

const PLATES: [string, Partial<PlateInput>][] = [
  ['a rectangle', { slab: deck }],
  ['a slab that spans along y', { slab: { ...deck, span: 'y' } }],
  ['an L with an overhang', { slab: deck, outline: [[0, -300], [18_000, -300], [18_000, 6000], [9000, 6000], [9000, 12_000], [0, 12_000]] }],
  ['a zone', { slab: deck, zones: [zone] }],
  ['a zone with a slab of its own', { slab: deck, zones: [{ ...zone, slab: { ...deck, maxSpan: 2500 } }] }],
  ['a keep-clear zone', { slab: deck, keepClear: [{ name: 'Foyer', x: 5500, y: 5500, width: 1000, height: 1000 }] }],
  ['a void', { slab: deck, voids: [{ name: 'Stair', x: 7000, y: 1000, width: 2500, height: 3000 }] }],
  ['an omitted column', { slab: deck, omittedColumns: [{ x: '2', y: 'B', line: 'x' }] }],
]

describe('a framing on a grid that is known', () => {
  it.each(PLATES)('gives what framing it anew gives: %s', (_, plate) => {
    const input = StudyInputSchema.parse({
      plate: plateOf([9000, 9000], [6000, 6000], plate), basis: basisOf({ minSecondarySpacing: 1600 }),
      range: rangeOf({ x: { kind: 'module', module: 1500, min: 4500, max: 9000 }, y: { kind: 'equal', min: 4000, max: 6000 }, divisions: [1, 2, 3, 4] }),
    })
    const study = prepareStudy(input)
    const reasons = new Set<string>()
    for (let number = 1; number <= study.total; number++) {
      const arrangement = study.arrangements.at(number)
      const known = frameOf(study, arrangement)
      const anew = frameArrangement(study.models[0]!, arrangement, study.framing)
      if (isRejected(anew)) {
        reasons.add(anew.rejection)
        expect(known).toEqual(anew)
      } else {
        expect(isRejected(known)).toBe(false)
      }
    }
    expect(reasons.size).toBeGreaterThan(0)
  })
})
