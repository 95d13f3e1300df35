import type { LoadCase, LoadParts } from '../members'
import type { Basics, CaseBasics } from './basics'
import { factor, kN, kNm, metres, num, quantity, row } from './format'
import type { SheetContext, SheetGroup, SheetLineLoad, SheetPointLoad, SheetRow } from './types'

/** Design loads of one case, own weight as a line load of its own. N, mm. */
export interface DesignLoads {
  line: { from: number, to: number, q: number }[]
  point: { at: number, P: number }[]
}

export function loadCaseOf({ beam, cases }: Basics, of: CaseBasics): LoadCase {
  if (of.verified.stage === 'service') return beam.service
  const services = cases.filter(other => other.verified.stage === 'service').length
  return beam.construction[cases.indexOf(of) - services]!
}

function designValue({ factors }: CaseBasics['combination'], load: LoadParts): number {
  return factors.permanent * load.permanent + factors.variable * load.variable + factors.accompanying * load.accompanying
}

export function designLoads(basics: Basics, of: CaseBasics): DesignLoads {
  const { line, point } = loadCaseOf(basics, of)
  const loads: DesignLoads = {
    line: line.map(load => ({ from: load.from, to: load.to, q: designValue(of.combination, load) })),
    point: point.map(load => ({ at: load.at, P: designValue(of.combination, load) })),
  }
  if (basics.weight > 0) {
    loads.line.push({ from: 0, to: basics.beam.span, q: of.combination.factors.permanent * basics.weight })
  }
  return loads
}

/** Loads as the drawing shows them, kN/m and kN. */
export function drawnLoads(basics: Basics): { line: SheetLineLoad[], point: SheetPointLoad[] } {
  const { line, point } = basics.beam.service
  const { combination } = basics.shown
  return {
    line: line.map(load => ({
      from: load.from, to: load.to, value: designValue(combination, load),
      permanent: load.permanent, variable: load.variable, height: load.height,
    })),
    point: point.map(load => ({
      at: load.at, value: designValue(combination, load) / 1000,
      permanent: load.permanent / 1000, variable: load.variable / 1000, height: load.height,
    })),
  }
}

const SYMBOLS = {
  '6.10': 'γ_{G} G + γ_{Q} Q',
  '6.10a': 'γ_{G} G + γ_{Q} ψ_{0} Q',
  '6.10b': 'ξ γ_{G} G + γ_{Q} Q',
} as const

/** "1.35 × 3.10 + 1.5 × 2.00" of one load in its own unit. */
function substitutedLoad({ rules }: Basics, of: CaseBasics, load: LoadParts, scale: number, digits: number): string {
  const { gammaG, gammaQ, xi } = rules.choice
  const G = num(load.permanent / scale, digits)
  const Q = num(load.variable / scale, digits)
  switch (of.combination.factors.name) {
    case '6.10': return `${factor(gammaG)} × ${G} + ${factor(gammaQ)} × ${Q}`
    case '6.10a': return `${factor(gammaG)} × ${G} + ${factor(gammaQ)} × ${factor(load.variable > 0 ? load.accompanying / load.variable : 0)} × ${Q}`
    case '6.10b': return `${factor(xi)} × ${factor(gammaG)} × ${G} + ${factor(gammaQ)} × ${Q}`
  }
}

function sameParts(a: LoadParts, b: LoadParts): boolean {
  const near = (p: number, q: number) => Math.abs(p - q) <= 1e-9 * Math.max(1, Math.abs(p))
  return near(a.permanent, b.permanent) && near(a.variable, b.variable) && near(a.accompanying, b.accompanying)
}

function lineRows(basics: Basics, of: CaseBasics, names: readonly string[]): SheetRow[] {
  const { line } = loadCaseOf(basics, of)
  return line.map((load, i) => {
    const whole = load.from === 0 && load.to === basics.beam.span
    const place = whole ? '' : `, ${metres(load.from)} to ${metres(load.to)} m`
    return row({
      clause: of.combination.factors.name,
      check: (names[i] ?? 'Line load') + place,
      expression: `w = ${SYMBOLS[of.combination.factors.name]}`,
      substituted: substitutedLoad(basics, of, load, 1, 3),
      resistance: quantity(designValue(of.combination, load), 'kN/m', 3),
    })
  })
}

