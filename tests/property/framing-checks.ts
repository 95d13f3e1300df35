/** Frames a made-up plate and holds the frame against the oracle: equilibrium with and without sizes, supports, slab on beams. */
import { nationalChoice } from '#shared/engine/actions'
import { type Arrangement, type Frame, beamDemand, frameArrangement, isRejected } from '#shared/engine/framing'
import { validateBeam } from '#shared/engine/members/validate'
import { type PlateModel, plateModel } from '#shared/engine/plate'
import { carriedLoads, columnReactions, equilibriumResidual, isUnsized, prepareFrame, sizeFrame } from '#shared/engine/search/sizedFrame'
import { type Sizer, sizingRules } from '#shared/engine/search/sizer'
import { CATALOGUE } from '#shared/engine/sections'
import type { Plate } from '#shared/schemas/plate'
import { REJECTIONS } from '#shared/schemas/study'
import { basisOf } from '../unit/search/inputs'
import { areaOnBeams, columnLoads, faultsOf, loadOnPlate } from './framing-oracle'
import { type Wishes, plateFrom } from './framing-plates'
import type { TRANSFORMS } from './plate-transforms'

export const FRAMING_RULES = { trimDistance: 600, minSecondarySpacing: null, maxPiece: null }
const GRAVITY = 9.81
const LARGEST_RESIDUAL = 1e-9

/** What came of framing: `framed`, or the reason; and the faults found. */
export interface Outcome { outcome: string, faults: string[] }

export function frameMadeUp(wishes: Wishes): Outcome {
  const made = plateFrom(wishes)
  return made ? frameAndCheck(made.plate, made.arrangement) : { outcome: 'no outline', faults: [] }
}

export function frameAndCheck(plate: Plate, arrangement: Arrangement): Outcome {
  const model = plateModel(plate)
  const frame = frameArrangement(model, arrangement, FRAMING_RULES)
  if (isRejected(frame)) {
    const isKnown = (REJECTIONS as readonly string[]).includes(frame.rejection) && frame.detail.length > 10
    return { outcome: frame.rejection, faults: isKnown ? [] : [`${frame.rejection} is no reason of the list`] }
  }
  return {
    outcome: 'framed',
    faults: [
      ...faultsOf(frame, plate), ...equilibriumFaults(plate, model, frame), ...sizedFaults(plate, model, frame),
      ...panelFaults(plate, model, arrangement, frame),
    ],
  }
}

function differs(name: string, found: number, expected: number, limit = LARGEST_RESIDUAL): string[] {
  const difference = Math.abs(found - expected) / (expected > 0 ? expected : 1)
  return difference < limit ? [] : [`${name}: ${found} instead of ${expected}`]
}

function added(loads: readonly number[][], size: number): number[] {
  return loads.reduce<number[]>((sum, load) => sum.map((value, k) => value + load[k]!), new Array<number>(size).fill(0))
}

function equilibriumFaults(plate: Plate, { kinds: { size, variable, area } }: PlateModel, frame: Frame): string[] {
  const applied = loadOnPlate(plate)
  const sums = added(columnLoads(frame, size, () => 0), size)
  return [
    ...differs('permanent load on the columns', sums[0]!, applied.permanent),
    ...variable.flatMap(({ category, reducible }, k) =>
      differs(`variable load of category ${category} on the columns`, sums[1 + k]!, applied.variable(category, reducible))),
    ...differs('area on the columns', sums[area]!, applied.area),
  ]
}

/** A sizer that hands out any section, so that frames get own weights without the work of sizing. */
function anySizer(model: PlateModel): Sizer {
  return {
    rules: sizingRules(model, basisOf({ constructionStage: true })),
    staircase: beam => [{ section: CATALOGUE[Math.floor(beam.span) % CATALOGUE.length]!, utilisation: 0.5, governing: 'bending' }],
    withinDepths: () => () => undefined,
    frequency: () => null,
  }
}

function sizedFaults(plate: Plate, model: PlateModel, frame: Frame): string[] {
  const sizer = anySizer(model)
  const prepared = prepareFrame(frame, model, sizer)
  const sized = sizeFrame(prepared, sizer, { edge: Infinity, interior: Infinity })
  if (isUnsized(sized)) return ['the sizer of the test always finds a section']
  const weights = frame.beams.map((beam, b) => sized.sections[b]!.section.mass * (beam.to - beam.from) / 1000 * GRAVITY)
  const own = columnLoads(frame, model.kinds.size, b => weights[b]!)
  const columns = columnReactions(prepared, sized.reactions)
  const rules = { kinds: model.kinds, choice: nationalChoice('EN'), reducesByArea: true, constructionStage: true }
  return [
    ...differs('residual of the search', equilibriumResidual(prepared, sized), 0),
    ...differs('permanent load with own weights', added(own, model.kinds.size)[0]!, loadOnPlate(plate).permanent + weights.reduce((a, b) => a + b, 0)),
    ...columns.flatMap((column, c) => differs(`column ${c}`, column[0]!, own[c]![0]!, 1e-8)),
    ...frame.beams.flatMap((beam, b) => {
      try {
        validateBeam(beamDemand(beam, prepared.loads[b]!, carriedLoads(beam, sized.reactions), rules))
        return []
      } catch (error) {
        return [`beam ${b} is none: ${String(error)}`]
      }
    }),
  ]
}

