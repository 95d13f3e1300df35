/** Chromium for the end-to-end tests: headless, and silent towards the outside. */
import { resolve } from 'node:path'
import axe from 'axe-core'
import { chromium } from 'playwright-core'
import type { Browser, Page } from 'playwright-core'
import { expect, inject, onTestFailed } from 'vitest'

const flags = [
  '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking',
  '--disable-component-update', '--disable-sync', '--disable-dev-shm-usage',
]

/** Starts the browser; the caller closes it. */
export function launchBrowser(): Promise<Browser> {
  // Chromium's sandbox does not run under root.
  const asRoot = process.getuid?.() === 0 ? ['--no-sandbox'] : []
  return chromium.launch({ executablePath: inject('chromium'), headless: true, args: [...flags, ...asRoot] })
}

/** Leaves a picture of the page under .data/test-pictures when the test that runs now fails. */
export function pictureOnFailure(page: Page) {
  const name = expect.getState().currentTestName?.replace(/[^\w]+/g, '-').slice(-80) ?? 'test'
  onTestFailed(async () => {
    await page.screenshot({ path: resolve(import.meta.dirname, `../../.data/test-pictures/${name}.png`) })
  })
}

/**
 * What the accessibility checker finds on the page as it stands: "screen: rule, first element", serious and critical.
 * Its text is evaluated, since the content security policy lets no script tag in.
 */
export async function accessibilityFindings(page: Page, screen: string): Promise<string[]> {
  await page.evaluate(axe.source)
  const found = await page.evaluate(async () => {
    const { axe: checker } = globalThis as unknown as { axe: { run: () => Promise<{ violations: { id: string, impact?: string | null, nodes: { target: unknown[] }[] }[] }> } }
    const { violations } = await checker.run()
    return violations.map(({ id, impact, nodes }) => ({ id, impact, target: String(nodes[0]?.target), count: nodes.length }))
  })
  return found
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .map(({ id, target, count }) => `${screen}: ${id}, ${target} (${count})`)
}
