/** Faults on order, for tests and rehearsals: what the network or the processor may do on a bad day. */
import express, { type Express } from 'express'
import { z } from 'zod'

const faultsSchema = z.strictObject({
  /** What becomes of webhook deliveries. */
  deliver: z.enum(['normal', 'drop', 'duplicate']),
  /** How often each event comes while `deliver` is `duplicate`. */
  copies: z.number().int().min(2).max(20),
  /** Deliveries are gathered so long, ms, and then sent one by one in another order than they came; 0 leaves the order alone. */
  shuffleMs: z.number().int().min(0).max(60_000),
  /** Wait before a delivery, ms. */
  delayMs: z.number().int().min(0).max(600_000),
  wrongSignature: z.boolean(),
  /** The next creating call is carried out, but its reply is cut off. */
  loseReply: z.boolean(),
  /** The next creating call is carried out, but its reply is held back so long, ms; its key counts as in progress. */
  holdReplyMs: z.number().int().min(0).max(60_000),
})
export type Faults = z.infer<typeof faultsSchema>

export const noFaults = (): Faults => ({
  deliver: 'normal',
  copies: 2,
  shuffleMs: 0,
  delayMs: 0,
  wrongSignature: false,
  loseReply: false,
  holdReplyMs: 0,
})

const LOOPBACK = /^(127\.|::1$|::ffff:127\.)/

/** POST /control/faults changes the named faults and answers all of them. Callers from elsewhere find nothing there. */
export function mountControl(app: Express, faults: Faults) {
  app.post('/control/faults', express.json(), (req, res, next) => {
    if (!LOOPBACK.test(req.socket.remoteAddress ?? '')) {
      next()
      return
    }
    const wanted = faultsSchema.partial().safeParse(req.body)
    if (!wanted.success) {
      res.status(400).json({ error: z.flattenError(wanted.error) })
      return
    }
    Object.assign(faults, wanted.data)
    res.json(faults)
  })
}
