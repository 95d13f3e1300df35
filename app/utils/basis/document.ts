import { nationalChoice, type ChoiceCode } from '#shared/engine/actions'
import type { Basis } from '#shared/schemas/basis'
import { DEFAULT_BASIS } from '#shared/utils/defaultBasis'
import { formatNumber } from '#shared/utils/format'
import { QUANTITIES } from './quantities'
import type { Quantity, QuantityValue } from './types'

export function sameValue(a: QuantityValue, b: QuantityValue): boolean {
  return Array.isArray(a) && Array.isArray(b) ? [...a].sort().join() === [...b].sort().join() : a === b
}

/** The whole basis with the defaults of one national choice. */
export function defaultsFor(code: ChoiceCode): Basis {
  const choice = nationalChoice(code)
  const start: Basis = { ...DEFAULT_BASIS, nationalChoice: code, overrides: {} }
  return QUANTITIES.reduce((basis, quantity) => quantity.write(basis, quantity.byDefault(choice), choice), start)
}

/** Another national choice: what stood at the old default moves to the new one, what was set stays. */
export function withChoice(basis: Basis, code: ChoiceCode): Basis {
  const before = nationalChoice(basis.nationalChoice)
  const after = nationalChoice(code)
  const moved: Basis = { ...basis, nationalChoice: code }
  return QUANTITIES.reduce((result, quantity) => {
    const value = quantity.read(basis, before)
    const next = sameValue(value, quantity.byDefault(before)) ? quantity.byDefault(after) : value
    return quantity.write(result, next, after)
  }, moved)
}

/** A value as it stands in words: "6.10a and 6.10b", "span / 360", "10 %", "UB · HEA". */
export function valueInWords({ control }: Quantity, value: QuantityValue): string {
  if (Array.isArray(value)) return value.join(' · ')
  if (control.kind === 'choice') return control.options.find(option => option.value === value)?.label ?? String(value)
  if (control.kind !== 'number') return String(value)
  if (value === null) return control.none ?? 'none'
  const shown = Number(value) * (control.factor ?? 1)
  const text = formatNumber(shown, control.decimals ?? shortest(shown))
  return [control.prefix, text, control.unit].filter(Boolean).join('\u00A0')
}

function shortest(value: number): number {
  return Math.abs(value - Math.round(value)) < 1e-9 ? 0 : Math.abs(value * 10 - Math.round(value * 10)) < 1e-8 ? 1 : 2
}

export interface Difference { quantity: Quantity | null, label: string, from: string, to: string }

/** What differs between two documents, line by line. */
export function differences(from: Basis, to: Basis): Difference[] {
  const fromChoice = nationalChoice(from.nationalChoice)
  const toChoice = nationalChoice(to.nationalChoice)
  const set = from.nationalChoice === to.nationalChoice
    ? []
    : [{ quantity: null, label: 'Set of choices', from: fromChoice.name, to: toChoice.name }]
  const lines = QUANTITIES.flatMap((quantity) => {
    const before = quantity.read(from, fromChoice)
    const after = quantity.read(to, toChoice)
    return sameValue(before, after)
      ? []
      : [{ quantity, label: quantity.label, from: valueInWords(quantity, before), to: valueInWords(quantity, after) }]
  })
  return [...set, ...lines]
}

/** Quantities that stand apart from their default. */
export function changedQuantities(basis: Basis): Quantity[] {
  const choice = nationalChoice(basis.nationalChoice)
  return QUANTITIES.filter(quantity => !sameValue(quantity.read(basis, choice), quantity.byDefault(choice)))
}

/** "UK choices · 6.10 · S355": for title blocks. */
export function basisInShort(basis: Basis): string {
  const grades = [...new Set([basis.secondary.grade, basis.primary.grade, basis.column.grade])]
  const combination = basis.combination === '6.10ab' ? '6.10a and b' : basis.combination
  return `${basis.nationalChoice} choices · ${combination} · ${grades.join(', ')}`
}
