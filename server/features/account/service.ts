/** Signing in, and what a signed-in rider keeps: bikes and orders. */
import { hash, verify } from '@node-rs/argon2'
import type { BikeFacts, OwnOrder, SignIn } from '#contract/account.ts'
import { AppError, notFound } from '../../http/errors.ts'
import { Bike } from '../../models/bike.ts'
import { Order } from '../../models/order.ts'
import { OrderLine } from '../../models/order-line.ts'
import { User } from '../../models/user.ts'
import { PASSWORD_COST } from './password-cost.ts'

let nobody: Promise<string> | undefined

/**
 * @returns the user's id
 * @throws AppError sign-in-failed, the same whether the address is unknown or the password wrong, and after the same work
 */
export async function checkSignIn({ email, password }: SignIn): Promise<number> {
  const user = await User.findOne({ where: { email: email.trim().toLowerCase() } })
  nobody ??= hash('nobody', PASSWORD_COST)
  const matches = await verify(user?.passwordHash ?? (await nobody), password).catch(() => false)
  if (!user || !matches) throw new AppError('sign-in-failed', 401)
  return user.id
}

const bikeView = (bike: Bike) => ({
  id: bike.id,
  name: bike.name,
  brakes: bike.brakes,
  beadSeatMm: bike.beadSeatMm as BikeFacts['beadSeatMm'],
  frontAxle: bike.frontAxle,
  rearAxle: bike.rearAxle,
  freehub: bike.freehub,
  rotorMount: bike.rotorMount,
  maxTyreMm: bike.maxTyreMm,
  caliperOpeningMm: bike.caliperOpeningMm,
})

export async function listBikes(userId: number) {
  const bikes = await Bike.findAll({ where: { userId }, order: ['id'] })
  return { items: bikes.map(bikeView), nextCursor: null }
}

export const addBike = async (userId: number, facts: BikeFacts) => bikeView(await Bike.create({ userId, ...facts }))

async function ownBike(userId: number, id: number): Promise<Bike> {
  const bike = await Bike.findOne({ where: { id, userId } })
  if (!bike) throw notFound()
  return bike
}

export const changeBike = async (userId: number, id: number, facts: BikeFacts) =>
  bikeView(await (await ownBike(userId, id)).update(facts))

export const removeBike = async (userId: number, id: number) => {
  await (await ownBike(userId, id)).destroy()
}

/** A rider's own orders, newest first; a rider has few, so the last hundred are all there is to see. */
export async function listOwnOrders(userId: number): Promise<{ items: OwnOrder[]; nextCursor: null }> {
  const orders = await Order.findAll({ where: { userId }, order: [['id', 'DESC']], limit: 100 })
  const lines = await OrderLine.findAll({ where: { orderId: orders.map(({ id }) => id) }, raw: true })
  return {
    items: orders.map((order) => ({
      orderNumber: order.number,
      state: order.state,
      totalCents: order.totalCents,
      currency: order.currency,
      titles: lines.filter(({ orderId }) => orderId === order.id).map(({ title }) => title),
      createdAt: order.createdAt.toISOString(),
    })),
    nextCursor: null,
  }
}
