/**
 * The key in a guest's order link. Derived from the order's number under the shop's secret (256 bits), so that every mail can carry the same link
 * while the table holds only a digest: a copy of the database opens no order.
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
