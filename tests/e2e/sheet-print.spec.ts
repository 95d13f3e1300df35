import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest'
import { launchBrowser, pictureOnFailure } from './browser'

/** The demo's calculation sheets on paper: A4 portrait, 210 × 297 mm. */
let browser: Browser
let page: Page

beforeAll(async () => {
  browser = await launchBrowser()
  page = await browser.newPage({ baseURL: inject('url'), viewport: { width: 1440, height: 900 }, locale: 'en-GB' })
  page.setDefaultTimeout(20_000)
  const answer = await page.request.post('/api/session', { data: { email: 'engineer@demo.example', password: 'demo-2417-wharf' } })
  expect(answer.ok()).toBe(true)
})

beforeEach(() => pictureOnFailure(page))
afterAll(() => browser.close())

async function read<T>(path: string): Promise<T> {
  return await (await page.request.get(path)).json() as T
}

/** Address of the lightest scheme of the demo's first finished study. */
async function demoScheme(): Promise<{ page: string, api: string }> {
  const projects = await read<{ id: string, number: string }[]>('/api/projects')
  const project = projects.find(({ number }) => number === '2417')
  if (!project) throw new Error('The demo project is not there.')
  const { studies } = await read<{ studies: { id: string, number: number, state: string }[] }>(`/api/projects/${project.id}`)
  const study = studies.filter(({ state }) => state === 'finished').sort((a, b) => a.number - b.number)[0]
  if (!study) throw new Error('The demo has no finished study.')
  const { rows } = await read<{ rows: { key: string }[] }>(`/api/studies/${study.id}/schemes?limit=1`)
  const scheme = `studies/${study.id}/schemes/${encodeURIComponent(rows[0]?.key ?? '')}`
  return { page: `/projects/${project.id}/${scheme}`, api: `/api/${scheme}` }
}

async function printed(mark: string) {
  await page.goto(`${(await demoScheme()).page}/members/${mark}`)
  await page.getByText(/6\.2\.5/).first().waitFor()
  await page.waitForLoadState('networkidle')
  const paper = (await page.pdf({ preferCSSPageSize: true })).toString('latin1')
  return { pages: paper.match(/\/Type\s*\/Page\b/g)?.length, size: /\/MediaBox\s*\[\s*0 0 ([\d.]+) ([\d.]+)/.exec(paper)?.slice(1).map(Number) }
}

describe('a calculation sheet on paper', () => {
  it.each(['P1', 'P8', 'E1', 'S1'])('prints %s on one page A4 portrait', async (mark) => {
    const { pages, size } = await printed(mark)
    expect(pages).toBe(1)
    // 210 × 297 mm in points of 1/72 in.
    expect(size?.map(Math.round)).toEqual([595, 842])
  })

  it('keeps its rows at 6.5 pt or more, and the screen as it was', async () => {
    const before = await page.locator('main').boundingBox()
    const { pages } = await printed('P8')
    expect(pages).toBe(1)
    expect(Number(await page.evaluate(() => document.documentElement.style.getPropertyValue('--print-type')))).toBeGreaterThanOrEqual(6.5)
    expect(await page.locator('main').boundingBox()).toEqual(before)
    expect(await page.getByText('Expression and numbers').isVisible()).toBe(true)
  })
})
