/**
 * What keeps a plate from being framed, in words, with the place and, where there is one, the
 * change that would mend it. An empty list: the plate can be framed on its own grid.
 */
import type { Plate } from '#shared/schemas/plate'
import { type BayGrid, type Grid, bayGrid, isCornerCrossing, isCrossing, ownerBeyond } from './bays'
import { type PlateModel, plateModel, slabAreaWithin } from './model'
import { coveredArea, outlineFault } from './outline'
import { type Axis, type Rectangle, areaOf, overlaps, rectangleOf } from './rectangles'

export type PlateProblemCode
  = 'outline' | 'grid' | 'beyond-overhang' | 'void' | 'zone' | 'region' | 'line-load' | 'omitted-column' | 'keep-clear'

/** A change that mends the problem: a grid line to add. */
export interface PlateOffer { label: string, addGridLine: { axis: Axis, at: number } }

export interface PlateProblem {
  code: PlateProblemCode
  message: string
  /** Path of the value in the plate file. */
  path: string
  /** Where on the plate, mm. */
  at?: [number, number]
  offers?: PlateOffer[]
}

/**
 * `grid: 'fixed'` also asks whether the plate can be framed on the lines of the file; `'free'` leaves
 * that to the layouts of a study.
 */
export function checkPlate(plate: Plate, grid: 'fixed' | 'free' = 'fixed'): PlateProblem[] {
  const fault = outlineFault(plate.outline)
  if (fault) {
    const corner = plate.outline[fault.index]
    return [{ code: 'outline', message: fault.message, path: `outline[${fault.index}]`, ...(corner && { at: [corner[0], corner[1]] }) }]
  }
  const problems = [...gridProblems(plate, 'gridX'), ...gridProblems(plate, 'gridY')]
  if (problems.length > 0) return problems
  const model = plateModel(plate)
  problems.push(
    ...voidProblems(model), ...zoneProblems(model), ...regionProblems(model), ...lineLoadProblems(model), ...omittedNameProblems(plate),
  )
  if (grid === 'fixed') problems.push(...gridFitProblems(model, { xs: plate.gridX.map(l => l.at), ys: plate.gridY.map(l => l.at) }))
  return problems
}

/** What keeps a layout of grid lines from framing the plate. */
export function checkGrid(model: PlateModel, grid: Grid): PlateProblem[] {
  return gridFitProblems(model, grid)
}

function gridFitProblems(model: PlateModel, grid: Grid): PlateProblem[] {
  const bays = bayGrid(model, grid)
  return [...beyondProblems(model, bays), ...regionGridProblems(model, bays), ...omittedProblems(model, bays)]
}

function gridProblems(plate: Plate, key: 'gridX' | 'gridY'): PlateProblem[] {
  const lines = plate[key]
  const problems: PlateProblem[] = []
  lines.forEach((line, i) => {
    const before = lines[i - 1]
    if (before && line.at <= before.at) {
      problems.push({
        code: 'grid', path: `${key}[${i}].at`,
        message: `Grid line ${line.label} at ${line.at} mm does not lie beyond line ${before.label} at ${before.at} mm. Grid lines stand in rising order.`,
      })
    }
    if (lines.findIndex(other => other.label === line.label) < i) {
      problems.push({
        code: 'grid', path: `${key}[${i}].label`, message: `Two grid lines are called ${line.label}. Give one of them another label.`,
      })
    }
  })
  return problems
}

/** "Void Stair 1", but "Void 1" where the name says the kind already. */
function called(kind: string, name: string): string {
  return name.toLowerCase().startsWith(kind.toLowerCase()) ? name : `${kind} ${name}`
}

function middle(box: Rectangle): [number, number] {
  return [(box.x0 + box.x1) / 2, (box.y0 + box.y1) / 2]
}

