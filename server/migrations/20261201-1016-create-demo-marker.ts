/** The mark of a database that holds invented demo data: one row or none. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'demo_marker',
    `
      id INT UNSIGNED NOT NULL PRIMARY KEY CHECK (id = 1),
      note VARCHAR(250) NOT NULL,
      seeded_at DATETIME(3) NOT NULL
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('demo_marker')
}
