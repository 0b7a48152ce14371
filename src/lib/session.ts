/** Who is signed in, shared by the header, the account and the desks. */
import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { session, type SignIn } from '#contract/account.ts'
import { nothing } from '#contract/common.ts'
import { api } from './api.ts'

export const sessionQuery = () =>
  queryOptions({
    queryKey: ['account', 'session'],
    queryFn: ({ signal }) => api.get('/api/session', session, signal),
    staleTime: 60_000,
  })

export const useSession = () => useQuery(sessionQuery())

export function useSignIn() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (credentials: SignIn) => api.post('/api/session', credentials, session),
    onSuccess: async (data) => {
      client.clear()
      client.setQueryData(sessionQuery().queryKey, data)
      await client.invalidateQueries()
    },
  })
}

export function useSignOut() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: () => api.delete('/api/session', nothing),
    onSuccess: async () => {
      client.clear()
      await client.invalidateQueries()
    },
  })
}
