import { describe, expect, it } from 'vitest'
import { nationalChoice } from '#shared/engine/actions'
import {
  bendingResistanceWithShear, exhaustingShear, classInBending, classInCompression, criticalTemperature, curveFor, fireReduction, flangeClass,
  flexuralBuckling, flexuralBucklingCurve, flexuralReduction, highShearFactor, interactionAnnexB, kcFromC1, kcLinear, ltbCurve,
  ltbModification, ltbReduction, ltbReductionModified, needsShearBucklingCheck, sectionFactor, shearArea, shearBucklingFactor,
  shearBucklingResistance, tensionResistance, tieForce, webClassInBending, webModulus, webSlenderness,
} from '#shared/engine/ec3'
import { findSection } from '#shared/engine/sections'
import type { Section } from '#shared/engine/sections'

const of = (designation: string): Section => findSection(designation)!
const UK = nationalChoice('UK')
const EN = nationalChoice('EN')

describe('classification (Table 5.2)', () => {
  it('has its limits at 9ε, 10ε, 14ε for the flange', () => {
    const flange = (c: number): Section => ({ ...of('IPE 300'), tw: 10, r: 0, tf: 10, b: 2 * c + 10 })
    expect([90, 90.1, 100, 100.1, 140, 140.1].map(c => flangeClass(flange(c), 235))).toEqual([1, 2, 2, 3, 3, 4])
  })

  it('has its limits at 72ε, 83ε, 124ε for the web in bending', () => {
    const web = (c: number): Section => ({ ...of('IPE 300'), tw: 10, r: 0, tf: 10, h: c + 20 })
    expect([720, 721, 830, 831, 1240, 1241].map(c => webClassInBending(web(c), 235))).toEqual([1, 2, 2, 3, 3, 4])
  })

  it('takes the worse of web and flange', () => {
    expect(classInBending(of('UC 152x152x23'), 355)).toBe(3)
    expect(classInBending(of('UB 457x191x67'), 355)).toBe(1)
    expect(classInCompression(of('UB 457x191x67'), 355)).toBe(4)
    expect(classInCompression(of('HEB 300'), 235)).toBe(1)
  })
})

describe('shear (6.2.6, EN 1993-1-5 section 5)', () => {
  it('takes at least η hw tw as shear area', () => {
    const plate: Section = { ...of('IPE 600'), A: 10_000, b: 400, tf: 10, r: 0, tw: 10, h: 520 }
    expect(shearArea(plate, 1.2)).toBeCloseTo(1.2 * 500 * 10, 9)
    const { A, b, tf, tw, r } = of('IPE 300')
    expect(shearArea(of('IPE 300'), 1)).toBeCloseTo(A - 2 * b * tf + (tw + 2 * r) * tf, 9)
  })

  it('checks shear buckling above 72ε/η only', () => {
    expect(needsShearBucklingCheck(of('UB 762x267x134'), 355, 1.0)).toBe(true)
    expect(needsShearBucklingCheck(of('UB 457x191x67'), 355, 1.0)).toBe(false)
    expect(needsShearBucklingCheck(of('UB 406x140x39'), 355, 1.2)).toBe(true)
  })

  it('reduces by χw of a non-rigid end post', () => {
    expect(shearBucklingFactor(0.6, 1.2)).toBe(1.2)
    expect(shearBucklingFactor(0.83, 1.0)).toBeCloseTo(1, 12)
    expect(shearBucklingFactor(1.5, 1.2)).toBeCloseTo(0.83 / 1.5, 12)
  })

  it('gives Vbw,Rd of UB 762x267x134 in S355 worked by hand', () => {
    const { h, tf, tw } = of('UB 762x267x134')
    const hw = h - 2 * tf
    const lambda = hw / (86.4 * tw * Math.sqrt(235 / 355))
    expect(webSlenderness(of('UB 762x267x134'), 355)).toBeCloseTo(lambda, 12)
    expect(shearBucklingResistance(of('UB 762x267x134'), 355, 1, 1)).toBeCloseTo(Math.min(1, 0.83 / lambda) * 355 * hw * tw / Math.sqrt(3), 3)
  })
})

