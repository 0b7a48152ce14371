/** Countries we deliver to. VAT: standard rates, MEMORY, to be confirmed before a real sale. Delivery prices and days: invented. */
const market = (
  code: string,
  currency: 'EUR' | 'GBP' | 'USD',
  vatPercentBp: number,
  deliveryCents: number,
  deliveryDaysFrom: number,
  deliveryDaysTo: number,
) => ({ code, currency, vatPercentBp, taxIncluded: vatPercentBp > 0, deliveryCents, deliveryDaysFrom, deliveryDaysTo })

export const markets = [
  market('PT', 'EUR', 2300, 900, 1, 2),
  market('ES', 'EUR', 2100, 1400, 2, 3),
  market('FR', 'EUR', 2000, 1900, 3, 5),
  market('DE', 'EUR', 1900, 1900, 3, 5),
  market('IE', 'EUR', 2300, 2600, 4, 7),
  market('NL', 'EUR', 2100, 1900, 3, 5),
  market('BE', 'EUR', 2100, 1900, 3, 5),
  market('AT', 'EUR', 2000, 2100, 3, 6),
  market('IT', 'EUR', 2200, 2100, 3, 6),
  market('LU', 'EUR', 1700, 1900, 3, 5),
  market('GB', 'GBP', 2000, 2900, 4, 8),
  market('US', 'USD', 0, 6900, 6, 11),
]
export type SeedMarket = (typeof markets)[number]
