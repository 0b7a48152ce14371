/** Pairs of wheels on the shelf; reserved ones are promised to orders. Free to sell = onHand - reserved. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class Stock extends Model<InferAttributes<Stock>, InferCreationAttributes<Stock>> {
  declare wheelsetId: number
  declare onHand: number
  declare reserved: CreationOptional<number>
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>
}

export const initStock = (sequelize: Sequelize) =>
  Stock.init(
    {
      wheelsetId: { type: DataTypes.INTEGER.UNSIGNED, primaryKey: true },
      onHand: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      reserved: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false, defaultValue: 0 },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'stock', underscored: true },
  )
