import { describe, expect, it } from 'vitest'
import { RangeSchema } from '#shared/schemas/range'
import { formProblem, openRange, rangeForm, rangeOf, rangeProduct } from '~~/app/utils/scheme/rangeForm'

describe('form of a range', () => {
  it('opens on the drawn grid, both directions, one to five panels, without a depth limit', () => {
    expect(rangeOf(openRange())).toEqual({
      x: { kind: 'fixed' }, y: { kind: 'fixed' }, primaryDirections: ['x', 'y'], divisions: [1, 2, 3, 4, 5], depthCap: null, maxDistinctSections: null,
    })
  })

  it('gives back the range that it was filled from', () => {
    const range = RangeSchema.parse({
      x: { kind: 'equal', min: 7500, max: 9000 }, y: { kind: 'module', module: 750, min: 6000, max: 9000 },
      primaryDirections: ['y'], divisions: [2, 3], depthCap: null, depthCapInterior: 460, maxDistinctSections: null,
      slabs: [{ system: 'deck', depth: 130, maxSpan: 3300 }],
    })
    expect(rangeOf(rangeForm(range), range)).toEqual(range)
  })

  it('makes only documents that the schema accepts', () => {
    const form = openRange()
    form.x = { kind: 'module', module: 1500, min: 6000, max: 12_000 }
    form.depthCap = 500
    expect(RangeSchema.safeParse(rangeOf(form)).success).toBe(true)
  })

  it('writes the product with each factor that the reader sees', () => {
    expect(rangeProduct({ layoutsX: 144, layoutsY: 6, directionsAndDivisions: 8, slabs: 2 }, 2, 4)).toBe('144 × 6 × 2 × 4 × 2')
    expect(rangeProduct({ layoutsX: 1, layoutsY: 1, directionsAndDivisions: 64, slabs: 1 }, 2, 4)).toBe('1 × 1 × 64')
  })

  it('names what is missing before anything is counted', () => {
    expect(formProblem(openRange())).toBeNull()
    expect(formProblem({ ...openRange(), alongX: false, alongY: false })).toMatch(/direction/)
    expect(formProblem({ ...openRange(), divisions: [] })).toMatch(/panels/)
    expect(formProblem({ ...openRange(), y: { kind: 'equal', min: 9000, max: 6000, module: 1500 } })).toMatch(/longer/)
  })
})
