/** What happened to an order, when and by whom. Rows are only added. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute, Sequelize } from 'sequelize'
import type { OrderState } from '#contract/checkout.ts'
import type { User } from './user.ts'

export class OrderEvent extends Model<InferAttributes<OrderEvent>, InferCreationAttributes<OrderEvent>> {
  declare id: CreationOptional<number>
  declare orderId: number
  declare kind: string
  declare fromState: CreationOptional<OrderState | null>
  declare toState: CreationOptional<OrderState | null>
  declare actorId: CreationOptional<number | null>
  declare actorRole: string // a role, or 'buyer' or 'machine'
  declare reason: CreationOptional<string | null>
  declare data: CreationOptional<Record<string, unknown> | null>
  declare createdAt: CreationOptional<Date>

  declare actor?: NonAttribute<User>
}

export const initOrderEvent = (sequelize: Sequelize) =>
  OrderEvent.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      orderId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      kind: { type: DataTypes.STRING(40), allowNull: false },
      fromState: { type: DataTypes.STRING(20), allowNull: true },
      toState: { type: DataTypes.STRING(20), allowNull: true },
      actorId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: true },
      actorRole: { type: DataTypes.STRING(20), allowNull: false },
      reason: { type: DataTypes.TEXT, allowNull: true },
      data: { type: DataTypes.JSON, allowNull: true },
      createdAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'order_events', underscored: true, updatedAt: false },
  )
