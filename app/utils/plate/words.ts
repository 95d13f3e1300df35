/** Figures and names in sentences. */
import { formatMillimetres, formatNumber } from '#shared/utils/format'

/** "9 000" */
export const thousands = (value: number) => formatNumber(value)

/** "9 000 mm" */
export const formatMm = (value: number) => formatMillimetres(value)

/** The first free name of a series: "Void 3". */
export function freeName(base: string, taken: readonly string[]): string {
  let count = 1
  while (taken.includes(`${base} ${count}`)) count++
  return `${base} ${count}`
}
