import { z } from 'zod'
import { basket, basketRequest } from '#contract/basket.ts'
import { marketCode } from '#contract/common.ts'
import { route, type Route } from '../../http/route.ts'
import { localeOf } from '../../http/texts.ts'
import { emptyBasket, openBasket, putBasket, readMarket, showBasket } from './service.ts'

const feature = 'basket'

export const basketRoutes: Route[] = [
  route(
    {
      method: 'get',
      path: '/api/basket',
      feature,
      access: 'anyone',
      summary: 'The visitor’s basket, priced and checked as of now',
      query: z.strictObject({ market: marketCode.optional() }),
      reply: basket,
    },
    async ({ deps, req, query }) => {
      const found = await openBasket(req.session.basketId)
      return found ? showBasket(deps, found, localeOf(req)) : emptyBasket(await readMarket(query.market ?? 'PT'))
    },
  ),
  route(
    {
      method: 'put',
      path: '/api/basket',
      feature,
      access: 'anyone',
      summary: 'Put these lines in the basket; the server prices them and runs the fit gate',
      body: basketRequest,
      reply: basket,
    },
    async ({ deps, req, body, user }) => {
      const locale = localeOf(req)
      const kept = await putBasket(deps, body, { basketId: req.session.basketId, userId: user?.id ?? null, locale })
      req.session.basketId = kept.id
      return showBasket(deps, kept, locale)
    },
  ),
]
