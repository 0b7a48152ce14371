/** The history of an order. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'order_events',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      order_id INT UNSIGNED NOT NULL,
      kind VARCHAR(40) NOT NULL,
      from_state VARCHAR(20) NULL CHECK (from_state IN ('holding', 'placed', 'query', 'cleared', 'queued', 'on-bench', 'handed-over', 'arrived', 'settled', 'dropped')),
      to_state VARCHAR(20) NULL CHECK (to_state IN ('holding', 'placed', 'query', 'cleared', 'queued', 'on-bench', 'handed-over', 'arrived', 'settled', 'dropped')),
      actor_id INT UNSIGNED NULL,
      actor_role VARCHAR(20) NOT NULL,
      reason TEXT NULL,
      data JSON NULL,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      CONSTRAINT order_events_order_fk FOREIGN KEY (order_id) REFERENCES orders (id),
      CONSTRAINT order_events_actor_fk FOREIGN KEY (actor_id) REFERENCES users (id) ON DELETE SET NULL
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('order_events')
}
