/** The range as the server has it. Filters travel as they stand in the address. */
import { keepPreviousData, queryOptions } from '@tanstack/react-query'
import { marketList, wheelsetDetail, wheelsetList, type Wheelset, type WheelsetList } from '#contract/catalogue.ts'
import type { Locale } from '#contract/common.ts'
import { api } from './api.ts'

export type Asked = Record<string, string>

/** Every wheelset that passes the filters: the cursor is followed to its end, so that the count shown is the whole count. */
export const wheelsetsQuery = (asked: Asked) =>
  queryOptions({
    queryKey: ['catalogue', 'wheelsets', asked],
    queryFn: async ({ signal }): Promise<WheelsetList> => {
      const items: Wheelset[] = []
      let cursor: string | null = null
      do {
        const params: string = new URLSearchParams({
          ...asked,
          limit: '100',
          ...(cursor === null ? {} : { cursor }),
        }).toString()
        const page: WheelsetList = await api.get(`/api/wheelsets?${params}`, wheelsetList, signal)
        items.push(...page.items)
        cursor = page.nextCursor
      } while (cursor !== null)
      return { items, nextCursor: null }
    },
    staleTime: 60_000,
    // While the next answer is on its way the present one stays on the page.
    placeholderData: keepPreviousData,
  })

export const wheelsetQuery = (slug: string, lng: Locale) =>
  queryOptions({
    queryKey: ['catalogue', 'wheelset', slug, lng],
    queryFn: ({ signal }) => api.get(`/api/wheelsets/${encodeURIComponent(slug)}?lng=${lng}`, wheelsetDetail, signal),
  })

export const marketsQuery = () =>
  queryOptions({
    queryKey: ['catalogue', 'markets'],
    queryFn: ({ signal }) => api.get('/api/markets', marketList, signal),
    staleTime: 60 * 60_000,
  })
