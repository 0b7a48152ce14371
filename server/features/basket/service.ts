/** The basket: kept with the visitor's session, priced and checked by the server at every look. */
import { randomUUID } from 'node:crypto'
import type { Transaction } from 'sequelize'
import type { BasketRequest, BasketView } from '#contract/basket.ts'
import type { Currency, Locale, MarketCode } from '#contract/common.ts'
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import { AppError, badField } from '../../http/errors.ts'
import { AdviceSnapshot } from '../../models/advice-snapshot.ts'
import { Basket } from '../../models/basket.ts'
import { BasketLine } from '../../models/basket-line.ts'
import { Market } from '../../models/market.ts'
import { Order } from '../../models/order.ts'
import { readCatalogue, type StoredWheelset } from '../catalogue/read.ts'
import { Fittings, optionChoices, passGate, type GateResult } from './gate.ts'
import { priceBasket } from './pricing.ts'

/** What the order needs of a line beyond what the shopper sees. */
export interface CheckedLine {
  set: StoredWheelset
  quantity: number
  adviceId: string | null
  gate: GateResult
  lineCents: number
  unitCents: number
  taxCents: number
}

export async function readMarket(code: string): Promise<Market> {
  const market = await Market.findByPk(code)
  if (!market) throw badField('market', 'not-a-choice', { choices: '' })
  return market
}

/** Prices and checks a basket as it stands now. Used for showing it and, inside the order's transaction, for ordering it. */
export async function checkBasket(
  deps: Pick<Deps, 'db' | 'clock'>,
  basket: Basket,
  locale: Locale,
  transaction?: Transaction,
) {
  const lines = await BasketLine.findAll({
    where: { basketId: basket.id },
    order: ['id'],
    ...(transaction ? { transaction } : {}),
  })
  const market = await readMarket(basket.market)
  const catalogue = new Map((await readCatalogue(deps, locale, true)).map((set) => [set.id, set]))
  const fittings = new Fittings(deps)
  const { currency } = market
  const checked = await Promise.all(
    lines.map(async (line, index) => {
      const set = catalogue.get(line.wheelsetId)
      const path = `lines.${index}`
      const adviceId = line.adviceId ?? basket.adviceId
      const asked = { sku: set?.sku ?? '', quantity: line.quantity, options: line.options, adviceId: line.adviceId }
      const gate = await passGate(asked, set, adviceId, fittings, path)
      if (set && set.available < line.quantity)
        gate.problems.push({ code: 'sold-out', path, data: { available: set.available, name: set.name } })
      const unitCents = set?.prices[currency]
      if (set && unitCents === undefined) gate.problems.push({ code: 'no-price', path, data: { currency } })
      return { set, quantity: line.quantity, adviceId, gate, unitCents: unitCents ?? 0 }
    }),
  )
  // A wheelset that has left the catalogue altogether (no limit in force) cannot be shown with its facts; it falls out of the basket.
  const known = checked.flatMap((line) => (line.set ? [{ ...line, set: line.set }] : []))
  const prices = priceBasket(known, market)
  const priced: CheckedLine[] = known.map((line, index) => ({
    ...line,
    lineCents: prices.lines[index]?.lineCents ?? 0,
    taxCents: prices.lines[index]?.taxCents ?? 0,
  }))
  return { market, prices, lines: priced }
}

export async function showBasket(
  deps: Pick<Deps, 'db' | 'clock'>,
  basket: Basket,
  locale: Locale,
): Promise<BasketView> {
  const { market, prices, lines } = await checkBasket(deps, basket, locale)
  const { goodsCents, deliveryCents, taxCents, totalCents } = prices
  return {
    basketId: basket.id,
    market: market.code as MarketCode,
    currency: market.currency,
    lines: lines.map(({ set, quantity, adviceId, gate, unitCents, lineCents }) => ({
      sku: set.sku,
      slug: set.slug,
      name: set.name,
      quantity,
      options: gate.options,
      optionChoices: optionChoices(set),
      unitCents,
      lineCents,
      adviceId,
      limitCheck: gate.limitCheck,
      readyToRideKg: gate.readyToRideKg,
      limitKg: set.limitKg,
      marginKg: gate.marginKg,
      available: set.available,
      problems: gate.problems,
    })),
    goodsCents,
    deliveryCents,
    taxCents,
    taxIncluded: market.taxIncluded,
    totalCents,
    deliveryDaysFrom: market.deliveryDaysFrom,
    deliveryDaysTo: market.deliveryDaysTo,
    canOrder: lines.length > 0 && lines.every(({ gate }) => gate.problems.length === 0),
  }
}