/** Slab area on each beam from the full bays is what the walk along the span finds; plates without overhang only. */
function panelFaults(plate: Plate, model: PlateModel, arrangement: Arrangement, frame: Frame): string[] {
  if (frame.bays.beyond.length > 0) return []
  const { area } = model.kinds
  const expected = areaOnBeams(frame, plate, spanOf(plate, arrangement, frame.bays.full))
  return frame.beams.flatMap((beam, b) => {
    const found = beam.stretches.reduce((sum, s) => sum + s.load[area]! * (s.to - s.from), 0)
    return Math.abs(found - expected[b]!) > 1
      ? [`slab on beam ${b} along ${beam.axis} at ${beam.at} from ${beam.from} to ${beam.to}: ${found} instead of ${expected[b]} mm²`]
      : []
  })
}

/** Direction of the slab span of the full bay at a point; null outside the full bays. */
function spanOf(plate: Plate, { grid: { xs, ys }, regions }: Arrangement, full: boolean[][]): (x: number, y: number) => 'x' | 'y' | null {
  const bay = (lines: readonly number[], value: number) => lines.findIndex((line, n) => line < value && (lines[n + 1] ?? -Infinity) > value)
  return (x, y) => {
    if (!full[bay(xs, x)]?.[bay(ys, y)]) return null
    const n = plate.regions.findIndex(r => x > r.x && x < r.x + r.width && y > r.y && y < r.y + r.height)
    const { direction, divisions } = regions[Math.max(0, n)]!
    return divisions === 1 ? (direction === 'x' ? 'y' : 'x') : direction
  }
}

/** Column loads, kinds and needs of a plate seen otherwise against those of the plate itself; one region only. */
export function transformFaults(wishes: Wishes, transform: typeof TRANSFORMS[number]): string[] {
  const made = plateFrom({ ...wishes, split: null })
  if (!made) return []
  const { plate, arrangement } = made
  const { direction, divisions } = arrangement.regions[0]!
  const other = transform.apply(plate)
  const turned = transform.transposes ? (direction === 'x' ? 'y' as const : 'x' as const) : direction
  const before = columnsInWords(plate, { direction, divisions }, transform.point)
  const after = columnsInWords(other, { direction: turned, divisions }, point => point)
  return before.flatMap((words, n) => words === after[n] ? [] : [`${transform.name}: ${after[n]} instead of ${words}`])
}

/** Loads are compared in steps of 10 N (10 mm²), the steps set off so that no round figure lies on one. */
const UNIT = 10
const OFF_TIES = 0.0371

/** Every column and beam of the frame with its loads, in an order that does not depend on the view. */
function columnsInWords(plate: Plate, region: { direction: 'x' | 'y', divisions: number }, point: (p: [number, number]) => [number, number]): string[] {
  const model = plateModel(plate)
  const grid = { xs: plate.gridX.map(line => line.at), ys: plate.gridY.map(line => line.at) }
  const frame = frameArrangement(model, { grid, regions: [region] }, FRAMING_RULES)
  if (isRejected(frame)) return [frame.rejection]
  const order = model.kinds.variable.map((kind, k) => ({ name: `${kind.category} ${kind.reducible}`, k: k + 1 })).sort((a, b) => a.name.localeCompare(b.name)).map(({ k }) => k)
  const figures = (load: readonly number[]) => [0, ...order, model.kinds.constructionPermanent, model.kinds.area].map(k => Math.round(load[k]! / UNIT + OFF_TIES)).join(' ')
  const loads = columnLoads(frame, model.kinds.size, () => 0)
  const place = (x: number, y: number) => point([x, y]).map(v => Math.round(v * 1000) / 1000 + 0).join('/')
  const columns = frame.columns.map((c, n) => `column ${place(c.x, c.y)} direct ${figures(c.direct)} all ${figures(loads[n]!)}`)
  const beams = frame.beams.map((b) => {
    const ends = b.axis === 'x' ? [place(b.from, b.at), place(b.to, b.at)] : [place(b.at, b.from), place(b.at, b.to)]
    const held = b.held.reduce((sum, h) => sum + h.to - h.from, 0)
    return `${b.kind} ${ends.sort().join(' ')} sides ${b.slabSides} carries ${b.carries.length} held ${Math.round(held + OFF_TIES)} tie ${Math.round(b.tieSpacing + OFF_TIES)}`
  })
  return [...columns.sort(), ...beams.sort()]
}
