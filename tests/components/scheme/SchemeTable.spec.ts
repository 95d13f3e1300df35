import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import SchemeTable from '~/components/scheme/SchemeTable.vue'
import { openQuery } from '~/stores/schemes'
import type { SchemeRow } from '#shared/schemas/api'
import { PlateSchema, type Slab } from '#shared/schemas/plate'

const slab: Slab = { system: 'deck', depth: 130, maxSpan: 3300, weight: 2.75, fixedToTopFlange: true, span: 'free' }
const plate = PlateSchema.parse({
  format: 'baywright-plate', version: 1, name: 'Level 1',
  gridX: [{ label: '1', at: 0 }, { label: '2', at: 9000 }], gridY: [{ label: 'A', at: 0 }, { label: 'B', at: 7500 }],
  outline: [[0, 0], [9000, 0], [9000, 7500], [0, 7500]], slab,
  floorLoad: { permanent: 3.6, variable: 3.8, category: 'B' }, storeys: 1, storeyHeight: 4000,
})
const row = (rank: number, massPerArea: number, more: Partial<SchemeRow> = {}): SchemeRow => ({
  rank, number: rank * 10, key: String(rank * 10), baysX: [9000], baysY: [7500], primaryDirection: 'x', divisions: 3, slab: 0,
  depthCap: null, beamMass: 1000, columnMass: 200, mass: 1200, massPerArea, depth: 540, pieces: 12, distinctSections: 4,
  onTradeOffLine: rank === 1, lowestFrequency: 3.6, governing: { deflectionTotal: 8, buckling: 2 }, ...more,
})
const mountTable = (rows: SchemeRow[], slabs: Slab[] = [slab]) => mountSuspended(SchemeTable, {
  props: { rows, slabs, plate, query: openQuery(), selected: '20', view: 'engineer', names: { x: 'numbers', y: 'letters' }, lightest: 40 },
})

describe('ranked table of schemes', () => {
  it('calls a difference under 3 % of the lightest equal, and no other', async () => {
    const table = await mountTable([row(1, 40), row(2, 41.1), row(3, 41.3)])
    const texts = table.findAll('table tbody tr').map(each => each.text())
    expect(texts[0]).not.toContain('equal')
    expect(texts[1]).toContain('+1.1 equal')
    expect(texts[2]).toContain('+1.3')
    expect(texts[2]).not.toContain('equal')
  })

  it('shows the structural depth: slab and deepest beam', async () => {
    const table = await mountTable([row(1, 40)])
    expect(table.find('table tbody td.lead:not(:first-child)').text()).toBe('670')
  })

  it('asks for another order and says which one stands', async () => {
    const table = await mountTable([row(1, 40)])
    expect(table.find('th[aria-sort="ascending"]').text()).toContain('Steel')
    await table.findAll('th button.sort').find(button => button.text().startsWith('Depth'))?.trigger('click')
    expect(table.emitted('sort')).toEqual([['depth']])
  })

  it('orders by the deepest beam where slabs differ, and names the slab', async () => {
    const planks: Slab = { ...slab, system: 'planks', depth: 275, name: 'Planks 275' }
    const table = await mountTable([row(1, 40, { slab: 1 })], [slab, planks])
    expect(table.text()).toContain('Planks 275')
    expect(table.find('table tbody').text()).toContain('815')
    await table.findAll('th button.sort').find(button => button.text().startsWith('Deepest beam'))?.trigger('click')
    expect(table.emitted('sort')).toEqual([['depth']])
  })

  it('selects with the mouse and with the keyboard', async () => {
    const table = await mountTable([row(1, 40), row(2, 45)])
    expect(table.find('tr.is-selected th button').attributes('aria-pressed')).toBe('true')
    await table.find('table tbody tr').trigger('click')
    await table.find('table tbody th button').trigger('click')
    expect(table.emitted('select')).toEqual([['10'], ['10']])
  })
})
