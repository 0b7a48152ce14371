/** A refund as the desk asks for it: through the till's one way of giving money back, with its audit row in the same transaction. */
import { createHash } from 'node:crypto'
import type { RefundDone, RefundRequest } from '#contract/support-desk.ts'
import { recordAudit } from '../../audit/record.ts'
import type { Deps } from '../../deps.ts'
import type { SignedIn } from '../../http/session.ts'
import { refundOrder } from '../checkout/refunds.ts'
import { findOrder } from './read.ts'

/** @throws AppError refund-too-much, nothing-to-refund, no-such-line, line-refunded, refund-refused, refund-unconfirmed */
export async function refundFromDesk(
  deps: Deps,
  actor: SignedIn,
  orderNumber: string,
  asked: RefundRequest,
  idempotencyKey: string,
): Promise<RefundDone> {
  const order = await findOrder(orderNumber)
  const { refund, leftCents } = await refundOrder(deps, {
    orderNumber,
    amountCents: asked.amountCents,
    lineIds: asked.lines,
    reason: asked.reason,
    actor,
    // Two people may choose the same key for two orders.
    idempotencyKey: createHash('sha256').update(`${order.id} ${idempotencyKey}`).digest('hex'),
    alongside: (row, transaction) =>
      recordAudit(
        actor,
        {
          action: 'order.refunded',
          subjectType: 'order',
          subjectId: orderNumber,
          reason: asked.reason,
          after: {
            amountCents: row.amountCents,
            currency: order.currency,
            ...(row.lineIds === null ? {} : { lines: row.lineIds }),
          },
        },
        transaction,
      ),
  })
  return {
    orderNumber,
    amountCents: refund.amountCents,
    currency: order.currency,
    state: refund.state,
    leftToRefundCents: leftCents,
  }
}
