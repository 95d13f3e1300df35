/** Intents on what stands on the plate: voids, keep-clear zones, load zones, regions, columns, line loads. */
import type { Category, LineLoad, LoadZone, Plate, PlateVoid } from '#shared/schemas/plate'
import { gridOf } from './grid'
import { coversPoint, type Box, type Point } from './outline'
import type { Outcome, PlatePatch } from './steps'
import { formatMm, freeName } from './words'

export const AREA_KINDS = ['voids', 'keepClear', 'zones', 'regions'] as const
export type AreaKind = typeof AREA_KINDS[number]
export type Area = Box & { name: string }

export const AREA_WORDS: Record<AreaKind, { one: string, short: string, capital: string }> = {
  voids: { one: 'void', short: 'void', capital: 'Void' },
  keepClear: { one: 'keep-clear zone', short: 'zone', capital: 'Keep clear' },
  zones: { one: 'load zone', short: 'zone', capital: 'Load zone' },
  regions: { one: 'region', short: 'region', capital: 'Region' },
}

/** Narrowest void or zone that a drag makes, mm. */
export const LEAST_SIDE = 100

const GONE: Outcome = { refusal: 'This element is no longer there.' }

/** Two corners, in any order, as a rectangle. */
export function boxOfCorners(a: Point, b: Point): Box {
  return {
    x: Math.min(a[0], b[0]), y: Math.min(a[1], b[1]),
    width: Math.abs(a[0] - b[0]), height: Math.abs(a[1] - b[1]),
  }
}

function areaPatch(plate: Plate, kind: AreaKind, change: <A extends Area>(areas: readonly A[]) => A[]): PlatePatch {
  switch (kind) {
    case 'voids': return { voids: change(plate.voids) }
    case 'keepClear': return { keepClear: change(plate.keepClear) }
    case 'zones': return { zones: change(plate.zones) }
    case 'regions': return { regions: change(plate.regions) }
  }
}

export function addArea(plate: Plate, kind: AreaKind, box: Box): Outcome {
  if (box.width < LEAST_SIDE || box.height < LEAST_SIDE) {
    return { refusal: `A ${AREA_WORDS[kind].one} is at least ${formatMm(LEAST_SIDE)} wide. Draw it from corner to corner.` }
  }
  const list: readonly Area[] = plate[kind]
  if (list.length >= (kind === 'regions' ? 50 : 200)) return { refusal: `No more than ${list.length} of this kind on one plate.` }
  const name = freeName(AREA_WORDS[kind].capital, list.map(area => area.name))
  const added = { name, ...box }
  const label = `new ${AREA_WORDS[kind].one} ${name}`
  switch (kind) {
    case 'voids': return { label, patch: { voids: [...plate.voids, added] } }
    case 'keepClear': return { label, patch: { keepClear: [...plate.keepClear, added] } }
    case 'regions': return { label, patch: { regions: [...plate.regions, added] } }
    case 'zones': return {
      label, patch: { zones: [...plate.zones, { ...added, ...plate.floorLoad, reducible: false }] },
    }
  }
}

/** Moves or resizes; whole millimetres. */
export function placeArea(plate: Plate, kind: AreaKind, index: number, box: Partial<Box>): Outcome {
  const area: Area | undefined = plate[kind][index]
  if (!area) return GONE
  const { width = area.width, height = area.height } = box
  if (width < 1 || height < 1) return { refusal: `${area.name} needs a width and a height above 0 mm.` }
  return {
    label: `${box.width === undefined && box.height === undefined ? 'move' : 'size'} of ${area.name}`,
    patch: areaPatch(plate, kind, areas => areas.map((each, i) => (i === index ? { ...each, ...box } : each))),
  }
}

/** A void's line load goes with its name. */
export function renameArea(plate: Plate, kind: AreaKind, index: number, typed: string): Outcome {
  const area: Area | undefined = plate[kind][index]
  const name = typed.trim()
  if (!area) return GONE
  if (name.length < 1 || name.length > 120) return { refusal: 'A name has 1 to 120 characters.' }
  const list: readonly Area[] = plate[kind]
  if (list.some((other, i) => i !== index && other.name === name)) {
    return { refusal: `${name} is taken by another ${AREA_WORDS[kind].one}. Choose a name that is free.` }
  }
  const patch = areaPatch(plate, kind, areas => areas.map((each, i) => (i === index ? { ...each, name } : each)))
  return {
    label: `name ${name}`,
    patch: kind === 'voids' ? { ...patch, lineLoads: withVoidRenamed(plate, area.name, name) } : patch,
  }
}

function isOnVoid(lineLoad: LineLoad, name: string): boolean {
  return typeof lineLoad.on === 'object' && 'void' in lineLoad.on && lineLoad.on.void === name
}

function withVoidRenamed(plate: Plate, from: string, to: string): LineLoad[] {
  return plate.lineLoads.map(each => (isOnVoid(each, from) ? { ...each, on: { void: to } } : each))
}

/** Takes an area out; a line load that stands on a void's edges goes with the void. */
export function removeArea(plate: Plate, kind: AreaKind, index: number): Outcome {
  const area: Area | undefined = plate[kind][index]
  if (!area) return GONE
  const patch = areaPatch(plate, kind, areas => areas.filter((_, i) => i !== index))
  const loads = plate.lineLoads.filter(each => !isOnVoid(each, area.name))
  const takesLoads = kind === 'voids' && loads.length < plate.lineLoads.length
  return {
    label: `removal of ${area.name}${takesLoads ? ' and its line load' : ''}`,
    patch: takesLoads ? { ...patch, lineLoads: loads } : patch,
  }
}

