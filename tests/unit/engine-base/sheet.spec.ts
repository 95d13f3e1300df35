import { describe, expect, it } from 'vitest'
import { applyOverrides, nationalChoice } from '#shared/engine/actions'
import { verifyBeam } from '#shared/engine/members'
import type { Beam, BeamRules } from '#shared/engine/members'
import { findSection, sectionsOf } from '#shared/engine/sections'
import { calculationSheet } from '#shared/engine/sheet'
import type { CalculationSheet } from '#shared/engine/sheet'
import { FREE, beamOf, heldOver, line, point, rulesOf } from './beams'
import { differenceOf, workedOut, wrongEqualities } from './recalculate'

const primary = beamOf(9000, {
  line: [line(0, 9000, 3.1, 2, 'top')],
  point: [point(3000, 42e3, 55e3), point(6000, 42e3, 55e3)],
  restraint: { held: [], points: [3000, 6000] },
}, [
  { name: 'wet slab', line: [line(0, 9000, 8, 2, 'top')], point: [], restraint: FREE },
  { name: 'planks on one side', line: [line(0, 9000, 4, 2, 'top')], point: [], restraint: FREE },
])
const secondary = beamOf(7500, { line: [line(0, 7500, 10, 9)], restraint: heldOver(7500) })
const uneven = beamOf(8000, {
  line: [line(0, 5000, 6, 4, 'top'), line(5000, 8000, 3, 2, 'top')],
  point: [point(2600, 30e3, 40e3)],
  restraint: { held: [{ from: 0, to: 2600 }], points: [5200] },
})
const short = beamOf(2400, { point: [point(1000, 200e3, 330e3)], restraint: heldOver(2400) })

const cases: [string, Beam, string, BeamRules][] = [
  ['a primary with two construction cases', primary, 'UB 533x210x92', rulesOf({ combination: '6.10ab', useF: true, limits: { variable: 360, total: 250, frequency: 3, variableShare: 0.1 } })],
  ['a held secondary', secondary, 'UB 406x140x39', rulesOf({ choice: nationalChoice('EN') })],
  ['an uneven beam held in part', uneven, 'UB 457x191x67', rulesOf({ ltbMethod: '6.3.2.2' })],
  ['a whole-beam eigenvalue', primary, 'UB 533x210x92', rulesOf({ criticalMoment: 'whole-beam' })],
  ['high shear', short, 'UB 457x191x67', rulesOf()],
  ['a slender web', beamOf(6000, { line: [line(0, 6000, 100, 100)], restraint: heldOver(6000) }), 'UB 762x267x134', rulesOf()],
]

function sheetOf(beam: Beam, designation: string, rules: BeamRules): CalculationSheet {
  return calculationSheet(beam, findSection(designation)!, 'S355', rules, { title: 'beam', candidates: sectionsOf(['UB']), psiFire: 0.5 })
}

