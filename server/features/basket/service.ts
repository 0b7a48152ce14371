/** The basket: kept with the visitor's session and with the account, priced and checked by the server at every look. */
import { randomUUID } from 'node:crypto'
import type { Transaction } from 'sequelize'
import type { BasketProblem, BasketRequest, BasketView } from '#contract/basket.ts'
import type { Locale, MarketCode } from '#contract/common.ts'
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import { AppError, badField } from '../../http/errors.ts'
import { Basket } from '../../models/basket.ts'
import { BasketLine } from '../../models/basket-line.ts'
import { Market } from '../../models/market.ts'
import { readCatalogue, type StoredWheelset } from '../catalogue/read.ts'
import { Fittings, optionChoices, passGate, type GateResult } from './gate.ts'
import { priceBasket } from './pricing.ts'
import { strictestFitting } from './remembered-fitting.ts'

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

export interface Visitor {
  basketId: string | undefined
  userId: number | null
}

export async function readMarket(code: string, transaction?: Transaction): Promise<Market> {
  const market = await Market.findByPk(code, transaction ? { transaction } : {})
  if (!market) throw badField('market', 'not-a-choice', { choices: '' })
  return market
}

/**
 * Prices and checks a basket as it stands now. Used for showing it and, inside the order's transaction, for ordering it.
 * @returns problems: what concerns the basket as a whole; each line's own are with the line
 */
export async function checkBasket(
  deps: Pick<Deps, 'db' | 'clock'>,
  basket: Basket,
  locale: Locale,
  transaction?: Transaction,
) {
  const inside = transaction ? { transaction } : {}
  const rows = await BasketLine.findAll({ where: { basketId: basket.id }, order: ['id'], ...inside })
  const market = await readMarket(basket.market, transaction)
  const catalogue = new Map((await readCatalogue(deps, locale, true, transaction)).map((set) => [set.id, set]))
  const fittings = new Fittings(deps, transaction)
  const problems: BasketProblem[] = []
  const checked: Omit<CheckedLine, 'lineCents' | 'taxCents'>[] = []
  for (const { wheelsetId, quantity, options, adviceId: own } of rows) {
    const set = catalogue.get(wheelsetId)
    // Left the catalogue altogether, without even a limit to show. Said aloud: the shopper takes the basket as it now is by putting it anew.
    if (!set) {
      problems.push({ code: 'left-range', path: 'lines', data: {} })
      continue
    }
    const path = `lines.${checked.length}`
    const adviceId = own ?? basket.adviceId
    const gate = await passGate(options, set, adviceId, fittings, path)
    const { available, name } = set
    if (available < quantity) gate.problems.push({ code: 'sold-out', path, data: { available, name } })
    const unitCents = set.prices[market.currency]
    if (unitCents === undefined) gate.problems.push({ code: 'no-price', path, data: { currency: market.currency } })
    checked.push({ set, quantity, adviceId, gate, unitCents: unitCents ?? 0 })
  }
  const prices = priceBasket(checked, market)
  const lines: CheckedLine[] = checked.map((line, index) => ({
    ...line,
    lineCents: prices.lines[index]?.lineCents ?? 0,
    taxCents: prices.lines[index]?.taxCents ?? 0,
  }))
  return { market, prices, lines, problems }
}

/** @param heldOrder the unpaid order that holds stock for this basket: what it holds is not missing from it */
export async function showBasket(
  deps: Pick<Deps, 'db' | 'clock'>,
  basket: Basket,
  locale: Locale,
  heldOrder: BasketView['heldOrder'],
): Promise<BasketView> {
  const { market, prices, lines, problems } = await checkBasket(deps, basket, locale)
  const { goodsCents, deliveryCents, taxCents, totalCents } = prices
  const standing = (line: BasketProblem[]) =>
    heldOrder === null ? line : line.filter(({ code }) => code !== 'sold-out')
  const shown = lines.map(({ set, quantity, adviceId, gate, unitCents, lineCents }) => ({
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
    problems: standing(gate.problems),
  }))
  return {
    ...emptyBasket(market),
    basketId: basket.id,
    lines: shown,
    goodsCents,
    deliveryCents,
    taxCents,
    totalCents,
    problems,
    canOrder: shown.length > 0 && problems.length === 0 && shown.every((line) => line.problems.length === 0),
    heldOrder,
  }
}

export const emptyBasket = (market: Market): BasketView => ({
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
  problems: [],
  canOrder: false,
  heldOrder: null,
})

/** The visitor's basket: the session's, unless it belongs to another account; else the open one that was last touched by this account. */
export async function findBasket({ basketId, userId }: Visitor): Promise<Basket | null> {
  const ofSession = basketId === undefined ? null : await Basket.findByPk(basketId)
  if (ofSession && (ofSession.userId === null || ofSession.userId === userId)) return ofSession
  if (userId === null) return null
  return Basket.findOne({ where: { userId, state: 'open' }, order: [['updatedAt', 'DESC']] })
}

/**
 * What a request says, held against the catalogue, the market and the kept fittings. Nothing is written yet.
 * @throws AppError naming each wrong field
 */
export async function readRequest(deps: Pick<Deps, 'db' | 'clock'>, request: BasketRequest, locale: Locale) {
  const market = await readMarket(request.market)
  if (market.currency !== request.currency) throw badField('currency', 'other-currency', { currency: market.currency })
  const catalogue = new Map((await readCatalogue(deps, locale, true)).map((set) => [set.sku, set]))
  const seen = new Set<string>()
  const rows = request.lines.map(({ sku, quantity, options, adviceId }, index) => {
    const set = catalogue.get(sku)
    if (!set) throw badField(`lines.${index}.sku`, 'no-such-wheelset')
    if (seen.has(sku)) throw badField(`lines.${index}.sku`, 'twice')
    seen.add(sku)
    return { wheelsetId: set.id, quantity, options, adviceId: adviceId ?? null }
  })
  return { market, rows, adviceId: await strictestFitting(rows.map((row) => row.adviceId)) }
}

/**
 * Replaces the basket's lines. The fitting last seen stays with the basket, and moves on to the next one, so that leaving it out of a line later
 * does not make anybody lighter.
 * @param found the visitor's basket, whatever its state; an ordered one is followed by a new one
 */
export async function putBasket(
  deps: Pick<Deps, 'db'>,
  { market, rows, adviceId }: Awaited<ReturnType<typeof readRequest>>,
  found: Basket | null,
  visitor: { userId: number | null; locale: Locale },
): Promise<Basket> {
  return inTransaction(deps.db, async (transaction) => {
    const present = found && (await Basket.findByPk(found.id, { transaction, lock: transaction.LOCK.UPDATE }))
    // Ordered in the same moment, in another tab: an order that waits for its payment must not lose its basket.
    if (present && present.state !== found.state) throw new AppError('changed-meanwhile', 409)
    const shared = {
      market: market.code,
      currency: market.currency,
      locale: visitor.locale,
      userId: visitor.userId,
      adviceId: adviceId ?? present?.adviceId ?? null,
    }
    const basket =
      present?.state === 'open'
        ? await present.update({ ...shared, version: present.version + 1 }, { transaction })
        : await Basket.create({ id: randomUUID(), ...shared }, { transaction })
    await BasketLine.destroy({ where: { basketId: basket.id }, transaction })
    await BasketLine.bulkCreate(
      rows.map((row) => ({ ...row, basketId: basket.id })),
      { transaction },
    )
    return basket
  })
}
