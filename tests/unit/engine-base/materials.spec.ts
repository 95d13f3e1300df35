import { describe, expect, it } from 'vitest'
import { yieldStrength } from '#shared/engine/materials'

describe('yield strength', () => {
  it.each([
    ['S355', 16, 355], ['S355', 16.1, 345], ['S355', 40, 345], ['S355', 63, 335], ['S355', 80, 325], ['S355', 100, 315], ['S355', 150, 295],
    ['S235', 16, 235], ['S235', 17, 225], ['S275', 41, 255], ['S460', 16, 460], ['S460', 40, 440], ['S460', 120, 385],
  ] as const)('%s at %d mm by the product standard is %d', (grade, thickness, fy) => {
    expect(yieldStrength(grade, thickness, 'product-standard')).toBe(fy)
  })

  it.each([['S355', 40, 355], ['S355', 40.1, 335], ['S235', 80, 215], ['S275', 80, 255], ['S460', 80, 430]] as const)(
    '%s at %d mm by EN 1993-1-1 Table 3.1 is %d', (grade, thickness, fy) => {
      expect(yieldStrength(grade, thickness, 'en-1993')).toBe(fy)
    })

  it('is not offered above the thickest step', () => {
    expect(yieldStrength('S460', 121, 'product-standard')).toBeNull()
    expect(yieldStrength('S355', 80.1, 'en-1993')).toBeNull()
  })
})
