/** Each wheel keeps what the structural model found of its design; a hub may state the most that one axle carries. */
import type { QueryInterface } from 'sequelize'

export async function up(q: QueryInterface) {
  await q.sequelize.query(`ALTER TABLE wheelset_wheels
    ADD COLUMN design_digest CHAR(16) NULL, ADD COLUMN strength JSON NULL, ADD COLUMN structure JSON NULL`)
  await q.sequelize.query('ALTER TABLE hubs ADD COLUMN max_axle_load_kg DOUBLE NULL CHECK (max_axle_load_kg > 0)')
}

export async function down(q: QueryInterface) {
  await q.sequelize.query('ALTER TABLE hubs DROP COLUMN max_axle_load_kg')
  await q.sequelize.query(
    'ALTER TABLE wheelset_wheels DROP COLUMN design_digest, DROP COLUMN strength, DROP COLUMN structure',
  )
}
