/** The calculation sheet of one beam of a scheme. */
import { applyOverrides, nationalChoice, psi } from '../actions'
import { EngineError } from '../errors'
import { oneSidedCases } from '../framing'
import type { Beam } from '../members'
import { type CalculationSheet, calculationSheet } from '../sheet'
import { beamEnds, beamMarks, beamPlace, namedGrid } from './naming'
import type { PreparedStudy } from './prepare'
import { rebuildScheme } from './rebuild'
import type { Scheme } from './schemes'
import { carriedLoads } from './sizedFrame'

/** @throws EngineError `unknown-reference` where the scheme has no beam of this mark. */
export function memberSheet(study: PreparedStudy, key: string, mark: string): CalculationSheet {
  const scheme = rebuildScheme(study, key)
  const { frame, needs } = scheme.prepared
  const marks = beamMarks(frame.beams)
  const b = marks.indexOf(mark)
  if (b < 0) throw new EngineError('unknown-reference', `Scheme ${key} has no beam ${mark}.`, 'mark')
  const { gridX, gridY } = namedGrid(study.input.plate, scheme.arrangement.grid)
  const { rules } = study.sizer
  const beam = frame.beams[b]!
  const demand = withOneSidedCases(study, scheme, b)
  return calculationSheet(demand, scheme.sized.sections[b]!.section, rules.grades[needs[b]!.role], rules.beam, {
    title: `${beam.kind} beam ${beamPlace(beam, gridX, gridY)}`,
    facts: [`Scheme ${key}`, `Mark ${mark}`],
    ends: beamEnds(beam, gridX, gridY),
    loadNames: loadNames(demand, scheme, b, marks),
    candidates: rules.sections[needs[b]!.role],
    overrides: applyOverrides(nationalChoice(rules.basis.nationalChoice), rules.basis.overrides).overridden,
    psiFire: psi(rules.choice, study.input.plate.floorLoad.category).psi1,
  })
}

/** Planks laid on one side first: shown on the sheet; never worse than both sides, so not asked while sizing. */
function withOneSidedCases(study: PreparedStudy, scheme: Scheme, b: number): Beam {
  const { prepared, sized } = scheme
  const beam = prepared.frame.beams[b]!
  const demand = sized.demands[b]!
  if (!study.input.basis.constructionStage || beam.slabSides < 2 || prepared.model.slab.system !== 'planks') return demand
  const carried = carriedLoads(beam, sized.reactions)
  return { ...demand, construction: [...demand.construction, ...oneSidedCases(beam, prepared.loads[b]!.spots, carried, study.sizer.rules.demand)] }
}

function loadNames(demand: Beam, scheme: Scheme, b: number, marks: readonly string[]): { line: string[], point: string[] } {
  const beam = scheme.prepared.frame.beams[b]!
  return {
    line: demand.service.line.map(() => 'Slab and line loads'),
    point: demand.service.point.map(({ at }) => {
      const ends = beam.carries.filter(carried => Math.abs(carried.at - at) < 1e-3).map(carried => marks[carried.beam]!)
      return ends.length > 0 ? ends.join(' and ') : 'Line load across'
    }),
  }
}
