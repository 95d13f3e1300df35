/** Names of grid lines, beams and columns of a scheme, as they stand on the plan. */
import type { Plate } from '#shared/schemas/plate'
import type { SchemeMember } from '#shared/schemas/study'
import type { FrameBeam, FrameColumn } from '../framing'
import type { Grid } from '../plate'

export interface NamedLine { label: string, at: number }

/** Letters of grid lines; I and O are left out by custom. */
const LETTERS = 'ABCDEFGHJKLMNPQRSTUVWXYZ'

export function letterLabel(index: number): string {
  const last = LETTERS[index % LETTERS.length]!
  return index < LETTERS.length ? last : letterLabel(Math.floor(index / LETTERS.length) - 1) + last
}

/** The plate's own labels where the layout has its lines, else numbers along x and letters along y. */
export function namedGrid(plate: Plate, grid: Grid): { gridX: NamedLine[], gridY: NamedLine[] } {
  const named = (drawn: readonly NamedLine[], lines: readonly number[], label: (n: number) => string): NamedLine[] => {
    const isDrawn = drawn.length === lines.length && lines.every((at, n) => drawn[n]!.at === at)
    return lines.map((at, n) => ({ label: isDrawn ? drawn[n]!.label : label(n), at }))
  }
  return { gridX: named(plate.gridX, grid.xs, n => String(n + 1)), gridY: named(plate.gridY, grid.ys, letterLabel) }
}

const PREFIX: Record<SchemeMember['kind'], string> = {
  secondary: 'S', primary: 'P', edge: 'E', trimmer: 'T', tie: 'B', column: 'C',
}

/** Marks by kind, counted from the lower left upwards: S1, S2 … P1 … (B for tie beams). */
export function beamMarks(beams: readonly FrameBeam[]): string[] {
  const order = beams.map((_, b) => b).sort((a, b) => {
    const [p, q] = [startOf(beams[a]!), startOf(beams[b]!)]
    return p.y - q.y || p.x - q.x || beams[a]!.axis.localeCompare(beams[b]!.axis)
  })
  const counts = new Map<string, number>()
  const marks = new Array<string>(beams.length)
  for (const b of order) {
    const prefix = PREFIX[beams[b]!.kind]
    const n = (counts.get(prefix) ?? 0) + 1
    counts.set(prefix, n)
    marks[b] = `${prefix}${n}`
  }
  return marks
}

function startOf({ axis, at, from }: FrameBeam): { x: number, y: number } {
  return axis === 'x' ? { x: from, y: at } : { x: at, y: from }
}

export function columnMarks(columns: readonly FrameColumn[]): string[] {
  const order = columns.map((_, c) => c).sort((a, b) => columns[a]!.y - columns[b]!.y || columns[a]!.x - columns[b]!.x)
  const marks = new Array<string>(columns.length)
  order.forEach((c, n) => {
    marks[c] = `C${n + 1}`
  })
  return marks
}

/** "B / 4–5" along the numbers, "4 / B–C" along the letters; between lines with the distance from the line before. */
export function beamPlace(beam: FrameBeam, gridX: readonly NamedLine[], gridY: readonly NamedLine[]): string {
  const [own, run] = beam.axis === 'x' ? [gridY, gridX] : [gridX, gridY]
  return `${linePlace(own, beam.at)} / ${linePlace(run, beam.from)}–${linePlace(run, beam.to)}`
}

export function columnPlace(column: FrameColumn, gridX: readonly NamedLine[], gridY: readonly NamedLine[]): string {
  return `${gridX[column.i]!.label}/${gridY[column.j]!.label}`
}

function linePlace(lines: readonly NamedLine[], at: number): string {
  const on = lines.find(line => Math.abs(line.at - at) < 0.5)
  if (on) return on.label
  const before = [...lines].reverse().find(line => line.at < at)
  return before ? `${before.label}+${((at - before.at) / 1000).toFixed(2)} m` : `${((at - lines[0]!.at) / 1000).toFixed(2)} m`
}

/** Labels of the two ends of a beam, for its calculation sheet. */
export function beamEnds(beam: FrameBeam, gridX: readonly NamedLine[], gridY: readonly NamedLine[]): [string, string] {
  const run = beam.axis === 'x' ? gridX : gridY
  return [linePlace(run, beam.from), linePlace(run, beam.to)]
}
