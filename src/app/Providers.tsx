import { QueryClient, QueryClientProvider } from '@tanstack/react-query'
import { RouterProvider } from 'react-router-dom'
import { ApiError } from '../lib/api.ts'
import { PreferencesProvider, type Preferences } from '../lib/preferences.tsx'
import { router } from './router.tsx'

const client = new QueryClient({
  defaultOptions: {
    queries: {
      staleTime: 30_000,
      refetchOnWindowFocus: false,
      // What the server refused it will refuse again; only lost connections and faults are tried twice more.
      retry: (count, error) =>
        count < 2 && (!(error instanceof ApiError) || error.problem.status === 0 || error.problem.status >= 500),
    },
  },
})

export function Providers({ preferences }: { preferences: Preferences }) {
  return (
    <QueryClientProvider client={client}>
      <PreferencesProvider initial={preferences}>
        <RouterProvider router={router} />
      </PreferencesProvider>
    </QueryClientProvider>
  )
}
