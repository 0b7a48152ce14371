/** Reading the audit, newest first. */
import { Op, type WhereOptions } from 'sequelize'
import type { AuditFilters } from '#contract/product-desk.ts'
import type { Role } from '#contract/common.ts'
import { AuditRow } from '../models/audit-row.ts'

const PAGE = 50

export async function listAudit({ subjectType, subjectId, limit = PAGE, cursor }: AuditFilters) {
  const where: WhereOptions<AuditRow> = {
    ...(subjectType === undefined ? {} : { subjectType }),
    ...(subjectId === undefined ? {} : { subjectId }),
    ...(cursor === undefined ? {} : { id: { [Op.lt]: Number(cursor) } }),
  }
  // One more than shown says whether there is a next page.
  const rows = await AuditRow.findAll({ where, order: [['id', 'DESC']], limit: limit + 1 })
  const items = rows.slice(0, limit).map((row) => ({
    id: row.id,
    actorName: row.actorName,
    actorRole: row.actorRole as Role,
    action: row.action,
    subjectType: row.subjectType,
    subjectId: row.subjectId,
    reason: row.reason,
    before: row.before,
    after: row.after,
    createdAt: row.createdAt.toISOString(),
  }))
  return { items, nextCursor: rows.length > limit ? String(items.at(-1)?.id) : null }
}
