/** A first choice of few sections by leaving out one after another: it bounds how heavy a section may be. */
import type { Section } from '../sections'
import type { MemberGroup } from './memberGroups'

export interface StartingLists {
  /** null where leaving out alone does not come down to so few. */
  lists: Map<string, Section[]> | null
  /** kg heavier than with the lightest section for every group; Infinity without lists. */
  extra: number
}

export function startingLists(groups: readonly MemberGroup[], most: number): StartingLists {
  const lists = new Map<string, Section[]>()
  let extra = 0
  for (const list of new Set(groups.map(group => group.list))) {
    const own = groups.filter(group => group.list === list)
    const start = fewOf(own, most)
    if (!start) return { lists: null, extra: Infinity }
    lists.set(list, start.sections)
    extra += start.extra
  }
  return { lists, extra }
}

function fewOf(groups: readonly MemberGroup[], most: number): { sections: Section[], extra: number } | null {
  let sections = [...new Set(groups.map(group => group.lightest))].sort((a, b) => a.catalogueIndex - b.catalogueIndex)
  const passing = groups.map(group => new Set(group.passingOf(sections)))
  for (;;) {
    if (sections.length <= most) return { sections, extra: extraOf(groups, passing, sections) }
    const best = leavingOut(groups, passing, sections)[0]
    if (!best || best.extra === Infinity) return null
    sections = sections.filter(section => section !== best.section)
  }
}

/** What leaving out each section costs, the cheapest first. */
export function leavingOut(
  groups: readonly MemberGroup[], passing: readonly ReadonlySet<Section>[], sections: readonly Section[],
): { section: Section, extra: number }[] {
  return sections
    .map(section => ({ section, extra: extraOf(groups, passing, sections.filter(other => other !== section)) }))
    .sort((a, b) => a.extra - b.extra || a.section.catalogueIndex - b.section.catalogueIndex)
}

function extraOf(groups: readonly MemberGroup[], passing: readonly ReadonlySet<Section>[], sections: readonly Section[]): number {
  return groups.reduce((sum, { weight, lightest }, g) => {
    let least = Infinity
    for (const section of sections) if (section.mass < least && passing[g]!.has(section)) least = section.mass
    return sum + weight * (least - lightest.mass)
  }, 0)
}
