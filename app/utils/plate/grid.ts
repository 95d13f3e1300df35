/**
 * Intents on grid lines. Each is a pure function of the document that gives the step to apply, or
 * the sentence that refuses it. The outline, the loads and the voids go with the lines they stand on.
 */
import type { GridLine, Plate } from '#shared/schemas/plate'
import { automaticLabels, dealLabels, seriesOf, type LabelSlot } from './labels'
import { describeBays } from './lengths'
import { coordinate, isRectangle, mapOutline, type Axis } from './outline'
import { shiftElements } from './shift'
import type { Outcome, PlatePatch } from './steps'
import { formatMm } from './words'

/** Grid lines closer than this are taken for one, mm. */
export const LEAST_BAY = 100
const MOST_LINES = 200

export function gridOf(plate: Plate, axis: Axis): readonly GridLine[] {
  return axis === 'x' ? plate.gridX : plate.gridY
}

/** Bays between neighbouring lines, mm. */
export function baysOf(lines: readonly GridLine[]): number[] {
  return lines.slice(1).map((line, i) => line.at - (lines[i]?.at ?? 0))
}

interface Slot { line: GridLine, slot: LabelSlot, was: string | null }

function slotsOf(plate: Plate, axis: Axis): Slot[] {
  const lines = gridOf(plate, axis)
  const labels = lines.map(line => line.label)
  const automatic = automaticLabels(labels, seriesOf(labels, axis))
  return lines.map((line, i) => ({ line, slot: automatic[i] ? null : line.label, was: line.label }))
}

/** Grid lines and omitted columns after labels were dealt out anew along one axis. */
function relabelled(plate: Plate, axis: Axis, slots: readonly Slot[]): PlatePatch {
  const series = seriesOf(gridOf(plate, axis).map(line => line.label), axis)
  const labels = dealLabels(slots.map(slot => slot.slot), series)
  const lines = slots.map(({ line }, i) => ({ ...line, label: labels[i] ?? line.label }))
  const renamed = new Map(slots.map(({ was }, i) => [was, labels[i] ?? '']))
  const omittedColumns = plate.omittedColumns.flatMap((column) => {
    const label = renamed.get(column[axis])
    return label === undefined ? [] : [{ ...column, [axis]: label }]
  })
  return { ...gridPatch(axis, lines), omittedColumns }
}

function gridPatch(axis: Axis, lines: GridLine[]): PlatePatch {
  return axis === 'x' ? { gridX: lines } : { gridY: lines }
}

const FOLDED = 'The outline has a corner in between and would fold over. Move that corner first.'

/** Where a line may stand between its neighbours, mm. */
export function rangeOfLine(plate: Plate, axis: Axis, index: number): [number, number] {
  const lines = gridOf(plate, axis)
  return [
    (lines[index - 1]?.at ?? -1_000_000 - LEAST_BAY) + LEAST_BAY,
    (lines[index + 1]?.at ?? 1_000_000 + LEAST_BAY) - LEAST_BAY,
  ]
}

/** Moves one line; its neighbours stay, and the outline's edge on it goes with it. */
export function moveGridLine(plate: Plate, axis: Axis, index: number, at: number): Outcome {
  const lines = gridOf(plate, axis)
  const line = lines[index]
  if (!line) return { refusal: 'This grid line is no longer there.' }
  const [least, most] = rangeOfLine(plate, axis, index)
  if (at < least || at > most) {
    const bounds = index === 0
      ? `at most ${formatMm(most)}`
      : index === lines.length - 1 ? `at least ${formatMm(least)}` : `${formatMm(least)} to ${formatMm(most)}`
    return { refusal: `Line ${line.label} at ${formatMm(at)} would pass its neighbour. It may stand at ${bounds}.` }
  }
  const by = at - line.at
  const outline = mapOutline(plate.outline, axis, (place) => {
    const goesWith = place === line.at
      || (index === 0 && place < line.at) || (index === lines.length - 1 && place > line.at)
    return goesWith ? place + by : place
  })
  if (!outline) return { refusal: FOLDED }
  const moved = lines.map((each, i) => (i === index ? { ...each, at } : each))
  return { label: `move of line ${line.label}`, patch: { ...gridPatch(axis, moved), outline } }
}

