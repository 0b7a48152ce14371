/** Every page that anybody can open, in both languages: it opens without a complaint, fits three widths, and passes the accessibility check. */
import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { accessibilityProblems, openBrowser, shopUrl, shot, visit } from './harness.ts'

const PAGES: [name: string, pathname: string][] = [
  ['home', '/'],
  ['fitting', '/fitting'],
  ['findings-empty', '/findings'],
  ['working', '/working'],
  ['range', '/range'],
  ['wheelset', '/range/rowan-45-disc'],
  ['side-by-side', '/side-by-side'],
  ['basket-empty', '/basket'],
  ['sign-in', '/sign-in'],
  ['not-there', '/nothing-here'],
]

let browser: Browser
beforeAll(async () => {
  browser = await openBrowser()
})
afterAll(() => browser.close())

describe.each([
  ['en', 'en-GB'],
  ['pt', 'pt-PT'],
])('in %s', (language, locale) => {
  it.each(PAGES)('%s opens without a complaint, fits every width, and is accessible', async (name, pathname) => {
    const { page, complaints, close } = await visit(browser, { locale })
    try {
      await page.goto(shopUrl(pathname))
      await page.getByRole('heading', { level: 1 }).first().waitFor()
      await page.waitForLoadState('networkidle')
      expect(await page.locator('html').getAttribute('lang')).toBe(language)
      expect(await shot(page, `${name}-${language}`), 'widths at which the page is wider than the window').toEqual([])
      expect(await accessibilityProblems(page)).toEqual([])
      expect(complaints).toEqual([])
    } finally {
      await close()
    }
  })
})
