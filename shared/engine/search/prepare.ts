/** A study made ready: the plate as a model for each slab system, the numbered range, the sizers. */
import type { StudyInput } from '#shared/schemas/study'
import { combinationFactors } from '../actions'
import { type ColumnSizer, columnSizer } from '../columns'
import { EngineError } from '../errors'
import { type Frame, type FramingRules, type Rejected, frameArrangement, isJudgedByGrid, isRejected, slabReason } from '../framing'
import { type BayGrid, type Grid, type PlateModel, bayGrid, checkGrid, checkPlate, plateModel } from '../plate'
import { sectionsOf } from '../sections'
import { type Arrangements, type NumberedArrangement, arrangementsOf } from './arrangements'
import { type PassingBook, passingBook } from './passing'
import type { Caps } from './sizedFrame'
import { type Sizer, beamSizer, sizingRules } from './sizer'

export interface PreparedStudy {
  input: StudyInput
  /** Arrangements in the range. */
  total: number
  arrangements: Arrangements
  /** One for each slab system tried. */
  models: PlateModel[]
  sizer: Sizer
  /** Verdicts on single sections, for choices of few. */
  passing: PassingBook
  columns: ColumnSizer
  framing: FramingRules
  /** Grids on which nothing but slab, spacing and piece length can refuse a framing. */
  passedGrids: WeakMap<Grid, BayGrid>
  /** Caps of the range. */
  caps: Caps
  /** Section depths that a beam may have, mm, falling: the caps worth asking about. */
  depths: number[]
}

/** Beyond this a study would not end in a working day; stated so that it is refused before it starts. */
export const LARGEST_RANGE = 1_000_000

/** @throws EngineError where the plate cannot be framed or the range is no range; nothing is searched yet. */
export function prepareStudy(input: StudyInput): PreparedStudy {
  const { plate, basis, range } = input
  refuse(checkPlate(plate, 'free'))
  const arrangements = arrangementsOf(plate, range)
  if (arrangements.count.total > LARGEST_RANGE) {
    throw new EngineError('too-many',
      `The range holds ${arrangements.count.total} arrangements; the most that one study takes is ${LARGEST_RANGE}. Narrow the bays, pin a line or leave out a direction.`, 'range')
  }
  const models = slabsOf(input).map(slab => plateModel(plate, slab))
  refuse(checkGrid(models[0]!, arrangements.at(1).grid))
  const rules = sizingRules(models[0]!, basis)
  const passing = passingBook(rules)
  return {
    input, arrangements, models,
    total: arrangements.count.total,
    sizer: beamSizer(rules, passing),
    passing,
    columns: columnSizer({
      choice: rules.choice, combinations: combinationFactors(rules.choice, basis.combination), kinds: models[0]!.kinds.variable,
      grade: basis.column.grade, sections: sectionsOf(basis.column.families), storeys: plate.storeys, storeyHeight: plate.storeyHeight,
      liftStoreys: basis.liftStoreys, roof: plate.roof ?? null, reducesByStoreys: basis.reductions.storeys,
      ltbMethod: basis.ltbMethod, utilisationLimit: basis.utilisationLimit,
    }),
    framing: {
      trimDistance: basis.trimDistance, minSecondarySpacing: basis.minSecondarySpacing, maxPiece: basis.buildability.maxPiece,
    },
    passedGrids: new WeakMap<Grid, BayGrid>(),
    caps: capsOf(input),
    depths: depthsOf(input),
  }
}

function refuse(problems: ReturnType<typeof checkPlate>): void {
  const first = problems[0]
  if (first) throw new EngineError('cannot-be-framed', first.message, `plate.${first.path}`)
}

function slabsOf({ plate, range }: StudyInput): (typeof plate.slab)[] {
  if (!range.slabs) return [plate.slab]
  range.slabs.forEach((slab, i) => {
    if (slab.weight === undefined || plate.slab.weight === undefined) {
      throw new EngineError('invalid', 'Slab systems are exchanged by their weights: the plate\'s slab and each one tried need a weight, kN/m².',
        plate.slab.weight === undefined ? 'plate.slab.weight' : `range.slabs[${i}].weight`)
    }
    if (plate.floorLoad.permanent - plate.slab.weight + slab.weight < 0) {
      throw new EngineError('negative', 'The floor\'s permanent load is less than the weight of its slab.', 'plate.floorLoad.permanent')
    }
  })
  return range.slabs
}

function capsOf({ range }: StudyInput): Caps {
  const edge = range.depthCap ?? Infinity
  return { edge, interior: Math.min(edge, range.depthCapInterior ?? Infinity) }
}

function depthsOf({ basis }: StudyInput): number[] {
  const sections = sectionsOf([...new Set([...basis.primary.families, ...basis.secondary.families])])
  return [...new Set(sections.map(section => section.h))].sort((a, b) => b - a)
}

/** Reasons that are asked after all those that depend on the grid alone. */
const AFTER_GRID: readonly Rejected['rejection'][] = ['slab-direction', 'slab-span', 'secondary-spacing', 'piece-length']

/**
 * The arrangement framed, or the first reason why it cannot be. Once a grid is known to pass what
 * depends on it alone, a slab that spans too far is refused without framing, with the same words.
 */
export function frameOf(prepared: PreparedStudy, arrangement: NumberedArrangement): Frame | Rejected {
  const model = prepared.models[arrangement.slab]!
  const { grid, regions } = arrangement
  const passed = isJudgedByGrid(model) ? prepared.passedGrids.get(grid) : undefined
  const refused = passed && slabReason(model, passed, regions[0]!)
  if (refused) return refused
  const frame = frameArrangement(model, arrangement, prepared.framing)
  if (!passed && isJudgedByGrid(model)) {
    if (!isRejected(frame)) prepared.passedGrids.set(grid, frame.bays)
    else if (AFTER_GRID.includes(frame.rejection)) prepared.passedGrids.set(grid, bayGrid(model, grid))
  }
  return frame
}
