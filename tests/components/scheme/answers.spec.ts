import { mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { flushPromises } from '@vue/test-utils'
import { readBody, setResponseStatus } from 'h3'
import { describe, expect, it, vi } from 'vitest'
import RankingRobustness from '~/components/scheme/RankingRobustness.vue'
import RepetitionPrice from '~/components/scheme/RepetitionPrice.vue'
import WhyNotQuestion from '~/components/scheme/WhyNotQuestion.vue'
import type { PriceOfRepetition, RationalisedScheme, Robustness, WhyNot } from '#shared/engine/search'
import type { AnswerRecord } from '#shared/schemas/answers'

const names = { x: 'numbers', y: 'letters' }

/** Answers the next question with `answer`; what was asked is in `asked`. */
function whyNotOf(study: string, answer: WhyNot) {
  const asked: unknown[] = []
  registerEndpoint(`/api/studies/${study}/why-not`, {
    method: 'POST',
    handler: async (event) => {
      asked.push(await readBody(event))
      return answer
    },
  })
  return asked
}
const mountQuestion = (studyId: string) =>
  mountSuspended(WhyNotQuestion, { props: { studyId, names, divisions: [2, 3], slabDepth: 130 } })

describe('why not', () => {
  it('asks for typed bays in millimetres and names what beats them, with the difference', async () => {
    const asked = whyNotOf('s1', {
      kind: 'inside', matching: 1, arrangements: [{
        number: 12, slab: 0, baysX: [9000, 9000], baysY: [7500], regions: [{ direction: 'x', divisions: 3 }] as never, rejected: null,
        schemes: [{ key: '12', massPerArea: 40.25, depth: 520, beatenBy: [{ key: '7', number: 7, massPerArea: 38, depth: 500, lighter: 2.25, shallower: 20 }] }],
      }],
    })
    const form = await mountQuestion('s1')
    const [x, y] = form.findAll('input[type="text"]')
    await x!.setValue('2@9000')
    await y!.setValue('7.5 m')
    await form.find('form').trigger('submit')
    await vi.waitFor(() => expect(form.text()).toContain('beaten by'))
    expect(asked).toEqual([{ baysX: [9000, 9000], baysY: [7500] }])
    expect(form.text()).toContain('2 @ 9.0 by 7.5 m, 3 panels, primaries along numbers')
    expect(form.text()).toContain('structural depth 650 mm')
    expect(form.text()).toMatch(/2\.[23] kg\/m² lighter, 20 mm shallower/)
    await form.findAll('button').find(button => button.text() === '7')!.trigger('click')
    expect(form.emitted('select')).toEqual([['7']])
  })

  it('asks nothing while the form is empty or a bay is no length, and says so', async () => {
    const asked = whyNotOf('s2', { kind: 'outside', detail: '', path: '' })
    const form = await mountQuestion('s2')
    await form.find('form').trigger('submit')
    expect(form.find('[role="alert"]').text()).toContain('Write bays')
    await form.find('input[type="text"]').setValue('6@7.5')
    await form.find('form').trigger('submit')
    await flushPromises()
    expect(form.find('[role="alert"]').text()).toContain('has no unit')
    expect(asked).toEqual([])
  })

  it('says which limit leaves an arrangement out', async () => {
    whyNotOf('s3', { kind: 'outside', detail: '7 divisions are not in the range.', path: 'range.divisions' })
    const form = await mountQuestion('s3')
    await form.find('input[type="text"]').setValue('9000')
    await form.find('form').trigger('submit')
    await vi.waitFor(() => expect(form.text()).toContain('Not in the range of this study'))
    expect(form.text()).toContain('7 divisions are not in the range.')
  })
})

const record = <R>(question: string, change: Partial<AnswerRecord<R>>): AnswerRecord<R> => ({
  question, state: 'queued', result: null, failure: null, engineVersion: null, askedAt: '2026-12-01T08:00:00Z', answeredAt: null, ...change,
})

const entry = (number: number, massPerArea: number | null, isInFront: boolean) =>
  ({ key: String(number), number, massPerArea, depth: massPerArea === null ? null : 500, reason: massPerArea === null ? 'No section passes.' : null, isInFront })
const holds: Robustness = {
  alwaysInFront: ['5'],
  cases: [
    { name: 'as-searched', change: 'As searched.', entries: [entry(5, 40, true), entry(9, 40.8, true)] },
    { name: 'imposed-load', change: 'Imposed loads 10 % higher.', entries: [entry(5, 42, true), entry(9, null, false)] },
  ],
}

describe('a question for the workers', () => {
  it('is offered, waits in words and shows the answer case by case', async () => {
    let isAsked = false
    let looks = 0
    registerEndpoint('/api/studies/s4/answers', { method: 'GET', handler: () => {
      looks += 1
      return isAsked ? [record('robustness', { state: 'finished', result: holds, engineVersion: '1' })] : []
    } })
    registerEndpoint('/api/studies/s4/answers', { method: 'POST', handler: (event) => {
      isAsked = true
      setResponseStatus(event, 202)
      return record('robustness', {})
    } })
    const section = await mountSuspended(RankingRobustness, { props: { studyId: 's4' } })
    await vi.waitFor(() => expect(looks).toBe(1))
    await section.find('button').trigger('click')
    await vi.waitFor(() => expect(section.text()).toContain('Waiting for a worker.'))
    await vi.waitFor(() => expect(section.find('table').exists()).toBe(true), 5_000)
    expect(section.text()).toContain('Scheme 5 stays in front in every case.')
    const cells = section.findAll('tbody tr').map(row => row.findAll('td').map(cell => cell.text().replace(/\s+/g, ' ')))
    expect(cells).toEqual([['40.0 lightest 500', '42.0 lightest 500'], ['40.8 equal 500', 'no scheme']])
    expect(section.text()).toContain('scheme 9: No section passes.')
  })

  it('that failed says why and can be asked again', async () => {
    registerEndpoint('/api/studies/s5/answers', { method: 'GET', handler: () => [record('robustness', { state: 'failed', failure: 'The answer was begun 3 times.' })] })
    const section = await mountSuspended(RankingRobustness, { props: { studyId: 's5' } })
    await vi.waitFor(() => expect(section.find('[role="alert"]').text()).toContain('The answer was begun 3 times.'))
    expect(section.find('button').text()).toBe('Ask again')
  })

  it('gives the price of repetition with the proof beside each mass', async () => {
    const step = (most: number, massPerArea: number | null, status: RationalisedScheme['status'], gap = 0): RationalisedScheme => ({
      most, status, gap, bound: null, rounds: 1,
      found: massPerArea === null
        ? null
        : {
            beamMass: 0, columnMass: 0, mass: massPerArea * 100, massPerArea, depth: 500, distinctSections: most,
            sections: [{ list: 'plate', designations: ['UB 305x165x40', 'UC 203x203x46'] }], beams: [], columns: [],
          },
    })
    const price: PriceOfRepetition = {
      key: '5', scope: 'plate', free: { mass: 4000, massPerArea: 40, distinctSections: 9 },
      steps: [step(2, null, 'impossible'), step(3, 46, 'best-found', 50), step(4, 41.5, 'optimal')],
    }
    registerEndpoint('/api/studies/s6/answers', { method: 'GET', handler: () => [record('repetition/plate/5', { state: 'finished', result: price })] })
    const section = await mountSuspended(RepetitionPrice, { props: { studyId: 's6', schemeKey: '5' } })
    await vi.waitFor(() => expect(section.find('table').exists()).toBe(true))
    const rows = section.findAll('tbody tr').map(row => row.findAll('td').map(cell => cell.text()))
    expect(rows).toEqual([['—', 'proved impossible'], ['46.0', '+6.0', 'best found, gap 0.5'], ['41.5', '+1.5', 'optimal']])
    expect(section.text()).toContain('UB 305×165×40, UC 203×203×46')
  })
})
