import { mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { readBody, setResponseStatus } from 'h3'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import ProjectPeople from '~/components/project/ProjectPeople.vue'
import type { ProjectDetail, ProjectRole } from '#shared/schemas/api'

const engineer = { id: 'e', name: 'Test engineer', email: 'engineer@office.example', role: 'engineer' } as const
const architect = { id: 'a', name: 'Test architect', email: 'architect@office.example', role: 'architect' } as const

const projectOf = (id: string, role: ProjectRole): ProjectDetail =>
  ({ id, number: 'T1', name: 'Test project', role, people: [engineer, architect], plates: [], studies: [], basisVersion: 0 })

/** Answers the routes of a project's people; what was asked is in `asked`. */
function peopleRoutes(id: string, refusal?: { status: number, message: string }) {
  const asked: unknown[] = []
  const answer = (event: Parameters<typeof setResponseStatus>[0], value: unknown) => {
    if (!refusal) return value
    setResponseStatus(event, refusal.status)
    return { statusCode: refusal.status, data: { code: 'not-found', message: refusal.message } }
  }
  registerEndpoint(`/api/projects/${id}/people`, {
    method: 'POST',
    handler: async (event) => {
      const body = await readBody<{ email: string, role: ProjectRole }>(event)
      asked.push(body)
      return answer(event, { id: 'n', name: 'New person', ...body })
    },
  })
  for (const person of [engineer, architect]) {
    registerEndpoint(`/api/projects/${id}/people/${person.id}`, {
      method: 'DELETE',
      handler: (event) => {
        asked.push(person.id)
        return answer(event, '')
      },
    })
  }
  registerEndpoint(`/api/projects/${id}`, () => projectOf(id, 'engineer'))
  return asked
}

const mountPeople = (id: string, role: ProjectRole = 'engineer') => mountSuspended(ProjectPeople, { props: { project: projectOf(id, role) } })
type Mounted = Awaited<ReturnType<typeof mountPeople>>
const press = (page: Mounted, label: string) => page.findAll('button').find(button => button.text() === label)!.trigger('click')

beforeEach(() => {
  useSessionStore().account = { id: 'e', name: 'Test engineer', email: engineer.email, initials: 'TE', isAdministrator: false, role: 'engineer' }
})

describe('the people of a project', () => {
  it('are only read by who may not choose them', async () => {
    const page = await mountPeople('p1', 'architect')
    expect(page.text()).toContain('Scheme engineer')
    expect(page.findAll('button, select, input')).toEqual([])
  })

  it('are added by e-mail and role; what is missing is said at its field and nothing is sent', async () => {
    const asked = peopleRoutes('p2')
    const page = await mountPeople('p2')
    await press(page, 'Add a person')
    await page.find('input').setValue('nobody')
    await page.find('form').trigger('submit')
    expect(page.findAll('[role=alert]').map(alert => alert.text())).toEqual([
      'This is not an e-mail address; write it as name@practice.example.', 'Choose what the person is on this project.',
    ])
    expect(asked).toEqual([])
    await page.find('input').setValue('New@office.example ')
    await page.find('form select').setValue('checker')
    await page.find('form').trigger('submit')
    await vi.waitFor(() => expect(page.find('[role=status]').text()).toBe('New person is on the project as checker.'))
    expect(asked).toEqual([{ email: 'new@office.example', role: 'checker' }])
  })

  it('keep what was typed where the server refuses, with its sentence', async () => {
    peopleRoutes('p3', { status: 404, message: 'Your practice has no account of that address.' })
    const page = await mountPeople('p3')
    await press(page, 'Add a person')
    await page.find('input').setValue('new@office.example')
    await page.find('form select').setValue('checker')
    await page.find('form').trigger('submit')
    await vi.waitFor(() => expect(page.find('form [role=alert]').text()).toContain('no account'))
    expect(page.find('input').element.value).toBe('new@office.example')
  })

  it('get another role or leave in their line; a refusal stands there and the old role comes back', async () => {
    const asked = peopleRoutes('p4', { status: 422, message: 'This is the last scheme engineer.' })
    const page = await mountPeople('p4')
    await page.findAll('li')[1]!.find('select').setValue('checker')
    await vi.waitFor(() => expect(page.findAll('li')[1]!.text()).toContain('This is the last scheme engineer.'))
    expect(page.findAll('li')[1]!.find('select').element.value).toBe('architect')
    await press(page, 'Remove')
    await vi.waitFor(() => expect(asked).toEqual([{ email: architect.email, role: 'checker' }, 'a']))
  })

  it('are asked once more before they change themselves', async () => {
    const asked = peopleRoutes('p5', { status: 422, message: 'This is the last scheme engineer.' })
    const page = await mountPeople('p5')
    await press(page, 'Leave')
    expect(page.text()).toContain('You will no longer see this project')
    await press(page, 'Stay scheme engineer')
    expect(page.text()).not.toContain('You will no longer see this project')
    expect(asked).toEqual([])
    await press(page, 'Leave')
    await press(page, 'Leave the project')
    await vi.waitFor(() => expect(page.findAll('li')[0]!.text()).toContain('This is the last scheme engineer.'))
    expect(asked).toEqual(['e'])
  })
})
