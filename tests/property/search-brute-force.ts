/**
 * A study done the long way, for rectangular plates without voids: every layout written out, every
 * beam's loads from spans and spacings, every section tried on every beam under every depth cap by
 * the plain verification. Nothing is cut short and nothing of the search is used.
 */
import { combinationFactors, nationalChoice } from '#shared/engine/actions'
import { columnSizer } from '#shared/engine/columns'
import { type Beam, type BeamPointLoad, type BeamRules, verifyBeam } from '#shared/engine/members'
import { yieldStrength } from '#shared/engine/materials'
import { type Section, sectionsOf } from '#shared/engine/sections'
import type { StudyInput } from '#shared/schemas/study'

type Axis = 'x' | 'y'

/** Loads of one stage on a beam or at its end: permanent, variable. */
interface Pair { permanent: number, variable: number }
interface Load { service: Pair, construction: Pair, area: number }

interface Member {
  axis: Axis
  at: number
  from: number
  to: number
  isPrimary: boolean
  isEdge: boolean
  /** Slab load per length and cladding per length. */
  slab: Load | null
  cladding: number
  /** Beams that end on it: index and place. */
  carries: { member: number, at: number }[]
  onColumns: boolean
  isTie: boolean
  tieForce: number
}

export interface BruteScheme { number: number, mass: number, depth: number, pieces: number, cap: number }
export interface BruteStudy {
  range: number
  rejected: Record<string, number>
  /** The lightest scheme of each feasible arrangement. */
  lightest: BruteScheme[]
  /** Schemes that no other beats, rising mass. */
  front: { mass: number, depth: number }[]
}

const G = 9.81
const differences = (lines: readonly number[]) => lines.slice(1).map((v, n) => v - lines[n]!)

/** All ways to fill a length by the rule in words: `n` equal bays, or multiples of the module with at most two different bays. */
export function bayLayouts(bays: StudyInput['range']['x'], length: number): number[][] {
  if (bays.kind === 'fixed') throw new Error('a fixed grid has no layouts')
  if (length < bays.min) return [[length]]
  if (bays.kind === 'equal') {
    const found: number[][] = []
    for (let n = 1; n <= 100; n++) {
      if (n * bays.min > length || length > n * bays.max) continue
      const lines = Array.from({ length: n + 1 }, (_, i) => Math.round(length * i / n))
      found.push(differences(lines))
    }
    return found
  }
  const found: number[][] = []
  const sizes = Array.from({ length: 200 }, (_, k) => (k + 1) * bays.module).filter(size => size >= bays.min && size <= bays.max)
  const fill = (rest: number, before: number[]) => {
    if (rest === 0) found.push(before)
    for (const size of sizes) {
      if (size > rest || new Set([...before, size]).size > 2) continue
      fill(rest - size, [...before, size])
    }
  }
  fill(length, [])
  return found
}

function allLayouts(input: StudyInput, axis: Axis): number[][] {
  const bays = input.range[axis]
  const drawn = (axis === 'x' ? input.plate.gridX : input.plate.gridY)
  if (bays.kind === 'fixed') return [drawn.map(line => line.at)]
  const stays = drawn.filter((line, n) => n === 0 || n === drawn.length - 1 || line.pinned).map(line => line.at)
  return differences(stays).reduce<number[][]>((all, length) => {
    const ways = bayLayouts(bays, length)
    return all.flatMap(lines => ways.map(way => way.reduce((list, bay) => [...list, list[list.length - 1]! + bay], lines)))
  }, [[stays[0]!]])
}

const addedUp = (a: Load, b: Load, f = 1): Load => ({
  service: { permanent: a.service.permanent + f * b.service.permanent, variable: a.service.variable + f * b.service.variable },
  construction: { permanent: a.construction.permanent + f * b.construction.permanent, variable: a.construction.variable + f * b.construction.variable },
  area: a.area + f * b.area,
})
const NOTHING: Load = { service: { permanent: 0, variable: 0 }, construction: { permanent: 0, variable: 0 }, area: 0 }

/** Slab load on a width, N/mm: kN/m² × mm / 1000. */
function slabOn({ plate }: StudyInput, width: number): Load {
  const wet = plate.slab.system === 'planks' ? 0 : plate.slab.depth / 1000
  return {
    service: { permanent: plate.floorLoad.permanent * width / 1000, variable: plate.floorLoad.variable * width / 1000 },
    construction: { permanent: ((plate.slab.weight ?? 0) + wet) * width / 1000, variable: 0.75 * width / 1000 },
    area: width,
  }
}

