/** One edit of a wheelset: words, prices, stock, on or off sale. All of it or none of it, with one audit row. */
import type { Transaction } from 'sequelize'
import { PRICE_JUMP_SHARE, productWheelset, type ProductChange, type ProductWheelset } from '#contract/product-desk.ts'
import { currencies, locales } from '#contract/common.ts'
import { recordAudit } from '../../audit/record.ts'
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import { AppError, notFound } from '../../http/errors.ts'
import type { SignedIn } from '../../http/session.ts'
import { Price } from '../../models/price.ts'
import { Stock } from '../../models/stock.ts'
import { Wheelset } from '../../models/wheelset.ts'
import { WheelsetText } from '../../models/wheelset-text.ts'
import { pricesNow, readProduct } from './read.ts'

type Reach = Pick<Deps, 'db' | 'clock'>
/** What changed, before and after, by dotted name; what stayed the same is not in it. */
interface Diff {
  before: Record<string, unknown>
  after: Record<string, unknown>
}

const note = (diff: Diff, name: string, before: unknown, after: unknown) => {
  if (before === after) return false
  diff.before[name] = before
  diff.after[name] = after
  return true
}

/**
 * @throws AppError changed-meanwhile (with the present values), price-jump, stock-below-reserved: all 409, nothing written
 */
export function changeWheelset(
  deps: Reach,
  actor: SignedIn,
  sku: string,
  change: ProductChange,
): Promise<ProductWheelset> {
  return inTransaction(deps.db, async (transaction) => {
    // The row lock puts two editors in line; the second then reads the first one's version.
    const wheelset = await Wheelset.findOne({ where: { sku }, lock: true, transaction })
    if (!wheelset) throw notFound()
    if (wheelset.version !== change.version) throw await changedMeanwhile(deps, sku, transaction)

    const diff: Diff = { before: {}, after: {} }
    await changeStock(deps, wheelset, change, diff, transaction)
    await changePrices(deps, wheelset, change, diff, transaction)
    await changeTexts(wheelset, change, diff, transaction)
    if (change.onSale !== undefined) note(diff, 'onSale', wheelset.onSale, change.onSale)

    // Saving what is there already is no change: no new version, no audit row.
    if (Object.keys(diff.after).length > 0) {
      await wheelset.update(
        { onSale: change.onSale ?? wheelset.onSale, version: wheelset.version + 1 },
        { transaction },
      )
      await recordAudit(
        actor,
        { action: 'wheelset.changed', subjectType: 'wheelset', subjectId: sku, reason: change.reason, ...diff },
        transaction,
      )
    }
    return readProduct(deps, sku, transaction)
  })
}

/** A refusal passes no reply schema, so the present values are named here. */
const changedMeanwhile = async (deps: Reach, sku: string, transaction: Transaction) =>
  new AppError('changed-meanwhile', 409, { present: productWheelset.parse(await readProduct(deps, sku, transaction)) })

async function changeStock(
  deps: Reach,
  wheelset: Wheelset,
  { stock }: ProductChange,
  diff: Diff,
  transaction: Transaction,
) {
  if (!stock) return
  // Sales take this lock too, so the count cannot move between this read and the write.
  const kept = await Stock.findByPk(wheelset.id, { lock: true, transaction })
  const onHand = kept?.onHand ?? 0
  if (stock.onHandSeen !== undefined && stock.onHandSeen !== onHand)
    throw await changedMeanwhile(deps, wheelset.sku, transaction)
  const reserved = kept?.reserved ?? 0
  if (stock.onHand < reserved) throw new AppError('stock-below-reserved', 409, { reserved })
  if (!note(diff, 'stock.onHand', onHand, stock.onHand)) return
  if (kept) await kept.update({ onHand: stock.onHand }, { transaction })
  else await Stock.create({ wheelsetId: wheelset.id, onHand: stock.onHand }, { transaction })
}

async function changePrices(
  { clock }: Reach,
  wheelset: Wheelset,
  change: ProductChange,
  diff: Diff,
  transaction: Transaction,
) {
  if (!change.prices) return
  const now = clock()
  const present = pricesNow(await Price.findAll({ where: { wheelsetId: wheelset.id }, transaction }), now)
  for (const currency of currencies) {
    const priceCents = change.prices[currency]
    if (priceCents === undefined) continue
    const before = present[currency]
    if (before !== undefined && !change.confirmJump && Math.abs(priceCents - before) > before * PRICE_JUMP_SHARE) {
      const percent = Math.round((100 * (priceCents - before)) / before)
      throw new AppError('price-jump', 409, { currency, fromCents: before, toCents: priceCents, percent })
    }
    // A new row, never an overwritten one: what a price was on a day stays known.
    if (note(diff, `prices.${currency}`, before ?? null, priceCents)) {
      await Price.create({ wheelsetId: wheelset.id, currency, priceCents, validFrom: now }, { transaction })
    }
  }
}

async function changeTexts(wheelset: Wheelset, change: ProductChange, diff: Diff, transaction: Transaction) {
  for (const locale of locales) {
    const typed = change.texts?.[locale]
    if (!typed) continue
    const kept = await WheelsetText.findOne({ where: { wheelsetId: wheelset.id, locale }, transaction })
    const tagline = note(diff, `texts.${locale}.tagline`, kept?.tagline ?? '', typed.tagline)
    const description = note(diff, `texts.${locale}.description`, kept?.description ?? '', typed.description)
    if (!tagline && !description) continue
    if (kept) await kept.update(typed, { transaction })
    else await WheelsetText.create({ wheelsetId: wheelset.id, locale, ...typed }, { transaction })
  }
}
