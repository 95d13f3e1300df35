/** Which sections pass for a beam, asked for as far as needed and remembered by the beam's own numbers. */
import { type Beam, type SizedSection, passingSections } from '../members'
import type { Section } from '../sections'
import { numberMap } from './numberKeys'
import { type SectionNeeds, type Sizer, type SizingRules, acceptance, addBeam, withFrequency } from './sizer'

export interface PassingBook {
  /** Of the candidates those that pass, in their order. */
  passing: (beam: Beam, needs: SectionNeeds, candidates: readonly Section[]) => SizedSection[]
}

export function passingBook(rules: SizingRules): PassingBook {
  const known = numberMap<Map<Section, SizedSection | null>>()
  return {
    passing(beam, needs, candidates) {
      addBeam(known, beam, needs)
      const verdicts = known.end(() => new Map<Section, SizedSection | null>())
      const unknown = candidates.filter(section => !verdicts.has(section))
      if (unknown.length > 0) {
        for (const section of unknown) verdicts.set(section, null)
        const found = passingSections(beam, unknown, rules.grades[needs.role], withFrequency(rules.beam, needs), acceptance(beam, needs, rules))
        for (const sized of found) verdicts.set(sized.section, sized)
      }
      return candidates.flatMap(section => verdicts.get(section) ?? [])
    },
  }
}

/** A beam's needs with the name of the list that its section comes from. */
export interface ListedNeeds extends SectionNeeds { list: string }

/** Sizes from lists of few sections, each beam from the list that its needs name. */
export function sizerFromLists(sizer: Sizer, book: PassingBook, lists: ReadonlyMap<string, readonly Section[]>): Sizer {
  const own = (needs: SectionNeeds): readonly Section[] => {
    const offered = lists.get((needs as ListedNeeds).list) ?? []
    return sizer.rules.sections[needs.role].filter(section => offered.includes(section))
  }
  return {
    rules: sizer.rules,
    frequency: sizer.frequency,
    staircase(beam, needs) {
      let shallowest = Infinity
      return book.passing(beam, needs, own(needs)).filter(({ section }) => {
        if (section.h >= shallowest) return false
        shallowest = section.h
        return true
      })
    },
  }
}
