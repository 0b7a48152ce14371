/** What a shopper has picked. adviceId keeps the last advice seen, so that a line cannot drop it. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute, Sequelize } from 'sequelize'
import type { AdviceSnapshot } from './advice-snapshot.ts'
import type { BasketLine } from './basket-line.ts'

export class Basket extends Model<InferAttributes<Basket>, InferCreationAttributes<Basket>> {
  declare id: string // UUID
  declare userId: CreationOptional<number | null>
  declare market: string
  declare currency: 'EUR' | 'GBP' | 'USD'
  declare locale: 'en' | 'pt'
  declare adviceId: CreationOptional<string | null>
  declare state: CreationOptional<'open' | 'ordered'>
  declare version: CreationOptional<number>
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>

  declare lines?: NonAttribute<BasketLine[]>
  declare advice?: NonAttribute<AdviceSnapshot>
}

export const initBasket = (sequelize: Sequelize) =>
  Basket.init(
    {
      id: { type: DataTypes.CHAR(36), primaryKey: true },
      userId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: true },
      market: { type: DataTypes.CHAR(2), allowNull: false },
      currency: { type: DataTypes.CHAR(3), allowNull: false },
      locale: { type: DataTypes.STRING(5), allowNull: false },
      adviceId: { type: DataTypes.CHAR(36), allowNull: true },
      state: { type: DataTypes.STRING(10), allowNull: false, defaultValue: 'open' },
      version: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false, defaultValue: 1 },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'baskets', underscored: true },
  )
