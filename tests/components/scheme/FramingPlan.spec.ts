import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import FramingPlan from '~/components/scheme/FramingPlan.vue'
import type { SchemeDetail, SchemeMemberDetail } from '#shared/schemas/api'

const member = (mark: string, more: Partial<SchemeMemberDetail>): SchemeMemberDetail => ({
  mark, kind: 'primary', section: 'UB 457x191x67', governing: 'buckling', utilisation: 0.9, place: mark, length: 9000, mass: 600,
  grade: 'S355', utilisations: {}, carriedBy: [], carries: [], reactions: null, frequency: null, alike: 1, ...more,
})

/** One bay of 9.0 × 7.5 m with one secondary beam; only what the plan reads. */
function bay(more: Partial<SchemeMemberDetail> = {}): SchemeDetail {
  const members = [
    member('P1', { from: [0, 0], to: [9000, 0], carries: ['S1'], carriedBy: ['C1'] }),
    member('P2', { from: [0, 7500], to: [9000, 7500], carries: ['S1'] }),
    member('S1', { kind: 'secondary', section: 'UB 406x140x39', from: [4500, 0], to: [4500, 7500], carriedBy: ['P1', 'P2'], ...more }),
    member('C1', { kind: 'column', section: 'UC 203x203x46', at: [0, 0] }),
  ]
  return {
    number: 7, members, primaryDirection: 'x', gridX: [{ label: '1', at: 0 }, { label: '2', at: 9000 }],
    gridY: [{ label: 'A', at: 0 }, { label: 'B', at: 7500 }],
    plate: { outline: [[0, 0], [9000, 0], [9000, 7500], [0, 7500]], voids: [], keepClear: [] },
  } as unknown as SchemeDetail
}
const mountPlan = (detail: SchemeDetail, selected: string | null = null) =>
  mountSuspended(FramingPlan, { props: { detail, selected } })

describe('framing plan', () => {
  it('writes sizes without the family where all beams are of one, with it where families mix', async () => {
    const alike = await mountPlan(bay())
    expect(alike.text()).toContain('457×191×67')
    expect(alike.text()).not.toContain('UB 457')
    const mixed = await mountPlan(bay({ section: 'IPE 400' }))
    expect(mixed.text()).toContain('UB 457×191×67')
    expect(mixed.text()).toContain('IPE 400')
  })

  it('says that a member fails', async () => {
    expect((await mountPlan(bay())).text()).not.toContain('fails')
    expect((await mountPlan(bay({ utilisation: 1.04 }))).text()).toContain('406×140×39 fails')
  })

  it('moves the selection with the arrow keys, opens with Enter and gives back with Escape', async () => {
    const plan = await mountPlan(bay(), 'P1')
    const drawing = plan.find('[role="group"]')
    await drawing.trigger('keydown', { key: 'ArrowUp' })
    await drawing.trigger('keydown', { key: 'Enter' })
    await drawing.trigger('keydown', { key: 'Escape' })
    expect(plan.emitted('select')).toEqual([['S1'], [null]])
    expect(plan.emitted('open')).toEqual([['P1']])
  })

  it('reads out the selected member', async () => {
    const plan = await mountPlan(bay(), 'S1')
    expect(plan.find('[aria-live]').text()).toContain('secondary beam S1')
  })
})
