/** Mails written in the transaction that causes them, sent after it. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'outbox_mails',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      order_id INT UNSIGNED NULL,
      kind VARCHAR(40) NOT NULL,
      ref VARCHAR(120) NOT NULL,
      recipient VARCHAR(190) NOT NULL,
      locale VARCHAR(5) NOT NULL CHECK (locale IN ('en', 'pt')),
      subject VARCHAR(250) NOT NULL,
      text TEXT NOT NULL,
      html TEXT NOT NULL,
      state VARCHAR(10) NOT NULL DEFAULT 'queued' CHECK (state IN ('queued', 'sent', 'failed')),
      attempts INT UNSIGNED NOT NULL DEFAULT 0,
      next_try_at DATETIME(3) NULL,
      sent_at DATETIME(3) NULL,
      last_error VARCHAR(500) NULL,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      UNIQUE KEY outbox_mails_ref (kind, ref),
      KEY outbox_mails_next (state, next_try_at),
      CONSTRAINT outbox_mails_order_fk FOREIGN KEY (order_id) REFERENCES orders (id)
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('outbox_mails')
}