describe.each(cases)('the calculation sheet of %s', (_name, beam, designation, rules) => {
  const sheet = sheetOf(beam, designation, rules)
  const rows = sheet.groups.flatMap(group => group.rows)

  it('can be recalculated from the numbers on it', () => {
    const differences = rows.map(row => ({ check: row.check, text: row.substituted, difference: differenceOf(row) }))
    const checked = differences.filter(({ difference }) => difference !== null)
    expect(checked.length).toBeGreaterThan(9)
    expect(checked.filter(({ difference }) => difference! > 1e-3)).toEqual([])
    expect(rows.flatMap(row => wrongEqualities(row.substituted))).toEqual([])
  })

  it('has utilisations that are effect over resistance', () => {
    const pairs = rows.flatMap(({ check, effect, resistance, utilisation }) =>
      utilisation !== null && effect !== null && resistance !== null && typeof effect !== 'string' && typeof resistance !== 'string'
        ? [{ check, utilisation, effect: effect.value, resistance: resistance.value }]
        : [])
    expect(pairs.length).toBeGreaterThan(2)
    for (const { check, utilisation, effect, resistance } of pairs) {
      const worked = check.startsWith('Frequency') ? resistance / effect : effect / resistance
      expect(worked, check).toBeCloseTo(utilisation, 9)
    }
  })

  it('has the governing check marked once, with the highest utilisation of all rows', () => {
    const governing = rows.filter(row => row.governs)
    expect(governing).toHaveLength(1)
    expect(governing[0]!.utilisation).toBe(sheet.governing.utilisation)
    expect(Math.max(...rows.map(row => row.utilisation ?? 0))).toBe(sheet.governing.utilisation)
  })

  it('says what the plain verification says', () => {
    const verified = verifyBeam(beam, findSection(designation)!, 'S355', rules)
    expect([sheet.passes, sheet.governing.check, sheet.governing.utilisation]).toEqual([verified.passes, verified.governing, verified.largest])
    expect(sheet.segments.map(({ utilisation }) => utilisation)).toEqual(verified.cases[verified.shown]!.segments.map(({ utilisation }) => utilisation))
  })

  it('draws diagrams that reach the figures written on them', () => {
    const { x, shear, moment, deflectionTotal, largest } = sheet.diagrams
    expect([shear.length, moment.length, deflectionTotal.length]).toEqual([x.length, x.length, x.length])
    expect(x[0]).toBe(0)
    expect(x.at(-1)).toBe(beam.span)
    for (let i = 1; i < x.length; i++) expect(x[i]!).toBeGreaterThanOrEqual(x[i - 1]!)
    expect(Math.max(...moment)).toBeLessThanOrEqual(largest.moment.value * (1 + 1e-9))
    expect(Math.max(...moment)).toBeGreaterThan(0.98 * largest.moment.value)
    expect(Math.max(...deflectionTotal)).toBeGreaterThan(0.98 * largest.deflectionTotal.value)
    expect(shear[0]!).toBeCloseTo(sheet.reactions.left.ultimate, 6)
    expect(-shear.at(-1)!).toBeCloseTo(sheet.reactions.right.ultimate, 6)
  })

  it('has no number that is none', () => {
    expect(JSON.stringify(sheet)).not.toMatch(/NaN|Infinity|undefined/)
    const numbers = rows.flatMap(row => [row.effect, row.resistance]).filter(value => value !== null && typeof value !== 'string')
    for (const value of numbers) expect(Number.isFinite((value as { value: number }).value)).toBe(true)
  })
})