/** Point loads; equal ones share a row. */
function pointRows(basics: Basics, of: CaseBasics, names: readonly string[]): SheetRow[] {
  const { point } = loadCaseOf(basics, of)
  const groups: number[][] = []
  point.forEach((load, i) => {
    const group = groups.find(([first]) => sameParts(point[first!]!, load) && (names[first!] ?? '') === (names[i] ?? ''))
    if (group) group.push(i)
    else groups.push([i])
  })
  return groups.map((group) => {
    const load = point[group[0]!]!
    const places = group.map(i => metres(point[i]!.at)).join(', ')
    return row({
      clause: of.combination.factors.name,
      check: `${names[group[0]!] ?? 'Point load'} at ${places} m${group.length > 1 ? ', each' : ''}`,
      expression: `P = ${SYMBOLS[of.combination.factors.name]}`,
      substituted: substitutedLoad(basics, of, load, 1000, 2),
      resistance: kN(designValue(of.combination, load)),
    })
  })
}

function ownWeightRow(basics: Basics, of: CaseBasics): SheetRow[] {
  if (basics.weight === 0) return []
  const { gammaG, xi } = basics.rules.choice
  const isB = of.combination.factors.name === '6.10b'
  return [row({
    check: 'Own weight',
    expression: isB ? 'w_{0} = ξ γ_{G} m g' : 'w_{0} = γ_{G} m g',
    substituted: `${isB ? `${factor(xi)} × ` : ''}${factor(gammaG)} × ${num(basics.section.mass, 1)} × 9.81 / 1000`,
    resistance: quantity(of.combination.factors.permanent * basics.weight, 'kN/m', 3),
  })]
}

/** R of the left support from every load: Σ P (L − a)/L + Σ w l (L − m)/L. */
function reactionRow(basics: Basics, of: CaseBasics, loads: DesignLoads): SheetRow {
  const L = basics.beam.span
  const terms = [
    ...loads.point.filter(load => load.P > 0).map(({ at, P }) => `${num(P / 1000, 2)} × ${metres(L - at, 3)}`),
    ...loads.line.filter(load => load.q > 0).map(({ from, to, q }) =>
      `${num(q, 3)} × ${metres(to - from, 3)} × ${metres(L - (from + to) / 2, 3)}`),
  ]
  return row({
    check: 'Reaction, left',
    expression: 'R_{A} = [Σ P (L − a) + Σ w l (L − m)] / L',
    substituted: terms.length ? `[${terms.join(' + ')}] / ${metres(L, 3)}` : '0',
    resistance: kN(of.total.left),
  })
}

/** MEd at its place: R x − Σ P (x − a) − Σ w l lever. */
function momentRow(of: CaseBasics, loads: DesignLoads): SheetRow {
  const at = of.verified.MEdAt
  const terms = [
    ...loads.point.filter(load => load.P > 0 && load.at < at).map(({ at: a, P }) => `${num(P / 1000, 2)} × ${metres(at - a, 3)}`),
    ...loads.line.filter(load => load.q > 0 && load.from < at).map(({ from, to, q }) => {
      const end = Math.min(to, at)
      return `${num(q, 3)} × ${metres(end - from, 3)} × ${metres(at - (from + end) / 2, 3)}`
    }),
  ]
  return row({
    check: `Largest moment, at ${metres(at)} m`,
    expression: 'M_{Ed} = R_{A} x − Σ P (x − a) − Σ w l (x − m)',
    substituted: [`${num(of.total.left / 1000, 2)} × ${metres(at, 3)}`, ...terms].join(' − '),
    resistance: kNm(of.verified.MEd),
  })
}

/** Loads, reaction, moment and shear of one case. */
export function loadsGroup(basics: Basics, of: CaseBasics, context: SheetContext, title: string): SheetGroup {
  const loads = designLoads(basics, of)
  const names = of.verified.stage === 'service' ? context.loadNames : undefined
  return {
    title,
    rows: [
      ...lineRows(basics, of, names?.line ?? []),
      ...pointRows(basics, of, names?.point ?? []),
      ...ownWeightRow(basics, of),
      reactionRow(basics, of, loads),
      momentRow(of, loads),
      row({
        check: 'Largest shear',
        expression: 'V_{Ed}',
        substituted: shearWords(of),
        resistance: kN(of.verified.VEd),
      }),
    ],
  }
}

function shearWords(of: CaseBasics): string {
  const total = of.total.left + of.total.right
  const right = of.total.right
  return Math.abs(of.verified.VEd - of.total.left) < 1e-9 * total
    ? 'R_{A}'
    : Math.abs(of.verified.VEd - right) < 1e-9 * total
      ? `R_{B} = Σ P + Σ w l − R_{A} = ${num(total / 1000, 2)} − ${num(of.total.left / 1000, 2)}`
      : 'the reaction less the load that stands on the support itself'
}