describe('bending with shear (6.2.8)', () => {
  it('starts above half of Vpl and ends without a web', () => {
    expect([0, 0.5, 0.75, 1].map(ratio => highShearFactor(ratio * 100, 100))).toEqual([0, 0, 0.25, 1])
  })

  it('takes Aw²/(4tw) off Wpl, or the web off Wel', () => {
    const section = of('IPE 400')
    const hw = section.h - 2 * section.tf
    expect(webModulus(section, 1)).toBeCloseTo((hw * section.tw) ** 2 / (4 * section.tw), 6)
    expect(webModulus(section, 3)).toBeCloseTo(section.tw * hw ** 3 / 12 / (section.h / 2), 6)
    expect(bendingResistanceWithShear(1000, 400, 0.25, 355, 1)).toBeCloseTo(900 * 355, 9)
    expect(bendingResistanceWithShear(1000, 400, 9, 355, 1)).toBeCloseTo(355, 9)
    expect(bendingResistanceWithShear(1000, 400, highShearFactor(exhaustingShear(1000, 400), 1), 355, 1)).toBeCloseTo(355, 6)
  })
})

describe('lateral-torsional buckling (6.3.2)', () => {
  it('chooses curves by h/b, method and national choice', () => {
    const ratio = (h: number): Section => ({ ...of('IPE 300'), h, b: 100 })
    const curves = (choice: typeof UK, method: '6.3.2.3' | '6.3.2.2') => [200, 201, 310, 311].map(h => ltbCurve(ratio(h), method, choice).curve)
    expect(curves(UK, '6.3.2.3')).toEqual(['b', 'c', 'c', 'd'])
    expect(curves(EN, '6.3.2.3')).toEqual(['b', 'c', 'c', 'c'])
    expect(curves(EN, '6.3.2.2')).toEqual(['a', 'b', 'b', 'b'])
    expect(curveFor(2, [{ upTo: 2, curve: 'a' }, { upTo: null, curve: 'b' }])).toBe('a')
  })

  it('returns 1 up to the plateau and falls above it', () => {
    const rolled = ltbCurve(of('UB 457x191x67'), '6.3.2.3', UK)
    const general = ltbCurve(of('UB 457x191x67'), '6.3.2.2', UK)
    expect([ltbReduction(0.4, rolled), ltbReduction(0.2, general)]).toEqual([1, 1])
    expect(ltbReduction(0.41, rolled)).toBeLessThan(1)
    expect(ltbReduction(3, rolled)).toBeLessThanOrEqual(1 / 9)
    expect(ltbReduction(1, general)).toBeCloseTo(1 / (0.5 * (1 + 0.34 * 0.8 + 1) + Math.sqrt((0.5 * (1 + 0.34 * 0.8 + 1)) ** 2 - 1)), 12)
  })

  it('modifies by f, at most 1 and 1/λ̄²', () => {
    const rolled = ltbCurve(of('UB 457x191x67'), '6.3.2.3', UK)
    expect(ltbModification(0.8, 0.6)).toBeCloseTo(0.8, 12)
    expect(ltbModification(2, 0.6)).toBe(1)
    expect(ltbReductionModified(0.8, rolled, 0.6)).toBeCloseTo(Math.min(1, ltbReduction(0.8, rolled) / 0.8), 12)
    expect(ltbReductionModified(0.5, rolled, 0.6)).toBe(1)
    expect(ltbReductionModified(0.3, rolled, 0.6)).toBe(1)
  })

  it('takes kc of Table 6.6 for linear moments and 1/√C1 elsewhere', () => {
    expect(kcLinear(1)).toBeCloseTo(1, 12)
    expect(kcLinear(0)).toBeCloseTo(1 / 1.33, 12)
    expect(kcLinear(-1)).toBeCloseTo(1 / 1.66, 12)
    expect(kcFromC1(1.13)).toBeCloseTo(0.9407, 4)
    expect(kcFromC1(0.9)).toBe(1)
  })
})

describe('compression (6.3.1)', () => {
  it('chooses curves by Table 6.2', () => {
    const curves = (designation: string, grade: 'S355' | 'S460') => (['y', 'z'] as const).map(axis => flexuralBucklingCurve(of(designation), axis, grade))
    expect(curves('UB 457x191x67', 'S355')).toEqual(['a', 'b'])
    expect(curves('UC 203x203x46', 'S355')).toEqual(['b', 'c'])
    expect(curves('HEB 300', 'S460')).toEqual(['a', 'a'])
    expect(curves('UB 457x191x67', 'S460')).toEqual(['a0', 'a0'])
    expect(curves('UC 356x406x1299', 'S355')).toEqual(['d', 'd'])
    expect(curves('UB 1016x305x584', 'S355')).toEqual(['b', 'c'])
  })

  it('returns 1 up to 0.2 and stays within 0 and 1', () => {
    expect(flexuralReduction(0.2, 'd')).toBe(1)
    expect(flexuralReduction(0.21, 'd')).toBeLessThan(1)
    expect(flexuralReduction(5, 'a')).toBeGreaterThan(0)
  })

  it('uses γM1', () => {
    const section = of('HEB 300')
    const [a, b] = [1, 1.1].map(gammaM1 => flexuralBuckling(section, 'S235', 235, gammaM1, 5000, 'z').NbRd)
    expect(a! / b!).toBeCloseTo(1.1, 12)
  })
})

