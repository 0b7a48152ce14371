/** Money taken and refunded; one row for each movement, whatever is told twice. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'ledger_entries',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      order_id INT UNSIGNED NOT NULL,
      kind VARCHAR(20) NOT NULL CHECK (kind IN ('taken', 'refunded')),
      amount_cents INT NOT NULL,
      currency CHAR(3) NOT NULL CHECK (currency IN ('EUR', 'GBP', 'USD')),
      ref VARCHAR(190) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      UNIQUE KEY ledger_entries_ref (ref),
      CONSTRAINT ledger_entries_order_fk FOREIGN KEY (order_id) REFERENCES orders (id),
      CHECK ((kind = 'taken' AND amount_cents > 0) OR (kind = 'refunded' AND amount_cents < 0))
  `,
  )
  await createTable(
    q,
    'refunds',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      order_id INT UNSIGNED NOT NULL,
      amount_cents INT UNSIGNED NOT NULL CHECK (amount_cents > 0),
      reason TEXT NOT NULL,
      state VARCHAR(10) NOT NULL DEFAULT 'asked' CHECK (state IN ('asked', 'done', 'failed')),
      stripe_refund_id VARCHAR(190) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NULL,
      idempotency_key VARCHAR(80) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
      author_id INT UNSIGNED NULL,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      UNIQUE KEY refunds_stripe_refund (stripe_refund_id),
      UNIQUE KEY refunds_idempotency_key (idempotency_key),
      CONSTRAINT refunds_order_fk FOREIGN KEY (order_id) REFERENCES orders (id),
      CONSTRAINT refunds_author_fk FOREIGN KEY (author_id) REFERENCES users (id)
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('refunds')
  await q.dropTable('ledger_entries')
}
