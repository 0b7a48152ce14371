import type { QueryInterface } from 'sequelize'

/**
 * CREATE TABLE in plain SQL, as Sequelize's own has no CHECK constraints. Text compares without regard to case and accents
 * unless a column says otherwise. Named charset: a server started without options would use latin1.
 */
export const createTable = (q: QueryInterface, name: string, columns: string) =>
  q.sequelize.query(
    `CREATE TABLE \`${name}\` (${columns}) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_uca1400_ai_ci`,
  )
