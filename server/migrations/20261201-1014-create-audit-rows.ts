/** What staff wrote. The name stays when the account goes, so there is no foreign key to users. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'audit_rows',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      actor_id INT UNSIGNED NULL,
      actor_name VARCHAR(120) NOT NULL,
      actor_role VARCHAR(20) NOT NULL,
      action VARCHAR(60) NOT NULL,
      subject_type VARCHAR(40) NOT NULL,
      subject_id VARCHAR(64) NOT NULL,
      reason TEXT NOT NULL,
      \`before\` JSON NULL,
      after JSON NULL,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      KEY audit_rows_subject (subject_type, subject_id),
      KEY audit_rows_created_at (created_at)
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('audit_rows')
}