/** Beams of a rectangular plate: primaries along `direction`, `n` divisions. */
function membersOf(input: StudyInput, xs: number[], ys: number[], direction: Axis, n: number): Member[] {
  const [p, q] = direction === 'x' ? [xs, ys] : [ys, xs]
  const cladding = input.plate.lineLoads.reduce((sum, load) => sum + load.permanent, 0)
  const across: Axis = direction === 'x' ? 'y' : 'x'
  const members: Member[] = []
  const psi = input.basis.nationalChoice === 'UK' ? 0.5 : 0.3
  const tieForce = (isEdge: boolean, spacing: number, length: number) => Math.max(75_000,
    (isEdge ? 0.4 : 0.8) * (input.plate.floorLoad.permanent + psi * input.plate.floorLoad.variable) / 1000 * spacing * length)
  const meanOf = (a: number | undefined, b: number | undefined) => a === undefined ? b! : b === undefined ? a : (a + b) / 2
  const bp = differences(p)
  const bq = differences(q)
  q.forEach((at, j) => bp.forEach((length, i) => {
    const isEdge = j === 0 || j === q.length - 1
    const width = n === 1 ? ((bq[j - 1] ?? 0) + (bq[j] ?? 0)) / 2 : 0
    members.push({
      axis: direction, at, from: p[i]!, to: p[i]! + length, isPrimary: true, isEdge, onColumns: true, carries: [],
      slab: width > 0 ? slabOn(input, width) : null, cladding: isEdge ? cladding : 0, isTie: false,
      tieForce: tieForce(isEdge, meanOf(bq[j - 1], bq[j]), length),
    })
  }))
  const primaryAt = (i: number, j: number) => j * bp.length + i
  bq.forEach((length, j) => {
    p.forEach((at, i) => {
      const isEdge = i === 0 || i === p.length - 1
      const width = n === 1 ? 0 : ((bp[i - 1] ?? 0) + (bp[i] ?? 0)) / 2 / n
      members.push({
        axis: across, at, from: q[j]!, to: q[j]! + length, isPrimary: false, isEdge, onColumns: true, carries: [],
        slab: width > 0 ? slabOn(input, width) : null, cladding: isEdge ? cladding : 0, isTie: width === 0 && !isEdge,
        tieForce: tieForce(isEdge, meanOf(bp[i - 1], bp[i]), length),
      })
    })
    bp.forEach((bay, i) => {
      for (let k = 1; k < n; k++) {
        const place = bay * k / n
        for (const row of [j, j + 1]) members[primaryAt(i, row)]!.carries.push({ member: members.length, at: place })
        members.push({
          axis: across, at: p[i]! + place, from: q[j]!, to: q[j]! + length, isPrimary: false, isEdge: false, onColumns: false, carries: [],
          slab: slabOn(input, bay / n), cladding: 0, isTie: false, tieForce: 0,
        })
      }
    })
  })
  return members
}

/** First reason against an arrangement before any sizing, from spans alone. */
function reasonBeforeSizing({ plate, basis }: StudyInput, xs: number[], ys: number[], direction: Axis, n: number): string | null {
  const [p, q] = direction === 'x' ? [differences(xs), differences(ys)] : [differences(ys), differences(xs)]
  for (const k of plate.keepClear) {
    for (const x of xs) for (const y of ys) if (x > k.x && x < k.x + k.width && y > k.y && y < k.y + k.height) return 'column-in-keep-clear'
  }
  const spanAxis = n === 1 ? (direction === 'x' ? 'y' : 'x') : direction
  if (plate.slab.span !== 'free' && plate.slab.span !== spanAxis) return 'slab-direction'
  const spans = n === 1 ? q : p.map(bay => bay / n)
  if (Math.max(...spans) > plate.slab.maxSpan + 1e-9) return 'slab-span'
  if (basis.minSecondarySpacing !== null && n > 1 && Math.min(...spans) < basis.minSecondarySpacing) return 'secondary-spacing'
  if (basis.buildability.maxPiece !== null && Math.max(...p, ...q) > basis.buildability.maxPiece) return 'piece-length'
  return null
}

interface Tools {
  input: StudyInput
  /** Sections that may be used; all of the families without it. */
  offered?: ReadonlySet<Section>
  rules: BeamRules
  verdicts: Map<string, boolean[]>
  psi0: number
}

