/** Stock moves, each one conditional statement: what is not there cannot be reserved, whoever asks at the same moment. */
import { QueryTypes, type Sequelize, type Transaction } from 'sequelize'

interface Want {
  wheelsetId: number
  quantity: number
}

const RESERVE = `UPDATE stock SET reserved = reserved + :quantity
  WHERE wheelset_id = :wheelsetId AND on_hand >= reserved + :quantity`
const RELEASE = `UPDATE stock SET reserved = reserved - :quantity
  WHERE wheelset_id = :wheelsetId AND reserved >= :quantity`
const SELL = `UPDATE stock SET on_hand = on_hand - :quantity, reserved = reserved - :quantity
  WHERE wheelset_id = :wheelsetId AND reserved >= :quantity`
const PUT_BACK = 'UPDATE stock SET on_hand = on_hand + :quantity WHERE wheelset_id = :wheelsetId'

/** Rows are always taken in ascending order of wheelset, so that two orders never wait for each other. */
const inOrder = <W extends Want>(wants: readonly W[]) => [...wants].sort((a, b) => a.wheelsetId - b.wheelsetId)

async function move(db: Sequelize, sql: string, { wheelsetId, quantity }: Want, transaction: Transaction) {
  const [, affected] = await db.query(sql, {
    replacements: { wheelsetId, quantity },
    type: QueryTypes.UPDATE,
    transaction,
  })
  return affected > 0
}

async function moveAll(db: Sequelize, sql: string, wants: readonly Want[], transaction: Transaction) {
  for (const want of inOrder(wants)) {
    if (!(await move(db, sql, want, transaction)))
      throw new Error(`stock of wheelset ${want.wheelsetId} does not hold what an order says it holds`)
  }
}

/** All or nothing. @returns the first that is not there, or null */
export async function reserve<W extends Want>(
  db: Sequelize,
  wants: readonly W[],
  transaction: Transaction,
): Promise<W | null> {
  const done: W[] = []
  for (const want of inOrder(wants)) {
    if (await move(db, RESERVE, want, transaction)) done.push(want)
    else {
      await moveAll(db, RELEASE, done, transaction)
      return want
    }
  }
  return null
}

export const release = (db: Sequelize, wants: readonly Want[], transaction: Transaction) =>
  moveAll(db, RELEASE, wants, transaction)

/** Reserved becomes sold. @returns false where the count does not bear it: a person has to look, but the payment is written down all the same */
export async function takeOut(db: Sequelize, wants: readonly Want[], transaction: Transaction): Promise<boolean> {
  let whole = true
  for (const want of inOrder(wants)) whole = (await move(db, SELL, want, transaction)) && whole
  return whole
}

/** A sold wheelset comes back before anything was built. */
export const putBack = (db: Sequelize, wants: readonly Want[], transaction: Transaction) =>
  moveAll(db, PUT_BACK, wants, transaction)
