/** 400 invented orders over the year before `now`: buyers, lines, money, history, mails and the advice each was bought on. */
import { createHash } from 'node:crypto'
import { taxInside } from '../features/basket/pricing.ts'
import type { LineOptions } from '../models/basket-line.ts'
import { demoAdvice } from './advice.ts'
import { catalogue, type SeedWheelset } from './catalogue.ts'
import { receiptWords, refundWords } from './mails.ts'
import { markets } from './markets.ts'
import { inventAnswers } from './order-answers.ts'
import { inventLife, type Step } from './order-life.ts'
import { inventBuyer, type Buyer } from './people.ts'
import { prng, type Prng } from './prng.ts'
import { demoUsers } from './users.ts'

const ORDERS = 400
const DAY_MS = 86_400_000
/** The last fortnight is a busy one, so that the desk has orders in every state. */
const RECENT = { orders: 64, days: 14 }
const SEED = 20261201
const RIDER = demoUsers[0]
/** Orders of the rider who can sign in, by their place in the row. */
const RIDERS_OWN = new Set([61, 148, 233, 307, 371])

const sha256 = (text: string) => createHash('sha256').update(text).digest('hex')

interface Chosen {
  wheelset: SeedWheelset
  adviceId: string | null
  limitCheck: 'within' | 'no-margin' | 'unconfirmed'
}

/** Rows for bulkCreate, with their ids, so that links need no second look. */
export function demoOrders(now: Date) {
  const random = prng(SEED)
  const rows = {
    bikes: demoBikes(now),
    snapshots: [] as ReturnType<typeof snapshotRow>[],
    orders: [] as ReturnType<typeof orderRow>[],
    lines: [] as ReturnType<typeof lineRow>[],
    events: [] as ReturnType<typeof eventRow>[],
    refunds: [] as ReturnType<typeof refundRow>[],
    ledger: [] as ReturnType<typeof ledgerRow>[],
    mails: [] as ReturnType<typeof mailRow>[],
  }
  for (let id = 1; id <= ORDERS; id += 1) {
    const startedAt = startOf(random, id, now)
    const buyer = RIDERS_OWN.has(id) ? ridersOwn(random, id) : inventBuyer(random, id)
    const chosen = choose(random, startedAt, rows.snapshots)
    const [first] = chosen
    if (!first) throw new Error('an order without a line')
    const build = chosen.some(({ wheelset }) => wheelset.buildKind === 'bench') ? 'bench' : 'shelf'
    const steps = inventLife(random, startedAt, now, build, first.adviceId !== null)
    const order = orderRow(random, id, buyer, steps, chosen)
    rows.orders.push(order)
    for (const line of order.draftLines) rows.lines.push(lineRow(random, rows.lines.length + 1, order, line))
    for (const step of steps) rows.events.push(eventRow(rows.events.length + 1, id, step))
    if (!order.placedAt) continue
    rows.ledger.push(
      ledgerRow(
        rows.ledger.length + 1,
        order,
        'taken',
        order.totalCents,
        order.stripePaymentIntent ?? '',
        order.placedAt,
      ),
    )
    rows.mails.push(mailRow(rows.mails.length + 1, order, 'receipt', receiptWords(order), order.placedAt))
    const drop = steps.find(({ toState }) => toState === 'dropped')
    if (!drop) continue
    const refund = refundRow(random, rows.refunds.length + 1, order, drop)
    rows.refunds.push(refund)
    rows.ledger.push(
      ledgerRow(rows.ledger.length + 1, order, 'refunded', -order.totalCents, refund.stripeRefundId, drop.at),
    )
    rows.mails.push(mailRow(rows.mails.length + 1, order, 'refund', refundWords(order), drop.at))
  }
  return rows
}

