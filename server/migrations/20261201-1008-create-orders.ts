/** Orders and their lines. A basket becomes one order at most; its sums must add up. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'orders',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      number VARCHAR(20) NOT NULL,
      basket_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
      user_id INT UNSIGNED NULL,
      email VARCHAR(190) NOT NULL,
      name VARCHAR(120) NOT NULL,
      locale VARCHAR(5) NOT NULL CHECK (locale IN ('en', 'pt')),
      market CHAR(2) NOT NULL,
      currency CHAR(3) NOT NULL CHECK (currency IN ('EUR', 'GBP', 'USD')),
      delivery JSON NOT NULL,
      postcode VARCHAR(20) NOT NULL,
      state VARCHAR(20) NOT NULL DEFAULT 'holding' CHECK (state IN ('holding', 'placed', 'query', 'cleared', 'queued', 'on-bench', 'handed-over', 'arrived', 'settled', 'dropped')),
      goods_cents INT UNSIGNED NOT NULL,
      delivery_cents INT UNSIGNED NOT NULL,
      tax_cents INT UNSIGNED NOT NULL,
      total_cents INT UNSIGNED NOT NULL,
      token_hash CHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      stripe_session_id VARCHAR(190) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NULL,
      stripe_payment_intent VARCHAR(190) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NULL,
      pay_url TEXT NULL,
      hold_expires_at DATETIME(3) NULL,
      placed_at DATETIME(3) NULL,
      advice_summary VARCHAR(500) NULL,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      UNIQUE KEY orders_number (number),
      UNIQUE KEY orders_basket (basket_id),
      UNIQUE KEY orders_stripe_session (stripe_session_id),
      KEY orders_payment_intent (stripe_payment_intent),
      KEY orders_token (token_hash),
      KEY orders_email (email),
      KEY orders_name (name),
      KEY orders_postcode (postcode),
      KEY orders_placed_at (placed_at),
      KEY orders_created_at (created_at),
      KEY orders_hold (state, hold_expires_at),
      CONSTRAINT orders_basket_fk FOREIGN KEY (basket_id) REFERENCES baskets (id),
      CONSTRAINT orders_user_fk FOREIGN KEY (user_id) REFERENCES users (id) ON DELETE SET NULL,
      CONSTRAINT orders_market_fk FOREIGN KEY (market) REFERENCES markets (code),
      CHECK (total_cents = goods_cents + delivery_cents OR total_cents = goods_cents + delivery_cents + tax_cents),
      CHECK (tax_cents <= total_cents)
  `,
  )
  await createTable(
    q,
    'order_lines',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      order_id INT UNSIGNED NOT NULL,
      wheelset_id INT UNSIGNED NOT NULL,
      sku VARCHAR(40) NOT NULL,
      title VARCHAR(120) NOT NULL,
      quantity INT NOT NULL CHECK (quantity > 0),
      unit_cents INT UNSIGNED NOT NULL,
      line_cents INT UNSIGNED NOT NULL,
      tax_cents INT UNSIGNED NOT NULL,
      options JSON NOT NULL,
      state VARCHAR(20) NOT NULL DEFAULT 'holding' CHECK (state IN ('holding', 'placed', 'query', 'cleared', 'queued', 'on-bench', 'handed-over', 'arrived', 'settled', 'dropped')),
      advice_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
      limit_check VARCHAR(20) NOT NULL CHECK (limit_check IN ('within', 'no-margin', 'unconfirmed')),
      limit_kg DOUBLE NOT NULL CHECK (limit_kg > 0),
      return_right VARCHAR(10) NOT NULL DEFAULT 'yes' CHECK (return_right = 'yes'),
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      CONSTRAINT order_lines_order_fk FOREIGN KEY (order_id) REFERENCES orders (id),
      CONSTRAINT order_lines_wheelset_fk FOREIGN KEY (wheelset_id) REFERENCES wheelsets (id),
      CONSTRAINT order_lines_advice_fk FOREIGN KEY (advice_id) REFERENCES advice_snapshots (id),
      CHECK (line_cents = unit_cents * quantity)
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('order_lines')
  await q.dropTable('orders')
}
