/** Money that moved: taken is positive, refunded negative. Rows are only added. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class LedgerEntry extends Model<InferAttributes<LedgerEntry>, InferCreationAttributes<LedgerEntry>> {
  declare id: CreationOptional<number>
  declare orderId: number
  declare kind: 'taken' | 'refunded'
  declare amountCents: number
  declare currency: 'EUR' | 'GBP' | 'USD'
  declare ref: string // what moved it, once: a payment intent or a refund
  declare createdAt: CreationOptional<Date>
}

export const initLedgerEntry = (sequelize: Sequelize) =>
  LedgerEntry.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      orderId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      kind: { type: DataTypes.STRING(20), allowNull: false },
      amountCents: { type: DataTypes.INTEGER, allowNull: false },
      currency: { type: DataTypes.CHAR(3), allowNull: false },
      ref: { type: DataTypes.STRING(190), allowNull: false },
      createdAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'ledger_entries', underscored: true, updatedAt: false },
  )
