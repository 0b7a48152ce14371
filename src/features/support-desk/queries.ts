import {
  infiniteQueryOptions,
  keepPreviousData,
  queryOptions,
  useMutation,
  useQueryClient,
} from '@tanstack/react-query'
import { deskOrder, deskOrderList, refundDone, revealedMass, type RefundRequest } from '#contract/support-desk.ts'
import type { OrderState } from '#contract/checkout.ts'
import { api } from '../../lib/api.ts'

export interface OrderSearch {
  q: string
  state: OrderState | ''
}

export const ordersQuery = ({ q, state }: OrderSearch) =>
  infiniteQueryOptions({
    queryKey: ['support-desk', 'orders', q, state],
    queryFn: ({ signal, pageParam }) => {
      const address = new URLSearchParams({
        ...(q ? { q } : {}),
        ...(state ? { state } : {}),
        ...(pageParam ? { cursor: pageParam } : {}),
      })
      return api.get(`/api/desk/orders?${address.toString()}`, deskOrderList, signal)
    },
    initialPageParam: '',
    getNextPageParam: ({ nextCursor }) => nextCursor,
    placeholderData: keepPreviousData,
    staleTime: 0,
  })

const path = (orderNumber: string, more = '') => `/api/desk/orders/${encodeURIComponent(orderNumber)}${more}`

export const orderQuery = (orderNumber: string) =>
  queryOptions({
    queryKey: ['support-desk', 'order', orderNumber],
    queryFn: ({ signal }) => api.get(path(orderNumber), deskOrder, signal),
    // Money is on this page: what is shown is never older than its opening.
    staleTime: 0,
  })

/** After a write, everything a desk shows may have moved: the order, the list, the audit. */
function useRefresh() {
  const client = useQueryClient()
  return () =>
    Promise.all([
      client.invalidateQueries({ queryKey: ['support-desk'] }),
      client.invalidateQueries({ queryKey: ['product-desk', 'audit'] }),
    ])
}

export interface RefundCall {
  request: RefundRequest
  /** The same on every repeat of one decision, so that a lost reply never pays twice. */
  idempotencyKey: string
}

export function useRefund(orderNumber: string) {
  const refresh = useRefresh()
  return useMutation({
    mutationFn: ({ request, idempotencyKey }: RefundCall) =>
      api.post(path(orderNumber, '/refunds'), request, refundDone, { idempotencyKey }),
    onSettled: refresh,
  })
}

/** The revealed advice stays in this mutation and goes with the page; the cache keeps the masked one. */
export function useRevealMass(orderNumber: string) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (reason: string) => api.post(path(orderNumber, '/reveal-mass'), { reason }, revealedMass),
    gcTime: 0,
    onSuccess: () => client.invalidateQueries({ queryKey: ['product-desk', 'audit'] }),
  })
}

export function useAddNote(orderNumber: string) {
  const refresh = useRefresh()
  return useMutation({
    mutationFn: ({ text, idempotencyKey }: { text: string; idempotencyKey: string }) =>
      api.post(path(orderNumber, '/notes'), { text }, deskOrder, { idempotencyKey }),
    onSuccess: refresh,
  })
}