/** The visitor's open basket, or null. */
export async function openBasket(basketId: string | undefined): Promise<Basket | null> {
  if (basketId === undefined) return null
  return Basket.findOne({ where: { id: basketId, state: 'open' } })
}

export function emptyBasket(market: Market): BasketView {
  return {
    basketId: null,
    market: market.code as MarketCode,
    currency: market.currency,
    lines: [],
    goodsCents: 0,
    deliveryCents: 0,
    taxCents: 0,
    taxIncluded: market.taxIncluded,
    totalCents: 0,
    deliveryDaysFrom: market.deliveryDaysFrom,
    deliveryDaysTo: market.deliveryDaysTo,
    canOrder: false,
  }
}

/**
 * Replaces the basket's lines by what was asked for. The last fitting seen stays with the basket, so that leaving it out of a line later does not
 * make anybody lighter.
 */
export async function putBasket(
  deps: Pick<Deps, 'db' | 'clock'>,
  request: BasketRequest,
  visitor: { basketId: string | undefined; userId: number | null; locale: Locale },
): Promise<Basket> {
  const market = await readMarket(request.market)
  if (market.currency !== request.currency) throw badField('currency', 'other-currency', { currency: market.currency })
  const catalogue = new Map((await readCatalogue(deps, visitor.locale, true)).map((set) => [set.sku, set]))
  const seen = new Set<string>()
  const rows = request.lines.map(({ sku, quantity, options, adviceId }, index) => {
    const set = catalogue.get(sku)
    if (!set) throw badField(`lines.${index}.sku`, 'no-such-wheelset')
    if (seen.has(sku)) throw badField(`lines.${index}.sku`, 'twice')
    seen.add(sku)
    return { wheelsetId: set.id, quantity, options, adviceId: adviceId ?? null }
  })
  for (const [index, { adviceId }] of rows.entries()) {
    if (adviceId !== null && (await AdviceSnapshot.count({ where: { id: adviceId } })) === 0)
      throw badField(`lines.${index}.adviceId`, 'no-such-fitting')
  }
  const lastAdvice = rows.findLast(({ adviceId }) => adviceId !== null)?.adviceId ?? null

  return inTransaction(deps.db, async (transaction) => {
    const found =
      visitor.basketId === undefined
        ? null
        : await Basket.findOne({ where: { id: visitor.basketId }, transaction, lock: transaction.LOCK.UPDATE })
    if (found?.state === 'ordered' && (await isHeld(found.id, transaction))) throw new AppError('order-open', 409)
    const shared = {
      market: market.code,
      currency: market.currency as Currency,
      locale: visitor.locale,
      userId: visitor.userId,
    }
    const basket =
      found?.state === 'open'
        ? await found.update(shared, { transaction })
        : await Basket.create({ id: randomUUID(), ...shared }, { transaction })
    await basket.update({ adviceId: lastAdvice ?? basket.adviceId, version: basket.version + 1 }, { transaction })
    await BasketLine.destroy({ where: { basketId: basket.id }, transaction })
    await BasketLine.bulkCreate(
      rows.map((row) => ({ ...row, basketId: basket.id })),
      { transaction },
    )
    return basket
  })
}

/** An order of this basket waits for its payment: changing the basket now would make two of one. */
async function isHeld(basketId: string, transaction: Transaction): Promise<boolean> {
  return (await Order.count({ where: { basketId, state: 'holding' }, transaction })) > 0
}