/** Evenly spread with some chance in it, oldest first: a year less a fortnight, then the fortnight. */
function startOf(random: Prng, id: number, now: Date): Date {
  const early = ORDERS - RECENT.orders
  const daysAgo =
    id <= early
      ? 365 - ((id - 1 + random.next()) * (365 - RECENT.days)) / early
      : RECENT.days * (1 - (id - early - 1 + random.next()) / RECENT.orders)
  return new Date(now.getTime() - Math.floor(daysAgo * DAY_MS))
}

/** One or two wheelsets; nine orders in ten on the strength of a fitting, the rest picked straight from the range. */
function choose(random: Prng, at: Date, snapshots: ReturnType<typeof snapshotRow>[]): Chosen[] {
  const anyOne = (): Chosen => ({ wheelset: random.pick(catalogue), adviceId: null, limitCheck: 'unconfirmed' })
  if (random.chance(0.1)) return [anyOne()]
  for (let tries = 0; tries < 20; tries += 1) {
    const answers = inventAnswers(random)
    const { advice, offers } = demoAdvice(answers)
    if (offers.length === 0) continue
    const snapshot = snapshotRow(random.uuid(), { ...answers }, { ...advice }, advice.rulesVersion, at)
    snapshots.push(snapshot)
    const pick = ({ wheelset, noMargin }: (typeof offers)[number]): Chosen => ({
      wheelset,
      adviceId: snapshot.id,
      limitCheck: noMargin ? 'no-margin' : 'within',
    })
    const [best, next] = offers
    const first = random.chance(0.6) && best ? best : random.pick(offers.slice(0, 5))
    const second = next && next !== first && random.chance(0.06) ? [pick(next)] : []
    return [pick(first), ...second]
  }
  return [anyOne()]
}

function orderRow(random: Prng, id: number, buyer: Buyer & { userId?: number }, steps: Step[], chosen: Chosen[]) {
  const market = markets.find(({ code }) => code === buyer.market)
  const started = steps[0]
  const last = steps.at(-1)
  if (!market || !started || !last) throw new Error(`order ${id} is incomplete`)
  const draftLines = chosen.map((one) => {
    const quantity = chosen.length === 1 && random.chance(0.03) ? 2 : 1
    const unitCents = one.wheelset.priceCents[market.currency]
    return {
      ...one,
      quantity,
      unitCents,
      lineCents: unitCents * quantity,
      taxCents: taxInside(unitCents * quantity, market.vatPercentBp),
    }
  })
  const goodsCents = draftLines.reduce((sum, { lineCents }) => sum + lineCents, 0)
  const totalCents = goodsCents + market.deliveryCents
  const placedAt = steps.find(({ toState }) => toState === 'placed')?.at ?? null
  const mark = String(id).padStart(6, '0')
  return {
    id,
    number: `F26-${mark}`,
    userId: buyer.userId ?? null,
    email: buyer.email,
    name: buyer.name,
    locale: buyer.market === 'PT' ? ('pt' as const) : ('en' as const),
    market: market.code,
    currency: market.currency,
    delivery: buyer.delivery,
    postcode: buyer.delivery.postcode,
    state: last.toState,
    goodsCents,
    deliveryCents: market.deliveryCents,
    taxCents: taxInside(totalCents, market.vatPercentBp),
    totalCents,
    // random digits, not the hash of a token: no link opens an invented order
    tokenHash: random.hex(64),
    stripeSessionId: `cs_demo_${mark}`,
    stripePaymentIntent: placedAt ? `pi_demo_${mark}` : null,
    holdExpiresAt: new Date(started.at.getTime() + 35 * 60_000),
    placedAt,
    createdAt: started.at,
    updatedAt: last.at,
    draftLines,
  }
}
type OrderRow = ReturnType<typeof orderRow>

function lineRow(random: Prng, id: number, order: OrderRow, line: OrderRow['draftLines'][number]) {
  const { wheelset, adviceId, limitCheck, quantity, unitCents, lineCents, taxCents } = line
  return {
    ...{
      id,
      orderId: order.id,
      wheelsetId: wheelset.id,
      sku: wheelset.sku,
      title: wheelset.name,
      quantity,
      unitCents,
      lineCents,
      taxCents,
    },
    options: optionsOf(random, wheelset),
    state: order.state,
    adviceId,
    limitCheck,
    limitKg: wheelset.limitKg,
    returnRight: 'yes' as const,
    createdAt: order.createdAt,
    updatedAt: order.updatedAt,
  }
}

