/** The calculation sheet of one member of a scheme: a beam, or a column lift by lift. */
import { applyOverrides, nationalChoice, psi } from '../actions'
import { EngineError } from '../errors'
import { oneSidedCases } from '../framing'
import type { Beam } from '../members'
import { explainColumn } from '../columns'
import { type CalculationSheet, type ColumnSheet, calculationSheet, columnSheet } from '../sheet'
import { beamEnds, beamMarks, beamPlace, columnMarks, columnPlace, namedGrid } from './naming'
import type { PreparedStudy } from './prepare'
import { rebuildScheme } from './rebuild'
import { type Scheme, columnDemand } from './schemes'
import { carriedLoads } from './sizedFrame'

/** @throws EngineError `unknown-reference` where the scheme has no member of this mark. */
export function memberSheet(study: PreparedStudy, key: string, mark: string): CalculationSheet | ColumnSheet {
  const scheme = rebuildScheme(study, key)
  const { frame, needs } = scheme.prepared
  const marks = beamMarks(frame.beams)
  const b = marks.indexOf(mark)
  if (b < 0) return columnOf(study, scheme, key, mark)
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
    psiFire: largestPsi1(study),
    tieForce: needs[b]!.tieForce,
  })
}

/** The largest ψ1 of the plate's categories: a beam may carry any of them (safe). */
function largestPsi1({ models, sizer: { rules: { choice } } }: PreparedStudy): number {
  return Math.max(...models[0]!.kinds.variable.map(({ category }) => psi(choice, category).psi1))
}

function columnOf(study: PreparedStudy, scheme: Scheme, key: string, mark: string): ColumnSheet {
  const { frame } = scheme.prepared
  const c = columnMarks(frame.columns).indexOf(mark)
  if (c < 0) throw new EngineError('unknown-reference', `Scheme ${key} has no member ${mark}.`, 'mark')
  const { gridX, gridY } = namedGrid(study.input.plate, scheme.arrangement.grid)
  const { basis } = study.input
  return columnSheet(explainColumn(study.columns, columnDemand(scheme.prepared, scheme.sized, c), scheme.columns[c]!), {
    title: `column ${columnPlace(frame.columns[c]!, gridX, gridY)}`,
    facts: [`Scheme ${key}`, `Mark ${mark}`],
    overrides: applyOverrides(nationalChoice(basis.nationalChoice), basis.overrides).overridden,
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
