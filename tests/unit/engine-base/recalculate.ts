import type { Quantity, SheetRow } from '#shared/engine/sheet'

/** The value of a piece of arithmetic as a sheet writes it; null where it says words. */
function valueOf(text: string): number | null {
  const code = text
    .replaceAll('\u2009', '').replaceAll('×', '*').replaceAll('−', '-').replaceAll('\u2212', '-')
    .replaceAll('[', '(').replaceAll(']', ')').replaceAll('π', String(Math.PI))
    .replace(/\^\{(\d+)\}/g, '**$1').replace(/√\(/g, 'Math.sqrt(').replace(/√([\d.]+)/g, 'Math.sqrt($1)')
    .replace(/([\d)])\s+\(/g, '$1*(').replace(/([\d)])\s+Math/g, '$1*Math').replace(/([\d)])\s*(mm|kN)\b.*$/, '$1')
  if (!/^[\d\s.()+\-*/]+$/.test(code.replaceAll('Math.sqrt', '')) || !/\d/.test(code)) return null
  return new Function(`return (${code})`)() as number
}

/**
 * The first expression with numbers of a row, worked out as a reader would with a pocket calculator;
 * null where the row says words. "2 360.1 × 10^{3} × 355 / 1.0" → 837 835 500.
 */
export function workedOut(substituted: string): number | null {
  return valueOf(substituted.split(/[,;]/)[0]!.split(/ = | ≤ /)[0]!)
}

/** Half a unit of the last digit of a printed number, and of every rounded number that it is worked out from. */
function roundingOf(printed: string): number {
  return 10 ** -(printed.trim().split('.')[1]?.length ?? 0)
}

/** Every "… = number" of a row that does not hold within one unit of the last printed digit. */
export function wrongEqualities(substituted: string): string[] {
  return substituted.split(/[,;:]/).flatMap((part) => {
    const sides = part.replace(/ (by|\(taken) .*$/, '').split(' = ')
    return sides.slice(1).flatMap((right, i) => {
      const [a, b] = [valueOf(sides[i]!), valueOf(right)]
      if (a === null || b === null) return []
      return Math.abs(a - b) <= Math.max(roundingOf(right), 5e-4 * Math.abs(b)) ? [] : [part]
    })
  })
}

function isQuantity(value: SheetRow['effect']): value is Quantity {
  return value !== null && typeof value !== 'string'
}

/** Relative difference between what a row shows and what its numbers give, in N or kN as it happens; null for words. */
export function differenceOf(row: SheetRow): number | null {
  const value = workedOut(row.substituted)
  if (value === null || value === 0) return null
  const shown = [row.resistance, row.effect].filter(isQuantity).map(quantity => quantity.value).filter(quantity => quantity !== 0)
  if (shown.length === 0) return null
  return Math.min(...shown.flatMap(quantity => [1, 1e3, 1e6].map(scale => Math.abs(value / (quantity * scale) - 1))))
}
