/** The whole study in one call, as `headless study` gives it. */
import type { SchemeRow } from '#shared/schemas/api'
import type { SchemeMember, SchemeResult, StudyInput, StudyResult } from '#shared/schemas/study'
import { endsOf } from './detail'
import { beamMarks, columnMarks } from './naming'
import { type PreparedStudy, prepareStudy } from './prepare'
import { rebuildScheme } from './rebuild'
import { placeOfRejection } from './rejectionPlace'
import { examineRange, rankRows } from './study'

/** Arrangements left out that are told one by one; the counts have them all. */
const TOLD_LEFT_OUT = 20

/** @throws EngineError where the plate cannot be framed or the range is no range. */
export function study(input: StudyInput): StudyResult {
  const prepared = prepareStudy(input)
  const leftOut: StudyResult['leftOut'] = []
  const part = examineRange(prepared, 0, prepared.total, {
    onLeftOut(number, { rejection, detail }) {
      if (leftOut.length >= TOLD_LEFT_OUT) return
      leftOut.push({ number, rejection, detail, place: placeOfRejection(prepared, prepared.arrangements.at(number), rejection) })
    },
  })
  const rows = rankRows(part)
  return {
    counts: { ...part.counts, range: prepared.total },
    schemes: rows.map(row => schemeResult(prepared, row)),
    leftOut,
    tradeOff: rows.filter(row => row.onTradeOffLine).map(row => row.rank),
  }
}

function schemeResult(prepared: PreparedStudy, row: SchemeRow): SchemeResult {
  const scheme = rebuildScheme(prepared, row.key)
  const { frame } = scheme.prepared
  const { plate, range } = prepared.input
  const marks = beamMarks(frame.beams)
  const columns = columnMarks(frame.columns)
  const beams = frame.beams.map((beam, b): SchemeMember => {
    const { section, governing, utilisation } = scheme.sized.sections[b]!
    const [from, to] = endsOf(beam)
    return { mark: marks[b]!, kind: beam.kind, from, to, section: section.designation, governing, utilisation }
  })
  const stanchions = frame.columns.map((column, c): SchemeMember => {
    const { lifts, base } = scheme.columns[c]!
    return {
      mark: columns[c]!, kind: 'column', at: [column.x, column.y], section: lifts[0]!.section.designation,
      governing: 'stability', utilisation: Math.max(...lifts.map(lift => lift.utilisation)),
      lifts: lifts.map(({ fromLevel, toLevel, section, utilisation }) => ({ fromLevel, toLevel, section: section.designation, utilisation })),
      base: { permanent: base.permanent / 1000, variable: base.variable / 1000, ultimate: base.ultimate / 1000 },
    }
  })
  const { rank, number, baysX, baysY, primaryDirection, divisions, depthCap, beamMass, columnMass, mass, massPerArea, depth, pieces, distinctSections } = row
  return {
    rank, number, baysX, baysY, primaryDirection, divisions,
    ...(plate.regions.length > 0 && {
      regions: plate.regions.map(({ name }, r) => ({
        name, primaryDirection: scheme.arrangement.regions[r]!.direction, divisions: scheme.arrangement.regions[r]!.divisions,
      })),
    }),
    ...(range.slabs && { slab: row.slab }),
    depthCap, beamMass, columnMass, mass, massPerArea, depth, pieces, distinctSections,
    members: [...beams, ...stanchions], residual: scheme.residual,
  }
}
