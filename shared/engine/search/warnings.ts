/** What the trade would remark on a scheme, in words: remarks, not rejections. */
import { CHOICE_CODES, nationalChoice } from '../actions'
import { type NamedLine, beamPlace } from './naming'
import type { PreparedStudy } from './prepare'
import type { Scheme } from './schemes'

/** Pieces longer than this are warned of (common practice, no source). */
const LONG_PIECE = 15_000
/** More different sections than this make ordering and detailing dear (common practice, no source). */
const MANY_SECTIONS = 8

export function warningsOf(study: PreparedStudy, scheme: Scheme, gridX: NamedLine[], gridY: NamedLine[]): string[] {
  return [
    ...longPieces(scheme, gridX, gridY), ...deepSecondaries(scheme, gridX, gridY), ...manySections(scheme), ...fromMemory(study),
  ]
}

function longPieces({ prepared: { frame } }: Scheme, gridX: NamedLine[], gridY: NamedLine[]): string[] {
  const long = frame.beams.filter(beam => beam.to - beam.from > LONG_PIECE)
  if (long.length === 0) return []
  const longest = long.reduce((a, b) => b.to - b.from > a.to - a.from ? b : a)
  return [`${long.length} ${long.length === 1 ? 'piece is' : 'pieces are'} longer than 15 m, the longest ${((longest.to - longest.from) / 1000).toFixed(2)} m at ${beamPlace(longest, gridX, gridY)}.`]
}

function deepSecondaries({ prepared: { frame }, sized }: Scheme, gridX: NamedLine[], gridY: NamedLine[]): string[] {
  const words: string[] = []
  let deeper = 0
  let equal = 0
  frame.beams.forEach((beam, high) => {
    for (const { beam: low } of beam.carries) {
      const difference = sized.sections[low]!.section.h - sized.sections[high]!.section.h
      if (difference > 0 && deeper++ === 0) {
        words.push(`The beam at ${beamPlace(frame.beams[low]!, gridX, gridY)} is deeper than the beam at ${beamPlace(beam, gridX, gridY)} that carries it.`)
      } else if (difference === 0) {
        equal++
      }
    }
  })
  if (deeper > 1) words.push(`${deeper} beam ends in all are deeper than the beam that carries them.`)
  if (equal > 0) words.push(`${equal} beam ends are as deep as the beam that carries them: they need a notch at both flanges.`)
  return words
}

function manySections({ sized, columns }: Scheme): string[] {
  const count = new Set([
    ...sized.sections.map(s => s.section.designation), ...columns.flatMap(c => c.lifts.map(l => l.section.designation)),
  ]).size
  return count > MANY_SECTIONS ? [`${count} different sections; up to ${MANY_SECTIONS} on a floor are common practice.`] : []
}

function fromMemory(study: PreparedStudy): string[] {
  const code = study.input.basis.nationalChoice
  if (!CHOICE_CODES.includes(code)) return []
  const { sources } = nationalChoice(code)
  const count = Object.values(sources).filter(source => source.status === 'from-memory').length
  return count > 0 ? [`${count} values of the national choices ${code} are from memory: confirm them against the national annex in force.`] : []
}