describe('interaction with Annex B (6.3.3)', () => {
  const base = {
    NEd: 500e3, MyEd: 60e6, MzEd: 8e6, NRk: 2000e3, MyRk: 200e6, MzRk: 80e6, chiY: 0.9, chiZ: 0.6, chiLT: 0.9,
    lambdaY: 0.5, lambdaZ: 0.9, Cmy: 0.9, Cmz: 0.9, CmLT: 0.9, gammaM1: 1, sectionClass: 1 as const,
  }

  it('agrees with a case worked by hand', () => {
    const ny = 500 / (0.9 * 2000)
    const nz = 500 / (0.6 * 2000)
    const kyy = 0.9 * (1 + 0.3 * ny)
    const kzz = 0.9 * (1 + 1.2 * nz)
    const kzy = 1 - 0.1 * 0.9 * nz / 0.65
    const result = interactionAnnexB(base)
    expect(result.kyy).toBeCloseTo(kyy, 12)
    expect(result.kzz).toBeCloseTo(kzz, 12)
    expect(result.kyz).toBeCloseTo(0.6 * kzz, 12)
    expect(result.kzy).toBeCloseTo(kzy, 12)
    expect(result.eq661).toBeCloseTo(ny + kyy * 60 / 180 + 0.6 * kzz * 0.1, 12)
    expect(result.eq662).toBeCloseTo(nz + kzy * 60 / 180 + kzz * 0.1, 12)
  })

  it('caps the factors at large slenderness and has its own form for class 3', () => {
    const slender = interactionAnnexB({ ...base, lambdaY: 3, lambdaZ: 3 })
    const ny = 500 / 1800
    const nz = 500 / 1200
    expect(slender.kyy).toBeCloseTo(0.9 * (1 + 0.8 * ny), 12)
    expect(slender.kzz).toBeCloseTo(0.9 * (1 + 1.4 * nz), 12)
    expect(slender.kzy).toBeCloseTo(1 - 0.1 * nz / 0.65, 12)
    const elastic = interactionAnnexB({ ...base, sectionClass: 3 })
    expect(elastic.kyy).toBeCloseTo(0.9 * (1 + 0.6 * 0.5 * ny), 12)
    expect(elastic.kyz).toBeCloseTo(elastic.kzz, 12)
    expect(elastic.kzy).toBeCloseTo(1 - 0.05 * 0.9 * nz / 0.65, 12)
    expect(interactionAnnexB({ ...base, lambdaZ: 0.3 }).kzy).toBeCloseTo(0.9, 12)
  })
})

describe('fire (EN 1993-1-2) and ties (EN 1991-1-7)', () => {
  it('gives the critical temperature by utilisation, null where there is none', () => {
    expect(criticalTemperature(0.6)).toBeCloseTo(554, 0)
    expect(criticalTemperature(1.01)).toBeNull()
    expect(criticalTemperature(0.001)).toBe(criticalTemperature(0.013))
  })

  it('reduces the load in fire', () => {
    expect(fireReduction(10, 10, 0.5, 28.5)).toBeCloseTo(15 / 28.5, 12)
    expect(fireReduction(0, 0, 0.5, 0)).toBe(0)
  })

  it('gives section factors on three and four sides', () => {
    const { A, b, perimeter } = of('UB 457x191x67')
    expect(sectionFactor(of('UB 457x191x67'), 4)).toBeCloseTo(1000 * perimeter / A, 9)
    expect(sectionFactor(of('UB 457x191x67'), 3)).toBeCloseTo(1000 * (perimeter - b) / A, 9)
  })

  it('never gives a tie less than 75 kN', () => {
    expect(tieForce('internal', 0.004, 0.003, 0.3, 3000, 9000)).toBeCloseTo(0.8 * (0.004 + 0.0009) * 27e6, 6)
    expect(tieForce('perimeter', 0.001, 0, 0, 1000, 3000)).toBe(75_000)
    expect(tensionResistance(5000, 355, 1)).toBe(1_775_000)
  })
})
