/** References that a caller wants whole: `expand[0]=payment_intent.latest_charge`. */
import { invalid } from './errors.ts'
import { listAt, type Form } from './forms.ts'
import type { Memory } from './state.ts'
import { chargeView, intentView, lineItemsView, type Json } from './views.ts'

type Kind = 'session' | 'intent' | 'charge' | 'refund'

/** The public reference allows as many steps. */
const DEEPEST = 4

const REFERENCES: Record<Kind, Partial<Record<string, 'intent' | 'charge'>>> = {
  session: { payment_intent: 'intent' },
  intent: { latest_charge: 'charge' },
  charge: { payment_intent: 'intent' },
  refund: { charge: 'charge', payment_intent: 'intent' },
}

/** @throws Refusal for words that are no names */
export const expandOf = (form: Form): string[] =>
  listAt(form, 'expand').map((field) => {
    if (typeof field !== 'string') throw invalid('Invalid array', 'expand')
    return field
  })

/** In a list each name begins at its entries: `data.payment_intent`. */
export const expandOfList = (form: Form): string[] =>
  expandOf(form).map((field) => {
    if (!field.startsWith('data.')) throw cannot(field)
    return field.slice('data.'.length)
  })

/**
 * @param view changed in place
 * @throws Refusal for a property that is no reference
 */
export function expand(memory: Memory, kind: Kind, view: Json, fields: readonly string[]): Json {
  for (const field of fields) {
    const steps = field.split('.')
    if (steps.length > DEEPEST) throw cannot(field)
    step(memory, kind, view, steps, field)
  }
  return view
}

function step(memory: Memory, kind: Kind, view: Json, [head = '', ...rest]: readonly string[], field: string) {
  const session = kind === 'session' && head === 'line_items' ? memory.sessions[String(view.id)] : undefined
  if (session && rest.length === 0) {
    view.line_items = lineItemsView(session, {})
    return
  }
  const target = Object.hasOwn(REFERENCES[kind], head) ? REFERENCES[kind][head] : undefined
  if (target === undefined) throw cannot(field)
  const at = view[head]
  const whole = typeof at === 'string' ? wholeOf(memory, target, at) : (at as Json | null | undefined)
  view[head] = whole ?? null
  if (rest.length === 0) return
  // Names are judged even where there is nothing yet to show.
  step(memory, target, whole ?? {}, rest, field)
}

function wholeOf({ intents, charges }: Memory, kind: 'intent' | 'charge', id: string): Json | null {
  if (kind === 'intent') return intents[id] ? intentView(intents[id]) : null
  return charges[id] ? chargeView(charges[id]) : null
}

const cannot = (field: string) => invalid(`This property cannot be expanded (${field}).`, 'expand')