/** Whether each section passes on a beam: the plain verification of every one. */
function verdicts({ rules, verdicts: known }: Tools, beam: Beam, sections: readonly Section[], grade: 'S355' | 'S275' | 'S235' | 'S460'): boolean[] {
  const key = JSON.stringify([beam, grade, sections.length, sections[0]!.designation])
  const found = known.get(key)
  if (found) return found
  const fresh = sections.map(section => verifyBeam(beam, section, grade, rules).passes)
  known.set(key, fresh)
  return fresh
}

interface Sized { sections: Section[], ends: Load[] }

function demandOf({ input, psi0 }: Tools, member: Member, ends: Load[]): Beam {
  const span = member.to - member.from
  const fixed = input.plate.slab.fixedToTopFlange
  const stage = (part: 'service' | 'construction') => {
    const accompanying = (variable: number) => part === 'service' ? psi0 * variable : variable
    const permanent = (member.slab?.[part].permanent ?? 0) + (part === 'service' ? member.cladding : 0)
    const variable = member.slab?.[part].variable ?? 0
    const places = [...new Set(member.carries.map(c => c.at))].sort((a, b) => a - b)
    const point = places.map((at): BeamPointLoad => {
      const load = member.carries.filter(c => c.at === at).reduce((sum, c) => addedUp(sum, ends[c.member]!), NOTHING)[part]
      return { at, permanent: load.permanent, variable: load.variable, accompanying: accompanying(load.variable), height: 'shear-centre' }
    })
    const isHeld = member.slab !== null && fixed && (part === 'service' || input.plate.slab.system === 'deck')
    return {
      name: part, point, restraint: { held: isHeld ? [{ from: 0, to: span }] : [], points: places },
      line: permanent + variable > 0 ? [{ from: 0, to: span, permanent, variable, accompanying: accompanying(variable), height: 'top' as const }] : [],
    }
  }
  return { span, selfWeight: true, service: stage('service'), construction: input.basis.constructionStage ? [stage('construction')] : [] }
}

function sizeAll(tools: Tools, members: Member[], cap: number, capInterior: number): Sized | null {
  const { input } = tools
  const sections = new Array<Section>(members.length)
  const ends = new Array<Load>(members.length)
  const order = [...members.keys()].sort((a, b) => members[a]!.carries.length - members[b]!.carries.length)
  for (const m of order) {
    const member = members[m]!
    const role = member.isPrimary ? input.basis.primary : input.basis.secondary
    const candidates = sectionsOf(role.families)
    const passes = verdicts(tools, demandOf(tools, member, ends), candidates, role.grade)
    const least = input.basis.buildability.minFlangeWidth
    const sides = member.slab === null ? 0 : member.isEdge ? 1 : 2
    const flange = least === null || sides === 0 ? 0 : sides === 2 ? least : least - 30
    const mustTie = member.isTie || (member.slab === null && member.cladding === 0 && member.carries.length === 0)
    const chosen = candidates.find((s, n) => passes[n]! && (tools.offered?.has(s) ?? true) && s.h <= (member.isEdge ? cap : Math.min(cap, capInterior)) && s.b >= flange
      && (!mustTie || isTie(tools, s, member, role.grade)))
    if (!chosen) return null
    sections[m] = chosen
    ends[m] = endLoad(member, chosen, ends)
  }
  return { sections, ends }
}

function isTie({ rules }: Tools, s: Section, member: Member, grade: 'S355' | 'S275' | 'S235' | 'S460'): boolean {
  const span = member.to - member.from
  const fy = yieldStrength(grade, Math.max(s.tf, s.tw), rules.choice.yieldRule) ?? 0
  return s.h >= Math.max(200, span / 40) && s.iz >= span / 300 && s.A * fy / rules.choice.gammaM0 >= member.tieForce
}

/** Half of everything goes to each end: all beams here are loaded symmetrically. */
function endLoad(member: Member, section: Section, ends: Load[]): Load {
  const span = member.to - member.from
  const own = section.mass * G / 1000 * span / 2
  const carried = member.carries.reduce((sum, c) => addedUp(sum, ends[c.member]!, 0.5), NOTHING)
  const slab = addedUp(NOTHING, member.slab ?? NOTHING, span / 2)
  const sum = addedUp(carried, slab)
  return {
    service: { permanent: sum.service.permanent + own + member.cladding * span / 2, variable: sum.service.variable },
    construction: { permanent: sum.construction.permanent + own, variable: sum.construction.variable },
    area: sum.area,
  }
}

