import type { PublishedCheck } from './types'

/** What a check is before it is judged; the tolerance is absolute. */
export type Claim = Omit<PublishedCheck, 'deviation' | 'passes'>

/** Judges a claim. A shown deviation passes whatever it is. */
export function judge(claim: Claim): PublishedCheck {
  const difference = Math.abs(claim.computed - claim.expected)
  return {
    ...claim,
    deviation: claim.expected === 0 ? difference : claim.computed / claim.expected - 1,
    // A printed half digit stands for a real number: rounding of the comparison itself must not decide.
    passes: claim.shown === true || difference <= claim.tolerance * (1 + 1e-9),
  }
}

/** Half a unit of the last printed digit. */
export function halfDigit(digits: number): { tolerance: number, toleranceReason: string } {
  return { tolerance: 0.5 * 10 ** -digits, toleranceReason: 'half of the last printed figure' }
}

/** A share of the expected value, with its reason. */
export function share(expected: number, part: number, toleranceReason: string): { tolerance: number, toleranceReason: string } {
  return { tolerance: Math.abs(expected) * part, toleranceReason }
}