/** Adds a line and keeps the rest where it is; beyond the outer lines the outline follows. */
export function addGridLine(plate: Plate, axis: Axis, at: number): Outcome {
  const lines = gridOf(plate, axis)
  if (lines.length >= MOST_LINES) return { refusal: 'A plate has at most 200 grid lines each way.' }
  const near = lines.find(line => Math.abs(line.at - at) < LEAST_BAY)
  if (near) {
    return { refusal: `Line ${near.label} stands at ${formatMm(near.at)}. Keep ${formatMm(LEAST_BAY)} between lines.` }
  }
  const slots = slotsOf(plate, axis)
  const before = slots.filter(({ line }) => line.at < at).length
  slots.splice(before, 0, { line: { label: '', at, pinned: false }, slot: null, was: null })
  const patch = relabelled(plate, axis, slots)
  const outline = mapOutline(plate.outline, axis, followEnds(lines, at, at))
  if (!outline) return { refusal: FOLDED }
  const added = (axis === 'x' ? patch.gridX : patch.gridY)?.[before]?.label ?? ''
  return { label: `new line ${added}`, patch: { ...patch, outline } }
}

/** Moves what lies on or beyond the outer lines when these move out to `first` or `last`. */
function followEnds(lines: readonly GridLine[], first: number, last: number) {
  const low = lines[0]?.at ?? 0
  const high = lines.at(-1)?.at ?? 0
  return (place: number) => {
    if (place >= high && last > high) return place + last - high
    if (place <= low && first < low) return place + first - low
    return place
  }
}

/** Adds a bay after a line and shifts the rest by its length. */
export function insertBay(plate: Plate, axis: Axis, after: number, length: number): Outcome {
  const lines = gridOf(plate, axis)
  const line = lines[after]
  if (!line) return { refusal: 'This grid line is no longer there.' }
  if (length < LEAST_BAY) return { refusal: `A bay is at least ${formatMm(LEAST_BAY)} long.` }
  const next = lines[after + 1]
  if (!next) return addGridLine(plate, axis, line.at + length)
  if (lines.length >= MOST_LINES) return { refusal: 'A plate has at most 200 grid lines each way.' }
  const slots = slotsOf(plate, axis).map(slot => (
    slot.line.at >= next.at ? { ...slot, line: { ...slot.line, at: slot.line.at + length } } : slot
  ))
  slots.splice(after + 1, 0, {
    line: { label: '', at: line.at + length, pinned: false }, slot: null, was: null,
  })
  const shifted = shiftElements(plate, axis, place => (place >= next.at ? place + length : place))
  if (!shifted) return { refusal: FOLDED }
  return {
    label: `new bay after line ${line.label}`,
    patch: { ...shifted, ...relabelled(plate, axis, slots) },
  }
}

/** Takes a line out; where it was an outer one the outline draws in to the next. */
export function removeGridLine(plate: Plate, axis: Axis, index: number): Outcome {
  const lines = gridOf(plate, axis)
  const line = lines[index]
  if (!line) return { refusal: 'This grid line is no longer there.' }
  if (lines.length <= 2) {
    return { refusal: `Line ${line.label} stays: a plate has at least two grid lines each way.` }
  }
  const isOuter = index === 0 || index === lines.length - 1
  if (isOuter && !isRectangle(plate.outline)) {
    return { refusal: `Line ${line.label} carries the outline's edge. Move the outline's corners off it first.` }
  }
  const patch = relabelled(plate, axis, slotsOf(plate, axis).filter((_, i) => i !== index))
  const next = lines[index === 0 ? 1 : index - 1]?.at ?? line.at
  const outline = isOuter
    ? mapOutline(plate.outline, axis, (place) => {
        const goesWith = index === 0 ? place <= line.at : place >= line.at
        return goesWith ? place + next - line.at : place
      })
    : plate.outline
  if (!outline) return { refusal: FOLDED }
  return { label: `removal of line ${line.label}`, patch: { ...patch, outline } }
}

