/** A creating call that was made, so that its repeat gets the same reply. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class IdempotencyKey extends Model<InferAttributes<IdempotencyKey>, InferCreationAttributes<IdempotencyKey>> {
  declare id: CreationOptional<number>
  declare scope: string
  declare key: string
  declare requestHash: string
  declare state: CreationOptional<'running' | 'done'>
  declare status: CreationOptional<number | null>
  declare body: CreationOptional<unknown>
  declare createdAt: CreationOptional<Date>
}

export const initIdempotencyKey = (sequelize: Sequelize) =>
  IdempotencyKey.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      scope: { type: DataTypes.STRING(120), allowNull: false },
      key: { type: DataTypes.STRING(80), allowNull: false },
      requestHash: { type: DataTypes.CHAR(64), allowNull: false },
      state: { type: DataTypes.STRING(10), allowNull: false, defaultValue: 'running' },
      status: { type: DataTypes.INTEGER.UNSIGNED, allowNull: true },
      body: { type: DataTypes.JSON, allowNull: true },
      createdAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'idempotency_keys', underscored: true, updatedAt: false },
  )