function columnMass(tools: Tools, members: Member[], { ends }: Sized, xs: number[], ys: number[], direction: Axis): number | null {
  const { input: { plate, basis }, rules } = tools
  const sizer = columnSizer({
    choice: rules.choice, combinations: combinationFactors(rules.choice, basis.combination),
    kinds: [{ category: plate.floorLoad.category, reducible: true }], grade: basis.column.grade,
    sections: sectionsOf(basis.column.families).filter(s => tools.offered?.has(s) ?? true),
    storeys: plate.storeys, storeyHeight: plate.storeyHeight, liftStoreys: basis.liftStoreys, roof: plate.roof ?? null,
    reducesByStoreys: basis.reductions.storeys, ltbMethod: basis.ltbMethod, utilisationLimit: basis.utilisationLimit,
  })
  let mass = 0
  for (const x of xs) {
    for (const y of ys) {
      const met = members.flatMap((member, m) => {
        if (!member.onColumns) return []
        const [s, t] = member.axis === 'x' ? [x, y] : [y, x]
        if (member.at !== t || (member.from !== s && member.to !== s)) return []
        const load = ends[m]!
        return [{
          axis: member.axis, side: member.from === s ? 1 as const : -1 as const,
          permanent: load.service.permanent, variable: [load.service.variable], area: load.area / 1e6,
        }]
      })
      const sized = sizer.size({ web: direction, direct: { permanent: 0, variable: [0], area: 0 }, ends: met, unheldFloors: { x: 0, y: 0 } })
      if (!sized) return null
      mass += sized.mass
    }
  }
  return mass / plate.storeys
}

/** Least mass of the beams, kg, where no beam is deeper than the primary that carries it: every choice of the carried beams tried. */
export function leastMassNotDeeper(input: StudyInput, direction: Axis, n: number): number | null {
  const tools = toolsOf(input)
  const members = membersOf(input, input.plate.gridX.map(l => l.at), input.plate.gridY.map(l => l.at), direction, n)
  const massOf = (m: number, s: Section) => s.mass * (members[m]!.to - members[m]!.from) / 1000
  const free = sizeAll(tools, members, Infinity, Infinity)
  if (!free) return null
  const lows = [...new Set(members.flatMap(member => member.carries.map(c => c.member)))]
  const highs = [...members.keys()].filter(m => members[m]!.carries.length > 0)
  const alone = [...members.keys()].filter(m => !lows.includes(m) && !highs.includes(m)).reduce((sum, m) => sum + massOf(m, free.sections[m]!), 0)
  const passing = lows.map((m) => {
    const sections = sectionsOf(input.basis.secondary.families)
    const passes = verdicts(tools, demandOf(tools, members[m]!, []), sections, input.basis.secondary.grade)
    return sections.filter((_, k) => passes[k])
  })
  let least: number | null = null
  const ends = new Array<Load>(members.length)
  const chosen = new Array<Section>(members.length)
  const choose = (k: number, mass: number) => {
    if (least !== null && mass >= least) return
    if (k < lows.length) {
      for (const section of passing[k]!) {
        const m = lows[k]!
        chosen[m] = section
        ends[m] = endLoad(members[m]!, section, ends)
        choose(k + 1, mass + massOf(m, section))
      }
      return
    }
    let total = mass
    for (const m of highs) {
      const sections = sectionsOf(input.basis.primary.families)
      const passes = verdicts(tools, demandOf(tools, members[m]!, ends), sections, input.basis.primary.grade)
      const deepest = Math.max(...members[m]!.carries.map(c => chosen[c.member]!.h))
      const found = sections.find((s, index) => passes[index] && s.h >= deepest)
      if (!found) return
      total += massOf(m, found)
    }
    least = Math.min(least ?? Infinity, total)
  }
  choose(0, alone)
  return least
}

function toolsOf(input: StudyInput): Tools {
  const { nationalChoice: code, combination, criticalMoment, ltbMethod, useF, limits, utilisationLimit } = input.basis
  return {
    input, verdicts: new Map(), psi0: 0.7,
    rules: { choice: nationalChoice(code), combination, criticalMoment, ltbMethod, useF, limits, utilisationLimit },
  }
}

