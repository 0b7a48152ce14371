/** What a basket costs. Whole cents only; the sums of the parts are the total, always. */
import type { Currency } from '#contract/common.ts'

export interface PricedLine {
  unitCents: number
  quantity: number
}

export interface Tariff {
  currency: Currency
  vatPercentBp: number
  /** Prices hold the tax (EU, UK); false: tax is due at the door (US). */
  taxIncluded: boolean
  deliveryCents: number
}

/**
 * Tax inside an amount that includes it, rounded half up to the cent. t = amount · r/(1 + r)
 * @param vatPercentBp rate in basis points, 2300 = 23 %
 * @source derived: amount = net · (1 + r)
 * @example taxInside(12300, 2300) // 2300
 */
export const taxInside = (cents: number, vatPercentBp: number) =>
  Math.floor((cents * vatPercentBp) / (10_000 + vatPercentBp) + 0.5)

/** @returns each line's cents and tax, and the sums; delivery is charged once, and not at all on nothing */
export function priceBasket(lines: readonly PricedLine[], tariff: Tariff) {
  const tax = (cents: number) => (tariff.taxIncluded ? taxInside(cents, tariff.vatPercentBp) : 0)
  const priced = lines.map(({ unitCents, quantity }) => {
    const lineCents = unitCents * quantity
    return { unitCents, quantity, lineCents, taxCents: tax(lineCents) }
  })
  const goodsCents = priced.reduce((sum, { lineCents }) => sum + lineCents, 0)
  const deliveryCents = priced.length > 0 ? tariff.deliveryCents : 0
  const taxCents = priced.reduce((sum, line) => sum + line.taxCents, tax(deliveryCents))
  return { lines: priced, goodsCents, deliveryCents, taxCents, totalCents: goodsCents + deliveryCents }
}
