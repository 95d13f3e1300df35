/** "Why not this one?": for any arrangement what excluded it, or what beats it and by how much. */
import type { SchemeRow } from '#shared/schemas/api'
import type { Direction, Rejection } from '#shared/schemas/study'
import { EngineError } from '../errors'
import type { RegionFraming } from '../framing'
import { grams } from '../quantities'
import type { NumberedArrangement } from './arrangements'
import type { LayoutPlace } from './layoutPlace'
import { schemesOffered } from './offered'
import type { PreparedStudy } from './prepare'
import { placeOfRejection } from './rejectionPlace'
import { differences, schemeRow } from './rows'
import { emptyFront } from './schemes'

/** An arrangement by its number, or all that have these bays (mm), direction, divisions and slab system. */
export interface ArrangementQuestion {
  number?: number
  baysX?: readonly number[]
  baysY?: readonly number[]
  primaryDirection?: Direction
  divisions?: number
  slab?: number
}

/** A kept scheme that is at most as heavy and as deep, one of them less. */
export interface BeatenBy {
  key: string
  number: number
  massPerArea: number
  depth: number
  /** kg/m² and mm less. */
  lighter: number
  shallower: number
}

export interface AnsweredScheme {
  key: string
  massPerArea: number
  depth: number
  /** The lightest first; empty: it is on the trade-off line. */
  beatenBy: BeatenBy[]
}

export interface AnsweredArrangement {
  number: number
  baysX: number[]
  baysY: number[]
  regions: RegionFraming[]
  slab: number
  /** null where it gives schemes. `place` in grid words where one member or bay is to blame, else null. */
  rejected: { rejection: Rejection, detail: string, place: string | null } | null
  schemes: AnsweredScheme[]
}

export type WhyNot
  = { kind: 'outside', detail: string, path: string }
    | { kind: 'inside', matching: number, arrangements: AnsweredArrangement[] }

/** Arrangements that one question has answered; what matches beyond is counted. */
export const MOST_ANSWERS = 24
/** Schemes named against one. */
const MOST_NAMED = 3

/** @param rows the kept schemes of the study, ranked */
export function whyNot(study: PreparedStudy, question: ArrangementQuestion, rows: readonly SchemeRow[]): WhyNot {
  const numbers = numbersAsked(study, question)
  if ('detail' in numbers) return { kind: 'outside', ...numbers }
  const asked = Array.from({ length: Math.min(MOST_ANSWERS, numbers.matching) }, (_, n) => numbers.at(n))
  return { kind: 'inside', matching: numbers.matching, arrangements: asked.map(number => answered(study, study.arrangements.at(number), rows)) }
}

interface Outside { detail: string, path: string }
interface Numbers { matching: number, at: (n: number) => number }

function numbersAsked(study: PreparedStudy, question: ArrangementQuestion): Numbers | Outside {
  const { number } = question
  if (number !== undefined) {
    if (!Number.isInteger(number) || number < 1) throw new EngineError('out-of-range', 'Arrangements are numbered from 1.', 'number')
    if (number > study.total) return { detail: `The range holds ${study.total} arrangements; there is no number ${number}.`, path: 'number' }
    return { matching: 1, at: () => number }
  }
  const { x, y, framings, count } = study.arrangements
  const placeX = layoutAsked(x, question.baysX)
  if (placeX && 'reason' in placeX) return { detail: placeX.reason, path: 'range.x' }
  const placeY = layoutAsked(y, question.baysY)
  if (placeY && 'reason' in placeY) return { detail: placeY.reason, path: 'range.y' }
  const outside = outsideFraming(study, question)
  if (outside) return outside
  const digits = [
    placeX ? [placeX.index] : upTo(x.count),
    placeY ? [placeY.index] : upTo(y.count),
    ...framings.map(list => list.flatMap((framing, n) => isAsked(framing, question) ? [n] : [])),
    question.slab === undefined ? upTo(count.slabs) : [question.slab],
  ]
  const sizes = [x.count, y.count, ...framings.map(list => list.length), count.slabs]
  return { matching: digits.reduce((product, list) => product * list.length, 1), at: n => numberAt(digits, sizes, n) }
}

function upTo(count: number): number[] {
  return Array.from({ length: count }, (_, n) => n)
}

function layoutAsked(layouts: PreparedStudy['arrangements']['x'], bays: readonly number[] | undefined): LayoutPlace | null {
  if (!bays) return null
  const lines = [layouts.ends[0]]
  for (const bay of bays) lines.push(lines[lines.length - 1]! + bay)
  return layouts.find(lines)
}

function isAsked(framing: RegionFraming, { primaryDirection, divisions }: ArrangementQuestion): boolean {
  return (primaryDirection ?? framing.direction) === framing.direction && (divisions ?? framing.divisions) === framing.divisions
}

function outsideFraming({ arrangements: { framings, count } }: PreparedStudy, question: ArrangementQuestion): Outside | null {
  const { primaryDirection, divisions, slab } = question
  if (framings.some(list => !list.some(framing => isAsked(framing, { primaryDirection })))) {
    return { detail: `Primary beams along ${primaryDirection} are not in the range.`, path: 'range.primaryDirections' }
  }
  if (framings.some(list => !list.some(framing => isAsked(framing, { divisions })))) {
    return { detail: `${divisions} divisions are not in the range.`, path: 'range.divisions' }
  }
  if (slab !== undefined && (slab < 0 || slab >= count.slabs)) {
    return { detail: `The range has ${count.slabs === 1 ? 'one slab system' : `${count.slabs} slab systems`}; there is none with index ${slab}.`, path: 'range.slabs' }
  }
  return null
}

/** The n-th combination as an arrangement's number, from 1; the last digit runs fastest. */
function numberAt(digits: readonly (readonly number[])[], sizes: readonly number[], n: number): number {
  let rest = n
  let number = 0
  let step = 1
  for (let d = digits.length - 1; d >= 0; d--) {
    const list = digits[d]!
    number += list[rest % list.length]! * step
    rest = Math.floor(rest / list.length)
    step *= sizes[d]!
  }
  return number + 1
}

function answered(study: PreparedStudy, arrangement: NumberedArrangement, rows: readonly SchemeRow[]): AnsweredArrangement {
  const { number, slab, regions, grid } = arrangement
  const place = { number, slab, regions, baysX: differences(grid.xs), baysY: differences(grid.ys) }
  const found = schemesOffered(study, arrangement, emptyFront())
  if (!Array.isArray(found)) {
    return { ...place, rejected: { ...found, place: placeOfRejection(study, arrangement, found.rejection) }, schemes: [] }
  }
  const schemes = found.map((scheme): AnsweredScheme => {
    const row = schemeRow(study, scheme)
    return { key: row.key, massPerArea: row.massPerArea, depth: row.depth, beatenBy: beaters(row, rows) }
  })
  return { ...place, rejected: null, schemes }
}

function beaters(row: SchemeRow, rows: readonly SchemeRow[]): BeatenBy[] {
  return rows
    .filter(other => grams(other.mass) <= grams(row.mass) && other.depth <= row.depth && (grams(other.mass) < grams(row.mass) || other.depth < row.depth))
    .sort((a, b) => grams(a.mass) - grams(b.mass) || a.depth - b.depth || a.number - b.number)
    .slice(0, MOST_NAMED)
    .map(({ key, number, massPerArea, depth }) => ({
      key, number, massPerArea, depth, lighter: row.massPerArea - massPerArea, shallower: row.depth - depth,
    }))
}
