/** Rule tables get what limits have: a draft with author and reason, a second person who is not the first, and a time that may be "when seconded". */
import type { QueryInterface } from 'sequelize'

export const up = (q: QueryInterface) =>
  q.sequelize.query(`ALTER TABLE rule_tables
    MODIFY COLUMN in_force_from DATETIME(3) NULL,
    ADD COLUMN reason TEXT NOT NULL DEFAULT '',
    ADD COLUMN based_on VARCHAR(20) NULL,
    ADD COLUMN drafted_by_id INT UNSIGNED NULL,
    ADD COLUMN seconded_by_id INT UNSIGNED NULL,
    ADD CONSTRAINT rule_tables_drafted_by_fk FOREIGN KEY (drafted_by_id) REFERENCES users (id),
    ADD CONSTRAINT rule_tables_seconded_by_fk FOREIGN KEY (seconded_by_id) REFERENCES users (id),
    ADD CONSTRAINT rule_tables_two_people CHECK (seconded_by_id IS NULL OR drafted_by_id IS NULL OR seconded_by_id <> drafted_by_id),
    ADD CONSTRAINT rule_tables_dated CHECK (state NOT IN ('seconded', 'in-force') OR in_force_from IS NOT NULL)`)

export async function down(q: QueryInterface) {
  await q.sequelize.query('DELETE FROM rule_tables WHERE in_force_from IS NULL')
  await q.sequelize.query(`ALTER TABLE rule_tables
    DROP CONSTRAINT rule_tables_dated,
    DROP CONSTRAINT rule_tables_two_people,
    DROP FOREIGN KEY rule_tables_seconded_by_fk,
    DROP FOREIGN KEY rule_tables_drafted_by_fk,
    DROP COLUMN seconded_by_id,
    DROP COLUMN drafted_by_id,
    DROP COLUMN based_on,
    DROP COLUMN reason,
    MODIFY COLUMN in_force_from DATETIME(3) NOT NULL`)
}
