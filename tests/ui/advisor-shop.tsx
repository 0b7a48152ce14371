/** The advisor's pages over the real sums and the seeded range, without a server between them. */
import { QueryClient, QueryClientProvider } from '@tanstack/react-query'
import { render } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { createMemoryRouter, RouterProvider } from 'react-router-dom'
import { vi } from 'vitest'
import { riderAnswers, type AdviceChanges, type RiderAnswers } from '#contract/advisor.ts'
import { advise } from '#core/advise.ts'
import { rulesFrom } from '#core/rules.ts'
import { influence, tippingPoints } from '#core/what-changes.ts'
import { catalogue } from '../../server/seeds/catalogue.ts'
import { wheelsetFacts } from '../../server/seeds/facts.ts'
import { solvedWheels } from '../../server/seeds/solved-wheels.ts'
import { designDigest } from '../../server/wheel-designs/solve.ts'
import { ruleTables } from '../../server/seeds/rule-tables.ts'
import type { Preferences } from '../../src/lib/preferences.tsx'
import { PreferencesProvider } from '../../src/lib/preferences.tsx'
import { FindingsPage } from '../../src/pages/advisor/FindingsPage.tsx'
import { FittingPage } from '../../src/pages/advisor/FittingPage.tsx'
import { WorkingPage } from '../../src/pages/advisor/WorkingPage.tsx'

const rules = rulesFrom([...ruleTables])

export const adviceFor = (answers: RiderAnswers) => advise(answers, wheelsetFacts, rules, 'test+0')

export const changesFor = (answers: RiderAnswers): AdviceChanges => ({
  rulesVersion: 'test+0',
  tippingPoints: tippingPoints(answers, wheelsetFacts, rules, 'test+0'),
  influence: influence(answers, wheelsetFacts, rules, 'test+0'),
})

/** A wheelset with what was found of its wheels, as the server gives it. */
export function detailOf(slug: string) {
  const seed = catalogue.find((one) => one.slug === slug)
  const facts = wheelsetFacts.find((one) => one.slug === slug)
  if (!seed || !facts) throw new Error(`no wheelset ${slug}`)
  const of = (position: 'front' | 'rear') => {
    const wheel = seed.wheels.find((one) => one.position === position)
    return wheel ? (solvedWheels.designs[designDigest(wheel)]?.structure ?? null) : null
  }
  return { ...facts, structure: { front: of('front'), rear: of('rear') } }
}

/** Addresses and bodies of every call; `fail` lets the next calls for advice go wrong. */
export const shop = { calls: [] as { path: string; answers: RiderAnswers | null }[], fail: false }

function answer(path: string, init?: RequestInit): Response {
  const answers =
    path === '/api/advice' ? riderAnswers.parse(JSON.parse(typeof init?.body === 'string' ? init.body : 'null')) : null
  shop.calls.push({ path, answers })
  if (answers && shop.fail) {
    const problem = {
      type: 'about:blank',
      title: '',
      status: 503,
      detail: '',
      instance: '',
      code: 'busy',
      requestId: 'r7',
    }
    return new Response(JSON.stringify(problem), { status: 503 })
  }
  const slug = /^\/api\/wheelsets\/([\w-]+)\?/.exec(path)?.[1]
  if (slug !== undefined) return new Response(JSON.stringify(detailOf(slug)))
  if (path === '/api/advice/changes') {
    const asked = riderAnswers.parse(JSON.parse(typeof init?.body === 'string' ? init.body : 'null'))
    return new Response(JSON.stringify(changesFor(asked)))
  }
  return new Response(JSON.stringify(answers ? adviceFor(answers) : { items: wheelsetFacts, nextCursor: null }))
}

export function openShop() {
  shop.calls.length = 0
  shop.fail = false
  localStorage.clear()
  sessionStorage.clear()
  vi.stubGlobal('scrollTo', () => undefined)
  vi.stubGlobal('matchMedia', () => ({
    matches: true,
    addEventListener: () => undefined,
    removeEventListener: () => undefined,
  }))
  vi.stubGlobal('fetch', (input: string, init?: RequestInit) => Promise.resolve(answer(input, init)))
}

export function open(path: string, change: Partial<Preferences> = {}) {
  const router = createMemoryRouter(
    [
      { path: '/fitting', Component: FittingPage },
      { path: '/findings', Component: FindingsPage },
      { path: '/working', Component: WorkingPage },
    ],
    { initialEntries: [path] },
  )
  const preferences: Preferences = {
    language: 'en',
    mass: 'kg',
    pressure: 'bar',
    length: 'mm',
    market: 'PT',
    theme: 'light',
    ...change,
  }
  render(
    <QueryClientProvider client={new QueryClient({ defaultOptions: { queries: { retry: false } } })}>
      <PreferencesProvider initial={preferences}>
        <RouterProvider router={router} />
      </PreferencesProvider>
    </QueryClientProvider>,
  )
  return { router, user: userEvent.setup() }
}
