/** A browser on the running shop: pages, screenshots at three widths, the accessibility check. Debian's Chromium, driven by playwright-core. */
import { mkdirSync } from 'node:fs'
import path from 'node:path'
import { AxeBuilder } from '@axe-core/playwright'
import { chromium } from 'playwright-core'
import type { Browser, BrowserContextOptions, Page } from 'playwright-core'

/** A small telephone, an upright tablet, a laptop. */
export const WIDTHS = [360, 768, 1440] as const
const HEIGHT = 900

const SCREENSHOTS = path.resolve(import.meta.dirname, '../../test-output/screenshots')

const needed = (name: string): string => {
  const value = process.env[name]
  if (!value) throw new Error(`${name} is not set: tests/e2e/global-setup.ts sets it`)
  return value
}

/** Address of a page of the shop, of the mails' reading page, or of the stand-in for payments. */
export const shopUrl = (pathname = '/') => new URL(pathname, needed('FELLOE_URL')).href
export const mailUrl = (pathname = '/') => new URL(pathname, needed('FELLOE_MAIL_URL')).href
export const payUrl = (pathname = '/') => new URL(pathname, needed('FELLOE_PAY_URL')).href

export function openBrowser(): Promise<Browser> {
  return chromium.launch({
    executablePath: process.env.CHROME_PATH ?? '/usr/bin/chromium',
    args: [
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
      '--disable-dev-shm-usage',
    ],
  })
}

export interface Visit {
  page: Page
  /** What the page complained about: errors in scripts, console errors (CSP among them), requests that failed. */
  complaints: string[]
  close: () => Promise<void>
}

/** A fresh visitor: no cookies, nothing kept. Times and numbers are those of the locale given, English unless said otherwise. */
export async function visit(browser: Browser, options: BrowserContextOptions = {}): Promise<Visit> {
  const context = await browser.newContext({
    viewport: { width: 1440, height: HEIGHT },
    locale: 'en-GB',
    timezoneId: 'Europe/Lisbon',
    reducedMotion: 'reduce',
    ...options,
  })
  const page = await context.newPage()
  page.setDefaultTimeout(15_000)
  const complaints: string[] = []
  page.on('pageerror', (error) => complaints.push(`script: ${error.message}`))
  page.on('console', (message) => {
    // a refused call (401, 404, 409) is an answer that the page shows; the browser logs it all the same
    const isAnswer = /Failed to load resource.*status of 4\d\d/.test(message.text())
    if (message.type() === 'error' && !isAnswer) complaints.push(`console: ${message.text()}`)
  })
  page.on('requestfailed', (request) => {
    const reason = request.failure()?.errorText ?? ''
    // a query that is no longer wanted is called off
    if (reason !== 'net::ERR_ABORTED') complaints.push(`request: ${request.url()} ${reason}`)
  })
  return { page, complaints, close: () => context.close() }
}

/**
 * Saves the whole page at each width as test-output/screenshots/<name>-<width>.png and puts the first size back.
 * @returns widths in px at which the page was wider than the window, which nobody should have to scroll to see
 */
export async function shot(page: Page, name: string): Promise<number[]> {
  mkdirSync(SCREENSHOTS, { recursive: true })
  const before = page.viewportSize()
  const tooWide: number[] = []
  for (const width of WIDTHS) {
    await page.setViewportSize({ width, height: HEIGHT })
    await page.evaluate(() => document.fonts.ready.then(() => undefined))
    const contentPx = await page.evaluate(() => document.documentElement.scrollWidth)
    if (contentPx > width) tooWide.push(width)
    await page.screenshot({
      path: path.join(SCREENSHOTS, `${name}-${width}.png`),
      fullPage: true,
      animations: 'disabled',
    })
  }
  if (before) await page.setViewportSize(before)
  return tooWide
}

/**
 * Checks the page as it stands against WCAG 2.2, levels A and AA.
 * @returns one line a violation with the places; empty when there is none
 */
export async function accessibilityProblems(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'])
    .analyze()
  return violations.map(
    ({ id, help, nodes }) => `${id}: ${help} at ${nodes.map(({ target }) => target.join(' ')).join(', ')}`,
  )
}
