/** The three scenarios, one typical level each, against the bands that the practice page gives for bare steel and for planks. */
import { readFileSync } from 'node:fs'
import { describe, expect, it, vi } from 'vitest'
import { type PreparedStudy, examineRange, prepareStudy, rankRows, schemeDetail } from '#shared/engine/search'
import { rebuildScheme } from '#shared/engine/search/rebuild'
import type { SchemeRow } from '#shared/schemas/api'
import type { BasisInput } from '#shared/schemas/basis'
import { PlateSchema } from '#shared/schemas/plate'
import type { Range } from '#shared/schemas/range'
import { basisOf, rangeOf } from './inputs'

vi.setConfig({ testTimeout: 120_000 })

const limits = { variable: 360, total: 200, frequency: 3, variableShare: 0.1 }

function studied(name: string, basis: Partial<BasisInput>, range: Partial<Range>): { prepared: PreparedStudy, rows: SchemeRow[] } {
  const file: unknown = JSON.parse(readFileSync(new URL(`../../fixtures/${name}.json`, import.meta.url), 'utf8'))
  const prepared = prepareStudy({ plate: PlateSchema.parse(file), basis: basisOf({ limits, ...basis }), range: rangeOf(range) })
  return { prepared, rows: rankRows(examineRange(prepared, 0, prepared.total)) }
}

const perArea = ({ prepared }: { prepared: PreparedStudy }, kg: number) => kg / (prepared.models[0]!.slabArea / 1e6)

/** With 10 % for connections and 2.5 kg/m² of bracing. */
const frameOf = (s: { prepared: PreparedStudy, rows: SchemeRow[] }) => 1.1 * (perArea(s, s.rows[0]!.beamMass) + perArea(s, s.rows[0]!.columnMass)) + 2.5

describe('S1, an office of 54 × 36 m in bare steel', () => {
  const s1 = studied('s1-office', { constructionStage: true }, { divisions: [1, 2, 3, 4, 5] })

  it('has beams of 26 to 34 kg/m² and a frame of 37 to 47 kg/m²', () => {
    expect(perArea(s1, s1.rows[0]!.beamMass)).toBeGreaterThan(26)
    expect(perArea(s1, s1.rows[0]!.beamMass)).toBeLessThan(34)
    expect(frameOf(s1)).toBeGreaterThan(37)
    expect(frameOf(s1)).toBeLessThan(47)
  })

  it('is 533 to 610 mm deep, secondaries 406 to 457 deep of 39 to 52 kg/m, primaries of 82 to 101 kg/m', () => {
    expect(s1.rows[0]!.depth).toBeGreaterThan(525)
    expect(s1.rows[0]!.depth).toBeLessThan(620)
    const { members } = schemeDetail(s1.prepared, s1.rows[0]!.key)
    const sections = (kind: string, length: number) => [...new Set(members.filter(m => m.kind === kind && m.length === length).map(m => m.section))]
    expect(sections('secondary', 7500)).toEqual(['UB 406x140x39'])
    for (const section of sections('primary', 9000)) expect(section).toMatch(/^UB (457x191x82|533x210x(82|92)|610x(178x82|229x101))$/)
  })

  it('rejects one division and two for the slab span and keeps equilibrium', () => {
    const whole = examineRange(s1.prepared, 0, s1.prepared.total)
    // bays of 9 and 7.5 m at 3.3 m: 9/2 and 7.5/2 are too much, 9/3 and 7.5/3 are not
    expect(whole.counts).toMatchObject({ examined: 10, feasible: 6, rejected: { 'slab-span': 4 } })
    expect(rebuildScheme(s1.prepared, s1.rows[0]!.key).residual).toBeLessThan(1e-9)
  })
})

describe('S2, a school of two wings on planks', () => {
  const buildability = { secondaryNotDeeper: false, minFlangeWidth: 180, maxPiece: null }
  const s2 = studied('s2-school', { buildability }, { divisions: [1, 2] })
  const detail = schemeDetail(s2.prepared, s2.rows[0]!.key)

  it('has beams of 14 to 20 kg/m² once the planks are grouted', () => {
    expect(perArea(s2, s2.rows[0]!.beamMass)).toBeGreaterThan(14)
    expect(perArea(s2, s2.rows[0]!.beamMass)).toBeLessThan(20)
  })

  it('is heavier where planks on one side are checked during erection', () => {
    const erected = studied('s2-school', { buildability, constructionStage: true }, { divisions: [1] })
    expect(erected.rows[0]!.beamMass).toBeGreaterThan(s2.rows[0]!.beamMass)
    expect(erected.rows[0]!.governing['construction']).toBeGreaterThan(0)
  })

  it('spans the planks along y: primaries along x, the beams across are ties only', () => {
    expect([s2.rows[0]!.primaryDirection, s2.rows[0]!.divisions]).toEqual(['x', 1])
    const ties = detail.members.filter(m => m.kind === 'tie')
    expect(ties.length).toBeGreaterThan(10)
    for (const tie of ties) expect(tie.section).toMatch(/^UB (203x133|254x102)/)
  })

  it('has a column at the re-entrant corner 4/D', () => {
    expect(detail.members.some(m => m.kind === 'column' && m.place === '4/D')).toBe(true)
  })

  it('gives beams with planks on both sides 180 mm of flange, on one side 150', () => {
    const { prepared, sized } = rebuildScheme(s2.prepared, s2.rows[0]!.key)
    prepared.frame.beams.forEach(({ slabSides }, b) => {
      expect(sized.sections[b]!.section.b).toBeGreaterThanOrEqual(slabSides === 2 ? 180 : slabSides === 1 ? 150 : 0)
    })
    const besideHall = prepared.frame.beams.find(b => b.axis === 'x' && b.at === 7500 && b.from === 43_200)!
    expect(besideHall.slabSides).toBe(1)
  })

  it('leaves the façade columns beside the hall unheld over two storeys', () => {
    const column = detail.members.find(m => m.kind === 'column' && m.place === '8/A')!
    // storeys of 3.8 m, the first floor missing across the façade: 7.6 m about the axis along it
    const foot = column.lifts![0]!
    expect([foot.LcrY, foot.LcrZ].sort((a, b) => a - b)).toEqual([3800, 7600])
    expect(foot.method).toBe('6.3.3 Annex B')
  })
})

describe('S4, a laboratory of 46.2 × 26.4 m', () => {
  const s4 = studied('s4-laboratory', { constructionStage: true }, { divisions: [1, 2, 3, 4] })

  it('keeps the laboratory strips clear of columns, every member within its limit, in equilibrium', () => {
    expect(s4.rows.length).toBeGreaterThan(0)
    const scheme = rebuildScheme(s4.prepared, s4.rows[0]!.key)
    expect(scheme.prepared.frame.columns.some(c => (c.y > 1000 && c.y < 8900) || (c.y > 17_500 && c.y < 25_400))).toBe(false)
    expect(Math.max(...scheme.sized.sections.map(s => s.utilisation))).toBeLessThanOrEqual(1)
    expect(scheme.residual).toBeLessThan(1e-9)
  })

  it('moved into a strip is rejected as a column in a keep-clear zone', () => {
    const moved = studied('s4-laboratory', {}, { divisions: [3], y: { kind: 'equal', min: 6000, max: 7000 } })
    const { counts } = examineRange(moved.prepared, 0, moved.prepared.total)
    expect(counts.rejected).toEqual({ 'column-in-keep-clear': counts.examined })
  })
})
