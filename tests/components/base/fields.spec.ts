import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import BaseButton from '~/components/base/BaseButton.vue'
import BaseField from '~/components/base/BaseField.vue'
import BaseSelect from '~/components/base/BaseSelect.vue'
import UtilisationBar from '~/components/base/UtilisationBar.vue'

const number = { label: 'Longest span', kind: 'number', modelValue: 3300, unit: 'mm', min: 1, max: 60_000 } as const

describe('a field of a number', () => {
  it('gives the number back when it is left, and only then', async () => {
    const field = await mountSuspended(BaseField, { props: number })
    const input = field.get('input')
    expect(input.element.value).toBe('3\u00A0300')
    input.element.value = '3 600'
    await input.trigger('input')
    expect(field.emitted('update:modelValue')).toBeUndefined()
    await input.trigger('change')
    expect(field.emitted('update:modelValue')).toEqual([[3600]])
  })

  it('keeps a text that is no number and says so beside it', async () => {
    const field = await mountSuspended(BaseField, { props: number })
    const input = field.get('input')
    for (const [text, message] of [['wide', 'not a number'], ['60001', 'over the greatest value'], ['', 'missing']] as const) {
      input.element.value = text
      await input.trigger('input')
      await input.trigger('change')
      expect(input.element.value).toBe(text)
      expect(field.get('[role=alert]').text()).toContain(message)
      expect(input.attributes('aria-describedby')).toBe(field.get('[role=alert]').attributes('id'))
    }
    expect(field.emitted('update:modelValue')).toBeUndefined()
  })

  it('goes back on Escape', async () => {
    const field = await mountSuspended(BaseField, { props: number })
    const input = field.get('input')
    input.element.value = '9'
    await input.trigger('input')
    await input.trigger('keydown', { key: 'Escape' })
    expect(input.element.value).toBe('3\u00A0300')
    expect(field.emitted('cancel')).toHaveLength(1)
  })

  it('may be emptied where no value is a value', async () => {
    const field = await mountSuspended(BaseField, { props: { ...number, allowEmpty: true } })
    const input = field.get('input')
    input.element.value = ''
    await input.trigger('input')
    await input.trigger('change')
    expect(field.emitted('update:modelValue')).toEqual([[null]])
  })
})

describe('a choice', () => {
  const options = [{ value: 'UK', label: 'United Kingdom' }, { value: 'EN', label: 'Recommended values' }]
  it('stands open until it is made', async () => {
    const select = await mountSuspended(BaseSelect, { props: { modelValue: null as string | null, options, label: 'Set of choices', choose: 'Choose a set' } })
    const element = select.get('select').element
    expect(element.selectedIndex).toBe(0)
    element.selectedIndex = 2
    await select.get('select').trigger('change')
    expect(select.emitted('update:modelValue')).toEqual([['EN']])
  })
})

describe('a button', () => {
  it('that is not available says why and does nothing', async () => {
    const button = await mountSuspended(BaseButton, { props: { unavailable: 'A study needs a floor plate; draw one first.' }, slots: { default: () => 'Set up' } })
    await button.get('button').trigger('click')
    expect(button.emitted('press')).toBeUndefined()
    const reason = button.get('button').attributes('aria-describedby')
    expect(button.get(`[id="${reason}"]`).text()).toBe('A study needs a floor plate; draw one first.')
  })
  it('answers one press while it is at work', async () => {
    const button = await mountSuspended(BaseButton, { slots: { default: () => 'Keep' } })
    await button.get('button').trigger('click')
    await button.setProps({ busy: true })
    await button.get('button').trigger('click')
    expect(button.emitted('press')).toHaveLength(1)
  })
})

describe('utilisation', () => {
  it('names a failure in words and hatches the surplus', async () => {
    const bar = await mountSuspended(UtilisationBar, { props: { value: 1.004 } })
    expect(bar.text()).toBe('1.004 fails')
    expect(bar.find('.hatch-oxide').exists()).toBe(true)
    await bar.setProps({ value: 1 })
    expect(bar.text()).toBe('1.00')
    expect(bar.find('.hatch-oxide').exists()).toBe(false)
  })
  it('shows nothing where there is no such limit', async () => {
    expect((await mountSuspended(UtilisationBar, { props: { value: null } })).text()).toBe('–')
  })
})
