/** The four questions as a rider meets them: what stands in the address, what does not, and how a slip of the unit is caught. */
import { screen, waitFor } from '@testing-library/react'
import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest'
import { checkMass, entryKg, entryOf } from '../../src/features/advisor/mass-entry.ts'
import { startTexts } from '../../src/lib/i18n.ts'
import { open, openShop, shop } from './advisor-shop.tsx'

beforeAll(() => startTexts('en'))
beforeEach(openShop)
afterEach(() => {
  vi.unstubAllGlobals()
})

const heading = (name: string) => screen.findByRole('heading', { level: 1, name })
const kept = '/fitting?ride=road-long&brakes=disc&front=28&rear=28&setup=tubeless&step=mass'

describe('a fitting', () => {
  it('leads through four questions to the findings, with every answer but the mass in the address', async () => {
    const { router, user } = open('/fitting')
    await heading('What do you ride?')
    await user.click(screen.getByRole('radio', { name: /Gravel/ }))
    await user.click(screen.getByRole('button', { name: 'Continue' }))
    expect(document.activeElement).toBe(await heading('Which brakes does the bike have?'))
    expect(screen.getByText('Question 2 of 4')).toBeTruthy()
    await user.click(screen.getByRole('radio', { name: /Disc brakes/ }))
    await user.click(screen.getByRole('button', { name: 'Continue' }))
    await heading('How wide are the tyres?')
    await user.click(screen.getByRole('radio', { name: /^40.mm/ }))
    await user.click(screen.getByRole('button', { name: 'Continue' }))
    await heading('What do you weigh?')
    await user.type(screen.getByLabelText('You, undressed'), '82,5')
    await user.click(screen.getByRole('button', { name: 'Show my findings' }))
    await waitFor(() => {
      expect(router.state.location.pathname).toBe('/findings')
    })
    const address = new URLSearchParams(router.state.location.search)
    expect(Object.fromEntries(address)).toEqual({
      ...{ ride: 'gravel', brakes: 'disc', front: '40', rear: '40', setup: 'tubeless' },
    })
    await waitFor(() => {
      expect(shop.calls.some(({ answers }) => answers?.bodyMassKg === 82.5)).toBe(true)
    })
    expect(shop.calls.every(({ path }) => !path.includes('82'))).toBe(true)
  })

  it('names the open answer and keeps the question', async () => {
    const { router, user } = open('/fitting')
    await user.click(screen.getByRole('button', { name: 'Continue' }))
    expect((await screen.findByRole('alert')).textContent).toContain("Choose a ride, or say that you don't know.")
    expect(router.state.location.search).toBe('')
  })

  it('keeps the answers on the way back', async () => {
    const { user } = open('/fitting?ride=gravel&brakes=disc&step=brakes')
    await user.click(await screen.findByRole('button', { name: 'Back' }))
    await heading('What do you ride?')
    expect(screen.getByRole<HTMLInputElement>('radio', { name: /Gravel/ }).checked).toBe(true)
  })

  it('takes "I don’t know" for an answer: long road rides, a look at the hub, no pressure', async () => {
    const { router, user } = open('/fitting')
    await user.click(screen.getByRole('radio', { name: /I don't know/ }))
    expect(router.state.location.search).toContain('ride=road-long')
    await user.click(screen.getByRole('button', { name: 'Continue' }))
    await user.click(await screen.findByRole('radio', { name: /I don't know/ }))
    await user.click(screen.getByRole('button', { name: 'I see a disc' }))
    await user.click(screen.getByRole('button', { name: 'Continue' }))
    await heading('How wide are the tyres?')
    await user.click(screen.getByRole('radio', { name: /I don't know/ }))
    expect(router.state.location.search).toContain('tyre=unknown')
  })

  it('asks whether pounds were meant for 165 kg and switches with one press', async () => {
    const { user } = open(kept)
    const box = await screen.findByLabelText<HTMLInputElement>('You, undressed')
    await user.type(box, '165')
    expect(sessionStorage.getItem('felloe.mass')).toBe(null)
    await user.click(screen.getByRole('button', { name: /I meant 165.lb/ }))
    // 165 lb by the pound's definition, 0.45359237 kg
    expect(JSON.parse(sessionStorage.getItem('felloe.mass') ?? '{}')).toEqual({ bodyMassKg: 74.842741 })
    expect(screen.getByLabelText<HTMLInputElement>('You, undressed').value).toBe('165')
  })

  it('takes 165 kg all the same once it is confirmed', async () => {
    const { user } = open(kept)
    await user.type(await screen.findByLabelText('You, undressed'), '165')
    await user.click(screen.getByRole('button', { name: /165.kg is right/ }))
    expect(JSON.parse(sessionStorage.getItem('felloe.mass') ?? '{}')).toEqual({ bodyMassKg: 165 })
  })

  it('takes a band of 10 kg instead of a number', async () => {
    const { user } = open(kept)
    await user.click(await screen.findByRole('button', { name: /rather give a band/ }))
    await user.selectOptions(screen.getByLabelText('Between'), '70')
    expect(JSON.parse(sessionStorage.getItem('felloe.mass') ?? '{}')).toEqual({ bodyMassBandKg: { from: 70, to: 80 } })
    expect(screen.getByText('You, upper edge of the band')).toBeTruthy()
  })

  it('lets the sum grow as answers come in', async () => {
    const { user } = open(kept)
    await user.type(await screen.findByLabelText('You, undressed'), '75')
    // 75 + 3 kit + 8.5 road bike + 1 in hand for an assumed one: the questionnaire's defaults
    await screen.findByText('87.5')
    expect(screen.getAllByText('assumed').length).toBeGreaterThan(0)
  })
})

describe('a mass as typed', () => {
  const kg = (value: number | null) => ({ unit: 'kg' as const, value, pounds: null })

  it('asks where a slip is likelier than the mass', () => {
    expect(checkMass(kg(75)).verdict).toBe('fine')
    expect(checkMass(kg(165)).verdict).toBe('ask')
    expect(checkMass(kg(7.5)).verdict).toBe('low')
    expect(checkMass(kg(181)).verdict).toBe('high')
    expect(checkMass(kg(null)).verdict).toBe('missing')
    expect(checkMass({ unit: 'lb', value: 75, pounds: null }).verdict).toBe('ask')
    const slip = checkMass(kg(7.5))
    expect(slip.verdict === 'low' && slip.readings.map(({ unit, value }) => `${value} ${unit}`)).toEqual([
      '7.5 st',
      '75 kg',
    ])
  })

  it('has its bounds after conversion', () => {
    expect(checkMass({ unit: 'lb', value: 66, pounds: null }).verdict).toBe('low')
    expect(checkMass({ unit: 'lb', value: 397, pounds: null }).verdict).toBe('high')
    expect(checkMass({ unit: 'st', value: 11, pounds: 11 }).verdict).toBe('fine')
  })

  it.each([48.2, 63.5, 74.842741, 101.6])('comes back to a pound of itself: %s kg', (mass) => {
    for (const unit of ['kg', 'lb', 'st'] as const)
      expect(Math.abs((entryKg(entryOf(mass, unit)) ?? 0) - mass)).toBeLessThan(0.24)
    expect(entryOf(mass, 'st').pounds).toBeLessThan(14)
  })
})
