/**
 * Arrangements examined with what is kept between them beside the same with nothing kept; a choice of
 * few sections beside the integer programme. CPU time of one run, and ratios: absolute times drift.
 */
import { examineRange, prepareStudy, priceOfRepetition } from '#shared/engine/search'
import { type SelectionProblem, leastMassSelection } from '#shared/engine/selection'
import { BasisSchema } from '#shared/schemas/basis'
import { PlateSchema } from '#shared/schemas/plate'
import { type StudyInput, StudyInputSchema } from '#shared/schemas/study'
import { proposeSections, rowsOf } from '#shared/optimise'

const plate = PlateSchema.parse({
  format: 'baywright-plate', version: 1, name: 'Office',
  gridX: [0, 9, 18, 27, 36, 45, 54].map((at, n) => ({ label: String(n + 1), at: at * 1000 })),
  gridY: [0, 7.5, 15, 21, 28.5, 36].map((at, n) => ({ label: 'ABCDEF'[n]!, at: at * 1000 })),
  outline: [[0, 0], [54_000, 0], [54_000, 36_000], [0, 36_000]],
  slab: { system: 'deck', depth: 130, weight: 2.75, maxSpan: 3300 },
  floorLoad: { permanent: 3.6, variable: 3.8, category: 'B' },
  lineLoads: [{ name: 'Curtain wall', on: 'outline', permanent: 4, variable: 0 }],
  storeys: 4, storeyHeight: 4000, roof: { permanent: 4, variable: 0.75 },
})
const basis = BasisSchema.parse({
  nationalChoice: 'UK', combination: '6.10', criticalMoment: 'by-segment', ltbMethod: '6.3.2.3', useF: false, constructionStage: true,
  secondary: { grade: 'S355', families: ['UB'] }, primary: { grade: 'S355', families: ['UB'] }, column: { grade: 'S355', families: ['UC'] },
  limits: { variable: 360, total: 200, frequency: 3, variableShare: 0.1 },
  buildability: { secondaryNotDeeper: false, minFlangeWidth: null, maxPiece: null }, connectionAllowance: 0.1,
})
const inputOf = (most: number | null): StudyInput => StudyInputSchema.parse({
  plate, basis, range: {
    x: { kind: 'module', module: 1500, min: 7500, max: 12_000 }, y: { kind: 'equal', min: 6000, max: 9000 },
    primaryDirections: ['x', 'y'], divisions: [1, 2, 3, 4], depthCap: null, maxDistinctSections: most,
  },
})

/** ms of CPU time. */
function cpu(run: () => void): number {
  const before = process.cpuUsage()
  run()
  const { user, system } = process.cpuUsage(before)
  return (user + system) / 1000
}

function line(what: string, value: number, unit: string, beside = ''): void {
  process.stdout.write(`${what.padEnd(66)} ${value.toFixed(value < 10 ? 2 : 0).padStart(8)} ${unit.padEnd(5)} ${beside}\n`)
}

const SAMPLE = 48
const study = prepareStudy(inputOf(null))
process.stdout.write(`Office of 54 × 36 m, ${study.total} arrangements\n`)
examineRange(prepareStudy(inputOf(null)), 0, SAMPLE)
const bare = cpu(() => {
  for (let n = 0; n < SAMPLE; n++) examineRange(prepareStudy(inputOf(null)), n, n + 1)
}) / SAMPLE
const whole = cpu(() => examineRange(study, 0, study.total)) / study.total
const again = cpu(() => examineRange(study, 0, study.total)) / study.total
line('an arrangement with nothing kept from others', bare, 'ms')
line('an arrangement of the whole study', whole, 'ms', `${(bare / whole).toFixed(0)} times quicker`)
line('an arrangement once all its beams are known', again, 'ms', `${(bare / again).toFixed(0)} times quicker: framing and taking down loads, no sizing`)
const few = prepareStudy(inputOf(6))
const limited = cpu(() => examineRange(few, 0, SAMPLE)) / SAMPLE
line('an arrangement with at most 6 different sections', limited, 'ms', `${(limited / bare).toFixed(1)} times one with nothing kept`)
const { steps } = priceOfRepetition(study, '46', 'plate')
line('price of repetition, K = 2 to 8', cpu(() => priceOfRepetition(study, '46', 'plate')), 'ms', `${steps.filter(step => step.status === 'optimal').length} of ${steps.length} proved`)

/** Pseudo-random numbers of a fixed seed, 0 … 1. */
function numbers(seed: number): () => number {
  let state = seed
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0
    return state / 2 ** 32
  }
}

/** Groups that ask for a strength, a stiffness and a depth of sections that have them in different measure. */
function made(groups: number, sections: number, next: () => number): SelectionProblem {
  const offered = Array.from({ length: sections }, () => {
    const mass = 15 + next() * 300
    return { mass, strength: mass * (0.7 + next() * 0.8), stiffness: mass * (0.5 + next() * 1.2) }
  }).sort((a, b) => a.mass - b.mass)
  return {
    masses: offered.map(({ mass }) => Math.round(mass * 10) / 10),
    groups: Array.from({ length: groups }, () => {
      const [strength, stiffness] = [20 + next() * 150, next() < 0.5 ? 0 : 15 + next() * 120]
      return { weight: 5 + next() * 400, passing: offered.flatMap((s, n) => s.strength >= strength && s.stiffness >= stiffness ? [n] : []) }
    }).filter(group => group.passing.length > 0),
  }
}

const next = numbers(11)
const large = Array.from({ length: 30 }, () => made(200, 180, next))
const times = large.map((problem, n) => cpu(() => leastMassSelection(problem, 2 + n % 7))).sort((a, b) => a - b)
process.stdout.write('\nAt most K of 180 sections for 200 groups\n')
line('proved optimum, median of 30', times[15]!, 'ms', 'target 500 ms')
line('proved optimum, slowest of 30', times[29]!, 'ms')
const small = Array.from({ length: 20 }, () => made(24, 30, next)).filter(problem => rowsOf(problem) < 700)
const own = cpu(() => small.forEach(problem => leastMassSelection(problem, 4)))
const programme = cpu(() => small.forEach(problem => proposeSections(problem, 4)))
line(`${small.length} small ones of 24 groups and 30 sections`, own, 'ms')
line('the same as integer programmes, unreduced', programme, 'ms', `${(programme / own).toFixed(0)} times slower`)
