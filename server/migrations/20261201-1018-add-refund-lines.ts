/** A refund of whole lines names them, so that no line is given back twice. */
import type { QueryInterface } from 'sequelize'

export const up = (q: QueryInterface) => q.sequelize.query('ALTER TABLE refunds ADD COLUMN line_ids JSON NULL')
export const down = (q: QueryInterface) => q.sequelize.query('ALTER TABLE refunds DROP COLUMN line_ids')