/** The whole study the long way. */
export function bruteStudy(input: StudyInput): BruteStudy {
  const { basis, range, plate } = input
  const tools = toolsOf(input)
  const area = (plate.gridX[plate.gridX.length - 1]!.at - plate.gridX[0]!.at) * (plate.gridY[plate.gridY.length - 1]!.at - plate.gridY[0]!.at) / 1e6
  const depths = [...new Set(sectionsOf([...new Set([...basis.primary.families, ...basis.secondary.families])]).map(s => s.h))]
  const rangeCap = range.depthCap ?? Infinity
  const result: BruteStudy = { range: 0, rejected: {}, lightest: [], front: [] }
  const all: BruteScheme[] = []
  const reject = (reason: string) => {
    result.rejected[reason] = (result.rejected[reason] ?? 0) + 1
  }
  const schemeUnder = (members: Member[], xs: number[], ys: number[], direction: Axis, cap: number, capInterior: number): BruteScheme | null => {
    const sized = sizeAll(tools, members, cap, capInterior)
    const columns = sized && columnMass(tools, members, sized, xs, ys, direction)
    if (!sized || columns === null) return null
    const beams = sized.sections.reduce((sum, s, m) => sum + s.mass * (members[m]!.to - members[m]!.from) / 1000, 0)
    const mass = (beams + columns) * (1 + basis.connectionAllowance) + basis.bracingAllowance * area
    return { number: result.range, mass, depth: Math.max(...sized.sections.map(s => s.h)), pieces: members.length + xs.length * ys.length, cap }
  }
  for (const xs of allLayouts(input, 'x')) {
    for (const ys of allLayouts(input, 'y')) {
      for (const direction of (['x', 'y'] as const).filter(d => range.primaryDirections.includes(d))) {
        for (const n of [...range.divisions].sort((a, b) => a - b)) {
          result.range++
          const early = reasonBeforeSizing(input, xs, ys, direction, n)
          if (early) {
            reject(early)
            continue
          }
          const members = membersOf(input, xs, ys, direction, n)
          const interior = range.depthCapInterior ?? Infinity
          const lightest = schemeUnder(members, xs, ys, direction, rangeCap, interior)
          if (!lightest) {
            reject(schemeUnder(members, xs, ys, direction, Infinity, Infinity) ? 'depth-cap' : 'no-section')
            continue
          }
          result.lightest.push(lightest)
          for (const cap of [Infinity, ...depths]) {
            const scheme = schemeUnder(members, xs, ys, direction, Math.min(rangeCap, cap), Math.min(interior, cap))
            if (scheme) all.push(scheme)
          }
        }
      }
    }
  }
  const grams = (kg: number) => Math.round(kg * 1000 + 1e-4)
  const beaten = (s: BruteScheme) => all.some(o =>
    grams(o.mass) <= grams(s.mass) && o.depth <= s.depth && (grams(o.mass) < grams(s.mass) || o.depth < s.depth))
  const points = new Map(all.filter(s => !beaten(s)).map(s => [`${grams(s.mass)}/${s.depth}`, { mass: grams(s.mass) / 1000, depth: s.depth }]))
  result.front = [...points.values()].sort((a, b) => a.mass - b.mass)
  return result
}

/** Every choice of `size` of the sections. */
function* choices(sections: readonly Section[], size: number): Generator<Section[]> {
  if (size === 0) yield []
  for (let n = 0; n + size <= sections.length && size > 0; n++) {
    for (const rest of choices(sections.slice(n + 1), size - 1)) yield [sections[n]!, ...rest]
  }
}

/**
 * Least mass, kg of beams and columns, with at most `most` different sections: every choice of them
 * tried, for beams and columns of different families. null where no choice serves every member.
 */
export function leastMassOfFew(input: StudyInput, direction: Axis, n: number, most: number): number | null {
  const plain = toolsOf(input)
  const [xs, ys] = [input.plate.gridX.map(l => l.at), input.plate.gridY.map(l => l.at)]
  const members = membersOf(input, xs, ys, direction, n)
  const beamSections = sectionsOf([...new Set([...input.basis.primary.families, ...input.basis.secondary.families])])
  const columnSections = sectionsOf(input.basis.column.families)
  let least = Infinity
  for (let forBeams = 1; forBeams < most; forBeams++) {
    const sizes = [...choices(beamSections, forBeams)].flatMap((offered) => {
      const sized = sizeAll({ ...plain, offered: new Set(offered) }, members, Infinity, Infinity)
      return sized ? [{ sized, mass: sized.sections.reduce((sum, s, m) => sum + s.mass * (members[m]!.to - members[m]!.from) / 1000, 0) }] : []
    }).sort((a, b) => a.mass - b.mass)
    for (const { sized, mass } of sizes) {
      if (mass >= least) break
      for (const offered of choices(columnSections, most - forBeams)) {
        const columns = columnMass({ ...plain, offered: new Set(offered) }, members, sized, xs, ys, direction)
        if (columns !== null) least = Math.min(least, mass + columns)
      }
    }
  }
  return least === Infinity ? null : least
}
