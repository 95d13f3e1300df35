/** Which sections pass for a beam, asked for as far as needed and remembered by the beam's own numbers. */
import { type Beam, type SizedSection, sectionVerdicts } from '../members'
import type { Section } from '../sections'
import { numberMap } from '../numberKeys'
import { type SectionNeeds, type Sizer, type SizingRules, acceptance, addBeam, withFrequency } from './sizer'

export interface PassingBook {
  /** Of the candidates those that pass, in their order. */
  passing: (beam: Beam, needs: SectionNeeds, candidates: readonly Section[]) => SizedSection[]
  /** The first of the candidates that passes between two depths, mm. */
  firstWithin: (beam: Beam, needs: SectionNeeds, candidates: readonly Section[]) => (least: number, most: number) => SizedSection | undefined
}

export function passingBook(rules: SizingRules): PassingBook {
  const known = numberMap<Map<Section, SizedSection | null>>()
  const verdictOf = (beam: Beam, needs: SectionNeeds) => {
    addBeam(known, beam, needs)
    const verdicts = known.end(() => new Map<Section, SizedSection | null>())
    let verify: ((section: Section) => SizedSection | null) | null = null
    return (section: Section): SizedSection | null => {
      const before = verdicts.get(section)
      if (before !== undefined) return before
      verify ??= sectionVerdicts(beam, rules.grades[needs.role], withFrequency(rules.beam, needs), acceptance(beam, needs, rules))
      const verdict = verify(section)
      verdicts.set(section, verdict)
      return verdict
    }
  }
  return {
    passing(beam, needs, candidates) {
      const verdict = verdictOf(beam, needs)
      return candidates.flatMap(section => verdict(section) ?? [])
    },
    firstWithin(beam, needs, candidates) {
      const verdict = verdictOf(beam, needs)
      return (least, most) => {
        for (const section of candidates) {
          const sized = section.h >= least && section.h <= most ? verdict(section) : null
          if (sized) return sized
        }
        return undefined
      }
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
    withinDepths: (beam, needs) => book.firstWithin(beam, needs, own(needs)),
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
