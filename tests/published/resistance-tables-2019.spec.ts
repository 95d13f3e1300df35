/**
 * British section resistance tables to Eurocode 3 with the UK National Annex, sections to BS EN 10365:2017 (published by SCI, edition of 2019); Eurocodes – Design of steel buildings with worked examples, Brussels, 16–17 October 2014.
 * Figures as collected in the project's check values; tolerance: half of the last printed figure, or
 * the reason that stands beside each check.
 */
import { describe, expect, it } from 'vitest'
import { resistanceTables } from '#shared/engine/verification'

const checks = resistanceTables()

describe('published checks: resistance-tables-2019', () => {
  it.each(checks.map(check => [`${check.source}: ${check.what} [${check.id}]`, check] as const))('%s', (_name, check) => {
    expect(Number.isFinite(check.computed)).toBe(true)
    if (check.shown) expect(Math.abs(check.deviation)).toBeLessThan(0.03)
    else expect(Math.abs(check.computed - check.expected)).toBeLessThanOrEqual(check.tolerance * (1 + 1e-9))
  })
})
