import { describe, expect, it } from 'vitest'
import { formulaInWords, parseFormula, symbolMarkup } from '../../../app/utils/formula'

/** i = italic symbol, _ = subscript, ^ = superscript, | = upright. */
function typeset(markup: string): string {
  const signs = { symbol: 'i', sub: '_', sup: '^', upright: '|' }
  return parseFormula(markup).map(part => `${signs[part.style]}${part.isBarred ? '¯' : ''}(${part.text})`).join('')
}

describe('formula markup', () => {
  it('sets symbols italic, subscripts upright and low', () => {
    expect(typeset('M_{b,Rd} = χ_{LT} W_{pl,y} f_y / γ_{M1}'))
      .toBe('i(M)_(b,Rd)|( = χ)_(LT)|( )i(W)_(pl,y)|( )i(f)_(y)|( / γ)_(M1)')
  })
  it('keeps units and words upright', () => {
    expect(typeset('at 4.50 m; limit span / 360')).toBe('|(at 4.50 m; limit span / 360)')
    expect(typeset('241.5 kN')).toBe('|(241.5 kN)')
    expect(typeset('curve c, line D')).toBe('|(curve c, line D)')
    expect(typeset('eigenvalue of a segment')).toBe('|(eigenvalue of a segment)')
  })
  it('raises exponents, those of units too', () => {
    expect(typeset('2 828.4 × 10^{3}')).toBe('|(2 828.4 × 10)^(3)')
    expect(typeset('cm⁴')).toBe('|(cm)^(4)')
  })
  it('draws the bar of a slenderness', () => {
    expect(typeset('λ\u0304_{LT} = 0.7')).toBe('|¯(λ)_(LT)|( = 0.7)')
    expect(typeset('bar{λ}_{LT}')).toBe('|¯(λ)_(LT)')
  })
  it('is read out without markup', () => {
    expect(formulaInWords('M_{b,Rd}')).toBe('M b,Rd')
  })
  it('loses nothing that is no markup', () => {
    expect(parseFormula('G 22.5 × 3.60 + 2.87 (6.10) [kN]').map(part => part.text).join('')).toBe('G 22.5 × 3.60 + 2.87 (6.10) [kN]')
  })
})

describe('symbols without markup', () => {
  it.each([
    ['Mb,Rd, UB 457x191x67, 3 m', 'M_{b,Rd}, UB 457x191x67, 3 m'],
    ['Mcr, closed form', 'M_{cr}, closed form'],
    ['χLT, curve c, β 0.75, λ̄LT,0 0.4', 'χ_{LT}, curve c, β 0.75, λ̄_{LT,0} 0.4'],
    ['C1 of end moments', 'C_{1} of end moments'],
    ['αn on the floors, ψ0 on the roof', 'α_{n} on the floors, ψ_{0} on the roof'],
    ['class in bending', 'class in bending'],
    ['M_{b,Rd}', 'M_{b,Rd}'],
    ['IPE 330, Vertical', 'IPE 330, Vertical'],
  ])('%s', (text, markup) => {
    expect(symbolMarkup(text)).toBe(markup)
  })
})
