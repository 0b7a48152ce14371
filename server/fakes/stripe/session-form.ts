/** What a checkout session asks for, read from its form and checked as the processor checks it. */
import { absent, invalid } from './errors.ts'
import { formAt, listAt, textAt, wordsAt, type Form } from './forms.ts'
import type { LineItem, Session } from './state.ts'

const NEAREST_S = 30 * 60
const FURTHEST_S = 24 * 3600

/**
 * @param now Unix seconds
 * @throws Refusal naming the parameter
 */
export function readSessionForm(form: Form, now: number): Omit<Session, 'id' | 'status' | 'paid' | 'intentId'> {
  onlyKnown(form)
  if (textAt(form, 'mode') !== 'payment') throw invalid('Only payment mode is spoken here.', 'mode')
  const items = listAt(form, 'line_items')
  if (items.length === 0) throw absent('line_items')
  const lines = items.map(readLine)
  const currency = lines[0]?.currency ?? ''
  const odd = lines.findIndex((line) => line.currency !== currency || !/^[a-z]{3}$/.test(line.currency))
  if (odd >= 0) throw invalid('Invalid currency.', `line_items[${odd}][price_data][currency]`)
  const successUrl = readUrl(form, 'success_url')
  if (successUrl === null) throw absent('success_url')
  const expiresAt = Number(textAt(form, 'expires_at') ?? now + FURTHEST_S)
  if (!Number.isInteger(expiresAt) || expiresAt < now + NEAREST_S || expiresAt > now + FURTHEST_S)
    throw invalid('expires_at must be between 30 minutes and 24 hours from now.', 'expires_at')
  return {
    created: now,
    expiresAt,
    currency,
    lines: lines.map(({ name, unitAmount, quantity }) => ({ name, unitAmount, quantity })),
    shipping: readShipping(form, currency),
    clientReferenceId: textAt(form, 'client_reference_id'),
    customerEmail: textAt(form, 'customer_email'),
    locale: textAt(form, 'locale') ?? 'auto',
    metadata: wordsAt(form, 'metadata'),
    intentMetadata: wordsAt(form, 'payment_intent_data', 'metadata'),
    successUrl,
    cancelUrl: readUrl(form, 'cancel_url') ?? successUrl,
  }
}

function readLine(item: Form | string, index: number): LineItem & { currency: string } {
  const param = (...path: string[]) => `line_items[${index}]${path.map((part) => `[${part}]`).join('')}`
  const text = (...path: string[]) => {
    const value = formAt(item, ...path)
    return typeof value === 'string' && value !== '' ? value : null
  }
  const whole = (least: number, value: string, ...path: string[]) => readWhole(value, least, param(...path))
  const needed = (...path: string[]) => {
    const value = text(...path)
    if (value === null) throw absent(param(...path))
    return value
  }
  return {
    name: needed('price_data', 'product_data', 'name'),
    unitAmount: whole(0, needed('price_data', 'unit_amount'), 'price_data', 'unit_amount'),
    quantity: whole(1, text('quantity') ?? '1', 'quantity'),
    currency: needed('price_data', 'currency'),
  }
}

function readWhole(value: string, least: number, param: string): number {
  const number = Number(value)
  if (!Number.isSafeInteger(number) || number < least)
    throw invalid(`Invalid integer: ${value}`, param, 'parameter_invalid_integer')
  return number
}

/** One way of delivery with a fixed price. The page offers no choice between several, so several are refused. */
function readShipping(form: Form, currency: string): Session['shipping'] {
  const [option, another] = listAt(form, 'shipping_options')
  if (option === undefined) return null
  if (another !== undefined) throw invalid('Only one shipping option is spoken here.', 'shipping_options')
  const at = 'shipping_options[0][shipping_rate_data]'
  const text = (...path: string[]) => {
    const value = formAt(option, 'shipping_rate_data', ...path)
    if (typeof value !== 'string' || value === '') throw absent(`${at}${path.map((part) => `[${part}]`).join('')}`)
    return value
  }
  if (text('type') !== 'fixed_amount') throw invalid('Only fixed amounts are spoken here.', `${at}[type]`)
  if (text('fixed_amount', 'currency') !== currency) throw invalid('Invalid currency.', `${at}[fixed_amount][currency]`)
  const amount = readWhole(text('fixed_amount', 'amount'), 0, `${at}[fixed_amount][amount]`)
  return { name: text('display_name'), amount }
}

/** `*` stands for any name or place in a list. What is not here has no effect here, so nobody is left to think it had. */
const KNOWN = [
  ...['mode', 'success_url', 'cancel_url', 'expires_at', 'client_reference_id', 'customer_email', 'locale'],
  ...['expand[*]', 'metadata[*]', 'payment_method_types[*]', 'payment_intent_data[metadata][*]'],
  ...['line_items[*][quantity]', 'line_items[*][price_data][currency]', 'line_items[*][price_data][unit_amount]'],
  'line_items[*][price_data][product_data][name]',
  'line_items[*][price_data][product_data][description]',
  ...['type', 'display_name', 'fixed_amount][currency', 'fixed_amount][amount'].map(
    (name) => `shipping_options[*][shipping_rate_data][${name}]`,
  ),
].map((name) => name.replaceAll(']', '').split('['))

/** @throws Refusal for a name that means nothing here */
function onlyKnown(form: Form, path: readonly string[] = []) {
  for (const [name, value] of Object.entries(form)) {
    const here = [...path, name]
    const branch = typeof value === 'object'
    const fits = KNOWN.some(
      (known) =>
        here.every((part, at) => known[at] === '*' || known[at] === part) &&
        (branch ? known.length > here.length : known.length === here.length || value === ''),
    )
    const [head = '', ...rest] = here
    const param = `${head}${rest.map((part) => `[${part}]`).join('')}`
    if (!fits) throw invalid(`Received unknown parameter: ${param}`, param, 'parameter_unknown')
    if (branch) onlyKnown(value, here)
  }
}

/** These end in links and redirects of the payment page: web addresses only. */
function readUrl(form: Form, param: string): string | null {
  const url = textAt(form, param)
  const web = url === null || (URL.canParse(url) && /^https?:$/.test(new URL(url).protocol))
  if (!web) throw invalid('Not a valid URL', param, 'url_invalid')
  return url
}
