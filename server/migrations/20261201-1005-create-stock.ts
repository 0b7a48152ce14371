/** Counted pairs; a pair cannot be promised that is not there. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'stock',
    `
      wheelset_id INT UNSIGNED NOT NULL PRIMARY KEY,
      on_hand INT NOT NULL,
      reserved INT NOT NULL DEFAULT 0,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      CONSTRAINT stock_wheelset_fk FOREIGN KEY (wheelset_id) REFERENCES wheelsets (id) ON DELETE CASCADE,
      CHECK (on_hand >= 0 AND reserved >= 0 AND reserved <= on_hand)
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('stock')
}
