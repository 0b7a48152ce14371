/** The four questions as a rider meets them: what stands in the address, what does not, and how a slip of the unit is caught. */
import { QueryClient, QueryClientProvider } from '@tanstack/react-query'
import { render, screen, waitFor } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { createMemoryRouter, RouterProvider } from 'react-router-dom'
import { beforeAll, beforeEach, describe, expect, it, vi } from 'vitest'
import { checkMass, entryKg, entryOf } from '../../src/features/advisor/mass-entry.ts'
import { startTexts } from '../../src/lib/i18n.ts'
import { PreferencesProvider } from '../../src/lib/preferences.tsx'
import { FittingPage } from '../../src/pages/advisor/FittingPage.tsx'
import { answerAdvice } from '../support/rider-limits.ts'

const sent: string[] = []

beforeAll(() => startTexts('en'))
beforeEach(() => {
  sent.length = 0
  localStorage.clear()
  sessionStorage.clear()
  vi.stubGlobal('scrollTo', () => undefined)
  vi.stubGlobal('fetch', (input: string, init?: RequestInit) => {
    sent.push(input)
    return Promise.resolve(answerAdvice(input, init))
  })
})
