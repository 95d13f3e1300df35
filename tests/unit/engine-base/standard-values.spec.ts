/**
 * Figures of the standards beside those of the engine, one by one: tables as they are printed, and values of
 * the expressions worked out apart from the engine. A wrong factor anywhere in ec3, materials or actions fails here.
 */
import { describe, expect, it } from 'vitest'
import { CHOICE_CODES, areaReduction, combinationFactors, nationalChoice, psi, storeyReduction } from '#shared/engine/actions'
import type { Category, CategoryGroup } from '#shared/engine/actions'
import {
  IMPERFECTION, KC_CENTRAL_LOAD, KC_UNIFORM_LOAD, c1Linear, c1QuarterPoints, c1c2TwoLoads, classInCompression, cmLinear, criticalTemperature, flexuralBucklingCurve,
  flexuralReduction, interactionAnnexB, ltbCurve, ltbReduction, ltbReductionModified, needsShearBucklingCheck,
  plasticShearResistance, shearBucklingResistance, tensionResistance, tieForce,
} from '#shared/engine/ec3'
import { E, G, GRAVITY, POISSON, yieldStrength } from '#shared/engine/materials'
import type { Grade } from '#shared/engine/materials'
import { CATALOGUE, findSection } from '#shared/engine/sections'
import type { Section } from '#shared/engine/sections'

const of = (designation: string): Section => findSection(designation)!
const IPE300 = of('IPE 300')
const EN = nationalChoice('EN')
const UK = nationalChoice('UK')

describe('materials', () => {
  it('has the constants of EN 1993-1-1 3.2.6', () => {
    expect([E, G, POISSON, GRAVITY]).toEqual([210_000, 81_000, 0.3, 9.81])
  })

  const table: [Grade, number[]][] = [
    ['S235', [235, 225, 215, 215, 215, 195]], ['S275', [275, 265, 255, 245, 235, 225]], ['S355', [355, 345, 335, 325, 315, 295]],
  ]
  it.each(table)('%s has fy of EN 10025-2 at 16, 40, 63, 80, 100, 150 mm, and the next step just above', (grade, values) => {
    const limits = [16, 40, 63, 80, 100, 150]
    expect(limits.map(t => yieldStrength(grade, t, 'product-standard'))).toEqual(values)
    expect([0, ...limits.slice(0, -1)].map(t => yieldStrength(grade, t + 0.1, 'product-standard'))).toEqual(values)
    expect(yieldStrength(grade, 150.1, 'product-standard')).toBeNull()
  })

  it('S460 M/ML has fy of EN 10025-4 up to 120 mm', () => {
    const limits = [16, 40, 63, 80, 100, 120]
    const values = [460, 440, 430, 410, 400, 385]
    expect(limits.map(t => yieldStrength('S460', t, 'product-standard'))).toEqual(values)
    expect([0, ...limits.slice(0, -1)].map(t => yieldStrength('S460', t + 0.1, 'product-standard'))).toEqual(values)
  })

  it.each([['S235', 235, 215], ['S275', 275, 255], ['S355', 355, 335], ['S460', 460, 430]] as const)(
    '%s has fy %d up to 40 mm and %d up to 80 mm by Table 3.1', (grade, thin, thick) => {
      expect([1, 40, 40.1, 80, 80.1].map(t => yieldStrength(grade, t, 'en-1993'))).toEqual([thin, thin, thick, thick, null])
    })
})

describe('sections', () => {
  it('has radii of gyration and elastic moduli that follow from I, A, h and b', () => {
    for (const { A, Iy, Iz, iy, iz, h, b, WelY, WelZ } of CATALOGUE) {
      expect([iy * iy * A / Iy, iz * iz * A / Iz, WelY * h / 2 / Iy, WelZ * b / 2 / Iz].map(value => Math.round(value * 1e9) / 1e9)).toEqual([1, 1, 1, 1])
    }
  })
})

describe('Table 5.2, web in compression', () => {
  it('has its limits at 33ε, 38ε, 42ε', () => {
    const web = (c: number): Section => ({ ...IPE300, tw: 10, r: 0, tf: 40, b: 100, h: c + 80 })
    expect([330, 331, 380, 381, 420, 421].map(c => classInCompression(web(c), 235))).toEqual([1, 2, 2, 3, 3, 4])
  })
})

