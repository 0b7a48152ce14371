/**
 * One row whose mark changes with every write to a table that advice reads, whoever writes: so a process may keep what it has read for as long as
 * the mark stands. A fresh mark each time, not a count: a count that starts again could repeat itself.
 */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

const READ_BY_ADVICE = ['wheelsets', 'wheelset_wheels', 'rims', 'hubs', 'limit_versions', 'rule_tables']
const EVENTS = ['insert', 'update', 'delete']

export async function up(q: QueryInterface) {
  await createTable(q, 'advice_inputs', 'id TINYINT UNSIGNED NOT NULL PRIMARY KEY, mark CHAR(36) NOT NULL')
  for (const table of READ_BY_ADVICE)
    for (const event of EVENTS)
      await q.sequelize.query(
        `CREATE TRIGGER ${table}_marks_advice_${event} AFTER ${event.toUpperCase()} ON ${table} FOR EACH ROW
         INSERT INTO advice_inputs (id, mark) VALUES (1, UUID()) ON DUPLICATE KEY UPDATE mark = UUID()`,
      )
}

export async function down(q: QueryInterface) {
  for (const table of READ_BY_ADVICE)
    for (const event of EVENTS) await q.sequelize.query(`DROP TRIGGER IF EXISTS ${table}_marks_advice_${event}`)
  await q.dropTable('advice_inputs')
}
