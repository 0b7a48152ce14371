import {
  order,
  orderKey,
  orderParams,
  orderPlaced,
  orderRequest,
  payReply,
  webhookReceived,
} from '#contract/checkout.ts'
import { AppError } from '../../http/errors.ts'
import { route, type Route } from '../../http/route.ts'
import { localeOf } from '../../http/texts.ts'
import { Order } from '../../models/order.ts'
import { dropOrder } from './drop-order.ts'
import { placeOrder, startPayment } from './place-order.ts'
import { settleCheckout } from './settle.ts'
import { findReadable, viewOrder } from './view-order.ts'
import { takeEvent } from './webhook.ts'

const feature = 'checkout'
const one = { params: orderParams, query: orderKey }

export const checkoutRoutes: Route[] = [
  route(
    {
      method: 'post',
      path: '/api/orders',
      feature,
      access: 'anyone',
      summary: 'Order the basket: checks it once more, holds the stock, opens the payment page',
      body: orderRequest,
      reply: orderPlaced,
      status: 201,
      idempotency: 'required',
    },
    ({ deps, req, body, user }) =>
      placeOrder(deps, body, { basketId: req.session.basketId, userId: user?.id ?? null, locale: localeOf(req) }),
  ),
  route(
    {
      method: 'get',
      path: '/api/orders/:orderNumber',
      feature,
      access: 'anyone',
      summary: 'One order, for its owner, for a guest with the key from the mail, for support',
      ...one,
      reply: order,
    },
    async ({ deps, params, query, user }) =>
      viewOrder(deps, await findReadable(params.orderNumber, { user, key: query.key })),
  ),
  route(
    {
      method: 'post',
      path: '/api/orders/:orderNumber/refresh',
      feature,
      access: 'anyone',
      summary: 'Back from the payment page: read there how it went, and place the order if it is paid',
      ...one,
      reply: order,
    },
    async ({ deps, params, query, user }) => {
      const found = await findReadable(params.orderNumber, { user, key: query.key })
      if (found.stripeSessionId !== null && found.state === 'holding') await settleCheckout(deps, found.stripeSessionId)
      return viewOrder(deps, await Order.findByPk(found.id, { rejectOnEmpty: true }))
    },
  ),
  route(
    {
      method: 'post',
      path: '/api/orders/:orderNumber/pay',
      feature,
      access: 'anyone',
      summary: 'The payment page of a held order, after checking limits and fit once more',
      ...one,
      reply: payReply,
    },
    async ({ deps, params, query, user }) => {
      const found = await findReadable(params.orderNumber, { user, key: query.key })
      return { payUrl: await startPayment(deps, found.id) }
    },
  ),
  route(
    {
      method: 'post',
      path: '/api/orders/:orderNumber/cancel',
      feature,
      access: 'anyone',
      summary: 'Leave an unpaid order: the stock is let go, the basket is open again',
      ...one,
      reply: order,
    },
    async ({ deps, params, query, user }) => {
      const found = await findReadable(params.orderNumber, { user, key: query.key })
      if (found.state === 'holding') {
        // The page is closed first, then read: a payment that was quicker wins.
        if (found.stripeSessionId !== null) {
          await deps.payments.expireCheckout(found.stripeSessionId)
          await settleCheckout(deps, found.stripeSessionId)
        }
        await dropOrder(deps, found.id, 'dropped', { reason: 'left-by-buyer' })
      } else if (found.state !== 'dropped') throw new AppError('too-late-to-leave', 409)
      return viewOrder(deps, await Order.findByPk(found.id, { rejectOnEmpty: true }))
    },
  ),
  route(
    {
      method: 'post',
      path: '/api/webhooks/stripe',
      feature,
      access: 'anyone',
      summary: 'Signed events of the payment processor; the signature covers the raw bytes',
      reply: webhookReceived,
      raw: true,
    },
    async ({ deps, req }) => {
      await takeEvent(deps, req.body as Buffer, req.get('stripe-signature') ?? '')
      return { received: true as const }
    },
  ),
]
