/**
 * Section checks of the engine beside the same checks written plainly, without anything kept; the cost
 * of one eigenvalue of lateral-torsional buckling. Prints ratios: absolute times drift with the machine.
 */
import { nationalChoice } from '#shared/engine/actions'
import { buildMesh, criticalFactor } from '#shared/engine/ec3'
import { lightestSections, resistancesOf, verifyBeam } from '#shared/engine/members'
import type { Beam, BeamRules } from '#shared/engine/members'
import { lightestPrepared, sizeUp } from '#shared/engine/members/lightest'
import { prepareBeam } from '#shared/engine/members/prepare'
import { sectionsOf } from '#shared/engine/sections'
import type { Section } from '#shared/engine/sections'

const SPAN = 9000
const rules: BeamRules = {
  choice: nationalChoice('UK'), combination: '6.10', criticalMoment: 'by-segment', ltbMethod: '6.3.2.3', useF: false,
  limits: { variable: 360, total: 200, frequency: null, variableShare: 0.1 }, utilisationLimit: 1,
}
const uniform = { from: 0, to: SPAN, permanent: 12, variable: 10, accompanying: 7, height: 'shear-centre' as const }
const point = (at: number) => ({ at, permanent: 42e3, variable: 55e3, accompanying: 38.5e3, height: 'shear-centre' as const })
const of = (service: Omit<Beam['service'], 'name'>): Beam => ({ span: SPAN, selfWeight: true, service: { name: 'in service', ...service }, construction: [] })

const beams: [string, Beam][] = [
  ['held along its length', of({ line: [uniform], point: [], restraint: { held: [{ from: 0, to: SPAN }], points: [] } })],
  ['held at two secondaries', of({ line: [], point: [point(3000), point(6000)], restraint: { held: [], points: [3000, 6000] } })],
  ['free, load on the top flange', of({ line: [{ ...uniform, permanent: 4, variable: 4, height: 'top' }], point: [], restraint: { held: [], points: [] } })],
]
const family = sectionsOf(['UB'])

/** Best of some rounds, µs a call. */
function timed(calls: number, run: () => void): number {
  let best = Infinity
  for (let round = 0; round < 7; round++) {
    const start = performance.now()
    for (let i = 0; i < calls; i++) run()
    best = Math.min(best, (performance.now() - start) / calls * 1000)
  }
  return best
}

/** The lightest section by verifying each in turn, nothing kept between sections. */
function plainLightest(beam: Beam, candidates: readonly Section[]): Section | undefined {
  return candidates.find(section => verifyBeam(beam, section, 'S355', rules).passes)
}

function line(what: string, value: number, unit: string, beside = ''): void {
  process.stdout.write(`${what.padEnd(58)} ${value.toFixed(value < 10 ? 2 : 1).padStart(10)} ${unit.padEnd(8)} ${beside}\n`)
}

for (const [name, beam] of beams) {
  const prepared = prepareBeam(beam, rules)
  const quick = lightestSections(beam, family, 'S355', rules)[0]?.section
  const plain = plainLightest(beam, family)
  if (quick !== plain) throw new Error(`Different sections for a beam ${name}.`)
  process.stdout.write(`\nBeam ${name}: ${quick?.designation ?? 'none passes'}\n`)
  const plainTime = timed(20, () => plainLightest(beam, family))
  const wholeTime = timed(500, () => lightestSections(beam, family, 'S355', rules))
  const keptTime = timed(1000, () => lightestPrepared(prepared, family, 'S355', rules))
  line('lightest of 107, each verified plainly', plainTime, 'µs')
  line('staircase of 107, beam prepared each time', wholeTime, 'µs', `${(plainTime / wholeTime).toFixed(0)} times quicker`)
  line('staircase of 107, beam prepared before', keptTime, 'µs', `${(plainTime / keptTime).toFixed(0)} times quicker`)
  const kept = family.map(section => resistancesOf(section, 'S355', rules.choice)!)
  const each = timed(300, () => {
    for (const resistances of kept) sizeUp(prepared, resistances, rules)
  }) / family.length
  const eachPlain = timed(3, () => {
    for (const section of family) verifyBeam(beam, section, 'S355', rules)
  }) / family.length
  line('one section check of 107, to its verdict', each * 1000, 'ns', `${(1 / each).toFixed(2)} million a second`)
  line('one section check, written plainly', eachPlain * 1000, 'ns', `${(eachPlain / each).toFixed(0)} times slower`)
}

process.stdout.write('\nElastic critical moment\n')
for (const [name, places, inside] of [
  ['one segment, uniform load', [0, SPAN], false],
  ['one segment, three loads inside', [0, 2250, 4500, 6750, SPAN], false],
  ['whole beam with three restraints', [0, 2250, 4500, 6750, SPAN], true],
] as const) {
  const held = places.map((_, i) => inside && i > 0 && i < places.length - 1 ? 1 : 0)
  const mesh = buildMesh(places, 0, places.length - 1, held)
  const loads = {
    M: places.map(x => 10 * x * (SPAN - x) / 2), V: places.map(x => 10 * (SPAN / 2 - x)), q: places.map(() => 10),
    qTop: places.map(() => 10), PTop: places.map(() => 0),
  }
  let i = 0
  const time = timed(400, () => {
    const { h, Iz, It, Iw } = family[i++ % family.length]!
    criticalFactor(mesh, loads, h / 2, 210_000 * Iz, 81_000 * It, 210_000 * Iw)
  })
  line(`one eigenvalue: ${name}`, time, 'µs')
}
