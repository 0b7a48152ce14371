/** The range's filters as they stand in the address. What cannot be read there is passed over, never sent on. */
import { wheelsetFilters, wheelsetSorts } from '#contract/catalogue.ts'

export const filterNames = [
  'q', 'ride', 'brake', 'beadSeatMm', 'material', 'seat', 'depthFromMm', 'depthToMm', 'spokesFrom', 'limitFromKg', 'tyreMm', 'assist', 'inStock',
] as const // prettier-ignore
export type FilterName = (typeof filterNames)[number]
export type Filters = Partial<Record<FilterName, string>>

/** `fit` orders by the rider's own findings and is worked out here; the rest is the server's. */
export const sorts = ['fit', ...wheelsetSorts] as const
export type Sort = (typeof sorts)[number]

export function readFilters(params: URLSearchParams): Filters {
  return Object.fromEntries(
    filterNames.flatMap((name) => {
      const text = params.get(name)?.trim() ?? ''
      return text !== '' && wheelsetFilters.shape[name].safeParse(text).success ? [[name, text]] : []
    }),
  )
}

export const readSort = (params: URLSearchParams): Sort | null =>
  sorts.find((one) => one === params.get('sort')) ?? null

/** @param change a value to set, or '' to take the filter away */
export function withFilters(
  params: URLSearchParams,
  change: Partial<Record<FilterName | 'sort', string>>,
): URLSearchParams {
  const next = new URLSearchParams(params)
  for (const [name, value] of Object.entries(change)) {
    if (value === '') next.delete(name)
    else next.set(name, value)
  }
  return next
}

export const withoutFilters = (params: URLSearchParams) =>
  withFilters(params, Object.fromEntries(filterNames.map((name) => [name, ''])))
