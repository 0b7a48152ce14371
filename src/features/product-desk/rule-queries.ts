import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { ruleTableList, ruleTableView, ruleVersion, type RuleDraft } from '#contract/product-desk-rules.ts'
import { api } from '../../lib/api.ts'

export const rulesQuery = () =>
  queryOptions({
    queryKey: ['product-desk', 'rules'],
    queryFn: ({ signal }) => api.get('/api/product/rules', ruleTableList, signal),
    staleTime: 0,
  })

export const ruleTableQuery = (name: string) =>
  queryOptions({
    queryKey: ['product-desk', 'rules', name],
    queryFn: ({ signal }) => api.get(`/api/product/rules/${encodeURIComponent(name)}`, ruleTableView, signal),
    staleTime: 0,
  })

function useRuleWrite<I>(write: (input: I) => Promise<unknown>) {
  const client = useQueryClient()
  return useMutation({ mutationFn: write, onSettled: () => client.invalidateQueries({ queryKey: ['product-desk'] }) })
}

export const useDraftRules = () =>
  useRuleWrite(({ draft, idempotencyKey }: { draft: RuleDraft; idempotencyKey: string }) =>
    api.post('/api/product/rule-changes', draft, ruleVersion, { idempotencyKey }),
  )

export const useDecideRules = () =>
  useRuleWrite(({ id, decision, reason }: { id: number; decision: 'approve' | 'reject'; reason: string }) =>
    api.post(`/api/product/rule-changes/${id}/${decision}`, { reason }, ruleVersion),
  )
