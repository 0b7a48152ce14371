/** Empties the outbox. A mail that cannot be handed over waits and is tried again, later each time; after eight tries it is set aside. */
import { createTransport } from 'nodemailer'
import { QueryTypes } from 'sequelize'
import type { Deps } from '../deps.ts'
import { OutboxMail } from '../models/outbox-mail.ts'

const MOST_TRIES = 8
const BATCH = 20

/** Seconds until the next try: 5, 10, 20 … up to an hour. */
const backOff = (attempts: number) => Math.min(3600, 5 * 2 ** (attempts - 1))

/** A server that takes the connection and says nothing is given up on well within a job's turn; its own waits are minutes. */
const PATIENCE_MS = 10_000

/** @param patienceMs how long each step of handing a mail over may take */
export function createMailer({ config }: Pick<Deps, 'config'>, patienceMs = PATIENCE_MS) {
  const transport = createTransport(
    {
      url: config.SMTP_URL,
      connectionTimeout: patienceMs,
      greetingTimeout: patienceMs,
      socketTimeout: patienceMs,
      dnsTimeout: patienceMs,
    },
    { from: config.MAIL_FROM },
  )
  const domain = new URL(config.PUBLIC_URL).hostname
  return {
    send: (mail: Pick<OutboxMail, 'kind' | 'ref' | 'recipient' | 'subject' | 'text' | 'html'>) =>
      transport.sendMail({
        to: mail.recipient,
        subject: mail.subject,
        text: mail.text,
        html: mail.html,
        // The same for every try: a mail that was taken just before its sender died is not shown twice by the reader's program.
        messageId: `<${mail.kind}.${mail.ref}@${domain}>`,
        headers: { 'Auto-Submitted': 'auto-generated' },
      }),
    close: () => {
      transport.close()
    },
  }
}
export type Mailer = Pick<ReturnType<typeof createMailer>, 'send'>

/** @returns how many left. Each row is locked while it is sent; a second sender passes it over. */
export async function sendOutbox(
  { db, clock, log }: Pick<Deps, 'db' | 'clock' | 'log'>,
  mailer: Mailer,
): Promise<number> {
  let sent = 0
  for (let count = 0; count < BATCH; count += 1) {
    const found = await db.transaction(async (transaction) => {
      const [row] = await db.query<{ id: number }>(
        `SELECT id FROM outbox_mails WHERE state = 'queued' AND (next_try_at IS NULL OR next_try_at <= :now) ORDER BY id LIMIT 1 FOR UPDATE SKIP LOCKED`,
        { replacements: { now: clock() }, type: QueryTypes.SELECT, transaction },
      )
      if (!row) return false
      const mail = await OutboxMail.findByPk(row.id, { transaction, rejectOnEmpty: true })
      const attempts = mail.attempts + 1
      try {
        await mailer.send(mail)
        await mail.update({ state: 'sent', sentAt: clock(), attempts, lastError: null }, { transaction })
        sent += 1
      } catch (error) {
        const lastError = (error instanceof Error ? error.message : String(error)).slice(0, 190)
        const state = attempts >= MOST_TRIES ? 'failed' : 'queued'
        const nextTryAt = new Date(clock().getTime() + backOff(attempts) * 1000)
        await mail.update({ state, attempts, lastError, nextTryAt }, { transaction })
        log.warn({ mail: mail.id, kind: mail.kind, attempts }, 'mail not handed over')
      }
      return true
    })
    if (!found) break
  }
  return sent
}
