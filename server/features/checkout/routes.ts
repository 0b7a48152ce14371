import {
  order,
  orderKey,
  orderParams,
  orderPlaced,
  orderRequest,
  payReply,
  webhookReceived,
} from '#contract/checkout.ts'
import type { Deps } from '../../deps.ts'
import { AppError } from '../../http/errors.ts'
import { route, type Call, type Route } from '../../http/route.ts'
import type { SignedIn } from '../../http/session.ts'
import { localeOf } from '../../http/texts.ts'
import type { Order } from '../../models/order.ts'
import { leaveOrder } from './leave-order.ts'
import { withinGuesses } from './order-guesses.ts'
import { placeOrder } from './place-order.ts'
import { payPageIsOver, startPayment } from './start-payment.ts'
import { settleCheckout } from './settle.ts'
import { findReadable, viewOrder } from './view-order.ts'
import { takeEvent } from './webhook.ts'

const feature = 'checkout'
const one = { params: orderParams, query: orderKey }

type OneOrder = Pick<
  Call<{ orderNumber: string }, { key?: string | undefined }, unknown>,
  'req' | 'res' | 'params' | 'query'
> & {
  deps: Deps
  user: SignedIn | null
}
const readable = async ({ req, res, params, query, user }: OneOrder): Promise<Order> => {
  await withinGuesses(req, res)
  return findReadable(params.orderNumber, { user, key: query.key })
}

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
    async (call) => viewOrder(call.deps, await readable(call)),
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
    async (call) => {
      const found = await readable(call)
      if (found.stripeSessionId !== null && found.state === 'holding')
        await settleCheckout(call.deps, found.stripeSessionId)
      return viewOrder(call.deps, await found.reload())
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
    async (call) => {
      const found = await readable(call)
      if (found.state === 'holding' && payPageIsOver(found, call.deps.clock()))
        await leaveOrder(call.deps, found, 'lapsed', { reason: 'hold-lapsed' })
      return { payUrl: await startPayment(call.deps, found.id) }
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
    async (call) => {
      const found = await readable(call)
      if (found.state !== 'holding' && found.state !== 'dropped') throw new AppError('too-late-to-leave', 409)
      const left =
        found.state === 'holding' ? await leaveOrder(call.deps, found, 'dropped', { reason: 'left-by-buyer' }) : found
      return viewOrder(call.deps, left)
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
