/** What the edit form holds while it is typed in, and how it becomes the contract's change. Only touched groups are sent. */
import { z } from 'zod'
import { currencies, locales, staffReason, type Currency } from '#contract/common.ts'
import { productChange, type ProductChange, type ProductWheelset } from '#contract/product-desk.ts'
import { readMoney, typeMoney } from '../../lib/form-words.ts'

export interface WheelsetForm {
  texts: Record<'en' | 'pt', { tagline: string; description: string }>
  prices: Record<Currency, string>
  stock: { onHand: string }
  onSale: boolean
  reason: string
  confirmJump: boolean
}

export const formOf = (set: ProductWheelset): WheelsetForm => ({
  texts: set.texts,
  prices: {
    EUR: '',
    GBP: '',
    USD: '',
    ...Object.fromEntries(Object.entries(set.prices).map(([currency, cents]) => [currency, typeMoney(cents)])),
  },
  stock: { onHand: String(set.onHand) },
  onSale: set.onSale,
  reason: '',
  confirmJump: false,
})

const money = z.string().transform((text, ctx) => {
  if (text.trim() === '') return undefined
  const cents = readMoney(text)
  if (cents === null) ctx.addIssue({ code: 'custom', message: 'not-money' })
  return cents ?? 100
})
const whole = z.string().transform((text, ctx) => {
  if (!/^\d{1,6}$/.test(text.trim())) ctx.addIssue({ code: 'custom', message: 'not-whole' })
  return Number(text)
})
// Empty words may be there already; they are refused only where they were typed.
const words = z.object({ tagline: z.string(), description: z.string() })

const same = (a: { tagline: string; description: string }, b: { tagline: string; description: string }) =>
  a.tagline.trim() === b.tagline && a.description.trim() === b.description

/** @param seen the wheelset as it stood on the screen: untouched groups stay out, so that they cannot undo a colleague's change */
export const wheelsetSchema = (seen: ProductWheelset) =>
  z
    .object({
      texts: z.object({ en: words, pt: words }),
      prices: z.object({ EUR: money, GBP: money, USD: money }),
      stock: z.object({ onHand: whole }),
      onSale: z.boolean(),
      // Said here as well as in the contract, so that every wrong field is named at once.
      reason: staffReason,
      confirmJump: z.boolean(),
    })
    .transform(({ texts, prices, stock, onSale, reason, confirmJump }): z.input<typeof productChange> => {
      const changedTexts = locales.filter((language) => !same(texts[language], seen.texts[language]))
      const changedPrices = currencies.filter(
        (currency) => prices[currency] !== undefined && prices[currency] !== seen.prices[currency],
      )
      return {
        version: seen.version,
        reason,
        ...(changedTexts.length > 0 ? { texts: Object.fromEntries(changedTexts.map((one) => [one, texts[one]])) } : {}),
        ...(changedPrices.length > 0
          ? { prices: Object.fromEntries(changedPrices.map((one) => [one, prices[one]])) }
          : {}),
        ...(stock.onHand !== seen.onHand ? { stock: { onHand: stock.onHand, onHandSeen: seen.onHand } } : {}),
        ...(onSale !== seen.onSale ? { onSale } : {}),
        ...(confirmJump ? { confirmJump } : {}),
      }
    })
    .pipe(productChange)

export const changesNothing = ({ texts, prices, stock, onSale }: ProductChange) =>
  texts === undefined && prices === undefined && stock === undefined && onSale === undefined

export interface Difference {
  name: string
  typed: string
  present: string
}

/** Where the typed form and what now stands on the server part ways, after somebody else saved first. */
export function differences(typed: WheelsetForm, present: ProductWheelset): Difference[] {
  const now = formOf(present)
  const pairs: [string, string, string][] = [
    ...locales.flatMap((language): [string, string, string][] => [
      [`texts.${language}.tagline`, typed.texts[language].tagline, now.texts[language].tagline],
      [`texts.${language}.description`, typed.texts[language].description, now.texts[language].description],
    ]),
    ...currencies.map((currency): [string, string, string] => [
      `prices.${currency}`,
      typed.prices[currency],
      now.prices[currency],
    ]),
    ['stock.onHand', typed.stock.onHand, now.stock.onHand],
    ['onSale', String(typed.onSale), String(now.onSale)],
  ]
  return pairs
    .filter(([, mine, theirs]) => mine.trim() !== theirs)
    .map(([name, mine, theirs]) => ({ name, typed: mine, present: theirs }))
}
