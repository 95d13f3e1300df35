/** The calculation sheet of a column, worked out again from what stands on it. */
import { describe, expect, it } from 'vitest'
import { combinationFactors, nationalChoice } from '#shared/engine/actions'
import { type BeamEnd, type ColumnDemand, type ColumnRules, columnSizer, explainColumn } from '#shared/engine/columns'
import { sectionsOf } from '#shared/engine/sections'
import { columnSheet } from '#shared/engine/sheet'
import { differenceOf, wrongEqualities } from '../engine-base/recalculate'

const UK = nationalChoice('UK')

function end(axis: 'x' | 'y', side: 1 | -1, permanent: number, variable: number[], area: number): BeamEnd {
  return { axis, side, permanent: permanent * 1000, variable: variable.map(value => value * 1000), area }
}

const ends = [end('x', 1, 60, [40, 0], 10), end('x', -1, 130, [80, 20], 20), end('y', 1, 33, [21, 5], 4)]
const demand = (change: Partial<ColumnDemand> = {}): ColumnDemand => ({
  web: 'x', direct: { permanent: 12_000, variable: [0, 0], area: 0 }, ends, unheldFloors: { x: 0, y: 0 }, ...change,
})

const rules = (change: Partial<ColumnRules> = {}): ColumnRules => ({
  choice: UK, combinations: combinationFactors(UK, '6.10'), kinds: [{ category: 'B', reducible: true }, { category: 'E', reducible: false }],
  grade: 'S355', sections: sectionsOf(['UC']), storeys: 4, storeyHeight: 4000, liftStoreys: 2, roof: null, reducesByStoreys: true,
  ltbMethod: '6.3.2.3', utilisationLimit: 1, ...change,
})

const roof = { permanent: 4, variable: 0.75 }
const ab = combinationFactors(UK, '6.10ab')
const columns: [string, ColumnRules, ColumnDemand][] = [
  ['held on every floor', rules(), demand()],
  ['under a roof, by 6.10a and 6.10b', rules({ roof, combinations: ab }), demand()],
  ['unheld along y on two floors', rules({ roof, combinations: ab, ltbMethod: '6.3.2.2' }), demand({ unheldFloors: { x: 0, y: 2 } })],
  ['unheld along x, web along y', rules({ choice: nationalChoice('DE'), reducesByStoreys: false }), demand({ web: 'y', unheldFloors: { x: 1, y: 0 } })],
  ['of nearly no load, short lengths', rules({ storeyHeight: 500 }), demand({ ends: [end('x', 1, 5, [1, 1], 1)] })],
  ['balanced on both sides', rules(), demand({ ends: [end('x', 1, 60, [40, 0], 10), end('x', -1, 60, [40, 0], 10)] })],
]

describe.each(columns)('the calculation sheet of a column %s', (_name, rule, asked) => {
  const sizer = columnSizer(rule)
  const sized = sizer.size(asked)!
  const sheet = columnSheet(explainColumn(sizer, asked, sized), { title: 'column B / 4' })
  const rows = sheet.lifts.flatMap(({ groups }) => groups.flatMap(group => group.rows))

  it('can be recalculated from the numbers on it', () => {
    const differences = rows.map(row => ({ check: row.check, text: row.substituted, difference: differenceOf(row) }))
    const checked = differences.filter(({ difference }) => difference !== null)
    expect(checked.length).toBeGreaterThan(10 * sheet.lifts.length)
    expect(checked.filter(({ difference }) => difference! > 1e-3)).toEqual([])
    expect(rows.flatMap(row => wrongEqualities(row.substituted))).toEqual([])
  })

  it('has the forces, resistances and utilisations of the sizing', () => {
    sized.lifts.forEach((lift, n) => {
      const shown = sheet.lifts[n]!.groups.flatMap(group => group.rows)
      const length = lift.lengths.reduce((most, next) => next.utilisation > most.utilisation ? next : most)
      const value = (check: string) => {
        const found = shown.find(row => row.check.startsWith(check))!.resistance
        return found !== null && typeof found !== 'string' ? found.value : Number.NaN
      }
      expect(value('Axial force at the foot')).toBeCloseTo(length.NEd / 1e3, 6)
      expect(value('Buckling resistance about y')).toBeCloseTo(length.NbYRd / 1e3, 6)
      expect(value('Buckling resistance about z')).toBeCloseTo(length.NbZRd / 1e3, 6)
      expect(value('Buckling resistance in bending')).toBeCloseTo(length.MbRd / 1e6, 6)
      expect(value('Bending about z')).toBeCloseTo(length.MczRd / 1e6, 6)
      const moments = (axis: 'y' | 'z') => Math.max(0, ...shown
        .filter(row => row.check.startsWith(`Moment about ${axis}`)).map(({ resistance }) => (resistance as { value: number }).value))
      expect(moments('y')).toBeCloseTo(length.MyEd / 1e6, 6)
      expect(moments('z')).toBeCloseTo(length.MzEd / 1e6, 6)
      expect(Math.max(...shown.map(row => row.utilisation ?? 0))).toBeCloseTo(lift.utilisation, 9)
    })
  })

  it('takes the smaller or larger of the two forms of an interaction factor', () => {
    for (const { check, substituted, resistance } of rows.filter(row => /^k_\{(yy|zz|zy)\}/.test(row.check))) {
      const forms = substituted.split('; ').map(part => Number(part.split(' = ')[1]!.replaceAll('\u2009', '')))
      const chosen = check.endsWith('larger') ? Math.max(...forms) : Math.min(...forms)
      expect(resistance).toBe(`${check.split(',')[0]!} ${chosen.toFixed(4)}`)
    }
  })

  it('marks the governing row once and says its parts', () => {
    const governing = rows.filter(row => row.governs)
    expect(governing).toHaveLength(1)
    expect(governing[0]!.utilisation).toBeCloseTo(Math.max(...sized.lifts.map(lift => lift.utilisation)), 9)
    expect(sheet.governing.sentence).toContain(governing[0]!.check)
    expect(sheet.passes).toBe(true)
  })

  it('has no number that is none', () => {
    expect(JSON.stringify(sheet)).not.toMatch(/NaN|Infinity|undefined/)
  })
})

describe('the axial force of a column sheet', () => {
  it('stands there in its parts: floors by αn, the roof by ψ0, its own weight', () => {
    const asked = demand({ ends: [end('x', 1, 100, [80, 0], 10), end('x', -1, 100, [80, 0], 10)], direct: { permanent: 0, variable: [0, 0], area: 0 } })
    const sizer = columnSizer(rules({ roof, storeys: 3 }))
    const sheet = columnSheet(explainColumn(sizer, asked, sizer.size(asked)!), { title: 'column' })
    const [force] = sheet.lifts[0]!.groups[0]!.rows
    // UK αn of three storeys 0.8, ψ0 of the roof 0.7; 20 m² of roof: 80 permanent, 15 variable
    expect(force!.substituted).toMatch(/^1\.35 × 3 × 200\.00 \+ 1\.5 × 0\.8 × 3 × 160\.00 \+ 1\.35 × 80\.00 \+ 1\.5 × 0\.7 × 15\.00 \+ 1\.35 × /)
    expect(force!.substituted).toContain('permanent of 3 floors + variable B of 3 floors + permanent of the roof + variable of the roof + own weight')
  })
})
