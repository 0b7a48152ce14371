/** People who sign in, their browsers, the bikes they keep. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'users',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      email VARCHAR(190) NOT NULL,
      name VARCHAR(120) NOT NULL,
      role VARCHAR(10) NOT NULL CHECK (role IN ('rider', 'support', 'product', 'admin')),
      password_hash VARCHAR(255) NOT NULL,
      locale VARCHAR(5) NOT NULL CHECK (locale IN ('en', 'pt')),
      active_from DATETIME(3) NULL,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      UNIQUE KEY users_email (email)
  `,
  )
  await createTable(
    q,
    'sessions',
    `
      sid_hash CHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL PRIMARY KEY,
      user_id INT UNSIGNED NULL,
      data JSON NOT NULL,
      expires_at DATETIME(3) NOT NULL,
      KEY sessions_expires_at (expires_at),
      CONSTRAINT sessions_user_fk FOREIGN KEY (user_id) REFERENCES users (id) ON DELETE CASCADE
  `,
  )
  await createTable(
    q,
    'bikes',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      user_id INT UNSIGNED NOT NULL,
      name VARCHAR(60) NOT NULL,
      brakes VARCHAR(10) NULL CHECK (brakes IN ('rim', 'disc')),
      bead_seat_mm INT UNSIGNED NULL,
      front_axle VARCHAR(20) NULL,
      rear_axle VARCHAR(20) NULL,
      freehub VARCHAR(30) NULL,
      rotor_mount VARCHAR(20) NULL CHECK (rotor_mount IN ('centre-lock', 'six-bolt')),
      max_tyre_mm DOUBLE NULL CHECK (max_tyre_mm > 0),
      caliper_opening_mm DOUBLE NULL CHECK (caliper_opening_mm > 0),
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      CONSTRAINT bikes_user_fk FOREIGN KEY (user_id) REFERENCES users (id) ON DELETE CASCADE
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('bikes')
  await q.dropTable('sessions')
  await q.dropTable('users')
}
