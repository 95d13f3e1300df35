/**
 * NCCI SN003 (C1, C2 for k = kw = 1); independent eigenvalues of the engineering basis, section 6; worked check (b) of the practice page; closed solution for uniform moment.
 * Figures as collected in the project's check values; tolerance: half of the last printed figure, or
 * the reason that stands beside each check.
 */
import { describe, expect, it } from 'vitest'
import { criticalMoments } from '#shared/engine/verification'

const checks = criticalMoments()

describe('published checks: critical-moments', () => {
  it.each(checks.map(check => [`${check.source}: ${check.what} [${check.id}]`, check] as const))('%s', (_name, check) => {
    expect(Number.isFinite(check.computed)).toBe(true)
    if (check.shown) expect(Math.abs(check.deviation)).toBeLessThan(0.03)
    else expect(Math.abs(check.computed - check.expected)).toBeLessThanOrEqual(check.tolerance * (1 + 1e-9))
  })
})
