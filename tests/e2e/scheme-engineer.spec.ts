import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest'
import { accessibilityFindings, launchBrowser, pictureOnFailure } from './browser'

/**
 * The scheme engineer's errand, on the demo plate: 54 × 36 m, numbers at 9 m, letters at 7.5 and 6 m.
 * What is expected stands in the demo's own figures and in what the pages promised on the way.
 */
let browser: Browser
let page: Page
const complaints: string[] = []
const findings: string[] = []

async function look(screen: string) {
  findings.push(...await accessibilityFindings(page, screen))
}

beforeAll(async () => {
  browser = await launchBrowser()
  page = await browser.newPage({ baseURL: inject('url'), viewport: { width: 1440, height: 900 }, locale: 'en-GB' })
  page.setDefaultTimeout(20_000)
  page.on('pageerror', error => complaints.push(error.message))
  page.on('console', (message) => {
    if (message.type() === 'error') complaints.push(message.text())
  })
})

beforeEach(() => pictureOnFailure(page))
afterAll(() => browser.close())

/** Where a point of the plate lies on the page: the drawing is fitted, with 142 and 84 px beside and 130 and 108 px above and below it. */
async function onDrawing(x: number, y: number) {
  const box = await page.getByTestId('plate-drawing').boundingBox()
  if (!box) throw new Error('The drawing is not on the page.')
  const scale = Math.min((box.width - 142 - 84) / 54_000, (box.height - 130 - 108) / 36_000)
  const left = 142 + (box.width - 142 - 84 - 54_000 * scale) / 2
  const top = 130 + (box.height - 130 - 108 - 36_000 * scale) / 2
  return { x: box.x + left + x * scale, y: box.y + top + (36_000 - y) * scale }
}

async function signIn() {
  await page.goto('/')
  await look('sign-in')
  await page.getByLabel('E-mail').fill('engineer@demo.example')
  await page.getByLabel('Password').fill('demo-2417-wharf')
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL(url => url.pathname === '/projects')
}

async function openDemoPlate() {
  await look('projects')
  await page.getByRole('link', { name: /Wharf Lane offices/ }).first().click()
  await page.waitForURL(/\/projects\/[0-9a-f-]+$/)
  await look('project')
  await page.getByRole('link', { name: /Typical floor/ }).first().click()
  await page.waitForURL(/\/plates\//)
  await page.locator('[data-ready]').waitFor()
}

describe('the scheme engineer', () => {
  it('signs in and opens the demo plate', async () => {
    await signIn()
    await openDemoPlate()
    const drawing = page.getByTestId('plate-drawing')
    expect(await drawing.getAttribute('aria-label')).toMatch(/54.000 by 36.000 mm, 7 grid lines along numbers, 6 along letters/)
  })

  it('drags grid line 2 by two steps of the module, and it is saved', async () => {
    await look('plate')
    const from = await onDrawing(9_000, 3_750)
    const to = await onDrawing(7_500, 3_750)
    await page.mouse.move(from.x, from.y)
    await page.mouse.down()
    await page.mouse.move((from.x + to.x) / 2, to.y, { steps: 5 })
    await page.mouse.move(to.x, to.y, { steps: 5 })
    await page.mouse.up()
    expect(await page.getByLabel('Label', { exact: true }).inputValue()).toBe('2')
    expect((await page.getByLabel('Position', { exact: true }).inputValue()).replace(/\D/g, '')).toBe('7500')

    await page.getByText(/all changes/).first().waitFor()
    await page.waitForFunction(() => !document.body.textContent?.includes('saving changes'))
    await page.reload()
    await page.getByText('Table', { exact: true }).click()
    await look('plate as a table')
    expect((await page.getByLabel('Position of line 2').inputValue()).replace(/\D/g, '')).toBe('7500')
  })

  it('runs a study of the moved grid to its end', async () => {
    await page.getByRole('button', { name: /Set up a grid study/ }).click()
    await page.waitForURL(/\/studies\/new/)
    await look('range of a study')
    await page.getByRole('button', { name: /^Run study/ }).click()
    await page.waitForURL(/\/studies\/[0-9a-f-]+$/)
    await page.getByRole('link', { name: 'Open the schemes' }).waitFor({ timeout: 120_000 })
    await look('finished study')
    // Two primary directions by one to five panels on one grid.
    expect(await page.getByRole('progressbar').getAttribute('aria-valuetext')).toBe('10 of 10 examined')
  })

  it('opens the lightest scheme and the calculation sheet of one of its beams', async () => {
    await page.getByRole('link', { name: 'Open the schemes' }).click()
    await page.waitForURL(/\/schemes$/)
    await page.locator('table tbody tr').first().waitFor()
    await look('schemes')
    await page.locator('table tbody tr').first().dblclick()
    await page.waitForURL(/\/schemes\/[^/]+$/)
    await page.getByText(/rank 1$/).waitFor()
    await look('scheme')
    await page.getByText('Members', { exact: true }).click()
    const row = page.locator('tbody tr', { has: page.getByRole('button', { name: 'S1', exact: true }) })
    const section = /UB \d+×\d+×\d+/.exec(await row.innerText())?.[0]
    await row.getByRole('button').click()
    await page.getByRole('link', { name: 'Open the calculation sheet' }).click()
    await page.waitForURL(/\/members\/S1$/)
    // Bending resistance, EN 1993-1-1 clause 6.2.5; deflection, clause 7.2.
    await page.getByText(/6\.2\.5/).first().waitFor()
    await look('calculation sheet')
    const sheet = await page.locator('body').innerText()
    expect(section).toMatch(/^UB/)
    expect(sheet).toContain(section)
    expect(sheet).toMatch(/7\.2/)
    expect(sheet).toMatch(/not for construction/i)
  })

  it('met no serious barrier on any of the screens', () => {
    expect(findings).toEqual([])
  })

  it('had no complaint from the browser on the way', () => {
    expect(complaints).toEqual([])
  })
})
