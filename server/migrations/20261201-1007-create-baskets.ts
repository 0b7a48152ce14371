/** Baskets and what lies in them. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'baskets',
    `
      id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL PRIMARY KEY,
      user_id INT UNSIGNED NULL,
      market CHAR(2) NOT NULL,
      currency CHAR(3) NOT NULL CHECK (currency IN ('EUR', 'GBP', 'USD')),
      locale VARCHAR(5) NOT NULL CHECK (locale IN ('en', 'pt')),
      advice_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
      state VARCHAR(10) NOT NULL DEFAULT 'open' CHECK (state IN ('open', 'ordered')),
      version INT UNSIGNED NOT NULL DEFAULT 1,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      KEY baskets_updated_at (updated_at),
      CONSTRAINT baskets_user_fk FOREIGN KEY (user_id) REFERENCES users (id) ON DELETE SET NULL,
      CONSTRAINT baskets_market_fk FOREIGN KEY (market) REFERENCES markets (code),
      CONSTRAINT baskets_advice_fk FOREIGN KEY (advice_id) REFERENCES advice_snapshots (id)
  `,
  )
  await createTable(
    q,
    'basket_lines',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      basket_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      wheelset_id INT UNSIGNED NOT NULL,
      quantity INT NOT NULL CHECK (quantity > 0),
      options JSON NOT NULL,
      advice_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      KEY basket_lines_wheelset (basket_id, wheelset_id),
      CONSTRAINT basket_lines_basket_fk FOREIGN KEY (basket_id) REFERENCES baskets (id) ON DELETE CASCADE,
      CONSTRAINT basket_lines_wheelset_fk FOREIGN KEY (wheelset_id) REFERENCES wheelsets (id),
      CONSTRAINT basket_lines_advice_fk FOREIGN KEY (advice_id) REFERENCES advice_snapshots (id)
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('basket_lines')
  await q.dropTable('baskets')
}
