/**
 * A local stand-in for Stripe: the part of its public wire protocol that a shop with hosted checkout uses, spoken to the real SDK. No money moves.
 * It lives apart from the shop and is chosen only by name in the settings.
 */
import express, { type Express, type Request } from 'express'
import { listen } from '../listen.ts'
import { mountControl } from './control.ts'
import { absent, answerErrors, invalid, missing, Refusal, refusedAtWork } from './errors.ts'
import { Deliveries } from './events.ts'
import { expand, expandOf, expandOfList } from './expand.ts'
import { listAt, readForm, textAt, wordsAt, type Form } from './forms.ts'
import { Once } from './idempotency.ts'
import { mountPayPage } from './pay-page.ts'
import { readSessionForm } from './session-form.ts'
import { newId, State, type Refund, type Session, type StripeEvent } from './state.ts'
import { chargeView, eventView, intentView, lineItemsView, page, refundView, sessionView } from './views.ts'

export interface StripeFakeOptions {
  port: number
  /** The fake listens here and, for the shop's own calls, on loopback. */
  host: string
  /** How a browser names `host` in addresses; `host` itself unless given. */
  payHost?: string
  secretKey: string
  webhookSecret: string
  webhookUrl: string
  /** Where memory is kept over restarts; null keeps it in the process. */
  file?: string | null
  clock?: () => Date
}

