import { describe, expect, it } from 'vitest'
import type { Slab } from '#shared/schemas/plate'
import { slabChoices, slabName, toggleSlab } from '~~/app/utils/scheme/slabs'

const slab = (depth: number, more: Partial<Slab> = {}): Slab =>
  ({ system: 'deck', depth, weight: 2.75, maxSpan: 3300, fixedToTopFlange: true, span: 'free', ...more })
const own = slab(130)
const planks = slab(275, { system: 'planks', name: 'Planks 200 + 75 topping' })

describe('slab systems of a range', () => {
  it('offers the plate\'s own first and none twice, whatever it is called', () => {
    expect(slabChoices(own, [slab(130, { name: 'Deck' }), planks], [planks])).toEqual([own, planks])
  })

  it('says nothing in the range while the plate\'s own stands alone', () => {
    const choices = [own, planks]
    const both = toggleSlab(choices, null, planks)
    expect(both).toEqual([own, planks])
    expect(toggleSlab(choices, both, planks)).toBeNull()
    expect(toggleSlab(choices, both, own)).toEqual([planks])
    expect(toggleSlab(choices, null, own)).toEqual([])
  })

  it('names a slab by its system and depth where it has no name', () => {
    expect(slabName(own)).toBe('deck slab 130')
    expect(slabName(planks)).toBe('Planks 200 + 75 topping')
  })
})
