/** Tables that the sums use, as dated versions. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'rule_tables',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      name VARCHAR(80) NOT NULL,
      version VARCHAR(20) NOT NULL,
      in_force_from DATETIME(3) NOT NULL,
      data JSON NOT NULL,
      source TEXT NOT NULL,
      label VARCHAR(10) NOT NULL CHECK (label IN ('read', 'memory', 'derived', 'practice')),
      state VARCHAR(20) NOT NULL DEFAULT 'in-force' CHECK (state IN ('drafted', 'seconded', 'in-force', 'rejected')),
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      UNIQUE KEY rule_tables_version (name, version)
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('rule_tables')
}
