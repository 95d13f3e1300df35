/** A plate framed and its loads read off in kN and m, steel without weight, for checks by hand. */
import { beamDemand, type Frame, type FrameBeam, frameArrangement, isRejected, mergedStretches, mergedSpots, type RegionFraming } from '#shared/engine/framing'
import { plateModel } from '#shared/engine/plate'
import { carriedLoads, columnReactions, isUnsized, NO_CAPS, prepareFrame, sizeFrame } from '#shared/engine/search/sizedFrame'
import { type Sizer, sizingRules } from '#shared/engine/search/sizer'
import { CATALOGUE } from '#shared/engine/sections'
import type { Beam, SizedSection } from '#shared/engine/members'
import type { Plate } from '#shared/schemas/plate'
import { basisOf } from '../search/inputs'

export const RULES = { trimDistance: 600, minSecondarySpacing: null, maxPiece: null }

/** Permanent and variable (all categories) load in kN, or kN/m. */
export interface Loads { permanent: number, variable: number }

export interface Framed {
  frame: Frame
  beam: (axis: 'x' | 'y', at: number, from?: number) => FrameBeam
  /** Line loads on a beam: from, to in m, permanent, variable in kN/m. */
  lines: (beam: FrameBeam) => [number, number, number, number][]
  /** Point loads on a beam, without carried beams: place in m, permanent, variable in kN. */
  points: (beam: FrameBeam) => [number, number, number][]
  /** Reactions in kN at the lower and the higher end: permanent, variable. */
  reactions: (beam: FrameBeam) => [Loads, Loads]
  /** Load of one floor on a column, kN. */
  column: (x: number, y: number) => Loads
  demand: (beam: FrameBeam) => Beam
}

const WEIGHTLESS = { ...CATALOGUE[0]!, mass: 0 }

export function framed(plate: Plate, direction: 'x' | 'y', divisions: number, ...others: RegionFraming[]): Framed {
  const model = plateModel(plate)
  const grid = { xs: plate.gridX.map(line => line.at), ys: plate.gridY.map(line => line.at) }
  const frame = frameArrangement(model, { grid, regions: [{ direction, divisions }, ...others] }, RULES)
  if (isRejected(frame)) throw new Error(`${frame.rejection}: ${frame.detail}`)
  const weightless: SizedSection = { section: WEIGHTLESS, utilisation: 0, governing: 'bending' }
  const sizer: Sizer = {
    rules: sizingRules(model, basisOf()), frequency: () => null, staircase: () => [weightless], withinDepths: () => () => weightless,
  }
  const prepared = prepareFrame(frame, model, sizer)
  const sized = sizeFrame(prepared, sizer, NO_CAPS)
  if (isUnsized(sized)) throw new Error('the weightless section always passes')
  const kinds = model.kinds.variable.length
  const pair = (load: readonly number[], unit: number): Loads => ({
    permanent: load[0]! / unit, variable: load.slice(1, 1 + kinds).reduce((sum, value) => sum + value, 0) / unit,
  })
  const columns = columnReactions(prepared, sized.reactions)
  const indexOf = (beam: FrameBeam) => frame.beams.indexOf(beam)
  return {
    frame,
    beam(axis, at, from) {
      const found = frame.beams.filter(b => b.axis === axis && b.at === at && (from === undefined || b.from === from))
      if (found.length !== 1) throw new Error(`${found.length} beams along ${axis} at ${at}`)
      return found[0]!
    },
    lines: beam => mergedStretches(beam.stretches, model.kinds.size).map(({ from, to, load }) => {
      const { permanent, variable } = pair(load, 1)
      return [from / 1000, to / 1000, permanent, variable] satisfies [number, number, number, number]
    }).filter(([, , permanent, variable]) => permanent !== 0 || variable !== 0),
    points: beam => mergedSpots(beam.spots, model.kinds.size).map(({ at, load }) => {
      const { permanent, variable } = pair(load, 1000)
      return [at / 1000, permanent, variable]
    }),
    reactions: (beam) => {
      const [low, high] = sized.reactions[indexOf(beam)]!
      return [pair(low, 1000), pair(high, 1000)]
    },
    column: (x, y) => pair(columns[frame.columns.findIndex(c => c.x === x && c.y === y)]!, 1000),
    demand: beam => beamDemand(beam, prepared.loads[indexOf(beam)]!, carriedLoads(beam, sized.reactions), sizer.rules.demand),
  }
}

export function rejectionOf(plate: Plate, direction: 'x' | 'y', divisions: number, rules: Partial<typeof RULES> | { minSecondarySpacing: number } | { maxPiece: number } = {}): string {
  const grid = { xs: plate.gridX.map(line => line.at), ys: plate.gridY.map(line => line.at) }
  const frame = frameArrangement(plateModel(plate), { grid, regions: [{ direction, divisions }] }, { ...RULES, ...rules })
  return isRejected(frame) ? frame.rejection : 'framed'
}
