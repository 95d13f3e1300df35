import type { Quantity, SheetRow } from './types'

const THIN = '\u2009'

/** A number as a sheet writes it: thin space between thousands, U+2212 for minus. */
export function num(value: number, digits: number): string {
  const fixed = Math.abs(value).toFixed(digits)
  const [whole = '0', part] = fixed.split('.')
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, THIN)
  const sign = value < 0 && Number(fixed) !== 0 ? '\u2212' : ''
  return sign + grouped + (part ? `.${part}` : '')
}

/** A factor without trailing zeros, at most four digits: 1.35, 0.925, 1.0. */
export function factor(value: number): string {
  const text = String(Math.round(value * 1e4) / 1e4)
  return text.includes('.') ? text : `${text}.0`
}

export function quantity(value: number, unit: string, digits: number): Quantity {
  return { value, unit, digits }
}

export const kN = (value: number, digits = 2): Quantity => quantity(value / 1000, 'kN', digits)
export const kNm = (value: number, digits = 2): Quantity => quantity(value / 1e6, 'kNm', digits)
export const mm = (value: number, digits = 2): Quantity => quantity(value, 'mm', digits)
/** mm as metres, "4.50". */
export const metres = (value: number, digits = 2): string => num(value / 1000, digits)

/** A row with everything that is not said left empty. */
export function row(parts: Partial<SheetRow> & Pick<SheetRow, 'check'>): SheetRow {
  return {
    clause: '', expression: '', substituted: '', effect: null, resistance: null, utilisation: null, governs: false, ...parts,
  }
}
