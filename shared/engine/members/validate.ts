import { EngineError } from '../errors'
import { GRADES } from '../materials'
import type { Grade } from '../materials'
import type { Beam, BeamRules, LoadCase, LoadParts, Restraint } from './types'

/** N, mm, N/mm: larger figures are slips of the pen, and their squares would leave the range of numbers. */
const LARGEST = 1e12
/** mm */
const SHORTEST_SPAN = 1
/** More points that hold a beam are a slip too; the eigenvalue of a whole beam takes their number to the third power. */
const MOST_RESTRAINTS = 200

function finite(value: number, path: string): void {
  if (typeof value !== 'number' || !Number.isFinite(value)) {
    throw new EngineError('not-a-number', 'This must be a finite number.', path)
  }
  if (Math.abs(value) > LARGEST) throw new EngineError('out-of-range', 'This number is too large.', path)
}

function positive(value: number, path: string): void {
  finite(value, path)
  if (value <= 0) throw new EngineError('not-positive', 'This must be greater than 0.', path)
}

function within(value: number, span: number, path: string): void {
  finite(value, path)
  if (value < 0 || value > span) {
    throw new EngineError('outside-span', `This place, ${value} mm, lies outside the beam of 0 to ${span} mm.`, path)
  }
}

function parts(load: LoadParts, path: string): void {
  for (const key of ['permanent', 'variable', 'accompanying'] as const) {
    finite(load[key], `${path}.${key}`)
    if (load[key] < 0) throw new EngineError('negative', 'A load acts downwards: it must not be negative.', `${path}.${key}`)
  }
}

function restraint({ held, points }: Restraint, span: number, path: string): void {
  let last = 0
  held.forEach((stretch, i) => {
    within(stretch.from, span, `${path}.held[${i}].from`)
    within(stretch.to, span, `${path}.held[${i}].to`)
    if (stretch.to <= stretch.from) throw new EngineError('empty-stretch', 'A held stretch must end after its start.', `${path}.held[${i}].to`)
    if (stretch.from < last) throw new EngineError('overlap', 'Held stretches must rise and not overlap.', `${path}.held[${i}].from`)
    last = stretch.to
  })
  if (points.length > MOST_RESTRAINTS) {
    throw new EngineError('too-many', `A beam is held at no more than ${MOST_RESTRAINTS} points.`, `${path}.points`)
  }
  points.forEach((at, i) => within(at, span, `${path}.points[${i}]`))
}

function loadCase(value: LoadCase, span: number, path: string): void {
  value.line.forEach((load, i) => {
    const at = `${path}.line[${i}]`
    within(load.from, span, `${at}.from`)
    within(load.to, span, `${at}.to`)
    if (load.to <= load.from) throw new EngineError('empty-stretch', 'A line load must end after its start.', `${at}.to`)
    parts(load, at)
  })
  value.point.forEach((load, i) => {
    within(load.at, span, `${path}.point[${i}].at`)
    parts(load, `${path}.point[${i}]`)
  })
  restraint(value.restraint, span, `${path}.restraint`)
}

/** Throws an EngineError that names the first value no beam can have. */
export function validateBeam(beam: Beam): void {
  positive(beam.span, 'span')
  if (beam.span < SHORTEST_SPAN) throw new EngineError('out-of-range', `A beam is at least ${SHORTEST_SPAN} mm long.`, 'span')
  loadCase(beam.service, beam.span, 'service')
  beam.construction.forEach((value, i) => loadCase(value, beam.span, `construction[${i}]`))
}

/** Throws an EngineError that names the first value no rules can have. */
export function validateRules(rules: BeamRules, grade: Grade): void {
  if (!GRADES.includes(grade)) throw new EngineError('unknown-grade', `There is no grade "${String(grade)}".`, 'grade')
  const { limits } = rules
  for (const key of ['variable', 'total', 'frequency'] as const) {
    const value = limits[key]
    if (value !== null) positive(value, `limits.${key}`)
  }
  finite(limits.variableShare, 'limits.variableShare')
  if (limits.variableShare < 0 || limits.variableShare > 1) {
    throw new EngineError('out-of-range', 'The share of variable load lies between 0 and 1.', 'limits.variableShare')
  }
  positive(rules.utilisationLimit, 'utilisationLimit')
}