describe('shear', () => {
  it('checks buckling of the web above 72ε/η', () => {
    const web = (hw: number): Section => ({ ...IPE300, tw: 10, tf: 10, h: hw + 20 })
    expect([720, 721].map(hw => needsShearBucklingCheck(web(hw), 235, 1.0))).toEqual([false, true])
    expect([600, 601].map(hw => needsShearBucklingCheck(web(hw), 235, 1.2))).toEqual([false, true])
  })

  it('divides by γM0, and by γM1 where the web buckles', () => {
    // 4000 · 355/√3/1.1 = 745.307 kN
    expect(plasticShearResistance(4000, 355, 1.1) / 1e3).toBeCloseTo(745.307, 3)
    const section = of('UB 762x267x134')
    expect(shearBucklingResistance(section, 355, 1, 1) / shearBucklingResistance(section, 355, 1, 1.1)).toBeCloseTo(1.1, 12)
    expect(tensionResistance(5000, 355, 1.25)).toBeCloseTo(1_420_000, 6)
  })
})

describe('buckling curves', () => {
  it('has α of Tables 6.1 and 6.3', () => {
    expect(IMPERFECTION).toEqual({ a0: 0.13, a: 0.21, b: 0.34, c: 0.49, d: 0.76 })
  })

  it.each([
    ['a0', [0.951321, 0.725344, 0.232299]], ['a', [0.924273, 0.665603, 0.222895]], ['b', [0.884215, 0.597023, 0.209461]],
    ['c', [0.842991, 0.539939, 0.196184]], ['d', [0.77932, 0.467091, 0.176633]],
  ] as const)('χ of curve %s at λ̄ 0.5, 1.0, 2.0', (curve, values) => {
    expect([0.5, 1, 2].map(lambda => flexuralReduction(lambda, curve))).toEqual(values.map(value => expect.closeTo(value, 6)))
  })

  const rolled = (h: number, b: number, tf: number): Section => ({ ...IPE300, h, b, tf })
  it.each([
    // h/b > 1.2: tf ≤ 40; 40 < tf ≤ 100. h/b ≤ 1.2: tf ≤ 100; tf > 100 (Table 6.2, y and z, S235 … S420 and S460)
    [rolled(121, 100, 40), ['a', 'b'], ['a0', 'a0']],
    [rolled(121, 100, 40.1), ['b', 'c'], ['a', 'a']],
    [rolled(121, 100, 100), ['b', 'c'], ['a', 'a']],
    [rolled(120, 100, 10), ['b', 'c'], ['a', 'a']],
    [rolled(120, 100, 100), ['b', 'c'], ['a', 'a']],
    [rolled(120, 100, 100.1), ['d', 'd'], ['c', 'c']],
  ] as const)('Table 6.2, row %#', (section, ordinary, strong) => {
    expect((['y', 'z'] as const).map(axis => flexuralBucklingCurve(section, axis, 'S355'))).toEqual(ordinary)
    expect((['y', 'z'] as const).map(axis => flexuralBucklingCurve(section, axis, 'S460'))).toEqual(strong)
  })
})

