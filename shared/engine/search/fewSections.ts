/**
 * A scheme with at most so many different sections, at the least mass: the groups of members and the
 * sections that pass for each make an integer programme; its answer is then sized with its own
 * weights, and where something no longer passes the programme is solved again without it.
 */
import type { Section } from '../sections'
import { HALF_A_GRAM, type Proposal } from '../selection'
import { type SectionLists, chooseSections, schemeFromLists, withoutFailed } from './fewSectionsRounds'
import { type MemberGroup, type MemberGroups, type SelectionScope, listOf, memberGroups } from './memberGroups'
import type { PreparedStudy } from './prepare'
import type { Scheme } from './schemes'
import { leavingOut, startingLists } from './startingLists'

export interface FewSections {
  /** null: no choice of so few sections serves every member, or none was found. */
  scheme: Scheme | null
  /** No choice of so few sections is lighter, kg of beams and columns of one floor; Infinity: there is none. */
  bound: number
  /** The bound proves the mass, or that there is none. */
  isOptimal: boolean
  /** How often a choice was sized with its own weights. */
  rounds: number
  /** The bound holds for choices up to this much heavier than the lightest sections of all groups, kg. */
  extra: number
}

export interface FewSectionsOptions {
  scope?: SelectionScope
  /** A solver beside our own, for a better start of the programme. */
  proposal?: Proposal
  /** Leaves the bound as the first round gives it: for a search that does not show it. */
  isBoundUnasked?: boolean
}

/** Rounds after which the best found stands, and attempts where rounds alone find nothing. */
const MOST_ROUNDS = 12
const MOST_ATTEMPTS = 60
/** Groups may be heavier by this much more than the start shows, so that a second round has something to choose from. */
const ROOM = 1.02

/** kg of beams and columns of one floor. */
export function steelOf({ mass }: Scheme): number {
  return mass.beamMass + mass.columnMass
}

/** @param free the lightest scheme of the arrangement under its cap, whatever the number of sections */
export function fewSections(study: PreparedStudy, free: Scheme, most: number, options: FewSectionsOptions = {}): FewSections {
  const scope = options.scope ?? 'plate'
  if (fits(free, most, scope)) return { scheme: free, bound: steelOf(free), isOptimal: true, rounds: 0, extra: Infinity }
  const task: Task = { study, free, most, scope, groupsFor: memberGroups(study, free, scope), proposal: options.proposal }
  const start = startingLists(task.groupsFor(0), most)
  const found = inRounds(task, start.extra * ROOM)
  if (found.isOptimal || (found.scheme && options.isBoundUnasked)) return found
  if (found.scheme) return withSharperBound(task, found, found.scheme)
  const scheme = leftOutOneByOne(task)
  return { ...found, scheme, isOptimal: scheme !== null && steelOf(scheme) - found.bound <= HALF_A_GRAM }
}

interface Task {
  study: PreparedStudy
  free: Scheme
  most: number
  scope: SelectionScope
  groupsFor: MemberGroups
  proposal: Proposal | undefined
}

/** The bound again, now that the groups need not be heavier than the best found allows. */
function withSharperBound(task: Task, found: FewSections, best: Scheme): FewSections {
  const extra = extraOf(best, task.groupsFor(found.extra))
  const groups = task.groupsFor(extra)
  const chosen = chooseSections(groups, groups.map(group => group.candidates(extra)), task.most, task.proposal)
  return proved({ ...found, extra, bound: Math.max(found.bound, chosen?.bound ?? -Infinity) }, groups)
}

/** kg by which a scheme is heavier than the lightest sections of all groups. */
function extraOf(scheme: Scheme, groups: readonly MemberGroup[]): number {
  return steelOf(scheme) - groups.reduce((sum, { weight, lightest }) => sum + weight * lightest.mass, 0)
}

/** Whether the bound reaches the best found, and the groups were asked as heavy as any better choice could be. */
function proved(found: FewSections, groups: readonly MemberGroup[]): FewSections {
  const { scheme, bound, extra } = found
  return { ...found, isOptimal: scheme !== null && steelOf(scheme) - bound <= HALF_A_GRAM && extraOf(scheme, groups) <= extra + HALF_A_GRAM }
}

/** Whether the scheme has no more than so many sections in each list. */
export function fits(scheme: Scheme, most: number, scope: SelectionScope): boolean {
  return [...listsOf(scheme, scope).values()].every(list => list.length <= most)
}

/** The different sections of a scheme by list. */
export function listsOf({ prepared, sized, columns }: Scheme, scope: SelectionScope): Map<string, Section[]> {
  const lists = new Map<string, Section[]>()
  const add = (kind: string, section: Section) => {
    const list = listOf(scope, kind)
    const known = lists.get(list)
    if (!known) lists.set(list, [section])
    else if (!known.includes(section)) known.push(section)
  }
  prepared.frame.beams.forEach((beam, b) => add(beam.kind, sized.sections[b]!.section))
  for (const { lifts } of columns) for (const { section } of lifts) add('column', section)
  return lists
}

function inRounds(task: Task, extra: number): FewSections {
  const { study, free, most, scope, proposal } = task
  const groups = task.groupsFor(extra)
  let scheme: Scheme | null = null
  let bound = Infinity
  let passing: Section[][] | null = groups.map(group => group.candidates(extra))
  let rounds = 0
  while (passing && rounds < MOST_ROUNDS) {
    const chosen = chooseSections(groups, passing, most, proposal)
    if (rounds === 0) {
      if (!chosen) return { scheme: null, bound, isOptimal: true, rounds, extra }
      bound = chosen.bound
    }
    if (!chosen || (scheme && chosen.cost >= steelOf(scheme) - HALF_A_GRAM)) break
    const attempt = schemeFromLists(study, free, chosen.lists, scope)
    rounds++
    if ('scheme' in attempt && (!scheme || steelOf(attempt.scheme) < steelOf(scheme))) scheme = attempt.scheme
    passing = withoutFailed(groups, passing, chosen, attempt)
  }
  return proved({ scheme, bound, isOptimal: false, rounds, extra }, groups)
}

/**
 * From the scheme's own sections, leaving out the one that costs least of those without which every
 * member still passes: for rules between beams that the programme does not know.
 */
function leftOutOneByOne({ study, free, most, scope, groupsFor }: Task): Scheme | null {
  const groups = groupsFor(0)
  const lists: Map<string, readonly Section[]> = listsOf(free, scope)
  let scheme: Scheme | null = null
  let attempts = 0
  for (const [list, sections] of [...lists]) {
    const own = groups.filter(group => group.list === list)
    const passing = own.map(group => new Set(group.passingOf(sections)))
    for (let left = sections; left.length > most;) {
      let next: Section[] | null = null
      for (const { section } of leavingOut(own, passing, left)) {
        if (attempts++ >= MOST_ATTEMPTS) return null
        const fewer = left.filter(other => other !== section)
        const attempt = schemeFromLists(study, free, new Map<string, readonly Section[]>([...lists, [list, fewer]]) satisfies SectionLists, scope)
        if (!('scheme' in attempt)) continue
        scheme = attempt.scheme
        next = fewer
        break
      }
      if (!next) return null
      left = next
      lists.set(list, left)
    }
  }
  return scheme
}
