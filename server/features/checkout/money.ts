/** What an order has brought in and given back, from rows that are only ever added. */
import type { Transaction } from 'sequelize'
import { LedgerEntry } from '../../models/ledger-entry.ts'
import { Refund } from '../../models/refund.ts'

/** @returns cents: taken so far, given back, and what is left once refunds on their way have arrived */
export async function moneyOf(orderId: number, transaction?: Transaction) {
  const inside = transaction ? { transaction } : {}
  const entries = await LedgerEntry.findAll({ where: { orderId }, raw: true, ...inside })
  const asked = await Refund.findAll({ where: { orderId, state: 'asked' }, raw: true, ...inside })
  const sum = (kind: LedgerEntry['kind']) =>
    entries.filter((entry) => entry.kind === kind).reduce((total, { amountCents }) => total + amountCents, 0)
  const takenCents = sum('taken')
  const refundedCents = -sum('refunded')
  const pendingCents = asked.reduce((total, { amountCents }) => total + amountCents, 0)
  return { takenCents, refundedCents, leftCents: takenCents - refundedCents - pendingCents }
}
