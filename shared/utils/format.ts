/**
 * Numbers, quantities and dates as they stand on every screen: thousands parted by a thin space that
 * does not break, U+2212 as the minus, a thin space before the unit. One place, so that a figure reads
 * the same on the table, the drawing and the sheet.
 */

/**
 * The no-break space, which in Manrope is as wide as its thin space (0.2 em). U+2009 would break the
 * line within a number, and U+202F, not in the font, is made half as wide by browsers.
 */
export const THIN_SPACE = '\u00A0'
export const MINUS = '\u2212'
const NONE = '–'

function isFigure(value: number | null | undefined): value is number {
  return value !== null && value !== undefined && Number.isFinite(value)
}

/** A number with fixed decimals: 12345.6, 1 → "12 345.6"; a missing one is "–". */
export function formatNumber(value: number | null | undefined, decimals = 0): string {
  if (!isFigure(value)) return NONE
  const fixed = Math.abs(value).toFixed(decimals)
  const [whole = '0', fraction] = fixed.split('.')
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, THIN_SPACE)
  const isZero = Number(fixed) === 0
  return `${value < 0 && !isZero ? MINUS : ''}${grouped}${fraction ? `.${fraction}` : ''}`
}

/** As few decimals as the number needs, at most three: for fields that give back what was typed. */
export function shortestDecimals(value: number): number {
  for (let decimals = 0; decimals < 3; decimals += 1) {
    if (Math.abs(value - Number(value.toFixed(decimals))) < 1e-9) return decimals
  }
  return 3
}

/** A number with its sign always written, for differences: "+6.7", "−3.5", "0.0". */
export function formatDifference(value: number | null | undefined, decimals = 1): string {
  const text = formatNumber(value, decimals)
  return isFigure(value) && Number(value.toFixed(decimals)) > 0 ? `+${text}` : text
}

/** A number and its unit, parted by a thin space. */
export function formatQuantity(value: number | null | undefined, unit: string, decimals = 0): string {
  return isFigure(value) ? `${formatNumber(value, decimals)}${THIN_SPACE}${unit}` : NONE
}

/** mm → "9 000 mm" */
export const formatMillimetres = (mm: number | null | undefined, decimals = 0) => formatQuantity(mm, 'mm', decimals)
/** mm → "9.00 m" */
export const formatMetres = (mm: number | null | undefined, decimals = 2) =>
  formatQuantity(isFigure(mm) ? mm / 1000 : null, 'm', decimals)
/** m² */
export const formatArea = (m2: number | null | undefined, decimals = 0) => formatQuantity(m2, 'm²', decimals)
/** kg/m² */
export const formatMassPerArea = (value: number | null | undefined, decimals = 1) => formatQuantity(value, 'kg/m²', decimals)
/** kg → "75.3 t" */
export const formatTonnes = (kg: number | null | undefined, decimals = 1) =>
  formatQuantity(isFigure(kg) ? kg / 1000 : null, 't', decimals)
/** kN */
export const formatForce = (kN: number | null | undefined, decimals = 1) => formatQuantity(kN, 'kN', decimals)
/** kNm */
export const formatMoment = (kNm: number | null | undefined, decimals = 1) => formatQuantity(kNm, 'kNm', decimals)
/** Share → "93.1 %" */
export const formatPercent = (share: number | null | undefined, decimals = 1) =>
  formatQuantity(isFigure(share) ? share * 100 : null, '%', decimals)

/**
 * Reads a number as people type it: spaces of any width between thousands, point or comma before the
 * decimals, hyphen or U+2212 as the minus. Null where it is no number.
 */
export function parseNumber(text: string): number | null {
  const plain = text.replace(/[\s\u2009\u202F\u00A0']/g, '').replace(/\u2212/g, '-').replace(',', '.')
  return /^[+-]?(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : null
}

const LOCALE = 'en-GB'

function parts(iso: string | Date, options: Intl.DateTimeFormatOptions, timeZone?: string, locale = LOCALE): string {
  return new Intl.DateTimeFormat(locale, { ...options, timeZone }).format(new Date(iso))
}

/** "10:52" */
export function formatTime(iso: string, timeZone?: string, locale = LOCALE): string {
  return parts(iso, { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' }, timeZone, locale)
}

/** "1 Dec 2026" */
export function formatDate(iso: string, timeZone?: string, locale = LOCALE): string {
  return parts(iso, { day: 'numeric', month: 'short', year: 'numeric' }, timeZone, locale)
}

/** "1 Dec 2026, 10:52" */
export function formatDateTime(iso: string, timeZone?: string, locale = LOCALE): string {
  return `${formatDate(iso, timeZone, locale)}, ${formatTime(iso, timeZone, locale)}`
}

/** "Today 10:52", "Yesterday 17:55", "27 Nov" within the year, else "27 Nov 2025". */
export function formatDay(iso: string, now: Date, timeZone?: string, locale = LOCALE): string {
  const day = (moment: string | Date) => parts(moment, { year: 'numeric', month: '2-digit', day: '2-digit' }, timeZone)
  const yesterday = new Date(now.getTime() - 24 * 3600 * 1000)
  if (day(iso) === day(now)) return `Today ${formatTime(iso, timeZone, locale)}`
  if (day(iso) === day(yesterday)) return `Yesterday ${formatTime(iso, timeZone, locale)}`
  const isThisYear = parts(iso, { year: 'numeric' }, timeZone) === parts(now, { year: 'numeric' }, timeZone)
  return isThisYear ? parts(iso, { day: 'numeric', month: 'short' }, timeZone, locale) : formatDate(iso, timeZone, locale)
}
