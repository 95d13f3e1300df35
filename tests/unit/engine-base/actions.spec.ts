import { describe, expect, it } from 'vitest'
import {
  CHOICE_CODES, applyOverrides, areaReduction, combinationFactors, nationalChoice, psi, storeyReduction,
} from '#shared/engine/actions'
import type { ChoiceValueName } from '#shared/engine/actions'
import { EngineError } from '#shared/engine/errors'

describe('national choices', () => {
  it.each(CHOICE_CODES)('%s gives every value a source and a standing', (code) => {
    const { sources } = nationalChoice(code)
    expect(Object.keys(sources).sort()).toEqual(Object.keys(nationalChoice('EN').sources).sort())
    for (const name of Object.keys(sources) as ChoiceValueName[]) {
      expect(sources[name].source.length, name).toBeGreaterThan(10)
      expect(['sourced', 'from-memory']).toContain(sources[name].status)
    }
  })

  it('has no recommended value from memory', () => {
    expect(Object.values(nationalChoice('EN').sources).every(({ status }) => status === 'sourced')).toBe(true)
  })

  it('differs between EN and UK where the annex decides', () => {
    const [en, uk] = [nationalChoice('EN'), nationalChoice('UK')]
    expect([en.eta, uk.eta]).toEqual([1.2, 1.0])
    expect([en.xi, uk.xi]).toEqual([0.85, 0.925])
    expect([en.yieldRule, uk.yieldRule]).toEqual(['en-1993', 'product-standard'])
    expect([psi(en, 'H').psi0, psi(uk, 'H').psi0]).toEqual([0, 0.7])
  })

  it('refuses a code that is none', () => {
    expect(() => nationalChoice('XX' as 'UK')).toThrow(EngineError)
    expect(() => nationalChoice('toString' as 'UK')).toThrow(EngineError)
  })
})

describe('combinations', () => {
  it('has one for 6.10 and two for 6.10a/b, ξ·γG not rounded', () => {
    const uk = nationalChoice('UK')
    expect(combinationFactors(uk, '6.10')).toEqual([{ name: '6.10', permanent: 1.35, variable: 1.5, accompanying: 0 }])
    const [a, b] = combinationFactors(uk, '6.10ab')
    expect(a).toEqual({ name: '6.10a', permanent: 1.35, variable: 0, accompanying: 1.5 })
    expect(b!.permanent).toBeCloseTo(1.24875, 12)
    expect([b!.variable, b!.accompanying]).toEqual([1.5, 0])
  })
})

describe('psi factors', () => {
  it.each([['A', 0.7], ['C3', 0.7], ['D1', 0.7], ['E1', 1], ['E', 1], ['F', 0.7]] as const)('ψ0 of category %s is %d', (category, value) => {
    expect(psi(nationalChoice('EN'), category).psi0).toBe(value)
  })
})

describe('reductions of imposed load', () => {
  it('keeps αA of C and D at 0.6 and above, and leaves storage alone', () => {
    const en = nationalChoice('EN')
    expect(areaReduction(en, 'C1', 1000)).toBe(0.6)
    expect(areaReduction(en, 'B', 1000)).toBeCloseTo(0.51, 12)
    expect(areaReduction(en, 'B', 15)).toBe(1)
    expect(areaReduction(en, 'E1', 1000)).toBe(1)
  })

  it('takes αn of EN only above two storeys', () => {
    const en = nationalChoice('EN')
    expect([1, 2, 3].map(n => storeyReduction(en, 'B', n))).toEqual([1, 1, 0.9])
    expect(storeyReduction(en, 'E1', 10)).toBe(1)
  })

  it('names a wrong area or number of storeys', () => {
    expect(() => areaReduction(nationalChoice('EN'), 'B', 0)).toThrow(EngineError)
    expect(() => storeyReduction(nationalChoice('EN'), 'B', 1.5)).toThrow(EngineError)
  })
})

describe('overrides', () => {
  it('replaces values, lists them, and leaves the choice itself alone', () => {
    const uk = nationalChoice('UK')
    const { choice, overridden } = applyOverrides(uk, { gammaM1: 1.1, ltbPlateau: 0.2, psi: { B: { psi0: 0.8, psi1: 0.5, psi2: 0.3 } }, eta: 1 })
    expect([choice.gammaM1, choice.ltb.rolled.plateau, choice.psi.B.psi0]).toEqual([1.1, 0.2, 0.8])
    expect([uk.gammaM1, uk.ltb.rolled.plateau, uk.psi.B.psi0]).toEqual([1.0, 0.4, 0.7])
    expect(overridden.map(({ name, from, to }) => [name, from, to])).toEqual([
      ['γM1', '1', '1.1'], ['λ̄LT,0', '0.4', '0.2'], ['ψ0 / ψ1 / ψ2, category B', '0.7 / 0.5 / 0.3', '0.8 / 0.5 / 0.3'],
    ])
    expect(choice.sources.gammaM1.source).toBe('set in the basis of design')
  })

  it('is the same object where nothing differs', () => {
    const uk = nationalChoice('UK')
    expect(applyOverrides(uk, undefined).choice).toBe(uk)
    expect(applyOverrides(uk, { gammaM1: 1 }).choice).toBe(uk)
  })

  it.each([{ gammaM0: Number.NaN }, { gammaM1: 0 }, { psi: { B: { psi0: 1.2, psi1: 0, psi2: 0 } } }])('refuses %j', (overrides) => {
    expect(() => applyOverrides(nationalChoice('UK'), overrides)).toThrow(EngineError)
  })
})