export function createStripeFake(options: StripeFakeOptions) {
  const clock = options.clock ?? (() => new Date())
  const now = () => Math.floor(clock().getTime() / 1000)
  const state = new State(options.file ?? null)
  const deliveries = new Deliveries(options.webhookUrl, options.webhookSecret, clock, () => {
    state.save()
  })
  const { memory } = state
  const once = new Once(state, deliveries.faults, now)
  let origin = ''
  let listening: Awaited<ReturnType<typeof listen>> | undefined
  let timer: NodeJS.Timeout | undefined

  const payUrl = (session: Session) => `${origin}/pay/${session.id}`
  const emit = (type: string, object: Record<string, unknown>) => {
    const event: StripeEvent = { id: newId('evt'), created: now(), type, object, delivery: 'waiting' }
    state.enter(event)
    deliveries.send(event)
    state.save()
  }
  const expireDue = () => {
    for (const session of Object.values(memory.sessions)) {
      if (session.status !== 'open' || session.expiresAt > now()) continue
      session.status = 'expired'
      emit('checkout.session.expired', sessionView(session, payUrl(session)))
    }
  }
  const findSession = (id: string) => {
    expireDue()
    return known(memory.sessions, id)
  }

  function createSession(form: Form) {
    const asked = readSessionForm(form, now())
    const session: Session = { ...asked, id: newId('cs_test'), status: 'open', paid: false, intentId: null }
    // What is asked to be whole is judged first: a session that is refused was never made.
    const alone = { ...memory, sessions: { [session.id]: session } }
    const view = expand(alone, 'session', sessionView(session, payUrl(session)), expandOf(form))
    memory.sessions[session.id] = session
    return view
  }

  /** Only what the public reference lets be changed and is of use here: metadata, where an empty word takes a name away. */
  function updateSession(id: string, form: Form) {
    const session = findSession(id)
    const other = Object.keys(form).find((name) => name !== 'metadata')
    if (other !== undefined) throw invalid(`Received unknown parameter: ${other}`, other, 'parameter_unknown')
    const words = Object.entries({ ...session.metadata, ...wordsAt(form, 'metadata') })
    session.metadata = Object.fromEntries(words.filter(([, word]) => word !== ''))
    return sessionView(session, payUrl(session))
  }

  function expireSession(id: string) {
    const session = findSession(id)
    if (session.status !== 'open')
      throw refusedAtWork(`Only Checkout Sessions with a status of open can be expired; this one is ${session.status}.`)
    session.status = 'expired'
    emit('checkout.session.expired', sessionView(session, payUrl(session)))
    return sessionView(session, payUrl(session))
  }

  function createRefund(form: Form) {
    const intentId = textAt(form, 'payment_intent')
    const named = textAt(form, 'charge') ?? intentId
    if (named === null) throw absent('charge')
    const charge = memory.charges[intentId === null ? named : (memory.intents[intentId]?.chargeId ?? '')]
    if (!charge) throw missing(named, intentId === null ? 'charge' : 'payment_intent')
    const left = charge.amount - charge.refunded
    if (left === 0)
      throw refusedAtWork(`Charge ${charge.id} has already been refunded.`, undefined, 'charge_already_refunded')
    const amount = Number(textAt(form, 'amount') ?? left)
    if (!Number.isInteger(amount) || amount < 1)
      throw invalid('Invalid integer.', 'amount', 'parameter_invalid_integer')
    if (amount > left)
      throw refusedAtWork(`Refund amount (${amount}) is greater than unrefunded amount on charge (${left}).`, 'amount')
    const refund: Refund = {
      id: newId('re'),
      created: now(),
      amount,
      currency: charge.currency,
      chargeId: charge.id,
      intentId: charge.intentId,
      metadata: wordsAt(form, 'metadata'),
      reason: textAt(form, 'reason'),
    }
    memory.refunds[refund.id] = refund
    charge.refunded += amount
    emit('charge.refunded', chargeView(charge))
    return refundView(refund)
  }

  /** One object, with what the caller wants whole. */
  const shown = (req: Request, kind: Parameters<typeof expand>[1], view: Record<string, unknown>) =>
    expand(memory, kind, view, expandOf(queryOf(req)))

  const app: Express = express()
  app.disable('x-powered-by')
  app.use((_req, res, next) => {
    res.set('Request-Id', newId('req'))
    next()
  })
  app.use('/v1', express.text({ type: 'application/x-www-form-urlencoded', limit: '200kb' }), (req, _res, next) => {
    if (req.get('authorization') !== `Bearer ${options.secretKey}`)
      throw new Refusal(401, 'invalid_request_error', 'Invalid API Key provided.')
    next()
  })
  app.post('/v1/checkout/sessions', (req, res) => {
    once.run(req, res, createSession)
  })
  app.get('/v1/checkout/sessions', (req, res) => {
    expireDue()
    const query = queryOf(req)
    const [status, intent] = [textAt(query, 'status'), textAt(query, 'payment_intent')]
    const found = newestFirst(memory.sessions).filter(
      (one) => (status === null || one.status === status) && (intent === null || one.intentId === intent),
    )
    const fields = expandOfList(query)
    const view = (one: Session) => expand(memory, 'session', sessionView(one, payUrl(one)), fields)
    res.json(page('/v1/checkout/sessions', found, view, query))
  })
  app.get('/v1/checkout/sessions/:id', (req, res) => {
    const session = findSession(req.params.id)
    res.json(shown(req, 'session', sessionView(session, payUrl(session))))
  })
  app.post('/v1/checkout/sessions/:id', (req, res) => {
    once.run(req, res, (form) => updateSession(req.params.id, form))
  })
  app.get('/v1/checkout/sessions/:id/line_items', (req, res) => {
    res.json(lineItemsView(findSession(req.params.id), queryOf(req)))
  })
  app.post('/v1/checkout/sessions/:id/expire', (req, res) => {
    once.run(req, res, () => expireSession(req.params.id))
  })
  app.get('/v1/payment_intents/:id', (req, res) => {
    res.json(shown(req, 'intent', intentView(known(memory.intents, req.params.id))))
  })
  app.get('/v1/charges/:id', (req, res) => {
    res.json(shown(req, 'charge', chargeView(known(memory.charges, req.params.id))))
  })
  app.post('/v1/refunds', (req, res) => {
    once.run(req, res, createRefund)
  })
  app.get('/v1/refunds', (req, res) => {
    const query = queryOf(req)
    const [charge, intent] = [textAt(query, 'charge'), textAt(query, 'payment_intent')]
    const found = newestFirst(memory.refunds).filter(
      (one) => (charge === null || one.chargeId === charge) && (intent === null || one.intentId === intent),
    )
    const fields = expandOfList(query)
    res.json(page('/v1/refunds', found, (one) => expand(memory, 'refund', refundView(one), fields), query))
  })
  app.get('/v1/refunds/:id', (req, res) => {
    res.json(shown(req, 'refund', refundView(known(memory.refunds, req.params.id))))
  })
  app.get('/v1/events', (req, res) => {
    expireDue()
    const query = queryOf(req)
    const type = textAt(query, 'type')
    const types = type === null ? listAt(query, 'types') : [type]
    const since = Number(textAt(query, 'created', 'gte') ?? 0)
    const found = [...memory.events]
      .reverse()
      .filter((event) => event.created >= since && (types.length === 0 || types.includes(event.type)))
    res.json(page('/v1/events', found, eventView, query))
  })
  app.use('/v1', (req) => {
    throw new Refusal(404, 'invalid_request_error', `Unrecognized request URL (${req.method}: ${req.path}).`)
  })
  mountControl(app, deliveries.faults)
  mountPayPage(app, {
    find: (id) => {
      expireDue()
      return Object.hasOwn(memory.sessions, id) ? (memory.sessions[id] ?? null) : null
    },
    pay: (session) => {
      if (!state.pay(session, now())) return
      const intent = state.intentOf(session, now())
      emit('payment_intent.succeeded', intentView(intent))
      emit('checkout.session.completed', sessionView(session, payUrl(session)))
    },
    decline: (session) => {
      const intent = state.decline(session, now())
      if (intent) emit('payment_intent.payment_failed', intentView(intent))
    },
  })
  app.use(answerErrors)

  return {
    start: async () => {
      listening = await listen(app, options.host, options.port)
      const { port } = listening
      origin = `http://${options.payHost ?? options.host}:${port}`
      timer = setInterval(expireDue, 5_000)
      deliveries.start(memory.events.filter(({ delivery }) => delivery === 'waiting'))
      return { port }
    },
    stop: async () => {
      clearInterval(timer)
      deliveries.stop()
      await listening?.close()
    },
  }
}

function queryOf(req: Request): Form {
  try {
    return readForm(req.originalUrl.split('?')[1] ?? '')
  } catch {
    throw invalid('Malformed parameters.')
  }
}

function known<T>(kind: Record<string, T>, id: string): T {
  const found = Object.hasOwn(kind, id) ? kind[id] : undefined
  if (!found) throw missing(id)
  return found
}

/** In one second several may be made: the later one in memory is the newer. */
const newestFirst = <T extends { created: number }>(kind: Record<string, T>) =>
  Object.values(kind)
    .reverse()
    .sort((a, b) => b.created - a.created)
