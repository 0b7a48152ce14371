/** Money asked back for an order. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute, Sequelize } from 'sequelize'
import type { Order } from './order.ts'
import type { User } from './user.ts'

export class Refund extends Model<InferAttributes<Refund>, InferCreationAttributes<Refund>> {
  declare id: CreationOptional<number>
  declare orderId: number
  declare amountCents: number
  declare lineIds: CreationOptional<number[] | null> // whole lines given back; null for an amount
  declare reason: string
  declare state: CreationOptional<'asked' | 'done' | 'failed'>
  declare stripeRefundId: CreationOptional<string | null>
  declare idempotencyKey: string
  declare authorId: CreationOptional<number | null>
  declare createdAt: CreationOptional<Date>

  declare author?: NonAttribute<User>
  declare order?: NonAttribute<Order>
}

export const initRefund = (sequelize: Sequelize) =>
  Refund.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      orderId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      amountCents: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      lineIds: { type: DataTypes.JSON, allowNull: true },
      reason: { type: DataTypes.TEXT, allowNull: false },
      state: { type: DataTypes.STRING(10), allowNull: false, defaultValue: 'asked' },
      stripeRefundId: { type: DataTypes.STRING(190), allowNull: true },
      idempotencyKey: { type: DataTypes.STRING(80), allowNull: false },
      authorId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: true },
      createdAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'refunds', underscored: true, updatedAt: false },
  )
