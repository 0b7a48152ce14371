import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { bike, bikeList, ownOrderList, type BikeFacts } from '#contract/account.ts'
import { nothing } from '#contract/common.ts'
import { api } from '../../lib/api.ts'

export const bikesQuery = () =>
  queryOptions({
    queryKey: ['account', 'bikes'],
    queryFn: ({ signal }) => api.get('/api/account/bikes', bikeList, signal),
  })
export const useBikes = () => useQuery(bikesQuery())

export const useOwnOrders = () =>
  useQuery({
    queryKey: ['account', 'orders'],
    queryFn: ({ signal }) => api.get('/api/account/orders', ownOrderList, signal),
  })

/** Adds a bike, or changes the one named. */
export function useKeepBike(bikeId: number | null) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (facts: BikeFacts) =>
      bikeId === null
        ? api.post('/api/account/bikes', facts, bike)
        : api.put(`/api/account/bikes/${bikeId}`, facts, bike),
    onSuccess: () => client.invalidateQueries({ queryKey: bikesQuery().queryKey }),
  })
}

export function useForgetBike() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (bikeId: number) => api.delete(`/api/account/bikes/${bikeId}`, nothing),
    onSuccess: () => client.invalidateQueries({ queryKey: bikesQuery().queryKey }),
  })
}
