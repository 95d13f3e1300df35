import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import SheetTable from '~/components/member/SheetTable.vue'
import type { SheetRow } from '#shared/engine/sheet'

const row = (more: Partial<SheetRow>): SheetRow => ({
  clause: '6.2.5', check: 'Bending', expression: 'M_{c,Rd} = W_{pl,y} f_{y} / γ_{M0}', substituted: '2 828.4 × 10^{3} × 345 / 1.0',
  effect: { value: 739.04, unit: 'kNm', digits: 1 }, resistance: { value: 975.8, unit: 'kNm', digits: 1 }, utilisation: 0.757, governs: false, ...more,
})
const mountTable = (rows: SheetRow[]) => mountSuspended(SheetTable, { props: { groups: [{ title: 'Strength', rows }] } })

describe('checks of a calculation sheet', () => {
  it('sets the expression, then the numbers in the same order, with effect and resistance in their unit', async () => {
    const table = await mountTable([row({})])
    const cells = table.findAll('tbody tr:not(.is-group) > *').map(cell => cell.text().replace(/\s+/g, ' '))
    expect(cells[2]).toBe('Mc,Rd = Wpl,y fy / γM0=2 828.4 × 103 × 345 / 1.0')
    expect(cells[3]).toBe('739.0 kNm')
    expect(cells[4]).toBe('975.8 kNm')
    expect(cells[5]).toBe('0.76')
    expect(table.find('sub').text()).toBe('c,Rd')
  })

  it('marks the governing row with the word', async () => {
    const table = await mountTable([row({}), row({ check: 'Shear', governs: true })])
    const marked = table.findAll('tr.is-governing')
    expect(marked).toHaveLength(1)
    expect(marked[0]?.text()).toContain('governs')
  })

  it('says "fails" above 1.00', async () => {
    const table = await mountTable([row({ utilisation: 1.003 })])
    expect(table.text()).toContain('1.003 fails')
  })

  it('leaves the utilisation out where there is none', async () => {
    const table = await mountTable([row({ utilisation: null, effect: 'class 1', resistance: null })])
    const cells = table.findAll('tbody tr:not(.is-group) > *')
    expect(cells[3]?.text()).toBe('class 1')
    expect(cells[5]?.text()).toBe('')
  })
})
