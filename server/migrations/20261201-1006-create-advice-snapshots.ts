/** Fittings frozen with the rules that gave them. JSON text is kept as it was written. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'advice_snapshots',
    `
      id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL PRIMARY KEY,
      user_id INT UNSIGNED NULL,
      answers JSON NOT NULL,
      advice JSON NOT NULL,
      rules_version VARCHAR(60) NOT NULL,
      sha256 CHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      KEY advice_snapshots_created_at (created_at),
      CONSTRAINT advice_snapshots_user_fk FOREIGN KEY (user_id) REFERENCES users (id) ON DELETE SET NULL
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('advice_snapshots')
}
