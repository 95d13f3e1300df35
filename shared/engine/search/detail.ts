/** A scheme opened: every member with its place, load path and utilisations, and the loads to the foundations. */
import type { ColumnLoad, SchemeDetail, SchemeMemberDetail } from '#shared/schemas/api'
import { applyOverrides, nationalChoice } from '../actions'
import type { ColumnLift, SizedColumn } from '../columns'
import type { FrameBeam } from '../framing'
import { verifyBeam } from '../members'
import { type NamedLine, beamMarks, beamPlace, columnMarks, columnPlace, namedGrid } from './naming'
import { pieceOutputs, tieForces } from './outputs'
import type { PreparedStudy } from './prepare'
import { rebuildScheme } from './rebuild'
import { schemeRow } from './rows'
import type { Scheme } from './schemes'
import { tieUtilisation } from './sizer'
import { ENGINE_VERSION } from './version'
import { warningsOf } from './warnings'

/** What the engine knows of an opened scheme; ranks and versions are the study's. */
export type EngineSchemeDetail = Omit<SchemeDetail,
  'studyId' | 'projectId' | 'studyNumber' | 'plateVersion' | 'basisVersion' | 'rank' | 'onTradeOffLine'>

/** @throws EngineError `unknown-reference` where the key names no scheme of the study. */
export function schemeDetail(study: PreparedStudy, key: string): EngineSchemeDetail {
  const scheme = rebuildScheme(study, key)
  const { plate, basis } = study.input
  const { rank: _rank, onTradeOffLine: _line, ...row } = schemeRow(study, scheme)
  const { gridX, gridY } = namedGrid(plate, scheme.arrangement.grid)
  const { model } = scheme.prepared
  return {
    ...row,
    total: study.total,
    plate, basis, gridX, gridY,
    engineVersion: ENGINE_VERSION,
    slabDepth: model.slab.depth,
    slabArea: model.slabArea / 1e6,
    members: [...beamDetails(study, scheme, gridX, gridY), ...columnDetails(study, scheme, gridX, gridY)],
    columnLoads: columnLoads(scheme, gridX, gridY),
    tieForces: tieForces(study, scheme, gridX, gridY),
    ...pieceOutputs(scheme),
    residual: scheme.residual,
    warnings: warningsOf(study, scheme, gridX, gridY),
    overrides: overrideWords(study),
  }
}

function beamDetails(study: PreparedStudy, scheme: Scheme, gridX: NamedLine[], gridY: NamedLine[]): SchemeMemberDetail[] {
  const { frame, needs } = scheme.prepared
  const { sized } = scheme
  const marks = beamMarks(frame.beams)
  const columns = columnMarks(frame.columns)
  const alike = countAlike(scheme)
  return frame.beams.map((beam, b): SchemeMemberDetail => {
    const { section, utilisation, governing } = sized.sections[b]!
    const grade = study.sizer.rules.grades[needs[b]!.role]
    const verified = verifyBeam(sized.demands[b]!, section, grade, study.sizer.rules.beam)
    const [from, to] = endsOf(beam)
    const length = beam.to - beam.from
    return {
      mark: marks[b]!, kind: beam.kind, from, to, section: section.designation, governing, utilisation,
      place: beamPlace(beam, gridX, gridY),
      length, mass: section.mass * length / 1000, grade,
      utilisations: { ...verified.utilisation, ...tieShare(study, scheme, b) },
      carriedBy: beam.supports.map(s => s.kind === 'column' ? columns[s.column]! : marks[s.beam]!),
      carries: beam.carries.map(carried => marks[carried.beam]!),
      reactions: { from: kiloNewtons(study, sized.reactions[b]![0]), to: kiloNewtons(study, sized.reactions[b]![1]) },
      frequency: verified.frequency,
      alike: alike[b]!,
    }
  })
}

function tieShare(study: PreparedStudy, { prepared: { needs }, sized }: Scheme, b: number): { tie?: number } {
  const { tieForce: force, role } = needs[b]!
  return force === 0 ? {} : { tie: tieUtilisation(sized.sections[b]!.section, sized.demands[b]!.span, force, study.sizer.rules, role) }
}

export function endsOf(beam: FrameBeam): [[number, number], [number, number]] {
  return beam.axis === 'x' ? [[beam.from, beam.at], [beam.to, beam.at]] : [[beam.at, beam.from], [beam.at, beam.to]]
}

