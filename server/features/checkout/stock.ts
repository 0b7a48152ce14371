/** Stock moves, each one conditional statement: what is not there cannot be reserved, whoever asks at the same moment. */
import { QueryTypes, type Sequelize, type Transaction } from 'sequelize'

interface Want {
  wheelsetId: number
  quantity: number
}

async function move(
  db: Sequelize,
  sql: string,
  { wheelsetId, quantity }: Want,
  transaction: Transaction,
): Promise<boolean> {
  const [, affected] = await db.query(sql, {
    replacements: { wheelsetId, quantity },
    type: QueryTypes.UPDATE,
    transaction,
  })
  return affected > 0
}

/** In ascending order of wheelset, so that two orders never wait for each other. @returns the first that is not there, or null */
export async function reserve<W extends Want>(
  db: Sequelize,
  wants: readonly W[],
  transaction: Transaction,
): Promise<W | null> {
  for (const want of [...wants].sort((a, b) => a.wheelsetId - b.wheelsetId)) {
    const sql =
      'UPDATE stock SET reserved = reserved + :quantity WHERE wheelset_id = :wheelsetId AND on_hand >= reserved + :quantity'
    if (!(await move(db, sql, want, transaction))) return want
  }
  return null
}

export async function release(db: Sequelize, wants: readonly Want[], transaction: Transaction) {
  for (const want of wants) {
    await move(
      db,
      'UPDATE stock SET reserved = reserved - :quantity WHERE wheelset_id = :wheelsetId AND reserved >= :quantity',
      want,
      transaction,
    )
  }
}

/** Reserved becomes sold. */
export async function takeOut(db: Sequelize, wants: readonly Want[], transaction: Transaction) {
  for (const want of wants) {
    const sql =
      'UPDATE stock SET on_hand = on_hand - :quantity, reserved = reserved - :quantity WHERE wheelset_id = :wheelsetId AND reserved >= :quantity'
    await move(db, sql, want, transaction)
  }
}

/** A sold wheelset comes back before anything was built. */
export async function putBack(db: Sequelize, wants: readonly Want[], transaction: Transaction) {
  for (const want of wants) {
    await move(db, 'UPDATE stock SET on_hand = on_hand + :quantity WHERE wheelset_id = :wheelsetId', want, transaction)
  }
}
