import { describe, expect, it } from 'vitest'
import { CATALOGUE, FAMILIES, compareSections, findSection, sectionsOf } from '#shared/engine/sections'
import { torsionByDifferences } from './torsion-reference'

describe('catalogue', () => {
  it('has the 285 sections of the eight families', () => {
    expect(CATALOGUE).toHaveLength(285)
    const counts = FAMILIES.map(family => CATALOGUE.filter(section => section.family === family).length)
    expect(counts).toEqual([107, 46, 18, 18, 24, 24, 24, 24])
  })

  it('finds a section by its designation only', () => {
    expect(findSection('UB 457x191x67')?.h).toBe(453.4)
    expect(findSection('UB 457x191x68')).toBeUndefined()
  })

  it('orders by mass, then depth, then place in the catalogue', () => {
    const sorted = sectionsOf(['UB', 'IPE'])
    expect(sorted).toHaveLength(125)
    for (let i = 1; i < sorted.length; i++) expect(compareSections(sorted[i - 1]!, sorted[i]!)).toBeLessThan(0)
  })
})

describe('section properties', () => {
  it('agree with closed arithmetic for all 285: mass from area within 0.6 %, Iw with its flanges-only form within 1.4 %', () => {
    const wrong = CATALOGUE.filter(({ A, mass, Iw, tf, b, h }) =>
      Math.abs(7850 * A / 1e6 / mass - 1) > 0.006 || Math.abs(Iw / (tf * b ** 3 * (h - tf) ** 2 / 24) - 1) > 0.014)
    expect(wrong.map(section => section.designation)).toEqual([])
  })

  it('have plastic moduli above the elastic ones by the ratios of I sections', () => {
    const wrong = CATALOGUE.filter(({ WplY, WelY, WplZ, WelZ }) =>
      WplY / WelY < 1.09 || WplY / WelY > 1.33 || WplZ / WelZ < 1.48 || WplZ / WelZ > 1.67)
    expect(wrong.map(section => section.designation)).toEqual([])
  })

  it('follows from slices of the outline (UB 457x191x67)', () => {
    const { h, b, tw, tf, r, A, Iy, Iz, WplY, WplZ, perimeter } = findSection('UB 457x191x67')!
    const slices = 200_000
    const dy = h / 2 / slices
    const sums = { A: 0, Iy: 0, Iz: 0, WplY: 0, WplZ: 0 }
    for (let k = 0; k < slices; k++) {
      const y = (k + 0.5) * dy
      const fromFlange = h / 2 - tf - y
      const fillet = fromFlange >= 0 && fromFlange < r ? r - Math.sqrt(r * r - (r - fromFlange) ** 2) : 0
      const width = fromFlange < 0 ? b : tw + 2 * fillet
      sums.A += 2 * width * dy
      sums.Iy += 2 * width * y * y * dy
      sums.Iz += 2 * width ** 3 / 12 * dy
      sums.WplY += 2 * width * y * dy
      sums.WplZ += 2 * width * width / 4 * dy
    }
    expect(A / sums.A).toBeCloseTo(1, 4)
    expect(Iy / sums.Iy).toBeCloseTo(1, 4)
    expect(Iz / sums.Iz).toBeCloseTo(1, 4)
    expect(WplY / sums.WplY).toBeCloseTo(1, 4)
    expect(WplZ / sums.WplZ).toBeCloseTo(1, 4)
    expect(perimeter).toBeCloseTo(4 * b + 2 * h - 2 * tw - (8 - 2 * Math.PI) * r, 9)
  })

  it.each([['IPE 330', 0.25], ['HEB 200', 0.5], ['HEM 200', 0.5]] as const)(
    '%s: It agrees with a two-dimensional torsion solution within 1.5 %%', (designation, step) => {
      const section = findSection(designation)!
      expect(Math.abs(section.It / torsionByDifferences(section, step) - 1)).toBeLessThan(0.015)
    })
})
