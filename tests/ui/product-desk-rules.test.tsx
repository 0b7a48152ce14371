/** The editor of the rule tables: any shape there and back, wrong cells named, nothing typed lost, differences before anything is sent. */
import { QueryClient, QueryClientProvider } from '@tanstack/react-query'
import { render, screen, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { createMemoryRouter, RouterProvider } from 'react-router-dom'
import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest'
import type { RuleDraft, RuleTableView, RuleVersionView } from '#contract/product-desk-rules.ts'
import { checkTable } from '#core/rule-check.ts'
import { ruleTables } from '../../server/seeds/rule-tables.ts'
import { differences } from '../../src/features/product-desk/rule-differences.ts'
import { readTyped, shapeOf, typedOf } from '../../src/features/product-desk/rule-shape.ts'
import { unitOf } from '../../src/features/product-desk/rule-words.ts'
import { startTexts } from '../../src/lib/i18n.ts'
import { PreferencesProvider } from '../../src/lib/preferences.tsx'
import { RuleTablePage } from '../../src/pages/product-desk/RuleTablePage.tsx'

const data = {
  rows: [
    [20, 13],
    [25, 19],
    [28, 21],
  ],
  growthPerMm: 0.4,
  warnBeyondMm: 1.5,
}
const version = (change: Partial<RuleVersionView>): RuleVersionView => ({
  ...{ id: 1, table: 'measuring-rims', version: '2026-12.1', standing: 'in-force', source: 'A source of the test' },
  ...{
    label: 'memory',
    reason: 'the first',
    draftedBy: null,
    secondedBy: null,
    basedOn: null,
    stale: false,
    own: false,
  },
  ...{ inForceFrom: '2026-01-01T00:00:00.000Z', createdAt: '2026-01-01T00:00:00.000Z', data, ...change },
})
const waits = (change: Partial<RuleVersionView> = {}) =>
  version({
    ...{ id: 2, version: '2026-12.2', standing: 'drafted', draftedBy: 'Ana', basedOn: '2026-12.1', inForceFrom: null },
    ...{ reason: 'a second look', data: { ...data, rows: [[20, 13], [25, 19.5], [30, 22]] }, ...change }, // prettier-ignore
  })

let table: RuleTableView
let sent: { path: string; body: unknown }[]
let refusal: object | null

function answer(path: string, init?: RequestInit): Response {
  if (init?.method === 'POST') {
    sent.push({ path, body: JSON.parse(typeof init.body === 'string' ? init.body : 'null') })
    if (refusal) return new Response(JSON.stringify(refusal), { status: (refusal as { status: number }).status })
    return new Response(JSON.stringify(waits({ id: 9 })), { status: 201 })
  }
  return new Response(JSON.stringify(path.includes('/audit') ? { items: [], nextCursor: null } : table))
}

beforeAll(() => startTexts('en'))
beforeEach(() => {
  const only = version({})
  table = { name: only.table, base: only, versions: [only] }
  sent = []
  refusal = null
  vi.stubGlobal('fetch', (input: string, init?: RequestInit) => Promise.resolve(answer(input, init)))
})
afterEach(() => {
  vi.unstubAllGlobals()
})

const preferences = {
  language: 'en',
  mass: 'kg',
  pressure: 'bar',
  length: 'mm',
  market: 'PT',
  theme: 'light',
} as const

async function open(client = new QueryClient({ defaultOptions: { queries: { retry: false } } })) {
  const router = createMemoryRouter([{ path: '/product/rules/:name', Component: RuleTablePage }], {
    initialEntries: ['/product/rules/measuring-rims'],
  })
  render(
    <QueryClientProvider client={client}>
      <PreferencesProvider initial={preferences}>
        <RouterProvider router={router} />
      </PreferencesProvider>
    </QueryClientProvider>,
  )
  await screen.findByRole('button', { name: 'Draft the version' })
  return userEvent.setup()
}
const cell = (column: string, row: number) =>
  screen.getByRole<HTMLInputElement>('textbox', { name: `${column}, row ${row}` })
const retype = async (user: ReturnType<typeof userEvent.setup>, field: HTMLElement, text: string) => {
  await user.clear(field)
  await user.type(field, text)
}

describe('the shape of a table', () => {
  it.each(ruleTables.map(({ name, data: seeded }) => [name, seeded] as const))(
    '%s goes into fields and back unchanged, and is taken by its own check',
    (name, seeded) => {
      const shape = shapeOf(name, seeded)
      const read = readTyped(shape, typedOf(shape, seeded))
      expect(read.faults).toEqual([])
      expect(read.data).toEqual(seeded)
      expect(checkTable(name, read.data, seeded)).toEqual([])
    },
  )
  it('reads a comma and a point alike, and leaves what is no number as it was typed', () => {
    const shape = shapeOf('limits', {})
    const read = readTyped(shape, { noMarginFrom: '0,9', caliperSlackMm: '4.5', assumedBikeExtraKg: 'one' })
    expect(read.data).toEqual({ noMarginFrom: 0.9, caliperSlackMm: 4.5, assumedBikeExtraKg: 'one' })
    expect(read.faults).toEqual([{ path: ['assumedBikeExtraKg'], code: 'not-number', data: {} }])
  })
  it('takes the unit from the end of a name, and none from a threshold inside one', () => {
    expect(['maxBar', 'upToMm', 'maxNPerMm', 'correctionDeg', 'limitC', 'warnAboveKg'].map(unitOf)).toEqual(
      ['bar', 'mm', 'N/mm', '°', '°C', 'kg'], // prettier-ignore
    )
    expect(['rearAbove100Kg', 'factor', 'race', 'drop'].map(unitOf)).toEqual([null, null, null, null])
  })
})

describe('differences', () => {
  it('name a changed cell, a new row, a row taken out and another order once each', () => {
    const to = { ...data, rows: [[25, 19.5], [20, 13], [30, 22]], growthPerMm: 0.5 } // prettier-ignore
    expect(differences(data, to)).toEqual([
      { at: ['rows', { row: '25' }, { row: '2' }], from: 19, to: 19.5 },
      { at: ['rows', { row: '28' }], from: [28, 21], to: undefined },
      { at: ['rows', { row: '30' }], from: undefined, to: [30, 22] },
      { at: ['rows'], from: '20, 25', to: '25, 20', order: true },
      { at: ['growthPerMm'], from: 0.4, to: 0.5 },
    ])
    expect(differences(data, structuredClone(data))).toEqual([])
  })
  it('go by number where rows have one name twice', () => {
    expect(differences([[1, 2], [1, 3]], [[1, 2], [1, 4]])).toEqual([{ at: [{ row: '2' }, { row: '2' }], from: 3, to: 4 }]) // prettier-ignore
  })
})

describe('the page of a table', () => {
  it('shows every field under its label with its unit, and old and new of what was typed', async () => {
    const user = await open()
    expect(screen.getByRole('heading', { level: 1, name: 'Measuring rims' })).toBeTruthy()
    expect(screen.getByRole<HTMLInputElement>('textbox', { name: 'Warn beyond' }).value).toBe('1.5')
    expect(screen.getByRole('textbox', { name: 'Warn beyond', description: 'mm' })).toBeTruthy()
    await retype(user, cell('Rim inner width, mm', 2), '19,5')
    const changes = within(screen.getByRole('table', { name: 'What changes' }))
    const line = changes.getByText('row 25 · Rim inner width, mm').closest('tr')
    expect(line?.textContent).toContain('19')
    expect(line?.textContent).toContain('19.5')
  })

  it('adds and removes rows by keyboard, and the focus goes with them', async () => {
    const user = await open()
    screen.getByRole('button', { name: 'Add a row after row 1' }).focus()
    await user.keyboard('{Enter}')
    expect(document.activeElement).toBe(cell('Tyre width, mm', 2))
    await user.keyboard('22{Tab}15')
    expect(cell('Rim inner width, mm', 2).value).toBe('15')
    expect(cell('Tyre width, mm', 3).value).toBe('25')
    await user.click(screen.getByRole('button', { name: 'Remove row 4' }))
    expect(screen.queryByRole('textbox', { name: 'Tyre width, mm, row 4' })).toBeNull()
    expect(document.activeElement).toBe(screen.getByRole('button', { name: 'Add a row at the end' }))
  })

  it('names row and column of a wrong cell, keeps what was typed and sends nothing', async () => {
    const user = await open()
    await retype(user, cell('Rim inner width, mm', 3), 'wide')
    await user.type(screen.getByRole('textbox', { name: 'Reason for the change' }), 'a reason of the test')
    await user.click(screen.getByRole('button', { name: 'Draft the version' }))
    const link = screen.getByRole('link', { name: 'Row 3 (28), column Rim inner width, mm: Type a number' })
    await user.click(link)
    expect(document.activeElement).toBe(cell('Rim inner width, mm', 3))
    expect(cell('Rim inner width, mm', 3).value).toBe('wide')
    expect(cell('Rim inner width, mm', 3).getAttribute('aria-invalid')).toBe('true')
    expect(sent).toEqual([])
  })

  it('sends the table as data over the version it was begun on, then starts afresh', async () => {
    const user = await open()
    await retype(user, cell('Rim inner width, mm', 3), '22')
    await user.type(screen.getByRole('textbox', { name: 'Reason for the change' }), 'a reason of the test')
    await user.click(screen.getByRole('button', { name: 'Draft the version' }))
    await screen.findByText('Drafted. It waits for a second person.')
    expect(sent).toHaveLength(1)
    expect(sent[0]?.path).toBe('/api/product/rule-changes')
    const draft = sent[0]?.body as RuleDraft
    expect(draft.data).toEqual({ ...data, rows: [[20, 13], [25, 19], [28, 22]] }) // prettier-ignore
    expect(draft).toMatchObject({ table: 'measuring-rims', basedOn: '2026-12.1', label: 'memory' })
    expect(draft.inForceFrom).toBeUndefined()
    expect(cell('Rim inner width, mm', 3).value).toBe('21')
  })

  it('hangs the server’s refusal on its cell and keeps the typing', async () => {
    const message = 'Row 2 (25), column 2: of the server'
    refusal = {
      ...{ type: 'about:blank', title: '', status: 400, detail: '', instance: '', code: 'validation', requestId: 'r1' },
      errors: [{ path: 'data.rows.1.1', code: 'not-valid', message }],
    }
    const user = await open()
    await retype(user, cell('Rim inner width, mm', 2), '20')
    await user.type(screen.getByRole('textbox', { name: 'Reason for the change' }), 'a reason of the test')
    await user.click(screen.getByRole('button', { name: 'Draft the version' }))
    await user.click(await screen.findByRole('link', { name: message }))
    expect(document.activeElement).toBe(cell('Rim inner width, mm', 2))
    expect(cell('Rim inner width, mm', 2).value).toBe('20')
  })

  it('shows a waiting draft cell by cell, and lets the second person decide with a reason', async () => {
    table.versions = [waits(), version({})]
    const user = await open()
    const changes = within(screen.getByRole('article')).getByRole('table', { name: 'What changes' })
    expect(changes.textContent).toContain('row 25 · Rim inner width, mm')
    expect(changes.textContent).toContain('taken out')
    await user.click(screen.getByRole('button', { name: 'Second it' }))
    expect(sent).toEqual([])
    await user.type(screen.getByRole('textbox', { name: 'Reason for your decision' }), 'looked up')
    const seconded = waits({ standing: 'in-force', secondedBy: 'Rui' })
    table = { ...table, base: seconded, versions: [seconded, version({ standing: 'replaced' })] }
    await user.click(screen.getByRole('button', { name: 'Second it' }))
    expect(sent).toEqual([{ path: '/api/product/rule-changes/2/approve', body: { reason: 'looked up' } }])
    await screen.findByRole('heading', { name: 'Draft a new version over 2026-12.2' })
    expect(cell('Rim inner width, mm', 2).value).toBe('19.5')
    expect(screen.queryByRole('alert')).toBeNull()
  })

  it('that got a newer version while somebody typed keeps the typing and says so', async () => {
    const client = new QueryClient({ defaultOptions: { queries: { retry: false } } })
    const user = await open(client)
    await retype(user, cell('Rim inner width, mm', 1), '14')
    const seconded = waits({ standing: 'in-force' })
    table = { ...table, base: seconded, versions: [seconded, version({ standing: 'replaced' })] }
    await client.invalidateQueries()
    await screen.findByText('Version 2026-12.2 was seconded while you typed over 2026-12.1')
    expect(cell('Rim inner width, mm', 1).value).toBe('14')
    await user.click(screen.getByRole('button', { name: 'Keep my typing, compare' }))
    // against the newer version the typing would also take its changes back
    expect(screen.getByText('4 places change')).toBeTruthy()
    await user.type(screen.getByRole('textbox', { name: 'Reason for the change' }), 'a reason of the test')
    await user.click(screen.getByRole('button', { name: 'Draft the version' }))
    expect(sent[0]?.body).toMatchObject({ basedOn: '2026-12.2' })
  })

  it.each([
    ['the author', { own: true }, 'Take it back'],
    ['anybody, once another version came first,', { stale: true }, 'Turn it down'],
  ])('%s cannot second it', async (_who, change, instead) => {
    table.versions = [waits(change), version({})]
    await open()
    expect(screen.queryByRole('button', { name: 'Second it' })).toBeNull()
    expect(screen.getByRole('button', { name: instead })).toBeTruthy()
  })
})
