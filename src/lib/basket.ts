/** The basket, which a wheelset's page, the header and the till all touch. The server prices and judges it; here it is only asked for. */
import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { keptAdvice, type RiderAnswers } from '#contract/advisor.ts'
import { basket, type BasketView, type LineOptions } from '#contract/basket.ts'
import { api } from './api.ts'
import { useKeptFitting } from './fitting.ts'
import { usePreferences } from './preferences.tsx'

export interface Line {
  sku: string
  quantity: number
  options: LineOptions
  adviceId?: string | null
}

export const basketQuery = (market: string) =>
  queryOptions({
    queryKey: ['basket', market],
    queryFn: ({ signal }) => api.get(`/api/basket?market=${market}`, basket, signal),
    staleTime: 10_000,
  })

export const useBasket = () => useQuery(basketQuery(usePreferences().market))

/** Replaces all lines; a change of country comes this way too. */
export function usePutLines() {
  const client = useQueryClient()
  const { market, currency } = usePreferences()
  return useMutation({
    mutationFn: (lines: readonly Line[]) =>
      api.put(
        '/api/basket',
        {
          market,
          currency,
          lines: lines.map(({ sku, quantity, options, adviceId }) => ({
            sku,
            quantity,
            options,
            ...(adviceId ? { adviceId } : {}),
          })),
        },
        basket,
      ),
    onSuccess: (data) => {
      client.setQueryData(basketQuery(market).queryKey, data)
    },
  })
}

export const linesOf = (view: BasketView | undefined): Line[] =>
  view?.lines.map(({ sku, quantity, options, adviceId }) => ({ sku, quantity, options, adviceId })) ?? []

const keepAdvice = (answers: RiderAnswers) => api.post('/api/advice-snapshots', answers, keptAdvice)

/**
 * Puts one wheelset into the basket beside what is there. With a fitting behind it, the fitting is kept with the line: only then, because only then
 * the shop answers for it.
 */
export function usePutLine() {
  const client = useQueryClient()
  const { market } = usePreferences()
  const { answers } = useKeptFitting()
  const putLines = usePutLines()
  const mutation = useMutation({
    mutationFn: async (line: Line) => {
      const present = linesOf(await client.query({ ...basketQuery(market), staleTime: 0 }))
      const adviceId = answers ? (await keepAdvice(answers)).adviceId : undefined
      const others = present.filter(({ sku }) => sku !== line.sku)
      return putLines.mutateAsync([...others, adviceId === undefined ? line : { ...line, adviceId }])
    },
  })
  return { put: mutation.mutateAsync, pending: mutation.isPending, error: mutation.error }
}
