/** Lengths and bays as they are typed: millimetres, or metres where the unit says so. */

export type Typed<T> = { value: T } | { problem: string }

const NUMBER = /^([+\-\u2212]?)(\d{1,3}(?:[\s\u00a0\u2009\u202f]\d{3})+|\d+)?(?:[.,](\d+))?\s*(mm|m)?$/

/**
 * A length in mm (integer). "9000", "9 000 mm", "7.5 m"; a figure with a decimal point and no unit
 * is refused, since 7.5 could be either.
 */
export function parseLength(text: string): Typed<number> {
  const match = NUMBER.exec(text.trim())
  const [, sign, whole, decimals, unit] = match ?? []
  if (!match || (whole === undefined && decimals === undefined)) {
    return { problem: `"${text.trim()}" is no length. Write millimetres, 7500, or metres, 7.5 m.` }
  }
  const digits = `${(whole ?? '0').replace(/\D/g, '')}.${decimals ?? '0'}`
  const magnitude = Number(digits)
  if (unit !== 'm' && decimals !== undefined && Number(decimals) !== 0) {
    return { problem: `${text.trim()} has no unit. Write ${digits} m, or whole millimetres.` }
  }
  const mm = unit === 'm' ? magnitude * 1000 : magnitude
  if (Math.abs(mm - Math.round(mm)) > 1e-6) {
    return { problem: `${text.trim()} is finer than a millimetre. Lengths are whole millimetres.` }
  }
  return { value: Math.round(mm) * (sign === '-' || sign === '\u2212' ? -1 : 1) }
}

const MAX_BAYS = 199

/**
 * Bays in mm. "6@9000", "7500, 7500, 6000", "3@7.2 m; 6 m". Parts are set off by commas or
 * semicolons; a comma between digits is a decimal one only where metres follow.
 */
export function parseBays(text: string): Typed<number[]> {
  const bays: number[] = []
  const parts = splitParts(text)
  if (parts.length === 0) return { problem: 'Write the bays: 6@9000, or 7500, 7500, 6000.' }
  for (const part of parts) {
    const times = /^(\d{1,3})\s*[@x×*]\s*(.+)$/i.exec(part)
    const count = times ? Number(times[1]) : 1
    const length = parseLength(times?.[2] ?? part)
    if ('problem' in length) return length
    if (length.value < 1) return { problem: `A bay of ${part} is not possible. Bays are longer than 0 mm.` }
    if (count < 1) return { problem: `${part} makes no bay. Write how many, 1 or more, before @.` }
    if (bays.length + count > MAX_BAYS) {
      return { problem: `More than ${MAX_BAYS} bays. A plate has at most 200 grid lines each way.` }
    }
    for (let i = 0; i < count; i++) bays.push(length.value)
  }
  return { value: bays }
}

function splitParts(text: string): string[] {
  const separator = text.includes(';') ? /;/ : /,(?!\d+\s*m(?!m))/
  return text.split(separator).map(part => part.trim()).filter(part => part !== '')
}

/** "6@9000" for equal bays, "2@7500, 6000, 2@7500" for others. */
export function describeBays(bays: readonly number[]): string {
  const groups: { length: number, count: number }[] = []
  for (const length of bays) {
    const last = groups.at(-1)
    if (last?.length === length) last.count++
    else groups.push({ length, count: 1 })
  }
  return groups.map(({ length, count }) => (count > 1 ? `${count}@${length}` : String(length))).join(', ')
}
