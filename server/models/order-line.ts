/** One wheelset in an order, with its name, price and limit as they stood when it was ordered. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute, Sequelize } from 'sequelize'
import type { AdviceSnapshot } from './advice-snapshot.ts'
import type { LineOptions } from './basket-line.ts'
import type { OrderState } from '#contract/checkout.ts'
import type { Order } from './order.ts'
import type { Wheelset } from './wheelset.ts'

export class OrderLine extends Model<InferAttributes<OrderLine>, InferCreationAttributes<OrderLine>> {
  declare id: CreationOptional<number>
  declare orderId: number
  declare wheelsetId: number
  declare sku: string
  declare title: string
  declare quantity: number
  declare unitCents: number
  declare lineCents: number
  declare taxCents: number
  declare options: LineOptions
  declare state: CreationOptional<OrderState>
  declare adviceId: CreationOptional<string | null>
  declare limitCheck: 'within' | 'no-margin' | 'unconfirmed'
  declare limitKg: number
  declare returnRight: CreationOptional<'yes'>
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>

  declare order?: NonAttribute<Order>
  declare wheelset?: NonAttribute<Wheelset>
  declare advice?: NonAttribute<AdviceSnapshot>
}

export const initOrderLine = (sequelize: Sequelize) =>
  OrderLine.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      orderId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      wheelsetId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      sku: { type: DataTypes.STRING(40), allowNull: false },
      title: { type: DataTypes.STRING(120), allowNull: false },
      quantity: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      unitCents: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      lineCents: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      taxCents: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      options: { type: DataTypes.JSON, allowNull: false },
      state: { type: DataTypes.STRING(20), allowNull: false, defaultValue: 'holding' },
      adviceId: { type: DataTypes.CHAR(36), allowNull: true },
      limitCheck: { type: DataTypes.STRING(20), allowNull: false },
      limitKg: { type: DataTypes.DOUBLE, allowNull: false },
      returnRight: { type: DataTypes.STRING(10), allowNull: false, defaultValue: 'yes' },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'order_lines', underscored: true },
  )
