import { resistancesOf, verifyBeam } from '../members'
import { compareSections } from '../sections'
import type { Section } from '../sections'
import type { Basics } from './basics'
import type { CalculationSheet } from './types'
import { designationText, failureSentence } from './words'

/** The heaviest candidate that is lighter than the section. */
function nextLighter(candidates: readonly Section[], section: Section): Section | null {
  let best: Section | null = null
  for (const candidate of candidates) {
    if (candidate.mass >= section.mass) continue
    if (best === null || compareSections(candidate, best) > 0) best = candidate
  }
  return best
}

/** A real verification of the next lighter section, in a sentence. */
export function whyNotLighter({ beam, section, grade, rules }: Basics, candidates: readonly Section[] | undefined): CalculationSheet['whyNotLighter'] {
  const lighter = candidates && nextLighter(candidates, section)
  if (!lighter) return null
  const designation = designationText(lighter.designation)
  if (!resistancesOf(lighter, grade, rules.choice)) {
    return { section: lighter.designation, check: 'bending', utilisation: 0, sentence: `${designation}: ${grade} is not offered at its thickness` }
  }
  const verified = verifyBeam(beam, lighter, grade, rules)
  const sentence = verified.passes
    ? `${designation} passes these checks with ${verified.largest.toFixed(2)}; another rule left it out (depth, flange width, number of different sections)`
    : `${designation} fails: ${failureSentence(verified, beam.span, rules.limits)}`
  return { section: lighter.designation, check: verified.governing, utilisation: verified.largest, sentence }
}
