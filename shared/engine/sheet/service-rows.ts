import { E } from '../materials'
import type { LoadParts } from '../members'
import { largestSag } from '../statics'
import type { Basics } from './basics'
import { factor, metres, mm, num, quantity, row } from './format'
import type { SheetGroup, SheetRow } from './types'

/** A row of deflection; `limit` undefined where the deflection is only a step to another result. */
interface DeflectionParts { check: string, loads: ServiceLoads, value: number, at: number, limit?: number | null, utilisation: number | null }

interface ServiceLoads { line: { from: number, to: number, q: number }[], point: { at: number, P: number }[] }

function serviceLoads({ beam, weight }: Basics, of: (load: LoadParts) => number, withOwnWeight: boolean): ServiceLoads {
  const line = beam.service.line.map(load => ({ from: load.from, to: load.to, q: of(load) })).filter(({ q }) => q > 0)
  const point = beam.service.point.map(load => ({ at: load.at, P: of(load) })).filter(({ P }) => P > 0)
  if (withOwnWeight && weight > 0) line.push({ from: 0, to: beam.span, q: weight })
  return { line, point }
}

/** All loads uniform over the whole span: their sum; null otherwise. */
function uniformLoad({ line, point }: ServiceLoads, span: number): number | null {
  if (point.length > 0 || line.some(({ from, to }) => from > 0 || to < span)) return null
  return line.reduce((sum, { q }) => sum + q, 0)
}

/**
 * "E I δ = c x − R x³/6 + …" with numbers in kN and m, so that it can be added up by hand. c, in kNm²,
 * comes from δ(L) = 0.
 */
function foeppl({ line, point }: ServiceLoads, span: number, at: number): { text: string, c: string } {
  const L = span / 1000
  const x = at / 1000
  const left = point.reduce((sum, { at: a, P }) => sum + P * (span - a) / span, 0) / 1000
    + line.reduce((sum, { from, to, q }) => sum + q * (to - from) * (span - (from + to) / 2) / span, 0) / 1000
  const cube = (place: number) => Math.max(0, place) ** 3
  const fourth = (place: number) => Math.max(0, place) ** 4
  const at6 = (place: number) => left * place ** 3 / 6
    - point.reduce((sum, { at: a, P }) => sum + P / 1000 * cube(place - a / 1000) / 6, 0)
    - line.reduce((sum, { from, to, q }) => sum + q * (fourth(place - from / 1000) - fourth(place - to / 1000)) / 24, 0)
  const c = at6(L) / L
  const terms = [`${num(c, 3)} × ${num(x, 3)}`, `− ${num(left, 3)} × ${num(x, 3)}^{3} / 6`]
  for (const { at: a, P } of point) if (a < at) terms.push(`+ ${num(P / 1000, 2)} × ${num(x - a / 1000, 3)}^{3} / 6`)
  for (const { from, to, q } of line) {
    if (from >= at) continue
    const tail = to < at ? ` − ${num(x - to / 1000, 3)}^{4}` : ''
    terms.push(`+ ${num(q, 3)} × (${num(x - from / 1000, 3)}^{4}${tail}) / 24`)
  }
  return { text: terms.join(' '), c: num(c, 3) }
}

function deflectionRow(basics: Basics, parts: DeflectionParts): SheetRow {
  const { span } = basics.beam
  const { value, at, limit, utilisation } = parts
  const EI = basics.resistances.EIy / 1e9
  const uniform = uniformLoad(parts.loads, span)
  const numbers = uniform !== null
    ? `5 × ${num(uniform, 3)} × ${num(span, 0)}^{4} / (384 × ${num(E, 0)} × ${num(basics.section.Iy / 1e4, 1)} × 10^{4})`
    : `[${foeppl(parts.loads, span, at).text}] × 10^{3} / ${num(EI, 1)}, E I in kNm^{2}`
  return row({
    clause: '7.2.1',
    check: parts.check,
    expression: uniform !== null
      ? 'δ = 5 w L^{4} / (384 E I_{y})'
      : 'E I_{y} δ(x) = c x − R x^{3}/6 + Σ P ⟨x − a⟩^{3}/6 + Σ w (⟨x − a⟩^{4} − ⟨x − b⟩^{4})/24, δ(L) = 0',
    substituted: `${numbers}; at ${metres(at)} m${limit ? `; limit span / ${num(limit, 0)} = ${num(span / limit, 2)}` : ''}`,
    effect: mm(value, limit === undefined ? 3 : 2),
    resistance: limit ? mm(span / limit) : limit === null ? 'no limit set' : null,
    utilisation,
  })
}

/** The deflection that the frequency is taken from. */
function vibratingRow(basics: Basics): SheetRow[] {
  const { verified, vibrating, rules: { limits: { variableShare: share } } } = basics
  if (verified.frequency === null) return []
  return [deflectionRow(basics, {
    check: `Deflection under G + ${factor(share)} Q${basics.weight > 0 ? ', own weight included' : ''}`,
    loads: serviceLoads(basics, load => load.permanent + share * load.variable, true),
    value: verified.frequencyDeflection,
    at: largestSag(basics.cases[0]!.x, vibrating).at,
    utilisation: null,
  })]
}

/** Deflection and frequency under characteristic loads. */
export function serviceGroup(basics: Basics): SheetGroup {
  const { verified, rules: { limits } } = basics
  const share = limits.variableShare
  return {
    title: 'Serviceability, characteristic',
    rows: [
      deflectionRow(basics, {
        check: 'Variable deflection',
        loads: serviceLoads(basics, load => load.variable, false),
        value: verified.deflection.variable,
        at: verified.deflection.atVariable,
        limit: limits.variable,
        utilisation: verified.utilisation.deflectionVariable,
      }),
      deflectionRow(basics, {
        check: basics.weight > 0 ? 'Total deflection, own weight included' : 'Total deflection',
        loads: serviceLoads(basics, load => load.permanent + load.variable, true),
        value: verified.deflection.total,
        at: verified.deflection.atTotal,
        limit: limits.total,
        utilisation: verified.utilisation.deflectionTotal,
      }),
      ...vibratingRow(basics),
      row({
        check: 'Frequency of the beam alone',
        expression: 'f_{1} = 18 / √δ',
        substituted: verified.frequency === null
          ? 'no load that vibrates'
          : `18 / √${num(verified.frequencyDeflection, 3)} mm under G + ${factor(share)} Q${limits.frequency === null ? '' : `; at least ${factor(limits.frequency)} Hz`}`,
        effect: verified.frequency === null ? null : quantity(verified.frequency, 'Hz', 2),
        resistance: limits.frequency === null ? 'no limit set' : quantity(limits.frequency, 'Hz', 1),
        utilisation: verified.utilisation.frequency,
      }),
    ],
  }
}
