/**
 * A local stand-in for Stripe: the part of its public wire protocol that a shop with hosted checkout uses, spoken to the real SDK. No money moves.
 * It lives apart from the shop and is chosen only by name in the settings.
 */
import { createHash } from 'node:crypto'
import type { Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import express, { type Express, type NextFunction, type Request, type Response } from 'express'
import { Deliveries, type Faults } from './events.ts'
import { formAt, listAt, readForm, textAt, wordsAt, type Form } from './forms.ts'
import { mountPayPage } from './pay-page.ts'
import { newId, State, type Session } from './state.ts'
import {
  chargeView,
  eventView,
  intentView,
  lineItemsView,
  newestFirst,
  page,
  refundView,
  sessionView,
} from './views.ts'

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

/** An error object of the protocol. */
class Refusal extends Error {
  readonly status: number
  readonly body: Record<string, unknown>
  constructor(status: number, type: string, message: string, more: Record<string, unknown> = {}) {
    super(message)
    this.status = status
    this.body = { error: { type, message, ...more } }
  }
}
const invalid = (message: string, param?: string, code?: string) =>
  new Refusal(400, 'invalid_request_error', message, { ...(param ? { param } : {}), ...(code ? { code } : {}) })
const missing = (id: string) =>
  new Refusal(404, 'invalid_request_error', `No such object: ${id}`, { code: 'resource_missing', param: 'id' })

export function createStripeFake(options: StripeFakeOptions) {
  const clock = options.clock ?? (() => new Date())
  const now = () => Math.floor(clock().getTime() / 1000)
  const state = new State(options.file ?? null)
  const deliveries = new Deliveries(options.webhookUrl, options.webhookSecret, clock)
  const { memory } = state
  const running = new Set<string>()
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
    const session = memory.sessions[id]
    if (!session) throw missing(id)
    return session
  }

  function createSession(form: Form) {
    const lines = listAt(form, 'line_items').map((item, index) => {
      const text = (...path: string[]) => {
        const value = formAt(item, ...path)
        return typeof value === 'string' ? value : null
      }
      const amount = Number(text('price_data', 'unit_amount'))
      const quantity = Number(text('quantity') ?? '1')
      const name = text('price_data', 'product_data', 'name')
      if (name === null)
        throw invalid(
          'Missing required param: name.',
          `line_items[${index}][price_data][product_data][name]`,
          'parameter_missing',
        )
      if (!Number.isInteger(amount) || amount < 0)
        throw invalid('Invalid integer.', `line_items[${index}][price_data][unit_amount]`, 'parameter_invalid_integer')
      if (!Number.isInteger(quantity) || quantity < 1)
        throw invalid('Invalid integer.', `line_items[${index}][quantity]`, 'parameter_invalid_integer')
      return { name, unitAmount: amount, quantity, currency: text('price_data', 'currency') ?? '' }
    })
    if (textAt(form, 'mode') !== 'payment') throw invalid('Only payment mode is spoken here.', 'mode')
    if (lines.length === 0) throw invalid('Missing required param: line_items.', 'line_items', 'parameter_missing')
    const currency = lines[0]?.currency ?? ''
    if (!/^[a-z]{3}$/.test(currency) || lines.some((line) => line.currency !== currency))
      throw invalid('Invalid currency.', 'currency')
    const successUrl = textAt(form, 'success_url')
    if (successUrl === null) throw invalid('Missing required param: success_url.', 'success_url', 'parameter_missing')
    const expiresAt = Number(textAt(form, 'expires_at') ?? now() + 86_400)
    if (!(expiresAt >= now() + 30 * 60 && expiresAt <= now() + 86_400))
      throw invalid('expires_at must be between 30 minutes and 24 hours from now.', 'expires_at')
    const session: Session = {
      id: newId('cs_test'),
      created: now(),
      expiresAt,
      status: 'open',
      paid: false,
      currency,
      lines: lines.map(({ name, unitAmount, quantity }) => ({ name, unitAmount, quantity })),
      clientReferenceId: textAt(form, 'client_reference_id'),
      customerEmail: textAt(form, 'customer_email'),
      locale: textAt(form, 'locale') ?? 'auto',
      metadata: wordsAt(form, 'metadata'),
      intentMetadata: wordsAt(form, 'payment_intent_data', 'metadata'),
      intentId: null,
      successUrl,
      cancelUrl: textAt(form, 'cancel_url') ?? successUrl,
    }
    memory.sessions[session.id] = session
    return sessionView(session, payUrl(session))
  }

  function createRefund(form: Form) {
    const intentId = textAt(form, 'payment_intent')
    const chargeId = textAt(form, 'charge') ?? (intentId === null ? null : (memory.intents[intentId]?.chargeId ?? null))
    const charge = chargeId === null ? undefined : memory.charges[chargeId]
    if (!charge)
      throw intentId !== null || chargeId !== null
        ? missing(intentId ?? chargeId ?? '')
        : invalid('Name a charge or a payment_intent.', 'charge')
    const left = charge.amount - charge.refunded
    if (left === 0)
      throw invalid(`Charge ${charge.id} has already been refunded.`, undefined, 'charge_already_refunded')
    const amount = Number(textAt(form, 'amount') ?? left)
    if (!Number.isInteger(amount) || amount < 1)
      throw invalid('Invalid integer.', 'amount', 'parameter_invalid_integer')
    if (amount > left)
      throw invalid(`Refund amount (${amount}) is greater than unrefunded amount on charge (${left}).`, 'amount')
    const refund = {
      id: newId('re'),
      created: now(),
      amount,
      currency: charge.currency,
      chargeId: charge.id,
      intentId: charge.intentId,
    }
    memory.refunds[refund.id] = refund
    charge.refunded += amount
    emit('charge.refunded', chargeView(charge))
    return refundView(refund)
  }

  /** First run kept once it began, faults included; a refusal of the parameters is not kept. */
  function once(req: Request, res: Response, work: (form: Form) => unknown) {
    const key = req.get('idempotency-key')
    const body = String(req.body ?? '')
    const fingerprint = createHash('sha256').update(`${req.path} ${body}`).digest('hex')
    const kept = key === undefined ? undefined : memory.replies[key]
    if (kept) {
      if (kept.fingerprint !== fingerprint)
        throw new Refusal(
          400,
          'idempotency_error',
          'Keys for idempotent requests can only be used with the same parameters.',
        )
      res.set('Idempotent-Replayed', 'true').status(kept.status).json(kept.body)
      return
    }
    if (key !== undefined && running.has(key))
      throw new Refusal(409, 'idempotency_error', 'A request with this key is in progress.', {
        code: 'idempotency_key_in_use',
      })
    if (key !== undefined) running.add(key)
    try {
      let form: Form
      try {
        form = readForm(body)
      } catch {
        throw invalid('Malformed parameters.')
      }
      const reply = work(form)
      if (key !== undefined) memory.replies[key] = { fingerprint, status: 200, body: reply }
      state.save()
      if (deliveries.faults.loseReply) {
        deliveries.faults.loseReply = false
        req.socket.destroy()
        return
      }
      res.json(reply)
    } finally {
      if (key !== undefined) running.delete(key)
    }
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
    once(req, res, createSession)
  })
  app.get('/v1/checkout/sessions', (req, res) => {
    expireDue()
    res.json(
      page('/v1/checkout/sessions', newestFirst(state).sessions, (one) => sessionView(one, payUrl(one)), req.query),
    )
  })
  app.get('/v1/checkout/sessions/:id', (req, res) => {
    const session = findSession(req.params.id)
    const wanted = JSON.stringify(req.query).includes('payment_intent')
    const intent = wanted && session.intentId !== null ? (memory.intents[session.intentId] ?? null) : null
    res.json(sessionView(session, payUrl(session), intent))
  })
  app.get('/v1/checkout/sessions/:id/line_items', (req, res) => {
    res.json(lineItemsView(findSession(req.params.id)))
  })
  app.post('/v1/checkout/sessions/:id/expire', (req, res) => {
    once(req, res, () => {
      const session = findSession(req.params.id)
      if (session.status !== 'open')
        throw invalid(`Only Checkout Sessions with a status of open can be expired; this one is ${session.status}.`)
      session.status = 'expired'
      emit('checkout.session.expired', sessionView(session, payUrl(session)))
      return sessionView(session, payUrl(session))
    })
  })
  app.get('/v1/payment_intents/:id', (req, res) => {
    const intent = memory.intents[req.params.id]
    if (!intent) throw missing(req.params.id)
    res.json(intentView(intent))
  })
  app.get('/v1/charges/:id', (req, res) => {
    const charge = memory.charges[req.params.id]
    if (!charge) throw missing(req.params.id)
    res.json(chargeView(charge))
  })
  app.post('/v1/refunds', (req, res) => {
    once(req, res, createRefund)
  })
  app.get('/v1/refunds/:id', (req, res) => {
    const refund = memory.refunds[req.params.id]
    if (!refund) throw missing(req.params.id)
    res.json(refundView(refund))
  })
  app.get('/v1/events', (req, res) => {
    expireDue()
    const { type } = req.query
    const since = Number((/created\[gte\]=(\d+)/.exec(decodeURIComponent(req.originalUrl)) ?? [])[1] ?? 0)
    const found = newestFirst(state).events.filter(
      (event) => event.created >= since && (typeof type !== 'string' || event.type === type),
    )
    res.json(page('/v1/events', found, eventView, req.query))
  })
  app.use('/v1', (req) => {
    throw new Refusal(404, 'invalid_request_error', `Unrecognized request URL (${req.method}: ${req.path}).`)
  })
  // Faults on order, for tests. Only callers on this machine reach it, as the stand-in listens on loopback.
  app.post('/control/faults', express.json(), (req, res) => {
    Object.assign(deliveries.faults, req.body as Partial<Faults>)
    res.json(deliveries.faults)
  })
  mountPayPage(app, {
    find: (id) => {
      expireDue()
      return memory.sessions[id] ?? null
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
  app.use((error: unknown, _req: Request, res: Response, next: NextFunction) => {
    if (res.headersSent) {
      next(error)
      return
    }
    if (error instanceof Refusal) res.status(error.status).json(error.body)
    else res.status(500).json({ error: { type: 'api_error', message: 'The stand-in failed.' } })
  })

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
