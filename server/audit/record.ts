/** The audit row of a staff write. Written inside the write's own transaction: no change without its row, no row without its change. */
import type { Transaction } from 'sequelize'
import type { SignedIn } from '../http/session.ts'
import { AuditRow } from '../models/audit-row.ts'

export interface AuditEntry {
  /** `<thing>.<what happened>`, such as `limit-change.seconded`; put into words by locales product-desk.json `audit.action`. */
  action: string
  subjectType: 'order' | 'wheelset' | 'limit-change' | 'rule-table'
  /** What people call it: an order number, a SKU, a table's name. */
  subjectId: string
  reason: string
  /** Only what changed. Never a body mass. */
  before?: Record<string, unknown>
  after?: Record<string, unknown>
}

export async function recordAudit(
  actor: Pick<SignedIn, 'id' | 'name' | 'role'>,
  entry: AuditEntry,
  transaction: Transaction,
) {
  await AuditRow.create(
    {
      actorId: actor.id,
      actorName: actor.name,
      actorRole: actor.role,
      action: entry.action,
      subjectType: entry.subjectType,
      subjectId: entry.subjectId,
      reason: entry.reason,
      before: entry.before ?? null,
      after: entry.after ?? null,
    },
    { transaction },
  )
}
