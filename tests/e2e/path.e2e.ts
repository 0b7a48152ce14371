/** The whole path in one browser: from the first question to a paid wheelset, the mail, the support desk and the money back. */
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { accessibilityProblems, mailUrl, openBrowser, payUrl, shopUrl, shot, visit } from './harness.ts'

let browser: Browser
beforeAll(async () => {
  browser = await openBrowser()
})
afterAll(() => browser.close())

const settle = async (page: Page) => {
  await page.waitForLoadState('networkidle')
}
/** By keyboard, as the drawn circle lies over the real radio. */
async function pick(page: Page, name: RegExp) {
  await page.getByRole('radio', { name }).focus()
  await page.keyboard.press('Space')
}
/** A page as a person would judge it: no sideways scroll at any width, nothing for the accessibility check to say. */
async function judge(page: Page, name: string) {
  await settle(page)
  expect(await shot(page, name), `${name}: widths at which it is wider than the window`).toEqual([])
  expect(await accessibilityProblems(page), name).toEqual([])
}

describe('a rider who has never been here', () => {
  it('answers four questions, buys the wheelset that fits, gets the mail; support gives the money back', async () => {
    const { page, complaints, close } = await visit(browser)
    await page.goto(shopUrl('/?mass=kg&pressure=bar&market=PT'))
    await settle(page)

    // Four questions; the first stands on the first page.
    await page.getByRole('link', { name: /^Long road rides/ }).click()
    await pick(page, /^Disc brakes/)
    await judge(page, 'path-1-brakes')
    await page.getByRole('button', { name: 'Continue' }).click()
    await pick(page, /^28/)
    await judge(page, 'path-2-tyre')
    await page.getByRole('button', { name: 'Continue' }).click()
    await page.getByRole('textbox', { name: 'You, undressed' }).fill('75')
    await judge(page, 'path-3-mass')
    await page.getByRole('button', { name: 'Show my findings' }).click()

    // Findings: total, margin, a way to the wheelset; the mass is nowhere in the address.
    await page.waitForURL(/\/findings/)
    await page.getByRole('heading', { level: 1, name: /^Ride/ }).waitFor()
    expect(page.url()).not.toContain('75')
    expect(await page.locator('main').innerText()).toContain('87.5')
    await judge(page, 'path-4-findings')
    const choice = page.locator('main a[href^="/range/"]').first()
    await choice.click()
    await page.waitForURL(/\/range\//)
    await judge(page, 'path-5-wheelset')

    // Every open part is chosen, then into the basket.
    for (const group of await page.locator('main fieldset').all()) {
      const open = group.getByRole('radio')
      if ((await open.count()) > 0 && (await group.getByRole('radio', { checked: true }).count()) === 0) {
        await open.first().focus()
        await page.keyboard.press('Space')
      }
    }
    await page.getByRole('button', { name: 'Put in the basket' }).click()
    await page.getByRole('link', { name: 'See the basket' }).click()
    await page.getByRole('heading', { level: 1, name: 'Basket' }).waitFor()
    await page
      .getByText(/within the stated limit/)
      .first()
      .waitFor()
    await judge(page, 'path-6-basket')
    await page.getByRole('link', { name: 'To the till' }).click()

    // The till: a wrong field names itself and what was typed stays.
    const fill = (label: string, value: string) => page.getByLabel(label, { exact: true }).fill(value)
    await fill('E-mail', 'not an address')
    await fill('Name', 'Rider of the Test')
    await fill('Street and number', 'Rua Inventada 1')
    await fill('Postcode', '3800-000')
    await fill('Town', 'Aveiro')
    await page.getByRole('button', { name: /^Go and pay/ }).click()
    await page
      .getByRole('alert')
      .getByRole('link', { name: /An e-mail address/ })
      .waitFor()
    expect(await page.getByLabel('Street and number', { exact: true }).inputValue()).toBe('Rua Inventada 1')
    await judge(page, 'path-7-till')
    await fill('E-mail', 'rider.of.the.test@mail.example')
    await page.getByRole('button', { name: /^Go and pay/ }).click()

    // The stand-in's page: declined first, then paid.
    await page.waitForURL((url) => url.href.startsWith(payUrl('/pay/')))
    await shot(page, 'path-8-pay')
    await page.getByRole('button', { name: 'Let the card be declined' }).click()
    await page.getByText('The card was declined').waitFor()
    await page.getByRole('button', { name: /^Pay/ }).click()
    await page.waitForURL(/\/orders\/F26-/)
    await page.getByRole('heading', { level: 1, name: 'Your order is placed and cleared' }).waitFor()
    await judge(page, 'path-9-order')
    const orderNumber = /F26-\d{6}/.exec(page.url())?.[0] ?? ''
    expect(orderNumber).not.toBe('')

    // The receipt, in the mail sink, with a link that opens the order.
    await expect
      .poll(async () => (await fetch(mailUrl('/api/mails?to=rider.of.the.test@mail.example'))).json(), {
        timeout: 15_000,
      })
      .toHaveLength(1)
    const [mail] = (await (await fetch(mailUrl('/api/mails?to=rider.of.the.test@mail.example'))).json()) as {
      subject: string
      text: string
    }[]
    expect(mail?.subject).toContain(orderNumber)
    expect(mail?.text).toContain(`/orders/${orderNumber}?key=`)
    expect(mail?.text).not.toContain('75 kg')

    // The support desk finds it by e-mail and gives all the money back.
    const desk = await visit(browser)
    await desk.page.goto(shopUrl('/sign-in'))
    await desk.page.getByLabel('E-mail').fill('support@felloe.example')
    await desk.page.getByLabel('Password').fill('support-demo-2026')
    await desk.page.getByRole('button', { name: 'Sign in' }).click()
    await desk.page.waitForURL(/\/desk\/orders/)
    await desk.page.getByRole('searchbox').first().fill('rider.of.the.test')
    await desk.page.keyboard.press('Enter')
    await desk.page.getByRole('link', { name: orderNumber }).click()
    await desk.page.getByRole('heading', { name: orderNumber }).waitFor()
    await judge(desk.page, 'path-10-desk')
    await desk.page.getByLabel('Reason', { exact: true }).first().fill('changed their mind before the build')
    await desk.page.getByRole('button', { name: /^Refund/ }).click()
    await desk.page
      .getByRole('dialog')
      .getByRole('button', { name: /refund|give/i })
      .click()
    await expect.poll(async () => desk.page.locator('main').innerText(), { timeout: 15_000 }).toMatch(/dropped/i)
    await shot(desk.page, 'path-11-refunded')

    await page.reload()
    await page.getByRole('heading', { level: 1, name: 'This order is dropped' }).waitFor()
    await page.getByText('Given back').first().waitFor()
    expect([...complaints, ...desk.complaints]).toEqual([])
    await desk.close()
    await close()
  })

  it('on a telephone, in Portuguese: a total above every limit is refused kindly, with the sum and a way on', async () => {
    const { page, complaints, close } = await visit(browser, { locale: 'pt-PT', viewport: { width: 360, height: 740 } })
    await page.goto(shopUrl('/fitting?step=mass&ride=road-long&brakes=disc&front=32&rear=32&setup=tubeless'))
    await settle(page)
    await page.locator('main input[inputmode="decimal"]').first().fill('158')
    await page.locator('main button').filter({ hasText: /./ }).first().waitFor()
    await page.keyboard.press('Tab')
    await shot(page, 'path-pt-mass')
    await page.evaluate(() => {
      sessionStorage.setItem('felloe.mass', JSON.stringify({ bodyMassKg: 158 }))
    })
    await page.goto(shopUrl('/findings?ride=road-long&brakes=disc&front=32&rear=32&setup=tubeless'))
    await page.getByRole('heading', { level: 1 }).waitFor()
    await judge(page, 'path-pt-refused')
    const words = await page.locator('main').innerText()
    expect(words).toMatch(/170,5|170/)
    expect(words).not.toMatch(/perca peso|gordo/i)
    expect(complaints).toEqual([])
    await close()
  })
})
