import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import StudyCounts from '~/components/study/StudyCounts.vue'

describe('counts of a study', () => {
  it('names each first reason in trade words and adds up to what was examined', async () => {
    const table = await mountSuspended(StudyCounts, {
      props: { counts: { range: 1000, examined: 1000, cut: 0, rejected: { 'void-cuts-beam': 240, 'slab-span': 600 }, feasible: 160 } },
    })
    const rows = table.findAll('tbody tr').map(each => each.text().replace(/\s+/g, ' '))
    expect(rows).toHaveLength(3)
    expect(rows[0]).toMatch(/^Stands ?160 ?16\.0.%$/)
    expect(rows[1]).toContain('A void cuts a beam')
    expect(rows[2]).toContain('Slab span over its limit')
    expect(table.find('tfoot').text().replace(/\s/g, '')).toBe('Sum1000100.0%')
  })

  it('has no share before anything is examined', async () => {
    const table = await mountSuspended(StudyCounts, { props: { counts: { range: 10, examined: 0, cut: 0, rejected: {}, feasible: 0 } } })
    expect(table.find('tbody').text().replace(/\s/g, '')).toBe('Stands00.0%')
  })
})
