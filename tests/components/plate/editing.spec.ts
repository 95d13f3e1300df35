import { mountSuspended } from '@nuxt/test-utils/runtime'
import { beforeEach, describe, expect, it } from 'vitest'
import { flushPromises, type VueWrapper } from '@vue/test-utils'
import PlateDimensionField from '~/components/plate/PlateDimensionField.vue'
import PlatePanel from '~/components/plate/PlatePanel.vue'
import PlateTableLines from '~/components/plate/PlateTableLines.vue'
import { baysOf } from '~/utils/plate/grid'
import { officePlate } from '../../unit/ui/plate/plates'

function load() {
  const store = usePlateStore()
  store.load({
    id: 'a', projectId: 'b', version: 3, savedAt: '2026-12-01T09:42:00Z', savedBy: 'Demo engineer', document: officePlate(),
  })
  store.select(null)
  store.rights = 'all'
  store.rest = 'shift'
  return store
}

async function type(wrapper: VueWrapper, label: string, value: string) {
  const id = wrapper.findAll('label').find(each => each.text().trim() === label)?.attributes('for')
  const input = wrapper.find<HTMLInputElement>(`[id="${id ?? ''}"]`)
  await input.setValue(value)
  await input.trigger('change')
  await flushPromises()
}

describe('the table of grid lines', () => {
  let store: ReturnType<typeof load>
  beforeEach(() => {
    store = load()
  })

  it('sets a bay in metres, shifts the rest, and takes it back as one step', async () => {
    const wrapper = await mountSuspended(PlateTableLines, { props: { axis: 'y' } })
    await type(wrapper, 'Bay C to D', '7.5 m')
    expect(baysOf(store.document?.gridY ?? [])).toEqual([7500, 7500, 7500, 7500, 7500])
    expect(store.document?.outline[2]).toEqual([54000, 37500])
    store.undo()
    expect(store.document).toEqual(officePlate())
    expect(usePlateHistoryStore().redoLabel).toBe('bay C–D')
  })

  it('says in place why a line cannot stand there, and keeps the document', async () => {
    const wrapper = await mountSuspended(PlateTableLines, { props: { axis: 'x' } })
    await type(wrapper, 'Position of line 4', '36000')
    expect(wrapper.find('[role=alert]').text()).toContain('would pass its neighbour')
    expect(store.document).toEqual(officePlate())
    expect(usePlateHistoryStore().undoLabel).toBeNull()
  })

  it('adds a line and labels the rest anew', async () => {
    const wrapper = await mountSuspended(PlateTableLines, { props: { axis: 'x' } })
    await type(wrapper, 'New line of numbers at', '13500')
    expect(store.document?.gridX.map(line => line.label).join(' ')).toBe('1 2 3 4 5 6 7 8')
    expect(wrapper.findAll('tbody tr')).toHaveLength(8)
  })
})

describe('the figure typed over on the drawing', () => {
  it('parts a bay where several are typed', async () => {
    const store = load()
    const wrapper = await mountSuspended(PlateDimensionField, { props: { target: { kind: 'bay', axis: 'x', index: 1 }, x: 0, y: 0 } })
    const input = wrapper.find('input')
    await input.setValue('2@4500')
    await input.trigger('keydown', { key: 'Enter' })
    expect(baysOf(store.document?.gridX ?? [])).toEqual([9000, 4500, 4500, 9000, 9000, 9000, 9000])
    expect(wrapper.emitted('close')).toHaveLength(1)
  })

  it('stays open with the sentence where the text is no length, and Escape gives back', async () => {
    const store = load()
    const wrapper = await mountSuspended(PlateDimensionField, { props: { target: { kind: 'bay', axis: 'x', index: 1 }, x: 0, y: 0 } })
    const input = wrapper.find('input')
    await input.setValue('7.5')
    await input.trigger('keydown', { key: 'Enter' })
    expect(wrapper.find('[role=alert]').text()).toContain('7.5 has no unit')
    expect(wrapper.emitted('close')).toBeUndefined()
    await input.trigger('keydown', { key: 'Escape' })
    expect(wrapper.emitted('close')).toHaveLength(1)
    expect(store.document).toEqual(officePlate())
  })
})

describe('the panel', () => {
  it('is closed to a role that reads, in words', async () => {
    const store = load()
    store.rights = 'none'
    const wrapper = await mountSuspended(PlatePanel, { props: { basis: null } })
    expect(wrapper.text()).toContain('Your role reads the plate')
    expect(wrapper.findAll('input').every(input => input.attributes('readonly') !== undefined || input.attributes('disabled') !== undefined)).toBe(true)
    expect(store.run(plate => ({ label: 'storeys', patch: { storeys: plate.storeys + 1 } }))).toContain('reads the plate')
    expect(store.document?.storeys).toBe(4)
  })
})