function kiloNewtons(study: PreparedStudy, load: readonly number[]): { permanent: number, variable: number } {
  const kinds = study.models[0]!.kinds.variable.length
  return { permanent: load[0]! / 1000, variable: load.slice(1, 1 + kinds).reduce((sum, value) => sum + value, 0) / 1000 }
}

function countAlike({ sized }: Scheme): number[] {
  const keys = sized.demands.map((demand, b) => `${sized.sections[b]!.section.catalogueIndex}|${JSON.stringify(demand)}`)
  const counts = new Map<string, number>()
  for (const key of keys) counts.set(key, (counts.get(key) ?? 0) + 1)
  return keys.map(key => counts.get(key)!)
}

function columnDetails(study: PreparedStudy, scheme: Scheme, gridX: NamedLine[], gridY: NamedLine[]): SchemeMemberDetail[] {
  const { frame } = scheme.prepared
  const marks = columnMarks(frame.columns)
  const beams = beamMarks(frame.beams)
  return frame.columns.map((column, c): SchemeMemberDetail => {
    const sized = scheme.columns[c]!
    const worst = worstLift(sized)
    return {
      mark: marks[c]!, kind: 'column', at: [column.x, column.y],
      section: sized.lifts[0]!.section.designation, governing: 'stability', utilisation: worst.utilisation,
      place: columnPlace(column, gridX, gridY),
      length: study.input.plate.storeyHeight, mass: sized.mass, grade: study.input.basis.column.grade,
      utilisations: { stability: worst.utilisation },
      carriedBy: [], carries: column.ends.map(({ beam }) => beams[beam]!),
      reactions: null, frequency: null,
      alike: scheme.columns.filter(other => sameLifts(other, sized)).length,
      lifts: sized.lifts.map(lift => ({
        fromLevel: lift.fromLevel, toLevel: lift.toLevel, section: lift.section.designation, utilisation: lift.utilisation,
        ...governingLength(lift),
      })),
    }
  })
}

function worstLift({ lifts }: SizedColumn): ColumnLift {
  return lifts.reduce((worst, lift) => lift.utilisation > worst.utilisation ? lift : worst)
}

function governingLength({ lengths }: ColumnLift): Pick<NonNullable<SchemeMemberDetail['lifts']>[number], 'NEd' | 'MyEd' | 'MzEd' | 'NbYRd' | 'NbZRd' | 'MbRd' | 'MczRd' | 'LcrY' | 'LcrZ' | 'method' | 'combination' | 'parts'> {
  const worst = lengths.reduce((most, length) => length.utilisation > most.utilisation ? length : most)
  return {
    NEd: worst.NEd / 1e3, MyEd: worst.MyEd / 1e6, MzEd: worst.MzEd / 1e6, NbYRd: worst.NbYRd / 1e3, NbZRd: worst.NbZRd / 1e3,
    MbRd: worst.MbRd / 1e6, MczRd: worst.MczRd / 1e6, LcrY: worst.LcrY, LcrZ: worst.LcrZ,
    method: worst.method, combination: worst.combination, parts: worst.parts,
  }
}

function sameLifts(a: SizedColumn, b: SizedColumn): boolean {
  return a.lifts.length === b.lifts.length && a.lifts.every((lift, n) => lift.section === b.lifts[n]!.section)
}

function columnLoads(scheme: Scheme, gridX: NamedLine[], gridY: NamedLine[]): ColumnLoad[] {
  const { frame } = scheme.prepared
  const marks = columnMarks(frame.columns)
  return frame.columns.map((column, c): ColumnLoad => {
    const { base, lifts } = scheme.columns[c]!
    return {
      mark: marks[c]!, place: columnPlace(column, gridX, gridY), at: [column.x, column.y], section: lifts[0]!.section.designation,
      permanent: base.permanent / 1000, variable: base.variable / 1000, ultimate: base.ultimate / 1000,
    }
  })
}

function overrideWords(study: PreparedStudy): string[] {
  const { basis } = study.input
  const { overridden } = applyOverrides(nationalChoice(basis.nationalChoice), basis.overrides)
  return overridden.map(({ name, from, to }) => `${name}: ${to} instead of ${from}`)
}
