/**
 * Steel Buildings in Europe – Multi-Storey Steel Buildings, Parts 1–10 (RFCS project SECHALO, technical content CTICM and SCI, 2009–2010), and EN 1991-1-7 A.5 as it quotes it.
 * Figures as collected in the project's check values; tolerance: half of the last printed figure, or
 * the reason that stands beside each check.
 */
import { describe, expect, it } from 'vitest'
import { steelBuildingsInEurope } from '#shared/engine/verification'

const checks = steelBuildingsInEurope()

describe('published checks: steel-buildings-in-europe-2010', () => {
  it.each(checks.map(check => [`${check.source}: ${check.what} [${check.id}]`, check] as const))('%s', (_name, check) => {
    expect(Number.isFinite(check.computed)).toBe(true)
    if (check.shown) expect(Math.abs(check.deviation)).toBeLessThan(0.03)
    else expect(Math.abs(check.computed - check.expected)).toBeLessThanOrEqual(check.tolerance * (1 + 1e-9))
  })
})
