/** The schemes that a study offers of an arrangement: with as many sections as are lightest, or with few. */
import { grams } from '../quantities'
import type { NumberedArrangement } from './arrangements'
import { fewSections } from './fewSections'
import type { PreparedStudy } from './prepare'
import { type Front, type NoScheme, type Scheme, frameForSizing, isNoScheme, schemesOf, sizeScheme } from './schemes'
import type { PreparedFrame } from './sizedFrame'

/** The scheme of an arrangement under a cap, with no more different sections than the range allows. */
export function sizeOffered(
  study: PreparedStudy, arrangement: NumberedArrangement, prepared: PreparedFrame, depthCap: number | null,
): Scheme | NoScheme {
  const free = sizeScheme(study, arrangement, prepared, depthCap)
  const most = study.input.range.maxDistinctSections
  return most === null || isNoScheme(free) ? free : withFew(study, free, most)
}

function withFew(study: PreparedStudy, free: Scheme, most: number): Scheme | NoScheme {
  const { scheme, isOptimal } = fewSections(study, free, most, { isBoundUnasked: true })
  if (scheme) return scheme
  const sections = most === 1 ? 'one section' : `${most} different sections`
  return { rejection: 'buildability', detail: isOptimal ? `No choice of ${sections} serves every member.` : `No choice of ${sections} was found that keeps the rules between beams.` }
}

export function schemesOffered(study: PreparedStudy, arrangement: NumberedArrangement, front: Front): Scheme[] | NoScheme {
  const most = study.input.range.maxDistinctSections
  return most === null ? schemesOf(study, arrangement, front) : schemesOfFew(study, arrangement, front, most)
}

/**
 * The lightest scheme with few sections, and for every lower depth the one that is just as deep. A
 * depth is passed over only where a known scheme as shallow is lighter than the arrangement with any
 * number of sections: what is kept never depends on what was known.
 */
function schemesOfFew(study: PreparedStudy, arrangement: NumberedArrangement, front: Front, most: number): Scheme[] | NoScheme {
  const prepared = frameForSizing(study, arrangement)
  if (isNoScheme(prepared)) return prepared
  let free = sizeScheme(study, arrangement, prepared, null)
  if (isNoScheme(free)) return free
  const lightest = withFew(study, free, most)
  if (isNoScheme(lightest)) return lightest
  const schemes = [lightest]
  front.add(grams(lightest.mass.mass), lightest.sized.depth)
  for (const depth of study.depths) {
    if (depth >= lightest.sized.depth) continue
    if (free.sized.depth > depth) {
      free = sizeScheme(study, arrangement, prepared, depth)
      if (isNoScheme(free)) return schemes
    }
    if (front.depthAtMostAsHeavy(grams(free.mass.mass) - 1) <= depth) continue
    const scheme = withFew(study, { ...free, depthCap: depth }, most)
    if (isNoScheme(scheme) || scheme.sized.depth !== depth) continue
    const mass = grams(scheme.mass.mass)
    if (!front.admits(mass, depth)) continue
    front.add(mass, depth)
    schemes.push(scheme)
  }
  return schemes
}
