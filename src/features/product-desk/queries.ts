import { infiniteQueryOptions, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import {
  auditList,
  limitImpact,
  limitList,
  limitVersion,
  productList,
  productWheelset,
  type AuditFilters,
  type LimitDraft,
  type ProductChange,
} from '#contract/product-desk.ts'
import { api } from '../../lib/api.ts'

export const productsQuery = () =>
  queryOptions({
    queryKey: ['product-desk', 'wheelsets'],
    queryFn: ({ signal }) => api.get('/api/product/wheelsets', productList, signal),
    staleTime: 0,
  })

const wheelsetPath = (sku: string) => `/api/product/wheelsets/${encodeURIComponent(sku)}`

export const productQuery = (sku: string) =>
  queryOptions({
    queryKey: ['product-desk', 'wheelset', sku],
    queryFn: ({ signal }) => api.get(wheelsetPath(sku), productWheelset, signal),
    staleTime: 0,
  })

export function useChangeWheelset(sku: string) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (change: ProductChange) => api.patch(wheelsetPath(sku), change, productWheelset),
    onSuccess: async (saved) => {
      client.setQueryData(productQuery(sku).queryKey, saved)
      await client.invalidateQueries({ queryKey: ['product-desk'] })
      await client.invalidateQueries({ queryKey: ['catalogue'] })
    },
  })
}

export const limitsQuery = () =>
  queryOptions({
    queryKey: ['product-desk', 'limits'],
    queryFn: ({ signal }) => api.get('/api/product/limits', limitList, signal),
    staleTime: 0,
  })

export const impactQuery = (id: number) =>
  queryOptions({
    queryKey: ['product-desk', 'impact', id],
    queryFn: ({ signal }) => api.get(`/api/product/limit-changes/${id}/impact`, limitImpact, signal),
  })

function useLimitWrite<I>(write: (input: I) => Promise<unknown>) {
  const client = useQueryClient()
  return useMutation({ mutationFn: write, onSettled: () => client.invalidateQueries({ queryKey: ['product-desk'] }) })
}

export const useDraftLimit = () =>
  useLimitWrite(({ draft, idempotencyKey }: { draft: LimitDraft; idempotencyKey: string }) =>
    api.post('/api/product/limit-changes', draft, limitVersion, { idempotencyKey }),
  )

export const useDecideLimit = () =>
  useLimitWrite(({ id, decision, reason }: { id: number; decision: 'approve' | 'reject'; reason: string }) =>
    api.post(`/api/product/limit-changes/${id}/${decision}`, { reason }, limitVersion),
  )

export const auditQuery = ({ subjectType, subjectId }: Pick<AuditFilters, 'subjectType' | 'subjectId'>) =>
  infiniteQueryOptions({
    queryKey: ['product-desk', 'audit', subjectType, subjectId],
    queryFn: ({ signal, pageParam }) => {
      const address = new URLSearchParams({
        ...(subjectType ? { subjectType } : {}),
        ...(subjectId ? { subjectId } : {}),
        ...(pageParam ? { cursor: pageParam } : {}),
        limit: '20',
      })
      return api.get(`/api/product/audit?${address.toString()}`, auditList, signal)
    },
    initialPageParam: '',
    getNextPageParam: ({ nextCursor }) => nextCursor,
  })