function voidProblems(model: PlateModel): PlateProblem[] {
  const problems: PlateProblem[] = []
  const { storeys } = model.plate
  model.voids.forEach(({ name, box, floors }, i) => {
    if (floors > storeys) {
      problems.push({
        code: 'void', path: `voids[${i}].floors`, at: middle(box), message: `Void ${name} repeats on ${floors} floors; the building has ${storeys}.`,
      })
    }
    if (coveredArea(model.outline, box) < areaOf(box) * (1 - 1e-12)) {
      problems.push({
        code: 'void', path: `voids[${i}]`, at: middle(box), message: `${called('Void', name)} reaches outside the outline. Draw it within the slab.`,
      })
    }
    model.voids.slice(0, i).forEach((other) => {
      if (other.name === name) {
        problems.push({ code: 'void', path: `voids[${i}].name`, at: middle(box), message: `Two voids are called ${name}. Give one of them another name.` })
      }
      if (overlaps(other.box, box)) {
        problems.push({ code: 'void', path: `voids[${i}]`, at: middle(box), message: `Voids ${other.name} and ${name} overlap. Draw them side by side or as one.` })
      }
    })
  })
  if (model.slabArea <= 0) problems.push({ code: 'void', path: 'voids', message: 'The voids leave no slab.' })
  return problems
}

function zoneProblems(model: PlateModel): PlateProblem[] {
  const problems: PlateProblem[] = []
  model.plate.zones.forEach((zone, i) => {
    const box = rectangleOf(zone)
    if (slabAreaWithin(model, box) <= 0) {
      problems.push({ code: 'zone', path: `zones[${i}]`, at: middle(box), message: `${called('Load zone', zone.name)} lies on no slab. Move it onto the plate or remove it.` })
    }
    model.plate.zones.slice(0, i).forEach((other) => {
      if (overlaps(rectangleOf(other), box)) {
        problems.push({ code: 'zone', path: `zones[${i}]`, at: middle(box), message: `Load zones ${other.name} and ${zone.name} overlap. A place can have one load only.` })
      }
    })
  })
  return problems
}

function regionProblems(model: PlateModel): PlateProblem[] {
  const problems: PlateProblem[] = []
  model.regions.forEach(({ name, box }, i) => {
    model.regions.slice(0, i).forEach((other) => {
      if (other.name === name) problems.push({ code: 'region', path: `regions[${i}].name`, message: `Two regions are called ${name}. Give one of them another name.` })
      if (overlaps(other.box, box)) {
        problems.push({ code: 'region', path: `regions[${i}]`, at: middle(box), message: `Regions ${other.name} and ${name} overlap.` })
      }
    })
  })
  return problems
}

function regionGridProblems(model: PlateModel, bays: BayGrid): PlateProblem[] {
  if (model.regions.length === 0) return []
  const { xs, ys } = bays.grid
  const problems: PlateProblem[] = []
  bays.full.forEach((column, i) => column.forEach((full, j) => {
    if (!full) return
    const box = { x0: xs[i]!, x1: xs[i + 1]!, y0: ys[j]!, y1: ys[j + 1]! }
    const parts = model.regions.filter(region => overlaps(region.box, box))
    const inside = parts.length === 1 && coveredArea([parts[0]!.box], box) >= areaOf(box) * (1 - 1e-12)
    if (inside) return
    problems.push({
      code: 'region', path: 'regions', at: middle(box),
      message: parts.length === 0
        ? `The bay at ${bayName(model.plate, bays.grid, i, j)} belongs to no region. Let the regions cover the plate.`
        : `The edge of ${called('region', parts[0]!.name)} cuts the bay at ${bayName(model.plate, bays.grid, i, j)}. Regions meet on grid lines.`,
    })
  }))
  return problems
}

function bayName(plate: Plate, { xs, ys }: Grid, i: number, j: number): string {
  const name = (lines: Plate['gridX'], at: number) => lines.find(line => line.at === at)?.label ?? `${at} mm`
  const { gridX, gridY } = plate
  return `${name(gridX, xs[i]!)}–${name(gridX, xs[i + 1]!)} / ${name(gridY, ys[j]!)}–${name(gridY, ys[j + 1]!)}`
}