/** Sets the length of one bay: the rest shifts, or the next bay takes up the difference. */
export function setBay(
  plate: Plate, axis: Axis, bay: number, length: number, rest: 'shift' | 'keep' = 'shift',
): Outcome {
  const lines = gridOf(plate, axis)
  const from = lines[bay]
  const to = lines[bay + 1]
  if (!from || !to) return { refusal: 'This bay is no longer there.' }
  if (length < LEAST_BAY) return { refusal: `A bay is at least ${formatMm(LEAST_BAY)} long.` }
  const label = `bay ${from.label}–${to.label}`
  if (rest === 'keep') {
    const outcome = moveGridLine(plate, axis, bay + 1, from.at + length)
    return 'refusal' in outcome ? outcome : { ...outcome, label }
  }
  const by = from.at + length - to.at
  const shift = (place: number) => (place >= to.at ? place + by : place)
  const shifted = shiftElements(plate, axis, shift)
  if (!shifted) return { refusal: FOLDED }
  const moved = lines.map(line => ({ ...line, at: shift(line.at) }))
  if (moved.some(line => Math.abs(line.at) > 1_000_000)) {
    return { refusal: 'The plate would reach farther than a kilometre from its origin.' }
  }
  return { label, patch: { ...shifted, ...gridPatch(axis, moved) } }
}

/** Parts one bay into bays of the given lengths; the rest shifts where their sum differs. */
export function partBay(plate: Plate, axis: Axis, bay: number, parts: readonly number[]): Outcome {
  const lines = gridOf(plate, axis)
  const from = lines[bay]
  const to = lines[bay + 1]
  if (!from || !to) return { refusal: 'This bay is no longer there.' }
  const first = parts[0]
  if (first === undefined || parts.some(part => part < LEAST_BAY)) {
    return { refusal: `A bay is at least ${formatMm(LEAST_BAY)} long.` }
  }
  if (parts.length === 1) return setBay(plate, axis, bay, first)
  if (lines.length + parts.length - 1 > MOST_LINES) {
    return { refusal: 'A plate has at most 200 grid lines each way.' }
  }
  const sum = parts.reduce((total, part) => total + part, 0)
  const whole = setBay(plate, axis, bay, sum)
  if ('refusal' in whole) return whole
  const shifted = { ...plate, ...whole.patch } as Plate
  const slots = slotsOf(shifted, axis)
  let at = from.at
  const between = parts.slice(0, -1).map((part) => {
    at += part
    return { line: { label: '', at, pinned: false }, slot: null, was: null }
  })
  slots.splice(bay + 1, 0, ...between)
  return {
    label: `bay ${from.label}–${to.label} in ${parts.length}`,
    patch: { ...whole.patch, ...relabelled(shifted, axis, slots) },
  }
}

/** Equal parts of one bay, whole millimetres, the outer lines kept. */
export function splitBay(plate: Plate, axis: Axis, bay: number, parts: number): Outcome {
  const length = baysOf(gridOf(plate, axis))[bay] ?? 0
  if (parts < 2) return { refusal: 'A bay is split into two parts or more.' }
  const places = Array.from({ length: parts + 1 }, (_, i) => Math.round((length * i) / parts))
  return partBay(plate, axis, bay, places.slice(1).map((place, i) => place - (places[i] ?? 0)))
}

