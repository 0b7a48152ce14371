/** History is only added to: an UPDATE of a history row is refused by the database itself. */
import type { QueryInterface } from 'sequelize'

const HISTORY = ['order_events', 'ledger_entries', 'audit_rows', 'advice_snapshots']

export async function up(q: QueryInterface) {
  for (const table of HISTORY) {
    await q.sequelize.query(
      `CREATE TRIGGER ${table}_no_update BEFORE UPDATE ON ${table} FOR EACH ROW
       SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = '${table}: rows are only added'`,
    )
  }
}

export async function down(q: QueryInterface) {
  for (const table of HISTORY) await q.sequelize.query(`DROP TRIGGER IF EXISTS ${table}_no_update`)
}
