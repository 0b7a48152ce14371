/**
 * The key in a guest's order link: 256 bits, derived from the order's number under the shop's secret, so that every mail and every reply can carry
 * the same link without the orders table holding it: that keeps a digest. It stands in clear only where the link itself has to: in the mails of the
 * outbox, and for a day in the kept answer of the ordering call.
 */
import { createHash, createHmac, timingSafeEqual } from 'node:crypto'
import type { Config } from '../../config.ts'

export const orderToken = ({ SESSION_SECRET }: Pick<Config, 'SESSION_SECRET'>, orderNumber: string) =>
  createHmac('sha256', SESSION_SECRET).update(`order ${orderNumber}`).digest('base64url')

export const digest = (token: string) => createHash('sha256').update(token).digest('hex')

export function opens(token: string, tokenHash: string): boolean {
  const [given, kept] = [Buffer.from(digest(token)), Buffer.from(tokenHash)]
  return given.length === kept.length && timingSafeEqual(given, kept)
}

export const orderUrl = (config: Pick<Config, 'SESSION_SECRET' | 'PUBLIC_URL'>, orderNumber: string) =>
  `${config.PUBLIC_URL}/orders/${orderNumber}?key=${orderToken(config, orderNumber)}`
