/** Wheelsets, their two wheels, their words in each language. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'wheelsets',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      sku VARCHAR(40) NOT NULL,
      slug VARCHAR(60) NOT NULL,
      name VARCHAR(80) NOT NULL,
      timber VARCHAR(40) NOT NULL,
      brake VARCHAR(10) NOT NULL CHECK (brake IN ('rim', 'disc')),
      bead_seat_mm INT UNSIGNED NOT NULL,
      rides JSON NOT NULL,
      use_condition INT UNSIGNED NOT NULL CHECK (use_condition BETWEEN 1 AND 5),
      assist_rated BOOLEAN NOT NULL DEFAULT FALSE,
      build_kind VARCHAR(10) NOT NULL CHECK (build_kind IN ('shelf', 'bench')),
      on_sale BOOLEAN NOT NULL DEFAULT TRUE,
      version INT UNSIGNED NOT NULL DEFAULT 1,
      invented_note VARCHAR(120) NULL,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      UNIQUE KEY wheelsets_sku (sku),
      UNIQUE KEY wheelsets_slug (slug),
      KEY wheelsets_on_sale (on_sale, name)
  `,
  )
  await createTable(
    q,
    'wheelset_wheels',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      wheelset_id INT UNSIGNED NOT NULL,
      position VARCHAR(10) NOT NULL CHECK (position IN ('front', 'rear')),
      rim_id INT UNSIGNED NOT NULL,
      hub_id INT UNSIGNED NOT NULL,
      spoke_id INT UNSIGNED NOT NULL,
      spoke_count INT UNSIGNED NOT NULL CHECK (spoke_count BETWEEN 12 AND 48 AND spoke_count % 4 = 0),
      crosses_left INT UNSIGNED NOT NULL CHECK (crosses_left <= 4),
      crosses_right INT UNSIGNED NOT NULL CHECK (crosses_right <= 4),
      tension_tight_n DOUBLE NOT NULL CHECK (tension_tight_n > 0),
      mass_g DOUBLE NOT NULL CHECK (mass_g > 0),
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      UNIQUE KEY wheelset_wheels_position (wheelset_id, position),
      CONSTRAINT wheelset_wheels_wheelset_fk FOREIGN KEY (wheelset_id) REFERENCES wheelsets (id) ON DELETE CASCADE,
      CONSTRAINT wheelset_wheels_rim_fk FOREIGN KEY (rim_id) REFERENCES rims (id),
      CONSTRAINT wheelset_wheels_hub_fk FOREIGN KEY (hub_id) REFERENCES hubs (id),
      CONSTRAINT wheelset_wheels_spoke_fk FOREIGN KEY (spoke_id) REFERENCES spokes (id)
  `,
  )
  await createTable(
    q,
    'wheelset_texts',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      wheelset_id INT UNSIGNED NOT NULL,
      locale VARCHAR(5) NOT NULL CHECK (locale IN ('en', 'pt')),
      tagline VARCHAR(200) NOT NULL,
      description TEXT NOT NULL,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      UNIQUE KEY wheelset_texts_locale (wheelset_id, locale),
      CONSTRAINT wheelset_texts_wheelset_fk FOREIGN KEY (wheelset_id) REFERENCES wheelsets (id) ON DELETE CASCADE
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('wheelset_texts')
  await q.dropTable('wheelset_wheels')
  await q.dropTable('wheelsets')
}
