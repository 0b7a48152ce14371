/** The findings over the real sums: what they say, how they refuse, and how an answer refines them where they stand. */
import { screen, waitFor, within } from '@testing-library/react'
import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest'
import { startTexts } from '../../src/lib/i18n.ts'
import { adviceFor, changesFor, detailOf, open, openShop, shop } from './advisor-shop.tsx'

beforeAll(() => startTexts('en'))
beforeEach(openShop)
afterEach(() => {
  vi.unstubAllGlobals()
})

const ADDRESS = '/findings?ride=road-long&brakes=disc&front=28&rear=28&setup=tubeless'
const weigh = (bodyMassKg: number) => {
  sessionStorage.setItem('felloe.mass', JSON.stringify({ bodyMassKg }))
}
const title = (name: RegExp) => screen.findByRole('heading', { level: 1, name })

describe('findings', () => {
  it('state the result, and beside it the cautions', async () => {
    weigh(75)
    open(ADDRESS)
    await title(/^Ride \d+ to \d+.mm in front, with \d\.\d.bar behind$/)
    expect(screen.getByText('A start, not a promise')).toBeTruthy()
    expect(screen.getByText(/^Read the maximum .* the lower one wins/)).toBeTruthy()
    expect(screen.getByText(/^Have a trained mechanic/)).toBeTruthy()
    expect(screen.getByText(/^Makers' instructions .* local rules/)).toBeTruthy()
    expect(document.title).not.toContain('75')
  })

  it('draw every offered wheelset against its limit and rule the rest out with a way back', async () => {
    weigh(75)
    const { user } = open(ADDRESS)
    await title(/^Ride/)
    const advice = adviceFor(shop.calls.find(({ answers }) => answers?.bodyMassKg === 75)!.answers!)
    const offered = advice.wheelsets.filter(({ rank }) => rank !== null).length
    await user.click(screen.getByRole('button', { name: /^Show \d+ more/ }))
    expect(screen.getAllByRole('img', { name: /^Total of .* against a limit of/ })).toHaveLength(offered)
    screen.getByRole('heading', {
      name: `${advice.wheelsets.length - offered} ruled out, and what would bring them back`,
    })
  })

  it('say where they turn, in whole kilograms of the rider and by name, and which answers matter', async () => {
    weigh(92)
    open(ADDRESS)
    const heading = await screen.findByRole('heading', { level: 2, name: 'What would change this' })
    const section = within(heading.closest('section')!)
    const heavier = (await section.findByText(/kg of rider and more:$/)).closest('li')
    const advice = adviceFor(shop.calls.find(({ answers }) => answers?.bodyMassKg === 92)!.answers!)
    const point = changesFor(shop.calls.find(({ answers }) => answers?.bodyMassKg === 92)!.answers!).tippingPoints.find(
      ({ input, direction }) => input === 'bodyMassKg' && direction === 'up',
    )
    expect(heavier?.textContent).toContain(`At ${point?.at.toFixed(1)}`)
    // Wheelsets by their names, never by their numbers.
    for (const { sku } of advice.wheelsets) expect(heavier?.textContent).not.toContain(sku)
    expect(section.getAllByText(/assumed$/).length).toBeGreaterThan(0)
  })
  it('draw the tension of every spoke under the rider, and list it: the one at the road has lost the most', async () => {
    weigh(92)
    const { user } = open(ADDRESS)
    const heading = await screen.findByRole('heading', {
      name: /^Standing under you, the lowest spoke keeps \d+.?% of its tension$/,
    })
    const section = within(heading.closest('section')!)
    const answers = shop.calls.find((call) => call.answers?.bodyMassKg === 92)!.answers!
    const advice = adviceFor(answers)
    const rear = detailOf(advice.wheelsets[0]!.slug).structure.rear!
    await user.click(section.getByRole('button', { name: /table/i }))
    const rows = section.getAllByRole('row').slice(1)
    expect(rows).toHaveLength(rear.profile.underLeft.length)
    const kept = rows.map((row) => {
      const [, resting, loaded] = [...row.querySelectorAll('td')].map((cell) =>
        Number(cell.textContent.replace(/\D/g, '')),
      )
      return (loaded ?? 0) / (resting ?? 1)
    })
    expect(Math.min(...kept.slice(0, 2), kept.at(-1)!)).toBe(Math.min(...kept))
    // By hand: tension at rest less share of the resting load on the rear wheel.
    const { left, right } = rear.tensionN
    const byHand = Math.min(
      ...[rear.profile.underLeft, rear.profile.underRight].flatMap((shares) =>
        shares.map((share, spoke) => 1 + (share * advice.loads!.rearN) / (spoke % 2 === 0 ? left : right)),
      ),
    )
    expect(Math.min(...kept)).toBeCloseTo(byHand, 2)
  })
  it('carry the doubt of the spokes and what the structure bears beside the stated limit', async () => {
    weigh(92)
    open(ADDRESS)
    await title(/^Ride/)
    screen.getByText(/^such a wheel carries about \d+\.\d.kg in all, \d+\.\d to \d+\.\d.kg$/)
    screen.getByText(/^by our model its structure carries about \d+\.\d.kg, ±25 %/)
    screen.getByText(
      (_, element) =>
        /^stated limit .* less .*, everything counted$/.test(element?.textContent ?? '') && element?.tagName === 'P',
    )
  })

  it('open each figure to its working', async () => {
    weigh(75)
    const { user } = open(ADDRESS)
    await title(/^Ride/)
    await user.click(screen.getByRole('button', { name: 'working: Tyre pressure, to start' }))
    expect(screen.getAllByText(/All About Tire Inflation/).length).toBe(2)
    expect(screen.getAllByText('practice').length).toBe(2)
  })

  it('show the trade-off as a table as well', async () => {
    weigh(75)
    const { user } = open(ADDRESS)
    await title(/^Ride/)
    await user.click(screen.getByRole('button', { name: 'Show as a table' }))
    expect(
      within(screen.getByRole('table', { name: 'Rim depth, watts saved and gust' })).getAllByRole('row').length,
    ).toBeGreaterThan(4)
  })

  it('never round a maximum up: 5 bar is 72 psi', async () => {
    weigh(75)
    open(`${ADDRESS}&tyreMax=5`, { pressure: 'psi' })
    await title(/psi behind$/)
    // 5 bar = 72.52 psi; 73 psi would be 5.03 bar
    expect(screen.getByText(/^never above 72.psi/)).toBeTruthy()
    expect(screen.queryByText(/73.psi/)).toBe(null)
  })

  it('refine in place when an answer is given, and the address keeps it', async () => {
    weigh(75)
    const { router, user } = open(ADDRESS)
    await title(/^Ride/)
    await user.selectOptions(screen.getByLabelText('Wind'), 'sheltered')
    expect(router.state.location.search).toContain('wind=sheltered')
    // The old result stands until the new one is there.
    expect(screen.getByRole('heading', { level: 1 }).textContent).toMatch(/^Ride/)
    await waitFor(() => {
      expect(shop.calls.some(({ answers }) => answers?.wind === 'sheltered')).toBe(true)
    })
  })

  it('name a number outside its bounds and do not send it', async () => {
    weigh(75)
    const { router, user } = open(ADDRESS)
    await title(/^Ride/)
    await user.type(screen.getByLabelText('Bike'), '90')
    expect(screen.getByText(/^From 5 to 35.kg/)).toBeTruthy()
    expect(router.state.location.search).not.toContain('90')
  })

  it('refuse with the sum, the gap and a way on', async () => {
    weigh(170)
    open(ADDRESS)
    await title(/is more than any of our limits for this bike/)
    expect(screen.getByText('What would hold')).toBeTruthy()
    expect(screen.getByText('Whom to ask')).toBeTruthy()
    expect(screen.getByText('Over by')).toBeTruthy()
    expect(screen.queryByText(/^Choose/)).toBe(null)
  })

  it('name the least tyre for a rim it does not go on', async () => {
    weigh(75)
    open(`${ADDRESS}&seat=hookless&inner=25`)
    await title(/do not go together/)
    // 25 mm inner, straight walls: 29 mm, ETRTO 2023 as told in the trade press (tyres reference 3.8)
    expect(screen.getByText(/at least 29.mm/)).toBeTruthy()
  })

  it('hint at no value out of scope', async () => {
    weigh(75)
    open(`${ADDRESS}&riders=2`)
    await title(/outside what we can work out/)
    expect(screen.queryByText(/\d.bar/)).toBe(null)
    expect(screen.getByText(/tandem/)).toBeTruthy()
  })

  it('give no pressure without a tyre, and say which answer would', async () => {
    weigh(75)
    open('/findings?ride=road-long&brakes=disc&tyre=unknown')
    await title(/spokes behind$/)
    expect(screen.getByText('none without a tyre')).toBeTruthy()
    expect(screen.getByRole('link', { name: 'Give the tyre' })).toBeTruthy()
  })

  it('ask for the mass alone where a link brings all the rest', async () => {
    const { user } = open(ADDRESS)
    await title(/One answer is yours alone/)
    expect(shop.calls.some(({ answers }) => answers)).toBe(false)
    await user.type(screen.getByLabelText('You, undressed'), '75')
    await user.click(screen.getByRole('button', { name: 'Show the findings' }))
    await title(/^Ride/)
  })

  it('say what went wrong and try again', async () => {
    weigh(75)
    shop.fail = true
    const { user } = open(ADDRESS)
    await screen.findByRole('alert')
    shop.fail = false
    await user.click(screen.getByRole('button', { name: 'Try again' }))
    await title(/^Ride/)
  })
})

describe('our working', () => {
  it('has a chapter for every kind of number, each reachable from the index', async () => {
    open('/working')
    await title(/How the numbers are made/)
    for (const link of within(screen.getByRole('navigation')).getAllByRole('link'))
      expect(document.querySelector(link.getAttribute('href') ?? '')).not.toBe(null)
  })
})
