import { describe, expect, it } from 'vitest'
import { CHOICE_CODES, nationalChoice } from '#shared/engine/actions'
import { BasisSchema, type Basis } from '#shared/schemas/basis'
import { DEFAULT_BASIS } from '#shared/utils/defaultBasis'
import { basisInShort, changedQuantities, defaultsFor, differences, valueInWords, withChoice } from '../../../app/utils/basis/document'
import { QUANTITIES } from '../../../app/utils/basis/quantities'

const quantity = (id: string) => QUANTITIES.find(line => line.id === id)!

describe('defaults of the basis', () => {
  it.each(CHOICE_CODES)('make a valid document with nothing changed under %s', (code) => {
    const basis = defaultsFor(code)
    expect(BasisSchema.parse(basis)).toEqual(basis)
    expect(basis.nationalChoice).toBe(code)
    expect(changedQuantities(basis)).toEqual([])
    expect(basis.overrides).toEqual({})
  })
  it('cover every field of the document', () => {
    const touched: Basis[] = QUANTITIES.map((line) => {
      const values: Record<string, unknown> = {
        choice: line.control.kind === 'choice' ? line.control.options.find(({ value }) => value !== line.read(DEFAULT_BASIS, nationalChoice('UK')))?.value : null,
        number: 0.9, families: ['HEB'], stated: null,
      }
      return line.write(DEFAULT_BASIS, values[line.control.kind] as never, nationalChoice('UK'))
    })
    const fields = new Set(touched.flatMap(basis => (Object.keys(basis) as (keyof Basis)[]).filter(key => JSON.stringify(basis[key]) !== JSON.stringify(DEFAULT_BASIS[key]))))
    expect(fields).toEqual(new Set(Object.keys(DEFAULT_BASIS).filter(key => key !== 'nationalChoice')))
  })
  it('name a source for every value of every choice', () => {
    for (const code of CHOICE_CODES) {
      for (const line of QUANTITIES) {
        const source = line.source(nationalChoice(code))
        expect(typeof source === 'string' ? source : source.source).not.toBe('')
      }
    }
  })
})

describe('changing a value', () => {
  it('stores an override only where it differs from the national value', () => {
    const uk = nationalChoice('UK')
    const raised = quantity('gammaM1').write(DEFAULT_BASIS, 1.1, uk)
    expect(raised.overrides).toEqual({ gammaM1: 1.1 })
    expect(changedQuantities(raised).map(({ id }) => id)).toEqual(['gammaM1'])
    expect(quantity('gammaM1').write(raised, uk.gammaM1, uk).overrides).toEqual({})
    expect(DEFAULT_BASIS.overrides).toEqual({})
  })
  it('keeps what was set and moves defaults when the national choice changes', () => {
    const set = quantity('limits.total').write({ ...DEFAULT_BASIS, overrides: { gammaM0: 1.05 } }, 250, nationalChoice('UK'))
    const moved = withChoice(set, 'DE')
    expect(moved.overrides).toEqual({ gammaM0: 1.05 })
    expect(moved.limits.total).toBe(250)
    expect(quantity('gammaM1').read(moved, nationalChoice('DE'))).toBe(1.1)
  })
  it('takes over the combination that a national choice offers alone', () => {
    expect(withChoice(DEFAULT_BASIS, 'NL').combination).toBe('6.10ab')
  })
})

describe('words', () => {
  it('write values with prefix and unit', () => {
    expect(valueInWords(quantity('limits.variable'), 360)).toBe('span /\u00A0360')
    expect(valueInWords(quantity('limits.frequency'), null)).toBe('no limit')
    expect(valueInWords(quantity('connectionAllowance'), 0.1)).toBe('10\u00A0%')
    expect(valueInWords(quantity('buildability.maxPiece'), 18_000)).toBe('18.00\u00A0m')
    expect(valueInWords(quantity('primary.families'), ['UB', 'HEA'])).toBe('UB · HEA')
  })
  it('list what differs between two versions', () => {
    const lines = differences(DEFAULT_BASIS, { ...DEFAULT_BASIS, combination: '6.10ab', connectionAllowance: 0.08 })
    expect(lines.map(({ label, from, to }) => [label, from, to])).toEqual([
      ['Combination', '6.10', '6.10a and 6.10b'],
      ['Connections', '0\u00A0%', '8\u00A0%'],
    ])
  })
  it('name a basis in short', () => {
    expect(basisInShort({ ...DEFAULT_BASIS, column: { grade: 'S460', families: ['UC'] } })).toBe('UK choices · 6.10 · S355, S460')
  })
})