describe('lateral-torsional buckling', () => {
  const section = (h: number): Section => ({ ...IPE300, h, b: 100 })

  it.each([
    [200, '6.3.2.3', 'b', [0.917112, 0.699668, 0.427259, 0.25]],
    [310, '6.3.2.3', 'c', [0.885889, 0.639115, 0.389128, 0.247418]],
    [311, '6.3.2.3', 'd', [0.835907, 0.559883, 0.338774, 0.219405]],
  ] as const)('UK, h/b %d/100, %s: χLT of curve %s at λ̄LT 0.6, 1.0, 1.5, 2.0', (h, method, curve, values) => {
    const found = ltbCurve(section(h), method, UK)
    expect([found.curve, found.plateau, found.beta]).toEqual([curve, 0.4, 0.75])
    expect([0.6, 1, 1.5, 2].map(lambda => ltbReduction(lambda, found))).toEqual(values.map(value => expect.closeTo(value, 6)))
  })

  it.each([
    [200, 'a', [0.889995, 0.665603, 0.372437]], [201, 'b', [0.837059, 0.597023, 0.342235]],
  ] as const)('general case, h/b %d/100: χLT of curve %s at λ̄LT 0.6, 1.0, 1.5', (h, curve, values) => {
    const found = ltbCurve(section(h), '6.3.2.2', EN)
    expect([found.curve, found.plateau, found.beta]).toEqual([curve, 0.2, 1])
    expect([0.6, 1, 1.5].map(lambda => ltbReduction(lambda, found))).toEqual(values.map(value => expect.closeTo(value, 6)))
  })

  it('limits χLT,mod by 1/λ̄LT²', () => {
    // curve b at 1.3: χLT 0.5236, f = 1 − 0.25 (1 − 2 · 0.25) = 0.875: 0.5984 > 1/1.69
    expect(ltbReductionModified(1.3, ltbCurve(section(200), '6.3.2.3', UK), 0.5)).toBeCloseTo(1 / 1.69, 12)
  })

  it('has kc 0.94 and 0.86 of Table 6.6', () => {
    expect([KC_UNIFORM_LOAD, KC_CENTRAL_LOAD]).toEqual([0.94, 0.86])
  })
})

describe('closed forms of C1', () => {
  it('1.77 − 1.04ψ + 0.27ψ², at most 2.6', () => {
    expect([1, 0.5, 0, -0.5, -1].map(c1Linear)).toEqual([1, 1.3175, 1.77, 2.3575, 2.6].map(value => expect.closeTo(value, 12)))
  })

  it('by quarter points: uniform moment, uniform load, load in the middle, one quarter point alone', () => {
    // √(35/35), √(35/27.125), √(35/21.5), √(35/10)
    expect([[1, 1, 1], [0.75, 1, 0.75], [0.5, 1, 0.5], [1, 0, 0], [0, 0, 1]].map(([a, b, c]) => c1QuarterPoints(1, a!, b!, c!)))
      .toEqual([1, 1.135924, 1.275895, 1.870829, 1.870829].map(value => expect.closeTo(value, 6)))
  })

  it('of two loads at a third: 1 + 2.92/27, C2 = (2.44 − 1.08)/3 · C1', () => {
    const { C1, C2 } = c1c2TwoLoads(1 / 3)
    expect([C1, C2]).toEqual([expect.closeTo(1.108148, 6), expect.closeTo(0.502360, 5)])
  })
})

describe('Annex B', () => {
  const base = {
    NEd: 600e3, MyEd: 50e6, MzEd: 5e6, NRk: 2000e3, MyRk: 200e6, MzRk: 80e6, chiY: 0.8, chiZ: 0.5, chiLT: 0.9,
    lambdaY: 0.7, lambdaZ: 0.9, Cmy: 0.8, Cmz: 0.7, CmLT: 0.8, gammaM1: 1, sectionClass: 3 as const,
  }
  const [ny, nz] = [600 / 1600, 600 / 1000]

  it('has the factors of class 3 below and above the limit of slenderness', () => {
    const short = interactionAnnexB(base)
    expect(short.kyy).toBeCloseTo(0.8 * (1 + 0.6 * 0.7 * ny), 12)
    expect(short.kzz).toBeCloseTo(0.7 * (1 + 0.6 * 0.9 * nz), 12)
    const slender = interactionAnnexB({ ...base, lambdaY: 1.6, lambdaZ: 1.8 })
    expect(slender.kyy).toBeCloseTo(0.8 * (1 + 0.6 * ny), 12)
    expect(slender.kzz).toBeCloseTo(0.7 * (1 + 0.6 * nz), 12)
    expect(slender.kzy).toBeCloseTo(1 - 0.05 * nz / 0.55, 12)
  })

  it('changes the form of kzy at λ̄z 0.4 for classes 1 and 2', () => {
    const kzy = (lambdaZ: number, NEd: number) => interactionAnnexB({ ...base, sectionClass: 1, lambdaZ, NEd }).kzy
    // nz = 0.6: below 0.4 the smaller of 0.6 + λ̄z and 1 − 0.1 λ̄z nz/(CmLT − 0.25)
    expect(kzy(0.39, 600e3)).toBeCloseTo(1 - 0.1 * 0.39 * 0.6 / 0.55, 12)
    expect(kzy(0.3, 600e3)).toBeCloseTo(0.9, 12)
    expect(kzy(0.45, 600e3)).toBeCloseTo(1 - 0.1 * 0.45 * 0.6 / 0.55, 12)
    expect(kzy(0.4, 10_000e3)).toBeCloseTo(1 - 0.1 * 0.4 * 10 / 0.55, 12)
  })

  it('divides the resistances by γM1', () => {
    const [a, b] = [1, 1.1].map(gammaM1 => interactionAnnexB({ ...base, gammaM1, NEd: 600e3 / gammaM1, MyEd: 50e6 / gammaM1, MzEd: 5e6 / gammaM1 }))
    expect(a!.eq661).toBeCloseTo(b!.eq661, 12)
    expect(a!.eq662).toBeCloseTo(b!.eq662, 12)
  })

  it('has Cm of a linear diagram, at least 0.4', () => {
    expect([1, 0.5, 0, -0.5, -0.6, -1].map(cmLinear)).toEqual([1, 0.8, 0.6, 0.4, 0.4, 0.4].map(value => expect.closeTo(value, 12)))
  })
})

