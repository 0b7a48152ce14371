/** Events from the payment service, each kept once by its own id. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'webhook_events',
    `
      event_id VARCHAR(255) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL PRIMARY KEY,
      type VARCHAR(80) NOT NULL,
      object_id VARCHAR(190) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NULL,
      created DATETIME(3) NOT NULL,
      payload JSON NOT NULL,
      received_at DATETIME(3) NOT NULL,
      KEY webhook_events_object (object_id)
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('webhook_events')
}
