/** Prices as dated versions, and the countries we deliver to. Money in minor units. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'markets',
    `
      code CHAR(2) NOT NULL PRIMARY KEY,
      currency CHAR(3) NOT NULL CHECK (currency IN ('EUR', 'GBP', 'USD')),
      vat_percent_bp INT UNSIGNED NOT NULL CHECK (vat_percent_bp < 10000),
      tax_included BOOLEAN NOT NULL,
      delivery_cents INT UNSIGNED NOT NULL,
      delivery_days_from INT UNSIGNED NOT NULL,
      delivery_days_to INT UNSIGNED NOT NULL,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      CHECK (delivery_days_to >= delivery_days_from)
  `,
  )
  await createTable(
    q,
    'prices',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      wheelset_id INT UNSIGNED NOT NULL,
      currency CHAR(3) NOT NULL CHECK (currency IN ('EUR', 'GBP', 'USD')),
      price_cents INT UNSIGNED NOT NULL CHECK (price_cents > 0),
      valid_from DATETIME(3) NOT NULL,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      UNIQUE KEY prices_valid_from (wheelset_id, currency, valid_from),
      CONSTRAINT prices_wheelset_fk FOREIGN KEY (wheelset_id) REFERENCES wheelsets (id) ON DELETE CASCADE
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('prices')
  await q.dropTable('markets')
}
