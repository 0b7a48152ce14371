import { queryOptions, useMutation } from '@tanstack/react-query'
import { order, orderPlaced, payReply, type OrderRequest } from '#contract/checkout.ts'
import { api } from '../../lib/api.ts'

const address = (orderNumber: string, key: string | null, what = '') =>
  `/api/orders/${encodeURIComponent(orderNumber)}${what}${key === null ? '' : `?key=${encodeURIComponent(key)}`}`

export const orderQuery = (orderNumber: string, key: string | null) =>
  queryOptions({
    queryKey: ['checkout', 'order', orderNumber, key],
    queryFn: ({ signal }) => api.get(address(orderNumber, key), order, signal),
    staleTime: 5_000,
  })

/** Reads at the payment page how it went; places the order if it is paid. */
export const refreshOrder = (orderNumber: string, key: string | null) =>
  api.post(address(orderNumber, key, '/refresh'), undefined, order)
export const cancelOrder = (orderNumber: string, key: string | null) =>
  api.post(address(orderNumber, key, '/cancel'), undefined, order)
export const payOrder = (orderNumber: string, key: string | null) =>
  api.post(address(orderNumber, key, '/pay'), undefined, payReply)

/** The same key for the same data: a second click or a retry gets the first order again. */
export function usePlaceOrder() {
  return useMutation({
    mutationFn: ({ request, idempotencyKey }: { request: OrderRequest; idempotencyKey: string }) =>
      api.post('/api/orders', request, orderPlaced, { idempotencyKey }),
  })
}
