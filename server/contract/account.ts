/** Signing in and out, the bikes a rider keeps, a rider's orders. */
import { z } from 'zod'
import { currency, isoTime, listOf, locale, role } from './common.ts'

export const signIn = z.strictObject({
  email: z.email().max(190),
  password: z.string().min(1).max(200),
})
export type SignIn = z.infer<typeof signIn>

export const sessionUser = z.object({ email: z.string(), name: z.string(), role, locale })
export type SessionUser = z.infer<typeof sessionUser>

export const session = z.object({ user: sessionUser.nullable() })
export type Session = z.infer<typeof session>

/** One bike's facts, as fit checks use them. Every fact may be unknown. */
export const bikeFacts = z.strictObject({
  name: z.string().trim().min(1).max(60),
  brakes: z.enum(['rim', 'disc']).nullable(),
  beadSeatMm: z.union([z.literal(622), z.literal(584)]).nullable(),
  frontAxle: z.string().max(20).nullable(),
  rearAxle: z.string().max(20).nullable(),
  freehub: z.string().max(30).nullable(),
  rotorMount: z.enum(['centre-lock', 'six-bolt']).nullable(),
  maxTyreMm: z.number().min(18).max(80).nullable(),
  caliperOpeningMm: z.number().min(15).max(60).nullable(),
})
export type BikeFacts = z.infer<typeof bikeFacts>

export const bike = z.object({ id: z.number().int(), ...bikeFacts.shape })
export type Bike = z.infer<typeof bike>
export const bikeList = listOf(bike)

export const ownOrder = z.object({
  orderNumber: z.string(),
  state: z.string(),
  totalCents: z.number().int(),
  currency,
  titles: z.array(z.string()),
  createdAt: isoTime,
})
export type OwnOrder = z.infer<typeof ownOrder>
export const ownOrderList = listOf(ownOrder)
