import { describe, expect, it } from 'vitest'
import { publishedChecks } from '#shared/engine/verification'

describe('the list of published checks', () => {
  const checks = publishedChecks()

  it('passes in this build, every one', () => {
    expect(checks.filter(check => !check.passes).map(check => check.id)).toEqual([])
  })

  it('names each check once, with a source and a tolerance', () => {
    expect(new Set(checks.map(check => check.id)).size).toBe(checks.length)
    expect(checks.length).toBeGreaterThan(150)
    for (const check of checks) {
      expect(check.source.length).toBeGreaterThan(10)
      expect(check.tolerance > 0 || check.shown === true).toBe(true)
    }
  })
})
