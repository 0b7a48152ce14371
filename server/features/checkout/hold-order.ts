/** The transaction that makes an order of a basket: gate, prices from our own rows, stock held. All of it or nothing. */
import { randomUUID } from 'node:crypto'
import type { Transaction } from 'sequelize'
import type { OrderRequest } from '#contract/checkout.ts'
import type { Locale } from '#contract/common.ts'
import type { Deps } from '../../deps.ts'
import { AppError, badField, notFound } from '../../http/errors.ts'
import { Basket } from '../../models/basket.ts'
import { OrderEvent } from '../../models/order-event.ts'
import { OrderLine } from '../../models/order-line.ts'
import { Order } from '../../models/order.ts'
import { checkBasket } from '../basket/service.ts'
import { digest, orderToken } from './order-token.ts'
import { reserve } from './stock.ts'

/** Stock is held longer than the payment page can stay open, so that nobody pays for what was let go. */
export const HOLD_MS = 35 * 60_000

export interface Buyer {
  userId: number | null
  locale: Locale
}

/** Written with zeros so that numbers sort as they count. */
const numberOf = (id: number) => `F26-${String(id).padStart(6, '0')}`

/**
 * @returns the held order; where the basket is held by an earlier one, that one
 * @throws AppError basket-empty, basket-not-ready, limit-not-acknowledged, price-changed, sold-out, already-ordered
 */
export async function holdOrder(
  deps: Pick<Deps, 'db' | 'clock' | 'config'>,
  request: OrderRequest,
  { userId, locale }: Buyer,
  transaction: Transaction,
): Promise<Order> {
  const { db, clock, config } = deps
  const basket = await Basket.findByPk(request.basketId, { transaction, lock: transaction.LOCK.UPDATE })
  if (!basket) throw notFound()
  const earlier = await Order.findOne({ where: { basketId: basket.id }, transaction })
  if (earlier?.state === 'holding') return earlier
  if (earlier || basket.state === 'ordered') throw new AppError('already-ordered', 409)

  const { market, prices, lines, problems } = await checkBasket(deps, basket, locale, transaction)
  if (request.delivery.country !== market.code)
    throw badField('delivery.country', 'other-country', { country: market.code })
  const all = [...problems, ...lines.flatMap(({ gate }) => gate.problems)]
  const gone = all.find(({ code }) => code === 'sold-out')
  if (gone && all.length === 1) throw new AppError('sold-out', 409, gone.data)
  if (all.length > 0) throw new AppError('basket-not-ready', 409, { problems: all })
  if (lines.length === 0) throw new AppError('basket-empty', 409)
  const confirmed = lines.every(({ gate }) => gate.limitCheck !== 'unconfirmed')
  if (!confirmed && request.limitAcknowledged !== true) throw new AppError('limit-not-acknowledged', 409)
  const { goodsCents, deliveryCents, taxCents, totalCents } = prices
  checkExpected(request, totalCents)

  const missing = await reserve(
    db,
    lines.map(({ set, quantity }) => ({ wheelsetId: set.id, quantity, name: set.name })),
    transaction,
  )
  if (missing) throw new AppError('sold-out', 409, { available: 0, name: missing.name })

  const now = clock()
  const { delivery, email } = request
  const order = await Order.create(
    {
      // The number comes from the row's id, which the database hands out: buyers of the same moment never wait for each other's number.
      number: randomUUID().slice(0, 20),
      basketId: basket.id,
      userId,
      email,
      name: delivery.name,
      locale: request.locale ?? locale,
      market: market.code,
      currency: market.currency,
      delivery,
      postcode: delivery.postcode,
      state: 'holding',
      ...{ goodsCents, deliveryCents, taxCents, totalCents },
      tokenHash: '',
      holdExpiresAt: new Date(now.getTime() + HOLD_MS),
      createdAt: now,
    },
    { transaction },
  )
  const number = numberOf(order.id)
  await order.update({ number, tokenHash: digest(orderToken(config, number)) }, { transaction })
  await OrderLine.bulkCreate(
    lines.map(({ set, quantity, unitCents, lineCents, taxCents: lineTaxCents, gate, adviceId }) => ({
      orderId: order.id,
      wheelsetId: set.id,
      sku: set.sku,
      title: set.name,
      quantity,
      unitCents,
      lineCents,
      taxCents: lineTaxCents,
      options: gate.options,
      state: 'holding' as const,
      adviceId,
      limitCheck: gate.limitCheck as 'within' | 'no-margin' | 'unconfirmed', // over the limit is a problem, refused above
      limitKg: set.limitKg,
    })),
    { transaction },
  )
  await OrderEvent.create(
    { orderId: order.id, kind: 'created', toState: 'holding', actorRole: 'buyer', createdAt: now },
    { transaction },
  )
  await basket.update({ state: 'ordered' }, { transaction })
  return order
}

export function checkExpected({ expectedTotalCents }: OrderRequest, totalCents: number) {
  if (expectedTotalCents !== undefined && expectedTotalCents !== totalCents)
    throw new AppError('price-changed', 409, { expectedTotalCents, totalCents })
}
