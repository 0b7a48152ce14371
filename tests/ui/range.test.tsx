/** The range, side by side and the filters behind them, against a stand-in for the server that answers as the contract says. */
import { QueryClient, QueryClientProvider } from '@tanstack/react-query'
import { render, screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { createMemoryRouter, RouterProvider } from 'react-router-dom'
import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest'
import type { Wheelset } from '#contract/catalogue.ts'
import { decidingRow, rowOfCode } from '../../src/features/catalogue/comparison.ts'
import { readFilters, withFilters, withoutFilters } from '../../src/features/catalogue/filters.ts'
import { firstOptions, openOptions } from '../../src/features/catalogue/options.ts'
import { readSlugs } from '../../src/features/catalogue/side-by-side.ts'
import { bothOf, shortPair, stockWord } from '../../src/features/catalogue/wheel-rows.ts'
import type { WheelsetVerdict } from '../../src/lib/fitting.ts'
import { startTexts } from '../../src/lib/i18n.ts'
import { PreferencesProvider } from '../../src/lib/preferences.tsx'
import { RangePage } from '../../src/pages/catalogue/RangePage.tsx'
import { SideBySidePage } from '../../src/pages/catalogue/SideBySidePage.tsx'

const wheel = (position: 'front' | 'rear', depthMm: number, spokeCount: number): Wheelset['front'] => ({
  ...{ position, rimName: 'Rim', hubName: 'Hub', spokeName: 'Spoke', material: 'carbon', depthMm, spokeCount },
  ...{ innerWidthMm: 21, outerWidthMm: 28, seat: 'hooked', maxPressureBar: 7, tyreMinMm: 28, tyreMaxMm: 47 },
  ...{ crossesLeft: 2, crossesRight: 2, tensionTightN: 1200 },
  ...{
    pcdLeftMm: 58,
    pcdRightMm: 54,
    flangeLeftMm: 34,
    flangeRightMm: 19,
    maxAxleLoadKg: 90,
    rotorMount: 'centre-lock',
    massG: 700,
  },
  axles: position === 'front' ? ['12x100'] : ['12x142', 'qr-10x135'],
  freehubs: position === 'front' ? [] : ['spline-road', 'thread-road'],
})

const wheelset = (name: string, depthMm: number, limitKg: number, change: Partial<Wheelset> = {}): Wheelset => ({
  ...{ sku: name.toUpperCase().replace(' ', '-'), slug: name.toLowerCase().replace(' ', '-'), name },
  ...{
    tagline: `About ${name}`,
    description: '',
    brake: 'disc',
    beadSeatMm: 622,
    rides: ['road-long'],
    useCondition: 1,
  },
  ...{ assistRated: false, buildKind: 'shelf', limitKg, limitProof: 'invented', massG: 1400, available: 5 },
  prices: { EUR: 90000, GBP: 80000, USD: 85000 },
  front: wheel('front', depthMm, 24),
  rear: wheel('rear', depthMm, 28),
  ...change,
})

const sets = [
  wheelset('Plum 30', 30, 110),
  wheelset('Pear 45', 45, 120),
  wheelset('Quince 50', 50, 120),
  wheelset('Fig 25', 25, 100),
  wheelset('Lime 35', 35, 105),
]

const calls: URL[] = []
let fail = false
function answer(input: string): Response {
  const url = new URL(input, 'http://shop.test')
  calls.push(url)
  if (fail) {
    const problem = {
      type: 'about:blank',
      title: '',
      status: 400,
      detail: '',
      instance: '',
      code: 'unknown',
      requestId: 'r1',
    }
    return new Response(JSON.stringify(problem), { status: 400 })
  }
  const from = Number(url.searchParams.get('limitFromKg') ?? 0)
  return new Response(JSON.stringify({ items: sets.filter(({ limitKg }) => limitKg >= from), nextCursor: null }))
}

beforeAll(() => startTexts('en'))
beforeEach(() => {
  calls.length = 0
  fail = false
  localStorage.clear()
  sessionStorage.clear()
  vi.stubGlobal('fetch', (input: string) => Promise.resolve(answer(input)))
})
afterEach(() => {
  vi.unstubAllGlobals()
})

function open(path: string) {
  const router = createMemoryRouter(
    [
      { path: '/range', Component: RangePage },
      { path: '/side-by-side', Component: SideBySidePage },
    ],
    { initialEntries: [path] },
  )
  const preferences = {
    language: 'en',
    mass: 'kg',
    pressure: 'bar',
    length: 'mm',
    market: 'PT',
    theme: 'light',
  } as const
  render(
    <QueryClientProvider client={new QueryClient({ defaultOptions: { queries: { retry: false } } })}>
      <PreferencesProvider initial={preferences}>
        <RouterProvider router={router} />
      </PreferencesProvider>
    </QueryClientProvider>,
  )
  return { router, user: userEvent.setup() }
}

describe('the range', () => {
  it('says in its heading how many there are and how deep, and shows each with its limit', async () => {
    open('/range')
    expect((await screen.findByRole('heading', { level: 1 })).textContent).toBe('The range')
    await screen.findByRole('heading', { level: 1, name: '5 wheelsets, 25 to 50 mm deep' })
    const card = screen.getByRole('link', { name: 'Pear 45' }).closest('article')!
    expect(within(card).getByText('120')).toBeTruthy()
    expect(within(card).getByText('€900')).toBeTruthy()
  })

  it('takes filters from the address, passes them on, and leaves out what it cannot read', async () => {
    open('/range?limitFromKg=115&brake=square&depthToMm=deep')
    await screen.findByRole('heading', { level: 1, name: '2 wheelsets, 45 to 50 mm deep' })
    const asked = calls.find(({ searchParams }) => searchParams.has('limitFromKg'))!.searchParams
    expect([asked.get('limitFromKg'), asked.get('brake'), asked.get('depthToMm')]).toEqual(['115', null, null])
  })

  it('writes a choice to the address and takes it away again', async () => {
    const { router, user } = open('/range')
    await screen.findByText('5 wheelsets found')
    await user.selectOptions(screen.getAllByLabelText('Limit, at least')[0]!, '120')
    await screen.findByText('2 wheelsets found')
    expect(router.state.location.search).toBe('?limitFromKg=120')
    await user.click(screen.getByRole('button', { name: /Take away: limit 120.kg or more/ }))
    await screen.findByText('5 wheelsets found')
    expect(router.state.location.search).toBe('')
  })

  it('says when nothing fits and offers the way back', async () => {
    const { user } = open('/range?limitFromKg=150')
    await screen.findByRole('heading', { level: 1, name: 'No wheelset fits all of this' })
    await user.click(screen.getAllByRole('button', { name: 'Clear all' })[0]!)
    await screen.findByText('5 wheelsets found')
  })

  it('names a failure and tries again when asked', async () => {
    fail = true
    const { user } = open('/range')
    const retry = await screen.findByRole('button', { name: 'Try again' })
    fail = false
    await user.click(retry)
    await screen.findByText('5 wheelsets found')
  })

  it('takes four side by side and refuses the fifth with a reason', async () => {
    const { user } = open('/range')
    await screen.findByText('5 wheelsets found')
    for (const { name } of sets.slice(0, 4))
      await user.click(screen.getByRole('checkbox', { name: `Put ${name} side by side` }))
    const fifth = screen.getByRole<HTMLInputElement>('checkbox', { name: 'Put Lime 35 side by side' })
    expect(fifth.disabled).toBe(true)
    expect(screen.getByText('Four are chosen already')).toBeTruthy()
    expect(screen.getByRole('link', { name: 'Compare' }).getAttribute('href')).toBe(
      '/side-by-side?sets=plum-30,pear-45,quince-50,fig-25',
    )
  })
})

describe('side by side', () => {
  it('stands in a table with a head for each column and row, and marks the limit as deciding', async () => {
    open('/side-by-side?sets=plum-30,pear-45')
    const table = await screen.findByRole('table')
    const columns = within(table)
      .getAllByRole('columnheader')
      .map(({ textContent }) => textContent)
    expect(columns).toHaveLength(2)
    expect(columns[0]).toContain('Plum 30')
    const row = within(table).getByText('decides').closest('tr')!
    expect(within(row).getByRole('rowheader').textContent).toContain('Stated limit')
    expect(
      within(row)
        .getAllByRole('cell')
        .map(({ textContent }) => textContent),
    ).toEqual(['110\u00a0kg', '120\u00a0kg'])
  })

  it('folds away what is alike, and keeps that in the address', async () => {
    const { router, user } = open('/side-by-side?sets=plum-30,pear-45')
    const table = await screen.findByRole('table')
    expect(within(table).queryByRole('rowheader', { name: 'Bead wall' })).not.toBeNull()
    await user.click(screen.getByRole('switch', { name: 'Only rows that differ' }))
    expect(within(table).queryByRole('rowheader', { name: 'Bead wall' })).toBeNull()
    expect(within(table).queryByRole('rowheader', { name: 'Rim depth' })).not.toBeNull()
    expect(router.state.location.search).toContain('differ=yes')
  })

  it('adds by name, takes out, and remembers the choice', async () => {
    const { router, user } = open('/side-by-side?sets=plum-30')
    await user.selectOptions(await screen.findByRole('combobox', { name: 'Add a wheelset' }), 'fig-25')
    await user.click(screen.getByRole('button', { name: 'Add a wheelset' }))
    await screen.findByRole('heading', { level: 1, name: 'Plum 30 and Fig 25' })
    await user.click(screen.getByRole('button', { name: 'Take Plum 30 out' }))
    await waitFor(() => {
      expect(router.state.location.search).toBe('?sets=fig-25')
    })
    expect(localStorage.getItem('felloe.side-by-side')).toBe('["fig-25"]')
  })

  it('tells how to fill it while it is empty, and which names it does not know', async () => {
    open('/side-by-side?sets=nobody')
    await screen.findByText(/One of the names in the address/)
    expect(screen.getByRole('link', { name: 'Go through the range' })).toBeTruthy()
  })
})

describe('decidingRow', () => {
  const [plum, pear] = [sets[0]!, sets[1]!]
  const rows = [
    { id: 'limit', label: '', values: ['a', 'b'], differs: true },
    { id: 'depth', label: '', values: ['a', 'b'], differs: true },
  ]
  const verdict = (sku: string, change: Partial<WheelsetVerdict>) =>
    [sku, { sku, verdict: 'fits', codes: [], ...change }] as [string, WheelsetVerdict]

  it('is the row of the first rule that rules one of them out', () => {
    const verdicts = new Map([verdict(plum.sku, {}), verdict(pear.sku, { verdict: 'mismatch', codes: ['rear-axle'] })])
    expect(decidingRow([plum, pear], rows, verdicts)).toEqual({ id: 'axles', byRule: true })
  })
  it('is the limit, then the depth, where nothing is ruled out', () => {
    expect(decidingRow([plum, pear], rows, null)).toEqual({ id: 'limit', byRule: false })
    expect(decidingRow([plum, pear], rows.slice(1), new Map([verdict(plum.sku, {})]))).toEqual({
      id: 'depth',
      byRule: false,
    })
    expect(decidingRow([plum, pear], [], null)).toBeNull()
  })
  it('does not guess for a rule it has never heard of', () => {
    expect(rowOfCode('something-new')).toBeNull()
  })
})

describe('what stands in an address or a storage', () => {
  it('filters: unreadable values are passed over, the rest stays as typed', () => {
    const params = new URLSearchParams('ride=gravel&limitFromKg=-4&q=%20%20&depthFromMm=30&sort=price&lng=pt')
    expect(readFilters(params)).toEqual({ ride: 'gravel', depthFromMm: '30' })
    expect(withFilters(params, { ride: '' }).has('ride')).toBe(false)
    expect(withoutFilters(params).toString()).toBe('sort=price&lng=pt')
  })
  it('side by side: four at most, no doubles, nothing odd', () => {
    expect(readSlugs(['a', 'b', 'a', '../x', 7, '', 'c', 'd', 'e'])).toEqual(['a', 'b', 'c', 'd'])
    expect(readSlugs('a,b')).toEqual([])
  })
})

describe('options', () => {
  it('an only choice is made, the bike of a fitting is followed where it fits, the rest stays open', () => {
    const set = sets[0]!
    const options = firstOptions(set, { rearAxle: '12x142', freehub: 'pattern-i' })
    expect(options).toEqual({ frontAxle: '12x100', rearAxle: '12x142', freehub: null, rotorMount: 'centre-lock' })
    expect(openOptions(set, options)).toEqual(['freehub'])
  })
})

describe('words for a pair', () => {
  it('say one value once and two values both', () => {
    const pair = ({ front, rear }: { front: string; rear: string }) => `${front}|${rear}`
    expect([bothOf('a', 'a', pair), bothOf('a', 'b', pair), bothOf('', 'b', pair)]).toEqual(['a', 'a|b', 'b'])
    expect([shortPair(45, 45), shortPair(45, 60)]).toEqual(['45', '45/60'])
  })
  it('never promise stock that is not there', () => {
    const word = (available: number, buildKind: 'shelf' | 'bench') => stockWord({ available, buildKind })
    expect([
      word(0, 'shelf'),
      word(0, 'bench'),
      word(1, 'shelf'),
      word(3, 'shelf'),
      word(9, 'shelf'),
      word(2, 'bench'),
    ]).toEqual(['none', 'none', 'last', 'few', 'shelf', 'bench'])
  })
})
