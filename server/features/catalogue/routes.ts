import { z } from 'zod'
import { marketList, wheelsetDetail, wheelsetFilters, wheelsetList } from '#contract/catalogue.ts'
import { locale } from '#contract/common.ts'
import { route, type Route } from '../../http/route.ts'
import { localeOf } from '../../http/texts.ts'
import { Market } from '../../models/market.ts'
import { listWheelsets, readWheelset } from './service.ts'

const feature = 'catalogue'

export const catalogueRoutes: Route[] = [
  route(
    {
      method: 'get',
      path: '/api/wheelsets',
      feature,
      access: 'anyone',
      summary: 'The range: filters, sort, cursor',
      query: wheelsetFilters,
      reply: wheelsetList,
    },
    ({ deps, req, query }) => listWheelsets(deps, query, query.lng ?? localeOf(req)),
  ),
  route(
    {
      method: 'get',
      path: '/api/wheelsets/:slug',
      feature,
      access: 'anyone',
      summary: 'One wheelset, with what the structural model found of its wheels',
      params: z.object({ slug: z.string().max(80) }),
      query: z.strictObject({ lng: locale.optional() }),
      reply: wheelsetDetail,
    },
    ({ deps, req, params, query }) => readWheelset(deps, params.slug, query.lng ?? localeOf(req)),
  ),
  route(
    {
      method: 'get',
      path: '/api/markets',
      feature,
      access: 'anyone',
      summary: 'Where we deliver, at what price and tax',
      reply: marketList,
    },
    async () => {
      const markets = await Market.findAll({ order: ['code'] })
      return {
        items: markets.map((one) => ({
          code: one.code as never,
          currency: one.currency,
          vatPercent: one.vatPercentBp / 100,
          taxIncluded: one.taxIncluded,
          deliveryCents: one.deliveryCents,
          deliveryDaysFrom: one.deliveryDaysFrom,
          deliveryDaysTo: one.deliveryDaysTo,
        })),
        nextCursor: null,
      }
    },
  ),
]
