/** A dated price in minor units. EUR and GBP include VAT, USD excludes tax. The newest validFrom that has come counts. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class Price extends Model<InferAttributes<Price>, InferCreationAttributes<Price>> {
  declare id: CreationOptional<number>
  declare wheelsetId: number
  declare currency: 'EUR' | 'GBP' | 'USD'
  declare priceCents: number
  declare validFrom: Date
  declare createdAt: CreationOptional<Date>
}

export const initPrice = (sequelize: Sequelize) =>
  Price.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      wheelsetId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      currency: { type: DataTypes.CHAR(3), allowNull: false },
      priceCents: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      validFrom: { type: DataTypes.DATE(3), allowNull: false },
      createdAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'prices', underscored: true, updatedAt: false },
  )
