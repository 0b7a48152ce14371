/** System limits as dated versions with their proof; the second person is never the first. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'limit_versions',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      wheelset_id INT UNSIGNED NOT NULL,
      limit_kg DOUBLE NOT NULL CHECK (limit_kg > 0),
      proof TEXT NOT NULL,
      reason TEXT NOT NULL,
      state VARCHAR(20) NOT NULL CHECK (state IN ('drafted', 'seconded', 'in-force', 'rejected')),
      drafted_by_id INT UNSIGNED NULL,
      seconded_by_id INT UNSIGNED NULL,
      in_force_from DATETIME(3) NULL,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      KEY limit_versions_in_force (wheelset_id, in_force_from),
      CONSTRAINT limit_versions_wheelset_fk FOREIGN KEY (wheelset_id) REFERENCES wheelsets (id) ON DELETE CASCADE,
      CONSTRAINT limit_versions_drafted_by_fk FOREIGN KEY (drafted_by_id) REFERENCES users (id),
      CONSTRAINT limit_versions_seconded_by_fk FOREIGN KEY (seconded_by_id) REFERENCES users (id),
      CHECK (seconded_by_id IS NULL OR drafted_by_id IS NULL OR seconded_by_id <> drafted_by_id),
      CHECK (state NOT IN ('seconded', 'in-force') OR in_force_from IS NOT NULL)
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('limit_versions')
}
