/** What the refund box holds while it is typed in, and how it becomes the contract's request. */
import { z } from 'zod'
import { refundRequest, type DeskLine, type DeskMoney } from '#contract/support-desk.ts'
import { readMoney } from '../../lib/form-words.ts'

export interface RefundForm {
  mode: 'all' | 'lines' | 'amount'
  lines: string[]
  amount: string
  reason: string
}

export const emptyRefund: RefundForm = { mode: 'all', lines: [], amount: '', reason: '' }

type Money = Pick<DeskMoney, 'leftToRefundCents' | 'taxIncluded' | 'deliveryCents'>

/** What the chosen lines come to; the last to go back brings the delivery charge along. The server does its own sum. */
export function linesCents(chosen: readonly string[], lines: readonly DeskLine[], money: Money): number {
  const picked = lines.filter(({ id }) => chosen.includes(String(id)))
  const goods = picked.reduce((sum, { lineCents, taxCents }) => sum + lineCents + (money.taxIncluded ? 0 : taxCents), 0)
  const last = picked.length > 0 && lines.every((line) => line.refunded || picked.includes(line))
  return goods + (last ? money.deliveryCents : 0)
}

/** Checks against what was left when the page was read; the server checks again under its lock. */
export const refundSchema = (money: Money, lines: readonly DeskLine[]) =>
  z
    .object({
      mode: z.enum(['all', 'lines', 'amount']),
      lines: z.array(z.string()),
      amount: z.string(),
      reason: z.string(),
    })
    .transform(({ mode, lines: chosen, amount, reason }, ctx): z.input<typeof refundRequest> => {
      const left = money.leftToRefundCents
      if (mode === 'all') return { amountCents: left, reason }
      if (mode === 'lines') {
        if (chosen.length === 0) ctx.addIssue({ code: 'custom', path: ['lines'], message: 'required' })
        if (linesCents(chosen, lines, money) > left)
          ctx.addIssue({ code: 'custom', path: ['lines'], message: 'more-than-left' })
        return { lines: chosen.map(Number), reason }
      }
      const amountCents = readMoney(amount)
      if (amountCents === null) ctx.addIssue({ code: 'custom', path: ['amount'], message: 'not-money' })
      else if (amountCents > left) ctx.addIssue({ code: 'custom', path: ['amount'], message: 'more-than-left' })
      return { amountCents: amountCents ?? 1, reason }
    })
    .pipe(refundRequest)
