/**
 * A local stand-in for Stripe: the part of its public wire protocol that a shop with hosted checkout uses, spoken to the real SDK. No money moves.
 * It lives apart from the shop and is chosen only by name in the settings.
 */
import type { Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import express, { type Express, type Request } from 'express'
import { mountControl } from './control.ts'
import { absent, answerErrors, invalid, missing, Refusal } from './errors.ts'
import { Deliveries } from './events.ts'
import { listAt, readForm, textAt, wordsAt, type Form } from './forms.ts'
import { Once } from './idempotency.ts'
import { mountPayPage } from './pay-page.ts'
import { readSessionForm } from './session-form.ts'
import { newId, State, type Refund, type Session } from './state.ts'
import { chargeView, eventView, intentView, lineItemsView, page, refundView, sessionView } from './views.ts'

export interface StripeFakeOptions {
  port: number
  host: string
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
  const deliveries = new Deliveries(options.webhookUrl, options.webhookSecret, clock)
  const { memory } = state
  const once = new Once(state, deliveries.faults, now)
  let origin = ''
  let server: Server | undefined
  let timer: NodeJS.Timeout | undefined

  const payUrl = (session: Session) => `${origin}/pay/${session.id}`
  const emit = (type: string, object: Record<string, unknown>) => {
    const event = { id: newId('evt'), created: now(), type, object }
    memory.events.push(event)
    state.save()
    deliveries.send(event)
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
    memory.sessions[session.id] = session
    return sessionView(session, payUrl(session))
  }

  function expireSession(id: string) {
    const session = findSession(id)
    if (session.status !== 'open')
      throw invalid(`Only Checkout Sessions with a status of open can be expired; this one is ${session.status}.`)
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
      throw invalid(`Charge ${charge.id} has already been refunded.`, undefined, 'charge_already_refunded')
    const amount = Number(textAt(form, 'amount') ?? left)
    if (!Number.isInteger(amount) || amount < 1)
      throw invalid('Invalid integer.', 'amount', 'parameter_invalid_integer')
    if (amount > left)
      throw invalid(`Refund amount (${amount}) is greater than unrefunded amount on charge (${left}).`, 'amount')
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
    res.json(page('/v1/checkout/sessions', found, (one) => sessionView(one, payUrl(one)), query))
  })
  app.get('/v1/checkout/sessions/:id', (req, res) => {
    const session = findSession(req.params.id)
    const expand = listAt(queryOf(req), 'expand')
    const other = expand.find((field) => field !== 'payment_intent')
    if (other !== undefined) throw invalid('This property cannot be expanded.', 'expand')
    const intent = expand.length > 0 && session.intentId !== null ? (memory.intents[session.intentId] ?? null) : null
    res.json(sessionView(session, payUrl(session), intent))
  })
  app.get('/v1/checkout/sessions/:id/line_items', (req, res) => {
    res.json(lineItemsView(findSession(req.params.id)))
  })
  app.post('/v1/checkout/sessions/:id/expire', (req, res) => {
    once.run(req, res, () => expireSession(req.params.id))
  })
  app.get('/v1/payment_intents/:id', (req, res) => {
    res.json(intentView(known(memory.intents, req.params.id)))
  })
  app.get('/v1/charges/:id', (req, res) => {
    res.json(chargeView(known(memory.charges, req.params.id)))
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
    res.json(page('/v1/refunds', found, refundView, query))
  })
  app.get('/v1/refunds/:id', (req, res) => {
    res.json(refundView(known(memory.refunds, req.params.id)))
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
    start: () =>
      new Promise<{ port: number }>((resolve, reject) => {
        server = app.listen(options.port, options.host, (error) => {
          if (error) {
            reject(error)
            return
          }
          const { port } = server?.address() as AddressInfo
          origin = `http://${options.host}:${port}`
          timer = setInterval(expireDue, 5_000)
          resolve({ port })
        })
      }),
    stop: async () => {
      clearInterval(timer)
      deliveries.stop()
      await new Promise((resolve) => {
        if (!server) {
          resolve(undefined)
          return
        }
        server.close(resolve)
        server.closeAllConnections()
      })
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
