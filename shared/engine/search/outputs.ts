/** Outputs of a scheme beside its sizes: tie forces per beam line, surface to protect, pieces. */
import type { SchemeDetail } from '#shared/schemas/api'
import { type Piece, heaviestPiece, longestPiece, protectionArea } from '../quantities'
import type { NamedLine } from './naming'
import type { PreparedStudy } from './prepare'
import type { Scheme } from './schemes'
import { tieForceOf } from './sizer'

/** Largest tie force of each column line, kN (EN 1991-1-7 A.5.1), with the floor's own load. */
export function tieForces(study: PreparedStudy, scheme: Scheme, gridX: readonly NamedLine[], gridY: readonly NamedLine[]): SchemeDetail['tieForces'] {
  const { frame, model } = scheme.prepared
  const forces: SchemeDetail['tieForces'] = []
  for (const axis of ['x', 'y'] as const) {
    for (const { label, at } of axis === 'x' ? gridY : gridX) {
      const beams = frame.beams.filter(beam => beam.axis === axis && Math.abs(beam.at - at) < 0.5 && !beam.isTrimmer)
      for (const place of ['perimeter', 'internal'] as const) {
        const there = beams.filter(beam => beam.isOnOutline === (place === 'perimeter'))
        if (there.length === 0) continue
        forces.push({ line: label, axis, place, force: Math.max(...there.map(beam => tieForceOf(beam, model, study.sizer.rules.choice))) / 1000 })
      }
    }
  }
  return forces
}

export function pieceOutputs(scheme: Scheme): Pick<SchemeDetail, 'protectionArea' | 'heaviestPiece' | 'longestPiece'> {
  const { prepared: { frame, model }, sized, columns } = scheme
  const beams = frame.beams.map((beam, b): Piece => ({
    section: sized.sections[b]!.section, length: beam.to - beam.from, sides: beam.hasSlab ? 3 : 4,
  }))
  const height = model.plate.storeyHeight
  const lifts = columns.flatMap(column => column.lifts.map((lift): Piece => ({
    section: lift.section, length: (lift.toLevel - lift.fromLevel) * height, sides: 4,
  })))
  return {
    protectionArea: { beams: protectionArea(beams), columns: protectionArea(lifts) / model.plate.storeys },
    heaviestPiece: heaviestPiece([...beams, ...lifts]),
    longestPiece: longestPiece([...beams, ...lifts]),
  }
}
