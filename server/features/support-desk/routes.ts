import { z } from 'zod'
import {
  deskNote,
  deskOrder,
  deskOrderFilters,
  deskOrderList,
  refundDone,
  refundRequest,
  revealedMass,
  revealMass as revealMassBody,
} from '#contract/support-desk.ts'
import { route, signedIn, type Route } from '../../http/route.ts'
import { readDeskOrder } from './read.ts'
import { refundFromDesk } from './refund.ts'
import { findOrders } from './search.ts'
import { addNote, revealMass } from './service.ts'

const feature = 'support-desk'
const access = ['support', 'admin'] as const
const byNumber = z.object({ orderNumber: z.string().max(20) })

export const supportDeskRoutes: Route[] = [
  route(
    {
      method: 'get',
      path: '/api/desk/orders',
      feature,
      access,
      summary: 'Find orders by number, name, e-mail or postcode, newest first',
      query: deskOrderFilters,
      reply: deskOrderList,
    },
    ({ deps, query }) => findOrders(deps, query),
  ),
  route(
    {
      method: 'get',
      path: '/api/desk/orders/:orderNumber',
      feature,
      access,
      summary: 'One order: lines, money, mails, timeline and the frozen advice without the body mass',
      params: byNumber,
      reply: deskOrder,
    },
    ({ params }) => readDeskOrder(params.orderNumber),
  ),
  route(
    {
      method: 'post',
      path: '/api/desk/orders/:orderNumber/reveal-mass',
      feature,
      access,
      summary: 'The frozen advice with the body mass, for a stated reason that is kept',
      params: byNumber,
      body: revealMassBody,
      reply: revealedMass,
    },
    (call) => revealMass(call.deps, signedIn(call), call.params.orderNumber, call.body.reason),
  ),
  route(
    {
      method: 'post',
      path: '/api/desk/orders/:orderNumber/refunds',
      feature,
      access,
      summary: 'Give money back: whole lines or an amount, never more than what is left',
      params: byNumber,
      body: refundRequest,
      reply: refundDone,
      status: 201,
      idempotency: 'required',
    },
    (call) =>
      refundFromDesk(
        call.deps,
        signedIn(call),
        call.params.orderNumber,
        call.body,
        call.req.get('idempotency-key') ?? '',
      ),
  ),
  route(
    {
      method: 'post',
      path: '/api/desk/orders/:orderNumber/notes',
      feature,
      access,
      summary: 'Leave a note for colleagues on the order',
      params: byNumber,
      body: deskNote,
      reply: deskOrder,
      status: 201,
      idempotency: 'optional',
    },
    (call) => addNote(call.deps, signedIn(call), call.params.orderNumber, call.body.text),
  ),
]
