/** One round of a choice of few sections: the integer programme, and its answer sized with its own weights. */
import { liftWithoutSection } from '../columns'
import { grams } from '../quantities'
import type { Section } from '../sections'
import { type Proposal, leastMassSelection } from '../selection'
import { sizeCoupled } from './coupled'
import { type MemberGroup, type SelectionScope, listOf } from './memberGroups'
import { type ListedNeeds, sizerFromLists } from './passing'
import type { PreparedStudy } from './prepare'
import { type Scheme, capsUnder, columnDemand, completeScheme, sizeColumns } from './schemes'
import { isUnsized } from './sizedFrame'

/** Sections by the list that a member takes from: one list for the plate, or one for each kind of member. */
export type SectionLists = ReadonlyMap<string, readonly Section[]>

/** The answer of the programme: lists, the section of each group, kg of one floor and its bound. */
export interface Chosen {
  lists: SectionLists
  choice: Section[]
  cost: number
  bound: number
}

/**
 * The lightest choice of at most `most` sections for each list; null where there is none.
 * @param passing sections that pass for each group
 */
export function chooseSections(groups: readonly MemberGroup[], passing: readonly (readonly Section[])[], most: number, proposal?: Proposal): Chosen | null {
  const lists = new Map<string, Section[]>()
  const choice = new Array<Section>(groups.length)
  let cost = 0
  let bound = 0
  for (const list of new Set(groups.map(group => group.list))) {
    const own = groups.map((_, g) => g).filter(g => groups[g]!.list === list)
    const sections = [...new Set(own.flatMap(g => passing[g]!))].sort((a, b) => a.catalogueIndex - b.catalogueIndex)
    const place = new Map(sections.map((section, s) => [section, s]))
    const found = leastMassSelection({
      masses: sections.map(section => section.mass),
      groups: own.map(g => ({ weight: groups[g]!.weight, passing: passing[g]!.map(section => place.get(section)!).sort((a, b) => a - b) })),
    }, most, { proposal })
    if (!found) return null
    lists.set(list, found.sections.map(s => sections[s]!))
    own.forEach((g, n) => {
      choice[g] = sections[found.choice[n]!]!
    })
    cost += found.cost
    bound += found.bound
  }
  return { lists, choice, cost, bound }
}

/** A scheme from the lists, or the member that found nothing in them; null where a rule between beams could not be kept. */
export type Attempt = { scheme: Scheme } | { without: MemberGroup['member'] | null }

export function schemeFromLists(study: PreparedStudy, free: Scheme, lists: SectionLists, scope: SelectionScope): Attempt {
  const { arrangement, depthCap, prepared } = free
  const needs = prepared.needs.map((need, b): ListedNeeds => ({ ...need, list: listOf(scope, prepared.frame.beams[b]!.kind) }))
  const sizer = sizerFromLists(study.sizer, study.passing, lists)
  const sized = sizeCoupled({ ...prepared, needs, fixedStairs: [] }, sizer, capsUnder(study.caps, depthCap))
  if ('coupled' in sized) return { without: null }
  if (isUnsized(sized)) return { without: { beam: prepared.alike[sized.beam]! } }
  const among = study.columns.among(lists.get(listOf(scope, 'column')) ?? [])
  const columns = sizeColumns({ input: study.input, columns: among }, prepared, sized)
  if (columns) return { scheme: completeScheme(study, arrangement, prepared, depthCap, sized, columns) }
  for (const column of new Set(prepared.alikeColumns)) {
    const lift = liftWithoutSection(among, columnDemand(prepared, sized, column))
    if (lift >= 0) return { without: { column, lift } }
  }
  return { without: null }
}

/** What each group may still take after an attempt: without the sections that did not pass; null where nothing failed alone. */
export function withoutFailed(
  groups: readonly MemberGroup[], passing: readonly (readonly Section[])[], chosen: Chosen, attempt: Attempt,
): Section[][] | null {
  let isLess = false
  const left = groups.map((group, g) => {
    const failed = 'scheme' in attempt
      ? actualSection(attempt.scheme, group) !== chosen.choice[g] ? [chosen.choice[g]!] : []
      : isSame(attempt.without, group.member) ? chosen.lists.get(group.list)! : []
    const kept = passing[g]!.filter(section => !failed.includes(section))
    isLess ||= kept.length < passing[g]!.length
    return kept
  })
  return isLess ? left : null
}

function isSame(a: MemberGroup['member'] | null, b: MemberGroup['member']): boolean {
  if (!a) return false
  return 'beam' in a ? 'beam' in b && a.beam === b.beam : 'column' in b && a.column === b.column && a.lift === b.lift
}

/** The heaviest section that a group has in a scheme: beams of one class may be sized apart by a depth rule. */
export function actualSection({ prepared, sized, columns }: Scheme, { member }: MemberGroup): Section {
  const all = 'beam' in member
    ? sized.sections.filter((_, b) => prepared.alike[b] === member.beam).map(({ section }) => section)
    : columns.filter((_, c) => prepared.alikeColumns[c] === member.column).map(({ lifts }) => lifts[member.lift]!.section)
  return all.reduce((a, b) => grams(b.mass) > grams(a.mass) ? b : a)
}
