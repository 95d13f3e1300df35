import { describe, expect, it } from 'vitest'
import { PlateSchema } from '#shared/schemas/plate'
import { RangeSchema } from '#shared/schemas/range'

const plate = {
  format: 'baywright-plate', version: 1, name: 'Level 1',
  gridX: [{ label: '1', at: 0 }, { label: '2', at: 9000 }],
  gridY: [{ label: 'A', at: 0 }, { label: 'B', at: 7500 }],
  outline: [[0, 0], [9000, 0], [9000, 7500], [0, 7500]],
  slab: { system: 'deck', depth: 130, maxSpan: 3600 },
  floorLoad: { permanent: 4, variable: 3, category: 'B' },
  storeys: 3, storeyHeight: 4000,
}

const sentence = (change: object) => PlateSchema.safeParse({ ...plate, ...change }).error?.issues[0]?.message

describe('a value that does not fit', () => {
  it.each([
    [{ storeys: 2.5 }, 'A whole number is needed, not 2.5.'],
    [{ storeys: '3' }, 'A number is needed, not a text.'],
    [{ storeys: undefined }, 'This value is missing; a number is needed.'],
    [{ storeys: 0 }, 'At least 1 is needed.'],
    [{ outline: plate.outline.slice(1) }, 'At least 4 entries are needed.'],
    [{ name: '  ' }, 'At least 1 character is needed.'],
    [{ slab: null }, 'An object is needed, not null.'],
    [{ slab: { ...plate.slab, system: 'glass' } }, 'One of deck, planks, solid is needed.'],
    [{ lineLoads: [{ name: 'Wall', on: 'edge', permanent: 1, variable: 0 }] }, 'A line load stands on "outline", on { from, to } or on { void }.'],
  ])('is answered with a sentence: %j', (change, message) => {
    expect(sentence(change)).toBe(message)
  })

  it('names the kinds of bays', () => {
    const issue = RangeSchema.safeParse({
      x: { kind: 'odd' }, y: { kind: 'fixed' }, primaryDirections: ['x'], divisions: [2], depthCap: null, maxDistinctSections: null,
    }).error?.issues[0]
    expect(issue?.message).toBe('The bays are of kind fixed, equal or module.')
  })
})
