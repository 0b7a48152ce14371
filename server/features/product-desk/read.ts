/** Wheelsets as the product desk sees them: everything, on sale or not, with counts and history. */
import { QueryTypes, type Transaction } from 'sequelize'
import type { ProductRow, ProductWheelset } from '#contract/product-desk.ts'
import { locales, type Currency, type Locale } from '#contract/common.ts'
import type { Deps } from '../../deps.ts'
import { notFound } from '../../http/errors.ts'
import { Price } from '../../models/price.ts'
import { WheelsetText } from '../../models/wheelset-text.ts'

type Reach = Pick<Deps, 'db' | 'clock'>

interface StoredRow extends Omit<ProductRow, 'onSale' | 'prices' | 'missingTexts' | 'updatedAt'> {
  id: number
  onSale: number
  updatedAt: Date
  useCondition: number
  assistRated: number
  rides: string[]
  limitProof: string | null
  limitInForceFrom: Date | null
}

const ROWS = `
  SELECT w.id, w.sku, w.slug, w.name, w.brake, w.bead_seat_mm AS beadSeatMm, w.build_kind AS buildKind, w.on_sale AS onSale, w.version,
    w.updated_at AS updatedAt, w.use_condition AS useCondition, w.assist_rated AS assistRated, w.rides,
    fr.depth_mm AS depthFrontMm, rr.depth_mm AS depthRearMm, f.spoke_count AS spokesFront, r.spoke_count AS spokesRear,
    l.limit_kg AS limitKg, l.proof AS limitProof, l.in_force_from AS limitInForceFrom,
    (SELECT COUNT(*) FROM limit_versions d WHERE d.wheelset_id = w.id AND d.state = 'drafted') AS draftedLimits,
    COALESCE(st.on_hand, 0) AS onHand, COALESCE(st.reserved, 0) AS reserved
  FROM wheelsets w
  JOIN wheelset_wheels f ON f.wheelset_id = w.id AND f.position = 'front'
  JOIN rims fr ON fr.id = f.rim_id
  JOIN wheelset_wheels r ON r.wheelset_id = w.id AND r.position = 'rear'
  JOIN rims rr ON rr.id = r.rim_id
  LEFT JOIN stock st ON st.wheelset_id = w.id
  LEFT JOIN limit_versions l ON l.id = (
    SELECT v.id FROM limit_versions v
    WHERE v.wheelset_id = w.id AND v.state IN ('seconded', 'in-force') AND v.in_force_from <= :now
    ORDER BY v.in_force_from DESC, v.id DESC LIMIT 1)
  WHERE (:sku IS NULL OR w.sku = :sku)
  ORDER BY w.name, w.sku`

/** The price in force of each currency; a later `validFrom` waits. */
export function pricesNow(
  rows: readonly Pick<Price, 'currency' | 'priceCents' | 'validFrom' | 'id'>[],
  now: Date,
): Partial<Record<Currency, number>> {
  const due = rows
    .filter(({ validFrom }) => validFrom <= now)
    .sort((a, b) => a.validFrom.getTime() - b.validFrom.getTime() || a.id - b.id)
  return Object.fromEntries(due.map(({ currency, priceCents }) => [currency, priceCents]))
}

async function readRows({ db, clock }: Reach, sku: string | null, transaction?: Transaction) {
  const now = clock()
  const rows = await db.query<StoredRow>(ROWS, { replacements: { now, sku }, type: QueryTypes.SELECT, transaction })
  const wheelsetId = rows.map(({ id }) => id)
  const prices = await Price.findAll({ where: { wheelsetId }, transaction })
  const texts = await WheelsetText.findAll({ where: { wheelsetId }, transaction })
  return rows.map((row) => ({
    row,
    prices: prices.filter((price) => price.wheelsetId === row.id),
    texts: texts.filter((text) => text.wheelsetId === row.id),
    now,
  }))
}

type Read = Awaited<ReturnType<typeof readRows>>[number]

function rowView({ row, prices, texts, now }: Read): ProductRow {
  return {
    ...row,
    onSale: Boolean(row.onSale),
    prices: pricesNow(prices, now),
    missingTexts: locales.filter(
      (language) => !texts.some(({ locale, description }) => locale === language && description !== ''),
    ),
    updatedAt: row.updatedAt.toISOString(),
  }
}

export async function listProducts(deps: Reach) {
  return { items: (await readRows(deps, null)).map(rowView), nextCursor: null }
}

/** @param transaction reads inside a running change, so that the reply shows what it wrote */
export async function readProduct(deps: Reach, sku: string, transaction?: Transaction): Promise<ProductWheelset> {
  const [read] = await readRows(deps, sku, transaction)
  if (!read) throw notFound()
  const { row, prices, texts } = read
  const wordsIn = (language: Locale) => {
    const found = texts.find(({ locale }) => locale === language)
    return { tagline: found?.tagline ?? '', description: found?.description ?? '' }
  }
  return {
    ...rowView(read),
    useCondition: row.useCondition,
    assistRated: Boolean(row.assistRated),
    rides: row.rides,
    limitProof: row.limitProof,
    limitInForceFrom: row.limitInForceFrom?.toISOString() ?? null,
    texts: { en: wordsIn('en'), pt: wordsIn('pt') },
    priceHistory: prices
      .sort((a, b) => b.validFrom.getTime() - a.validFrom.getTime() || b.id - a.id)
      .map(({ currency, priceCents, validFrom }) => ({ currency, priceCents, validFrom: validFrom.toISOString() })),
  }
}