function optionsOf(random: Prng, { wheels }: SeedWheelset): LineOptions {
  const front = wheels.find(({ position }) => position === 'front')
  const rear = wheels.find(({ position }) => position === 'rear')
  if (!front || !rear) throw new Error('a wheelset without its wheels')
  // the first one named is the usual one
  const mostly = (list: string[]) => (random.chance(0.7) ? list[0] : random.pick(list)) ?? null
  return {
    frontAxle: mostly(front.hub.axles),
    rearAxle: mostly(rear.hub.axles),
    freehub: mostly(rear.hub.freehubs),
    rotorMount: rear.hub.rotorMount,
  }
}

const snapshotRow = (
  id: string,
  answers: Record<string, unknown>,
  advice: Record<string, unknown>,
  rulesVersion: string,
  at: Date,
) => ({
  ...{ id, answers, advice, rulesVersion, createdAt: at },
  sha256: sha256(JSON.stringify({ answers, advice })),
})

const eventRow = (id: number, orderId: number, { at, ...step }: Step) => ({ id, orderId, ...step, createdAt: at })

const refundRow = (random: Prng, id: number, order: OrderRow, drop: Step) => ({
  ...{ id, orderId: order.id, amountCents: order.totalCents, reason: drop.reason ?? '', state: 'done' as const },
  stripeRefundId: `re_demo_${String(order.id).padStart(6, '0')}`,
  idempotencyKey: random.uuid(),
  authorId: drop.actorId,
  createdAt: drop.at,
})

const ledgerRow = (
  id: number,
  order: OrderRow,
  kind: 'taken' | 'refunded',
  amountCents: number,
  ref: string,
  at: Date,
) => ({
  ...{ id, orderId: order.id, kind, amountCents, currency: order.currency, ref, createdAt: at },
})

const mailRow = (
  id: number,
  order: OrderRow,
  kind: string,
  words: { subject: string; text: string; html: string },
  at: Date,
) => ({
  ...{ id, orderId: order.id, kind, ref: order.number, recipient: order.email, locale: order.locale, ...words },
  ...{
    state: 'sent' as const,
    attempts: 1,
    sentAt: new Date(at.getTime() + 4000),
    createdAt: at,
    updatedAt: new Date(at.getTime() + 4000),
  },
})

const ridersOwn = (random: Prng, id: number): Buyer & { userId: number } => ({
  ...inventBuyer(random, id),
  userId: RIDER.id,
  name: RIDER.name,
  email: RIDER.email,
  market: 'PT',
  delivery: { name: RIDER.name, line1: 'Rua das Oficinas 12', postcode: '3800-114', city: 'Aveiro', country: 'PT' },
})

const demoBikes = (now: Date) => [
  {
    ...{
      id: 1,
      userId: RIDER.id,
      name: 'Estrada azul',
      brakes: 'disc' as const,
      beadSeatMm: 622,
      frontAxle: '12x100',
      rearAxle: '12x142',
    },
    ...{
      freehub: 'spline-road',
      rotorMount: 'centre-lock' as const,
      maxTyreMm: 34,
      caliperOpeningMm: null,
      createdAt: now,
      updatedAt: now,
    },
  },
  {
    ...{
      id: 2,
      userId: RIDER.id,
      name: 'A velha',
      brakes: 'rim' as const,
      beadSeatMm: 622,
      frontAxle: 'qr-9x100',
      rearAxle: 'qr-10x130',
    },
    ...{
      freehub: 'spline-road',
      rotorMount: null,
      maxTyreMm: 28,
      caliperOpeningMm: 30,
      createdAt: now,
      updatedAt: now,
    },
  },
]