/** Sets all bays of one axis from its first line on. */
export function setBays(plate: Plate, axis: Axis, bays: readonly number[]): Outcome {
  const lines = gridOf(plate, axis)
  const first = lines[0]?.at ?? 0
  if (bays.length === 0) return { refusal: 'A plate has at least one bay each way.' }
  if (bays.some(bay => bay < LEAST_BAY)) return { refusal: `A bay is at least ${formatMm(LEAST_BAY)} long.` }
  if (bays.length >= MOST_LINES) return { refusal: 'A plate has at most 200 grid lines each way.' }
  const isSameCount = bays.length === lines.length - 1
  if (!isSameCount && !isRectangle(plate.outline)) {
    return { refusal: `The outline has corners on lines in between, so the number of bays stays ${lines.length - 1}. Add or remove lines one by one.` }
  }
  let at = first
  const places = [first, ...bays.map(bay => (at += bay))]
  const known = slotsOf(plate, axis)
  const slots = places.map((place, i): Slot => {
    const slot = known[i]
    return slot
      ? { ...slot, line: { ...slot.line, at: place } }
      : { line: { label: '', at: place, pinned: false }, slot: null, was: null }
  })
  const move = isSameCount ? withLines(lines, places) : stretchEnd(plate, axis, lines, places)
  const shifted = isSameCount ? shiftElements(plate, axis, move) : null
  const outline = mapOutline(plate.outline, axis, move)
  if (!outline || (isSameCount && !shifted)) return { refusal: FOLDED }
  return {
    label: `bays ${describeBays(bays)}`,
    patch: { ...shifted, ...relabelled(plate, axis, slots), outline },
  }
}

/** What lies on or after a line, up to the next, goes with that line. */
function withLines(lines: readonly GridLine[], places: readonly number[]) {
  return (place: number) => {
    const index = lines.filter(line => line.at <= place).length - 1
    const line = lines[index]
    return line ? place + (places[index] ?? line.at) - line.at : place
  }
}

/** The far edge of a rectangle keeps its distance from the last line. */
function stretchEnd(
  plate: Plate, axis: Axis, lines: readonly GridLine[], places: readonly number[],
) {
  const edge = Math.max(...plate.outline.map(point => coordinate(point, axis)))
  const by = (places.at(-1) ?? 0) - (lines.at(-1)?.at ?? 0)
  return (place: number) => (place === edge ? place + by : place)
}

/** Names a line; where it is the first of its series, the lines after it follow. */
export function setLabel(plate: Plate, axis: Axis, index: number, typed: string): Outcome {
  const label = typed.trim()
  const slots = slotsOf(plate, axis)
  const slot = slots[index]
  if (!slot) return { refusal: 'This grid line is no longer there.' }
  if (label.length < 1 || label.length > 8) return { refusal: 'A label has 1 to 8 characters.' }
  if (slots.some((other, i) => i !== index && other.line.label === label)) {
    return { refusal: `Label ${label} stands on another line of this direction. Choose one that is free.` }
  }
  const series = seriesOf([label], axis)
  const startsSeries = index === 0 && slot.slot === null
    && automaticLabels([label], series)[0] === true
  const labels = startsSeries
    ? dealLabels(slots.map(each => each.slot), series)
    : slots.map((each, i) => (i === index ? label : each.line.label))
  const renamed = new Map(slots.map((each, i) => [each.line.label, labels[i] ?? '']))
  return {
    label: `label ${label}`,
    patch: {
      ...gridPatch(axis, slots.map(({ line }, i) => ({ ...line, label: labels[i] ?? line.label }))),
      omittedColumns: plate.omittedColumns.map(column => (
        { ...column, [axis]: renamed.get(column[axis]) ?? column[axis] }
      )),
    },
  }
}

/** A pinned line stays when a study sets out the bays anew. */
export function setPinned(plate: Plate, axis: Axis, index: number, pinned: boolean): Outcome {
  const lines = gridOf(plate, axis)
  const line = lines[index]
  if (!line) return { refusal: 'This grid line is no longer there.' }
  return {
    label: pinned ? `pin on line ${line.label}` : `unpinned line ${line.label}`,
    patch: gridPatch(axis, lines.map((each, i) => (i === index ? { ...each, pinned } : each))),
  }
}
