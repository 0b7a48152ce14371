/** A country we deliver to, by ISO 3166-1 code. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class Market extends Model<InferAttributes<Market>, InferCreationAttributes<Market>> {
  declare code: string
  declare currency: 'EUR' | 'GBP' | 'USD'
  declare vatPercentBp: number // basis points, 2300 = 23 %
  declare taxIncluded: boolean
  declare deliveryCents: number
  declare deliveryDaysFrom: number
  declare deliveryDaysTo: number
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>
}

export const initMarket = (sequelize: Sequelize) =>
  Market.init(
    {
      code: { type: DataTypes.CHAR(2), primaryKey: true },
      currency: { type: DataTypes.CHAR(3), allowNull: false },
      vatPercentBp: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      taxIncluded: { type: DataTypes.BOOLEAN, allowNull: false },
      deliveryCents: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      deliveryDaysFrom: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      deliveryDaysTo: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'markets', underscored: true },
  )