describe('words of the sheet', () => {
  it('explains why the next lighter section is not enough, by verifying it', () => {
    const sheet = sheetOf(secondary, 'UB 457x191x67', rulesOf())
    const lighter = findSection(sheet.whyNotLighter!.section)!
    expect(lighter.mass).toBeLessThan(67.1)
    const verified = verifyBeam(secondary, lighter, 'S355', rulesOf())
    expect(sheet.whyNotLighter!.utilisation).toBe(verified.largest)
    expect(sheet.whyNotLighter!.sentence).toContain(verified.passes ? 'passes' : 'fails')
  })

  it('gives the critical temperature only where stability does not govern', () => {
    const fire = (sheet: CalculationSheet) => sheet.groups.at(-1)!.rows.at(-1)!.resistance
    expect(fire(sheetOf(primary, 'UB 533x210x92', rulesOf()))).toBe('not given: stability governs')
    expect(fire(sheetOf(secondary, 'UB 406x140x39', rulesOf()))).toMatchObject({ unit: '°C' })
  })

  it('reduces for fire from the combination that the utilisation belongs to', () => {
    const temperature = (combination: '6.10' | '6.10ab', permanent: number, variable: number) => {
      const beam = beamOf(7500, { line: [line(0, 7500, permanent, variable)], restraint: heldOver(7500) }, [], false)
      const sheet = sheetOf(beam, 'UB 406x140x39', rulesOf({ combination }))
      return [sheet.combination, (sheet.groups.at(-1)!.rows.at(-1)!.resistance as { value: number }).value]
    }
    // M = (G + ψfi Q) L²/8 against Wpl fy whatever the combination: θcr of μ0 = M/Mc,Rd by EN 1993-1-2 (4.22)
    const expected = (G: number, Q: number) => {
      const mu = (G + 0.5 * Q) * 7500 ** 2 / 8 / (findSection('UB 406x140x39')!.WplY * 355)
      return 39.19 * Math.log(1 / (0.9674 * mu ** 3.833) - 1) + 482
    }
    expect(temperature('6.10', 10, 9)).toEqual(['6.10', expect.closeTo(expected(10, 9), 6)])
    expect(temperature('6.10ab', 10, 9)).toEqual(['6.10b', expect.closeTo(expected(10, 9), 6)])
    expect(temperature('6.10ab', 20, 1)).toEqual(['6.10a', expect.closeTo(expected(20, 1), 6)])
  })

  it('shows beside a whole beam the closed form of its weakest piece alone, which is less', () => {
    const rows = sheetOf(primary, 'UB 533x210x92', rulesOf({ criticalMoment: 'whole-beam' })).groups.flatMap(group => group.rows)
    const value = (check: string) => (rows.find(row => row.check.startsWith(check))!.resistance as { value: number }).value
    const alone = rows.find(row => row.check.startsWith('Closed form of that piece'))!
    // the middle third under nearly uniform moment: C1 1.0
    expect(rows.some(row => row.check === 'Uniform moment on the piece from 3.00 to 6.00 m')).toBe(true)
    expect(Number(alone.substituted.split(' ')[0])).toBeCloseTo(1, 2)
    expect(value('Closed form of that piece') / value('Elastic critical moment')).toBeLessThan(0.8)
    expect(value('Closed form of that piece') / value('Elastic critical moment')).toBeGreaterThan(0.7)
  })

  it('shows the rules of a tie where the beam serves as one', () => {
    const beam = beamOf(9000, { restraint: FREE })
    const tie = (context: { tieForce?: number }) => calculationSheet(beam, findSection('UB 254x102x22')!, 'S355', rulesOf(), { title: 'tie', ...context })
      .groups.find(({ title }) => title === 'Tie')?.rows
    expect(tie({})).toBeUndefined()
    // A 28.02 cm²: 2802 · 355 = 995 kN; L/40 = 225 mm against 254; L/300 = 30 mm against iz 20.6
    const rows = tie({ tieForce: 99_000 })!
    expect(rows.map(({ utilisation }) => utilisation)).toEqual([expect.closeTo(99 / 994.7, 3), expect.closeTo(225 / 254, 9), expect.closeTo(30 / 20.58, 2)])
    expect(rows.flatMap(row => wrongEqualities(row.substituted))).toEqual([])
    expect(differenceOf(rows[0]!)).toBeLessThan(1e-3)
  })

  it('says where k_c comes from', () => {
    const beam = beamOf(6000, { line: [line(0, 6000, 8, 6)], restraint: FREE })
    const words = (code: 'EN' | 'UK') => sheetOf(beam, 'UB 457x191x67', rulesOf({ choice: nationalChoice(code), useF: true }))
      .groups.flatMap(({ rows }) => rows).find(({ clause }) => clause === '(6.58)')!.substituted
    expect(words('EN')).toContain('k_{c} of Table 6.6')
    expect(words('UK')).toMatch(/k_\{c\} = 1 \/ √1\.13\d\d/)
  })

  it('prints the overrides and what is from memory', () => {
    const { choice, overridden } = applyOverrides(nationalChoice('UK'), { gammaM1: 1.1 })
    const sheet = calculationSheet(secondary, findSection('UB 406x140x39')!, 'S355', rulesOf({ choice }), { title: 'beam', overrides: overridden })
    expect(sheet.choices).toContain('γM1: 1.1 instead of 1, set in the basis of design')
    expect(sheet.choices.some(text => text.startsWith('From memory, confirm'))).toBe(true)
    expect(sheet.whyNotLighter).toBeNull()
  })

  it('works out an expression like a pocket calculator', () => {
    expect(workedOut('2\u2009360.1 × 10^{3} × 355 / 1.0')).toBeCloseTo(837_835_500, 0)
    expect(workedOut('0.5 [1 + 0.49 (0.7396 − 0.4) + 0.75 × 0.7396^{2}]')).toBeCloseTo(0.7883, 4)
    expect(workedOut('held along its whole length')).toBeNull()
  })
})
