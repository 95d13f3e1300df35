import { EngineError } from '../errors'
import type { CategoryGroup, ChoiceOverrides, ChoiceValueName, NationalChoice, Override, Psi, ValueSource } from './types'

const IN_THE_BASIS: ValueSource = { source: 'set in the basis of design', status: 'sourced' }

function figure(value: number): string {
  return String(Math.round(value * 1e6) / 1e6)
}

function psiText({ psi0, psi1, psi2 }: Psi): string {
  return `${figure(psi0)} / ${figure(psi1)} / ${figure(psi2)}`
}

type Scalar = 'gammaM0' | 'gammaM1' | 'eta' | 'gammaG' | 'gammaQ' | 'xi'

const SYMBOLS: Record<Scalar, string> = { gammaM0: 'γM0', gammaM1: 'γM1', eta: 'η', gammaG: 'γG', gammaQ: 'γQ', xi: 'ξ' }

function requirePositive(value: number, path: string): number {
  if (!Number.isFinite(value)) throw new EngineError('not-a-number', 'The override must be a number.', path)
  if (value <= 0) throw new EngineError('not-positive', 'The override must be greater than 0.', path)
  return value
}

/**
 * The choice with the values of the basis of design in place of its own, and a list of what was
 * changed, to be printed wherever results are. Values equal to the national one are no override.
 */
export function applyOverrides(
  choice: NationalChoice, overrides: ChoiceOverrides | undefined,
): { choice: NationalChoice, overridden: Override[] } {
  const overridden: Override[] = []
  if (!overrides) return { choice, overridden }
  const result = { ...choice, sources: { ...choice.sources } as Record<ChoiceValueName, ValueSource> }
  const note = (name: string, from: string, to: string, ...keys: ChoiceValueName[]) => {
    overridden.push({ name, from, to })
    for (const key of keys) result.sources[key] = IN_THE_BASIS
  }
  for (const key of Object.keys(SYMBOLS) as Scalar[]) {
    const value = overrides[key]
    if (value === undefined || value === choice[key]) continue
    result[key] = requirePositive(value, key)
    note(SYMBOLS[key], figure(choice[key]), figure(value), key)
  }
  if (overrides.yieldRule && overrides.yieldRule !== choice.yieldRule) {
    result.yieldRule = overrides.yieldRule
    note('fy by', choice.yieldRule, overrides.yieldRule, 'yieldRule')
  }
  if (overrides.tiePsi && overrides.tiePsi !== choice.tiePsi) {
    result.tiePsi = overrides.tiePsi
    note('ψ of the tie force', choice.tiePsi, overrides.tiePsi, 'tiePsi')
  }
  overrideLtb(result, choice, overrides, note)
  overridePsi(result, choice, overrides, note)
  return { choice: Object.freeze(overridden.length ? result : choice), overridden }
}

type Note = (name: string, from: string, to: string, ...keys: ChoiceValueName[]) => void

function overrideLtb(result: NationalChoice, choice: NationalChoice, overrides: ChoiceOverrides, note: Note): void {
  const { rolled, kcRule } = choice.ltb
  const plateau = overrides.ltbPlateau ?? rolled.plateau
  const beta = overrides.ltbBeta ?? rolled.beta
  if (plateau !== rolled.plateau) note('λ̄LT,0', figure(rolled.plateau), figure(requirePositive(plateau, 'ltbPlateau')), 'ltbRolled')
  if (beta !== rolled.beta) note('β', figure(rolled.beta), figure(requirePositive(beta, 'ltbBeta')), 'ltbRolled')
  const nextKc = overrides.kcRule ?? kcRule
  if (nextKc !== kcRule) note('kc', kcRule, nextKc, 'kcRule')
  result.ltb = { ...choice.ltb, rolled: { ...rolled, plateau, beta }, kcRule: nextKc }
}

function overridePsi(result: NationalChoice, choice: NationalChoice, overrides: ChoiceOverrides, note: Note): void {
  const table: Record<CategoryGroup, Psi> = { ...choice.psi }
  for (const [group, value] of Object.entries(overrides.psi ?? {}) as [CategoryGroup, Psi][]) {
    for (const [key, factor] of Object.entries(value)) {
      if (!(factor >= 0 && factor <= 1)) throw new EngineError('out-of-range', 'A factor ψ lies between 0 and 1.', `psi.${group}.${key}`)
    }
    const own = choice.psi[group]
    if (own.psi0 === value.psi0 && own.psi1 === value.psi1 && own.psi2 === value.psi2) continue
    table[group] = { ...value }
    note(`ψ0 / ψ1 / ψ2, category ${group}`, psiText(own), psiText(value), 'psi')
  }
  result.psi = table
}
