import { z } from 'zod'
import { basket, basketRequest } from '#contract/basket.ts'
import { marketCode } from '#contract/common.ts'
import { route, type Route } from '../../http/route.ts'
import { localeOf } from '../../http/texts.ts'
import { findHeldOrder, leaveOrder } from '../checkout/leave-order.ts'
import { orderUrl } from '../checkout/order-token.ts'
import { emptyBasket, findBasket, putBasket, readMarket, readRequest, showBasket } from './service.ts'

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
    async ({ deps, req, query, user }) => {
      const found = await findBasket({ basketId: req.session.basketId, userId: user?.id ?? null })
      const held = found && (await findHeldOrder(found.id))
      if (!found || (found.state === 'ordered' && !held)) return emptyBasket(await readMarket(query.market ?? 'PT'))
      if (req.session.basketId !== found.id) req.session.basketId = found.id
      const heldOrder = held && { orderNumber: held.number, orderUrl: orderUrl(deps.config, held.number) }
      return showBasket(deps, found, localeOf(req), heldOrder)
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
      const userId = user?.id ?? null
      const asked = await readRequest(deps, body, locale)
      const visitor = { basketId: req.session.basketId, userId }
      const before = await findBasket(visitor)
      // An unpaid order of this basket is left: what it holds is what the shopper is changing.
      const held = before && (await findHeldOrder(before.id))
      if (held) await leaveOrder(deps, held, 'dropped', { reason: 'basket-changed' })
      const kept = await putBasket(deps, asked, held ? await findBasket(visitor) : before, { userId, locale })
      req.session.basketId = kept.id
      return showBasket(deps, kept, locale, null)
    },
  ),
]
