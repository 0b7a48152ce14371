/** What the draft form holds while it is typed in, and how it becomes the contract's draft. */
import { z } from 'zod'
import { limitDraft } from '#contract/product-desk.ts'
import { parseNumber } from '../../ui/NumberField.tsx'

export interface LimitForm {
  sku: string
  limitKg: string
  proof: string
  reason: string
  /** As a datetime field gives it: local time without a zone; empty for at once. */
  inForceFrom: string
}

export const limitSchema = z
  .object({ sku: z.string(), limitKg: z.string(), proof: z.string(), reason: z.string(), inForceFrom: z.string() })
  .transform(({ limitKg, inForceFrom, ...rest }, ctx) => {
    const kg = parseNumber(limitKg)
    if (kg === null) ctx.addIssue({ code: 'custom', path: ['limitKg'], message: 'not-number' })
    const at = inForceFrom === '' ? null : new Date(inForceFrom)
    if (at && Number.isNaN(at.getTime())) ctx.addIssue({ code: 'custom', path: ['inForceFrom'], message: 'not-valid' })
    return {
      ...rest,
      limitKg: kg ?? 0,
      ...(at && !Number.isNaN(at.getTime()) ? { inForceFrom: at.toISOString() } : {}),
    }
  })
  .pipe(limitDraft)