function lineLoadProblems(model: PlateModel): PlateProblem[] {
  const problems: PlateProblem[] = []
  model.plate.lineLoads.forEach((line, i) => {
    const { on } = line
    if (on === 'outline') return
    if ('void' in on) {
      if (!model.voids.some(v => v.name === on.void)) {
        problems.push({ code: 'line-load', path: `lineLoads[${i}].on.void`, message: `${called('Line load', line.name)} stands on ${called('void', on.void)}, which is not on the plate.` })
      }
      return
    }
    const [ax, ay] = on.from
    const [bx, by] = on.to
    const at: [number, number] = [(ax + bx) / 2, (ay + by) / 2]
    const path = `lineLoads[${i}].on`
    if ((ax !== bx) === (ay !== by)) {
      problems.push({ code: 'line-load', path, at, message: `${called('Line load', line.name)} must run parallel to the grid and have a length.` })
      return
    }
    const off = lengthOffSlab(model, on.from, on.to)
    if (off > 0) {
      problems.push({ code: 'line-load', path, at, message: `${off} mm of ${called('line load', line.name)} stand on no slab. Draw it on the plate and clear of voids.` })
    }
  })
  return problems
}

/** Length of a grid-parallel line that has slab on neither side, mm. */
function lengthOffSlab(model: PlateModel, from: readonly [number, number], to: readonly [number, number]): number {
  const alongX = from[1] === to[1]
  const a = Math.min(alongX ? from[0] : from[1], alongX ? to[0] : to[1])
  const b = Math.max(alongX ? from[0] : from[1], alongX ? to[0] : to[1])
  const c = alongX ? from[1] : from[0]
  const boxes = [...model.outline, ...model.voids.map(v => v.box)]
  const cuts = boxes.flatMap(r => alongX ? [r.x0, r.x1] : [r.y0, r.y1]).filter(value => value > a && value < b)
  const stations = [a, ...cuts.sort((p, q) => p - q), b]
  let off = 0
  for (let i = 0; i + 1 < stations.length; i++) {
    const m = (stations[i]! + stations[i + 1]!) / 2
    const onSlab = [c - 0.25, c + 0.25].some(side => hasSlab(model, alongX ? m : side, alongX ? side : m))
    if (!onSlab) off += stations[i + 1]! - stations[i]!
  }
  return off
}

function hasSlab(model: PlateModel, x: number, y: number): boolean {
  const within = (r: Rectangle) => x > r.x0 && x < r.x1 && y > r.y0 && y < r.y1
  const onOutline = model.outline.some(r => x >= r.x0 && x <= r.x1 && y >= r.y0 && y <= r.y1)
  return onOutline && !model.voids.some(v => within(v.box))
}

function beyondProblems(model: PlateModel, bays: BayGrid): PlateProblem[] {
  if (!bays.full.some(column => column.includes(true))) {
    return [{ code: 'grid', path: 'gridX', message: 'No bay of the grid lies within the outline. Set grid lines on the plate\'s edges.' }]
  }
  const problems: PlateProblem[] = []
  for (const piece of bays.beyond) {
    if (ownerBeyond(model, bays, piece)) continue
    problems.push(beyondProblem(model, bays, piece))
    if (problems.length >= 20) break
  }
  return problems
}

function beyondProblem(model: PlateModel, bays: BayGrid, piece: Rectangle): PlateProblem {
  const offers = beyondOffers(model, bays, piece)
  const mend = offers.length > 0 ? ` ${offers[0]!.label}, or draw the edge in.` : ' Draw the edge in to a beam line.'
  return {
    code: 'beyond-overhang', path: 'outline', at: middle(piece), offers,
    message: `The slab at (${piece.x0}…${piece.x1}, ${piece.y0}…${piece.y1}) mm has no beam line within ${model.plate.overhang} mm of its edge.${mend}`,
  }
}

