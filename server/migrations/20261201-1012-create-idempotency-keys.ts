/** Creating calls by the key their caller gave them. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'idempotency_keys',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      scope VARCHAR(120) NOT NULL,
      \`key\` VARCHAR(80) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
      request_hash CHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      state VARCHAR(10) NOT NULL DEFAULT 'running' CHECK (state IN ('running', 'done')),
      status INT UNSIGNED NULL,
      body JSON NULL,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      UNIQUE KEY idempotency_keys_key (scope, \`key\`),
      KEY idempotency_keys_created_at (created_at)
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('idempotency_keys')
}
