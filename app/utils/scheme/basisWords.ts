/** The basis of design in words, where results are shown. */
import type { Basis } from '#shared/schemas/basis'

const SYMBOLS: Record<keyof Basis['overrides'], string> = {
  gammaM0: 'γM0', gammaM1: 'γM1', gammaG: 'γG', gammaQ: 'γQ', xi: 'ξ', eta: 'η',
}

/** "γM0 = 1.1": values that the user puts in place of the national ones. */
export function overridesInWords(basis: Pick<Basis, 'overrides'>): string[] {
  return (Object.keys(SYMBOLS) as (keyof Basis['overrides'])[])
    .filter(key => basis.overrides[key] !== undefined)
    .map(key => `${SYMBOLS[key]} = ${basis.overrides[key]}`)
}

/** "UK choices · 6.10 · S355 · LTB by segment" */
export function basisInShort(basis: Basis): string {
  const grades = new Set([basis.secondary.grade, basis.primary.grade, basis.column.grade])
  return [
    `${basis.nationalChoice} choices`, basis.combination, [...grades].join('/'),
    basis.criticalMoment === 'by-segment' ? 'LTB by segment' : 'LTB whole beam',
  ].join(' · ')
}