/** Outline edges that bound the piece and have no grid line on them. */
function beyondOffers(model: PlateModel, bays: BayGrid, piece: Rectangle): PlateOffer[] {
  const offers: PlateOffer[] = []
  for (const edge of model.edges) {
    const lines = edge.axis === 'y' ? bays.grid.xs : bays.grid.ys
    if (lines.includes(edge.at)) continue
    const beside = edge.axis === 'y'
      ? (piece.x0 === edge.at || piece.x1 === edge.at) && edge.from < piece.y1 && edge.to > piece.y0
      : (piece.y0 === edge.at || piece.y1 === edge.at) && edge.from < piece.x1 && edge.to > piece.x0
    if (!beside) continue
    const axis: Axis = edge.axis === 'y' ? 'x' : 'y'
    if (offers.some(offer => offer.addGridLine.axis === axis && offer.addGridLine.at === edge.at)) continue
    offers.push({ label: `Add a grid line at ${axis} = ${edge.at} mm`, addGridLine: { axis, at: edge.at } })
  }
  return offers
}

/** Omitted columns that name no crossing of the drawn lines, or one twice. */
function omittedNameProblems(plate: Plate): PlateProblem[] {
  const problems: PlateProblem[] = []
  plate.omittedColumns.forEach((omitted, n) => {
    const path = `omittedColumns[${n}]`
    const name = `${omitted.x}/${omitted.y}`
    if (!plate.gridX.some(line => line.label === omitted.x)) {
      problems.push({ code: 'omitted-column', path: `${path}.x`, message: `Omitted column ${name}: there is no grid line ${omitted.x}.` })
    }
    if (!plate.gridY.some(line => line.label === omitted.y)) {
      problems.push({ code: 'omitted-column', path: `${path}.y`, message: `Omitted column ${name}: there is no grid line ${omitted.y}.` })
    }
    if (plate.omittedColumns.findIndex(other => other.x === omitted.x && other.y === omitted.y) < n) {
      problems.push({ code: 'omitted-column', path, message: `Column ${name} is omitted twice.` })
    }
  })
  return problems
}

/** Omitted columns that cannot be left out of this grid; those on lines that it does not have count for nothing. */
function omittedProblems({ plate }: PlateModel, bays: BayGrid): PlateProblem[] {
  return plate.omittedColumns.flatMap((omitted, n): PlateProblem[] => {
    const x = plate.gridX.find(line => line.label === omitted.x)?.at
    const y = plate.gridY.find(line => line.label === omitted.y)?.at
    if (x === undefined || y === undefined) return []
    const [i, j] = [bays.grid.xs.indexOf(x), bays.grid.ys.indexOf(y)]
    if (i < 0 || j < 0) return []
    const path = `omittedColumns[${n}]`
    const name = `${omitted.x}/${omitted.y}`
    const at: [number, number] = [x, y]
    if (!isCrossing(bays, i, j)) {
      return [{ code: 'omitted-column', path, at, message: `There is no column at ${name} to omit.` }]
    }
    if (runsThrough(bays, i, j, omitted.line)) return []
    return isCornerCrossing(bays, i, j)
      ? [{ code: 'omitted-column', path, at, message: `Column ${name} stands at a corner; a corner column cannot be omitted.` }]
      : [{ code: 'omitted-column', path: `${path}.line`, at, message: `No beam line along ${omitted.line} runs through ${name}. Let the line run the other way.` }]
  })
}

/** Whether the beam line along `axis` goes on at both sides of a crossing. */
export function runsThrough(bays: BayGrid, i: number, j: number, axis: Axis): boolean {
  const full = (a: number, b: number) => bays.full[a]?.[b] ?? false
  return axis === 'x'
    ? (full(i - 1, j - 1) || full(i - 1, j)) && (full(i, j - 1) || full(i, j))
    : (full(i - 1, j - 1) || full(i, j - 1)) && (full(i - 1, j) || full(i, j))
}