describe('fire and ties', () => {
  it.each([[0.7, 525.784], [0.6, 554.279], [0.5, 584.665], [0.3, 663.777], [0.013, 1135.655]])('θcr at μ0 %d is %d °C', (mu, expected) => {
    expect(criticalTemperature(mu)).toBeCloseTo(expected, 3)
  })

  it('has the tie forces of A.5: 0.8 inside, 0.4 at the perimeter', () => {
    // (4.2 + 0.5 · 3.0) · 3 · 9 = 153.9 kN
    expect(tieForce('internal', 0.0042, 0.003, 0.5, 3000, 9000) / 1e3).toBeCloseTo(123.12, 9)
    expect(tieForce('perimeter', 0.0084, 0.006, 0.5, 3000, 9000) / 1e3).toBeCloseTo(123.12, 9)
    expect(tieForce('internal', 0.001, 0.001, 0.5, 1000, 3000)).toBe(75_000)
  })
})

describe('national choices', () => {
  const psiTable: Record<CategoryGroup, [number, number, number]> = {
    A: [0.7, 0.5, 0.3], B: [0.7, 0.5, 0.3], C: [0.7, 0.7, 0.6], D: [0.7, 0.7, 0.6], E: [1, 0.9, 0.8], F: [0.7, 0.7, 0.6], G: [0.7, 0.5, 0.3],
    H: [0, 0, 0],
  }

  it.each(Object.entries(psiTable) as [CategoryGroup, [number, number, number]][])('EN 1990 Table A1.1, category %s', (group, values) => {
    const { psi0, psi1, psi2 } = psi(EN, group as Category)
    expect([psi0, psi1, psi2]).toEqual(values)
    if (group !== 'H') expect(psi(UK, group as Category)).toEqual(psi(EN, group as Category))
  })

  it('has the partial factors, η, ξ, curves and ties of EN and UK', () => {
    const figures = ({ gammaM0, gammaM1, gammaG, gammaQ, eta, xi, tiePsi, ltb }: typeof EN) =>
      [gammaM0, gammaM1, gammaG, gammaQ, eta, xi, tiePsi, ltb.rolled.plateau, ltb.rolled.beta, ltb.general.plateau, ltb.kcRule]
    expect(figures(EN)).toEqual([1, 1, 1.35, 1.5, 1.2, 0.85, 'psi2', 0.4, 0.75, 0.2, 'table-6.6'])
    expect(figures(UK)).toEqual([1, 1, 1.35, 1.5, 1.0, 0.925, 'psi1', 0.4, 0.75, 0.2, '1/sqrt(C1)'])
    expect(psi(UK, 'H')).toEqual({ psi0: 0.7, psi1: 0, psi2: 0 })
  })

  it('has the imposed loads of EN 1991-1-1 (recommended) and of the UK (from memory)', () => {
    const loads = ({ imposed }: typeof EN) => Object.entries(imposed).map(([category, { qk, Qk }]) => [category, qk, Qk])
    expect(loads(EN)).toEqual([
      ['A', 2, 2], ['B', 3, 4.5], ['C1', 3, 4], ['C2', 4, 4], ['C3', 5, 4], ['C4', 5, 7], ['C5', 5, 4.5], ['D1', 4, 4], ['D2', 5, 7],
      ['E1', 7.5, 7], ['F', 2.5, 20], ['G', 5, 90], ['H', 0.4, 1],
    ])
    expect(loads(UK)).toEqual([
      ['A', 1.5, 2], ['B', 2.5, 2.7], ['C1', 2, 3], ['C2', 4, 3.6], ['C3', 3, 4.5], ['C4', 5, 7], ['C5', 5, 3.6], ['D1', 4, 3.6], ['D2', 4, 3.6],
      ['E1', 7.5, 4.5], ['F', 2.5, 10], ['G', 5, null], ['H', 0.6, 0.9],
    ])
  })

  it('gives the other countries what differs from the recommended values (from memory)', () => {
    expect(nationalChoice('DE').gammaM1).toBe(1.1)
    expect([nationalChoice('IE').eta, nationalChoice('IE').yieldRule]).toEqual([1.0, 'product-standard'])
    expect(['NL', 'SE'].map(code => nationalChoice(code as 'NL').xi)).toEqual([0.89, 0.89])
    expect((['A', 'B', 'C', 'D', 'E'] as const).map(category => psi(nationalChoice('NL'), category).psi0)).toEqual([0.4, 0.5, 0.6, 0.6, 1])
    expect(CHOICE_CODES.map(code => nationalChoice(code).combinations.join(' '))).toEqual([
      '6.10 6.10ab', '6.10 6.10ab', '6.10 6.10ab', '6.10', '6.10', '6.10ab', '6.10ab',
    ])
  })

  it('has the advisory limits of deflection', () => {
    const ratios = (code: 'EN' | 'UK' | 'FR') => nationalChoice(code).deflection.map(({ load, ratio }) => `${load} ${ratio}`)
    expect(ratios('UK')).toEqual(['variable 360', 'variable 200'])
    // Steel Buildings in Europe, Part 4, Table 4.2
    expect(ratios('FR')).toEqual(['total 200', 'variable 300', 'total 250', 'variable 350'])
    expect(ratios('EN')).toEqual([])
  })

  it('reduces imposed load by area', () => {
    // EN: 5/7 · 0.7 + 10/A; UK: 1 − A/1000 ≥ 0.75; DE: 0.5 + 10/A, 0.7 + 10/A (from memory)
    expect([20, 40, 100].map(area => areaReduction(EN, 'B', area))).toEqual([1, 0.75, 0.6].map(value => expect.closeTo(value, 12)))
    expect([20, 40, 100, 300].map(area => areaReduction(UK, 'B', area))).toEqual([0.98, 0.96, 0.9, 0.75].map(value => expect.closeTo(value, 12)))
    const DE = nationalChoice('DE')
    expect([areaReduction(DE, 'B', 40), areaReduction(DE, 'D', 50), areaReduction(DE, 'B', 15), areaReduction(DE, 'E', 40)])
      .toEqual([0.75, 0.9, 1, 1].map(value => expect.closeTo(value, 12)))
  })

  it('reduces imposed load by storeys', () => {
    expect([1, 2, 3, 4, 10].map(n => storeyReduction(EN, 'B', n))).toEqual([1, 1, 0.9, 0.85, 0.76].map(value => expect.closeTo(value, 12)))
    expect([1, 2, 3, 4, 5, 6, 10, 11].map(n => storeyReduction(UK, 'B', n))).toEqual([1, 0.9, 0.8, 0.7, 0.6, 0.6, 0.6, 0.5].map(value => expect.closeTo(value, 12)))
    expect([2, 3, 6].map(n => storeyReduction(nationalChoice('DE'), 'B', n))).toEqual([1, 0.9, 0.8].map(value => expect.closeTo(value, 12)))
  })

  it('combines by 6.10, 6.10a and 6.10b', () => {
    expect(combinationFactors(EN, '6.10ab')).toEqual([
      { name: '6.10a', permanent: 1.35, variable: 0, accompanying: 1.5 },
      { name: '6.10b', permanent: expect.closeTo(1.1475, 12), variable: 1.5, accompanying: 0 },
    ])
  })
})
