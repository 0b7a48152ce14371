/** What the support desk does with an order besides reading it. Each write leaves its author and reason in the audit. */
import { recordAudit } from '../../audit/record.ts'
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import type { SignedIn } from '../../http/session.ts'
import { OrderEvent } from '../../models/order-event.ts'
import { findOrder, readDeskOrder, readRevealedAdvice } from './read.ts'

/** Nothing is answered before the audit row stands: nobody sees a body mass without having said why. The mass is not in the row. */
export async function revealMass({ db }: Pick<Deps, 'db'>, actor: SignedIn, number: string, reason: string) {
  const order = await findOrder(number)
  const advice = await readRevealedAdvice(order)
  await db.transaction((transaction) =>
    recordAudit(
      actor,
      {
        action: 'order.mass-revealed',
        subjectType: 'order',
        subjectId: order.number,
        reason,
        after: { advice: advice.map(({ adviceId }) => adviceId) },
      },
      transaction,
    ),
  )
  return { advice }
}

export async function addNote(
  { db, clock }: Pick<Deps, 'db' | 'clock'>,
  actor: SignedIn,
  number: string,
  text: string,
) {
  const order = await findOrder(number)
  await inTransaction(db, async (transaction) => {
    await OrderEvent.create(
      { orderId: order.id, kind: 'note', actorId: actor.id, actorRole: actor.role, reason: text, createdAt: clock() },
      { transaction },
    )
    await recordAudit(
      actor,
      { action: 'order.noted', subjectType: 'order', subjectId: order.number, reason: text },
      transaction,
    )
  })
  return readDeskOrder(number)
}
