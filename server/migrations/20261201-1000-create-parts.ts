/** The parts that wheels are built of: rims, hubs, spokes. Measures in mm, bar, g, kN. */
import type { QueryInterface } from 'sequelize'
import { createTable } from './create-table.ts'

export async function up(q: QueryInterface) {
  await createTable(
    q,
    'rims',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      code VARCHAR(40) NOT NULL,
      name VARCHAR(80) NOT NULL,
      material VARCHAR(10) NOT NULL CHECK (material IN ('carbon', 'alloy')),
      bead_seat_mm INT UNSIGNED NOT NULL,
      depth_mm DOUBLE NOT NULL CHECK (depth_mm > 0),
      inner_width_mm DOUBLE NOT NULL CHECK (inner_width_mm > 0),
      outer_width_mm DOUBLE NOT NULL,
      seat VARCHAR(10) NOT NULL CHECK (seat IN ('hooked', 'hookless')),
      brake VARCHAR(10) NOT NULL CHECK (brake IN ('rim', 'disc')),
      max_pressure_bar DOUBLE NOT NULL CHECK (max_pressure_bar > 0),
      tyre_min_mm DOUBLE NOT NULL CHECK (tyre_min_mm > 0),
      tyre_max_mm DOUBLE NOT NULL,
      mass_g DOUBLE NOT NULL CHECK (mass_g > 0),
      nipple_seat_diameter_mm DOUBLE NOT NULL CHECK (nipple_seat_diameter_mm > 0),
      offset_mm DOUBLE NOT NULL DEFAULT 0,
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      UNIQUE KEY rims_code (code),
      CHECK (outer_width_mm > inner_width_mm),
      CHECK (tyre_max_mm >= tyre_min_mm)
  `,
  )
  await createTable(
    q,
    'hubs',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      code VARCHAR(40) NOT NULL,
      name VARCHAR(80) NOT NULL,
      position VARCHAR(10) NOT NULL CHECK (position IN ('front', 'rear')),
      brake VARCHAR(10) NOT NULL CHECK (brake IN ('rim', 'disc')),
      axles JSON NOT NULL,
      freehubs JSON NOT NULL,
      rotor_mount VARCHAR(20) NULL CHECK (rotor_mount IN ('centre-lock', 'six-bolt')),
      pcd_left_mm DOUBLE NOT NULL CHECK (pcd_left_mm > 0),
      pcd_right_mm DOUBLE NOT NULL CHECK (pcd_right_mm > 0),
      flange_left_mm DOUBLE NOT NULL CHECK (flange_left_mm > 0),
      flange_right_mm DOUBLE NOT NULL CHECK (flange_right_mm > 0),
      assist_rated BOOLEAN NOT NULL DEFAULT FALSE,
      mass_g DOUBLE NOT NULL CHECK (mass_g > 0),
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      UNIQUE KEY hubs_code (code),
      CHECK ((brake = 'disc') = (rotor_mount IS NOT NULL))
  `,
  )
  await createTable(
    q,
    'spokes',
    `
      id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
      code VARCHAR(40) NOT NULL,
      name VARCHAR(80) NOT NULL,
      material VARCHAR(10) NOT NULL CHECK (material IN ('steel', 'carbon')),
      profile VARCHAR(40) NOT NULL,
      ea_kn DOUBLE NOT NULL CHECK (ea_kn > 0),
      mass_g DOUBLE NOT NULL CHECK (mass_g > 0),
      created_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      updated_at DATETIME(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3),
      UNIQUE KEY spokes_code (code)
  `,
  )
}

export async function down(q: QueryInterface) {
  await q.dropTable('spokes')
  await q.dropTable('hubs')
  await q.dropTable('rims')
}
