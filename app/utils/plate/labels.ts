/** Labels of grid lines: letters one way, numbers the other; I and O are skipped by custom. */

const LETTERS = 'ABCDEFGHJKLMNPQRSTUVWXYZ'

/** 0 → A, 7 → H, 8 → J, 23 → Z, 24 → AA. */
export function letterLabel(index: number): string {
  const letter = LETTERS[index % LETTERS.length] ?? ''
  return index < LETTERS.length
    ? letter
    : letterLabel(Math.floor(index / LETTERS.length) - 1) + letter
}

/** 0 → 1. */
export function numberLabel(index: number): string {
  return String(index + 1)
}

/** Place of a label in its series, or null where it belongs to none. */
function indexOfLetters(label: string): number | null {
  let index = 0
  for (const letter of label) {
    const place = LETTERS.indexOf(letter)
    if (place < 0) return null
    index = index * LETTERS.length + place + 1
  }
  return label ? index - 1 : null
}

function indexOfNumber(label: string): number | null {
  return /^[1-9]\d{0,4}$/.test(label) ? Number(label) - 1 : null
}

export interface Series {
  kind: 'letters' | 'numbers'
  /** Index of the first label in its series. */
  start: number
}

/** The series that an axis runs in: read off its first label, else that of the axis by custom. */
export function seriesOf(labels: readonly string[], axis: 'x' | 'y'): Series {
  const first = labels[0] ?? ''
  const number = indexOfNumber(first)
  if (number !== null) return { kind: 'numbers', start: number }
  const letters = indexOfLetters(first)
  if (letters !== null) return { kind: 'letters', start: letters }
  return { kind: axis === 'x' ? 'numbers' : 'letters', start: 0 }
}

function labelAt(series: Series, count: number): string {
  return (series.kind === 'letters' ? letterLabel : numberLabel)(series.start + count)
}

/** True for each line whose label is the next of the series, false where it was typed. */
export function automaticLabels(labels: readonly string[], series: Series): boolean[] {
  let count = 0
  return labels.map((label) => {
    if (label !== labelAt(series, count)) return false
    count++
    return true
  })
}

/** A line while labels are dealt out: the label it keeps, or null for the next of the series. */
export type LabelSlot = string | null

/** Labels for all slots; a label that was typed is never given twice. */
export function dealLabels(slots: readonly LabelSlot[], series: Series): string[] {
  const typed = new Set(slots.filter(slot => slot !== null))
  let count = 0
  return slots.map((slot) => {
    if (slot !== null) return slot
    while (typed.has(labelAt(series, count))) count++
    return labelAt(series, count++)
  })
}
