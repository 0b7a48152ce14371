/** One key, one effect: the first reply is kept and given again, and two requests never run on one key at once. */
import { createHash } from 'node:crypto'
import type { Request, Response } from 'express'
import type { Faults } from './control.ts'
import { invalid, Refusal } from './errors.ts'
import { readForm, type Form } from './forms.ts'
import type { KeptReply, State } from './state.ts'

/** Keys may be forgotten after a day; then the request is a new one. */
const KEPT_S = 86_400
const LONGEST_KEY = 255

type Reply = Pick<KeptReply, 'status' | 'body'>

export class Once {
  private readonly running = new Set<string>()
  private readonly state: State
  private readonly faults: Faults
  private readonly now: () => number

  constructor(state: State, faults: Faults, now: () => number) {
    this.state = state
    this.faults = faults
    this.now = now
  }

  /** Answers a creating call. A refusal of the parameters is not kept, one met while carrying the request out is. */
  run(req: Request, res: Response, work: (form: Form) => unknown) {
    const body = typeof req.body === 'string' ? req.body : ''
    const key = req.get('idempotency-key')
    if (key === undefined) {
      const reply = work(read(body))
      this.state.save()
      this.answer(req, res, { status: 200, body: reply }, null)
      return
    }
    if (key.length > LONGEST_KEY) throw invalid('Idempotency keys have at most 255 characters.', 'idempotency_key')
    const fingerprint = createHash('sha256').update(`${req.originalUrl} ${body}`).digest('hex')
    const kept = this.kept(key)
    if (kept) {
      if (kept.fingerprint !== fingerprint)
        throw new Refusal(
          400,
          'idempotency_error',
          'Keys for idempotent requests can only be used with the same parameters they were first used with.',
        )
      if (this.running.has(key))
        throw new Refusal(409, 'idempotency_error', 'A request with this key is in progress.', {
          code: 'idempotency_key_in_use',
        })
      res.set('Idempotent-Replayed', 'true').status(kept.status).json(kept.body)
      return
    }
    const reply = carryOut(() => work(read(body)))
    this.state.memory.replies[key] = { at: this.now(), fingerprint, ...reply }
    this.state.save()
    this.answer(req, res, reply, key)
  }

  private kept(key: string) {
    const { memory } = this.state
    const oldest = this.now() - KEPT_S
    memory.replies = Object.fromEntries(Object.entries(memory.replies).filter(([, { at }]) => at >= oldest))
    return Object.hasOwn(memory.replies, key) ? memory.replies[key] : undefined
  }

  private answer(req: Request, res: Response, reply: Reply, key: string | null) {
    const { loseReply, holdReplyMs } = this.faults
    this.faults.loseReply = false
    this.faults.holdReplyMs = 0
    const finish = () => {
      if (key !== null) this.running.delete(key)
      if (loseReply) req.socket.destroy()
      else if (!res.destroyed) res.status(reply.status).json(reply.body)
    }
    if (holdReplyMs === 0) {
      finish()
      return
    }
    if (key !== null) this.running.add(key)
    setTimeout(finish, holdReplyMs)
  }
}

function carryOut(work: () => unknown): Reply {
  try {
    return { status: 200, body: work() }
  } catch (error) {
    if (error instanceof Refusal && error.begun) return { status: error.status, body: error.body }
    throw error
  }
}

function read(body: string): Form {
  try {
    return readForm(body)
  } catch {
    throw invalid('Malformed parameters.')
  }
}
