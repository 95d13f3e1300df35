/**
 * Worked UK example of a column (combinations 6.10, 6.10a, 6.10b); EN 1991-1-1 (6.1), (6.2); Budapest University of Technology, solution manual 10.11; worked check (a) of the practice page; spot values of 6.3.1, 6.3.2.3 and EN 1993-1-2 (4.22).
 * Figures as collected in the project's check values; tolerance: half of the last printed figure, or
 * the reason that stands beside each check.
 */
import { describe, expect, it } from 'vitest'
import { actionsAndService } from '#shared/engine/verification'

const checks = actionsAndService()

describe('published checks: actions-and-service', () => {
  it.each(checks.map(check => [`${check.source}: ${check.what} [${check.id}]`, check] as const))('%s', (_name, check) => {
    expect(Number.isFinite(check.computed)).toBe(true)
    if (check.shown) expect(Math.abs(check.deviation)).toBeLessThan(0.03)
    else expect(Math.abs(check.computed - check.expected)).toBeLessThanOrEqual(check.tolerance * (1 + 1e-9))
  })
})