/** A second one beside the first, its name free. */
export function copyArea(plate: Plate, kind: AreaKind, index: number): Outcome {
  const area: Area | undefined = plate[kind][index]
  if (!area) return GONE
  const list: readonly Area[] = plate[kind]
  const name = freeName(area.name.replace(/ \d+$/, ''), list.map(each => each.name))
  return {
    label: `copy of ${area.name}`,
    patch: areaPatch(plate, kind, (areas) => {
      const source = areas[index]
      return source ? [...areas, { ...source, name, x: source.x + source.width }] : [...areas]
    }),
  }
}

export function setVoidFloors(plate: Plate, index: number, floors: number | undefined): Outcome {
  if (floors !== undefined && (!Number.isInteger(floors) || floors < 1 || floors > plate.storeys)) {
    return { refusal: `A void repeats on 1 to ${plate.storeys} floors, from the lowest up.` }
  }
  return {
    label: `floors of ${plate.voids[index]?.name ?? 'the void'}`,
    patch: {
      voids: plate.voids.map((each, i): PlateVoid => {
        if (i !== index) return each
        const { floors: _, ...rest } = each
        return floors === undefined ? rest : { ...rest, floors }
      }),
    },
  }
}

export function setZoneLoad(
  plate: Plate, index: number,
  change: { permanent?: number, variable?: number, category?: Category, reducible?: boolean },
): Outcome {
  const zone = plate.zones[index]
  if (!zone) return GONE
  return {
    label: `load of ${zone.name}`,
    patch: { zones: plate.zones.map((each, i): LoadZone => (i === index ? { ...each, ...change } : each)) },
  }
}

/** Leaves a column out, or puts it back; `line` is the beam line that runs through. */
export function toggleColumn(plate: Plate, xLabel: string, yLabel: string, line: 'x' | 'y' = 'x'): Outcome {
  const known = plate.omittedColumns.some(each => each.x === xLabel && each.y === yLabel)
  const place = `${xLabel}/${yLabel}`
  if (known) {
    return {
      label: `column ${place} put back`,
      patch: { omittedColumns: plate.omittedColumns.filter(each => each.x !== xLabel || each.y !== yLabel) },
    }
  }
  const x = gridOf(plate, 'x').find(each => each.label === xLabel)
  const y = gridOf(plate, 'y').find(each => each.label === yLabel)
  if (!x || !y) return { refusal: `There is no column position ${place}.` }
  if (!coversPoint(plate.outline, [x.at, y.at])) return { refusal: `${place} lies outside the outline and has no column.` }
  if (plate.outline.some(corner => corner[0] === x.at && corner[1] === y.at)) {
    return { refusal: `Column ${place} stands on a corner of the outline and cannot be left out.` }
  }
  return {
    label: `omitted column ${place}`,
    patch: { omittedColumns: [...plate.omittedColumns, { x: xLabel, y: yLabel, line }] },
  }
}

export function setOmittedLine(plate: Plate, index: number, line: 'x' | 'y'): Outcome {
  const column = plate.omittedColumns[index]
  if (!column) return GONE
  return {
    label: `line through ${column.x}/${column.y}`,
    patch: { omittedColumns: plate.omittedColumns.map((each, i) => (i === index ? { ...each, line } : each)) },
  }
}

/** Why a line load cannot stand there; null where it can. */
function placeFault(name: string, on: LineLoad['on']): string | null {
  if (typeof on === 'string' || !('from' in on)) return null
  const { from, to } = on
  return (from[0] === to[0]) === (from[1] === to[1])
    ? `${name} runs along x or along y: its ends share one coordinate, not both.`
    : null
}

export function addLineLoad(plate: Plate, on: LineLoad['on']): Outcome {
  const fault = placeFault('A line load', on)
  if (fault) return { refusal: fault }
  if (plate.lineLoads.length >= 200) return { refusal: 'No more than 200 line loads on one plate.' }
  const name = on === 'outline' && !plate.lineLoads.some(each => each.name === 'Cladding')
    ? 'Cladding'
    : freeName('Line load', plate.lineLoads.map(each => each.name))
  return {
    label: `new line load ${name}`,
    patch: { lineLoads: [...plate.lineLoads, { name, on, permanent: 0, variable: 0 }] },
  }
}

export function setLineLoad(plate: Plate, index: number, change: Partial<LineLoad>): Outcome {
  const lineLoad = plate.lineLoads[index]
  if (!lineLoad) return GONE
  const name = change.name?.trim()
  if (name !== undefined && (name.length < 1 || name.length > 120)) return { refusal: 'A name has 1 to 120 characters.' }
  const next = { ...lineLoad, ...change, ...(name === undefined ? {} : { name }) }
  const fault = placeFault(next.name, next.on)
  if (fault) return { refusal: fault }
  return {
    label: `line load ${next.name}`,
    patch: { lineLoads: plate.lineLoads.map((each, i) => (i === index ? next : each)) },
  }
}

export function removeLineLoad(plate: Plate, index: number): Outcome {
  const lineLoad = plate.lineLoads[index]
  if (!lineLoad) return GONE
  return {
    label: `removal of ${lineLoad.name}`,
    patch: { lineLoads: plate.lineLoads.filter((_, i) => i !== index) },
  }
}
