/** A pair of wheels on sale. Its limit, prices, texts and stock are dated or counted in their own tables. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute, Sequelize } from 'sequelize'
import type { LimitVersion } from './limit-version.ts'
import type { Price } from './price.ts'
import type { Stock } from './stock.ts'
import type { WheelsetText } from './wheelset-text.ts'
import type { WheelsetWheel } from './wheelset-wheel.ts'

export class Wheelset extends Model<InferAttributes<Wheelset>, InferCreationAttributes<Wheelset>> {
  declare id: CreationOptional<number>
  declare sku: string
  declare slug: string
  declare name: string
  declare timber: string
  declare brake: 'rim' | 'disc'
  declare beadSeatMm: number
  declare rides: string[] // ride values of the advisor's contract for which it may be offered
  declare useCondition: number // ASTM F2043, 1 to 5
  declare assistRated: CreationOptional<boolean>
  declare buildKind: 'shelf' | 'bench'
  declare onSale: CreationOptional<boolean>
  declare version: CreationOptional<number> // counted up by each edit; an edit that names an older version is refused
  declare inventedNote: CreationOptional<string | null> // set on demo rows only
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>

  declare wheels?: NonAttribute<WheelsetWheel[]>
  declare texts?: NonAttribute<WheelsetText[]>
  declare limits?: NonAttribute<LimitVersion[]>
  declare prices?: NonAttribute<Price[]>
  declare stock?: NonAttribute<Stock>
}

export const initWheelset = (sequelize: Sequelize) =>
  Wheelset.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      sku: { type: DataTypes.STRING(40), allowNull: false },
      slug: { type: DataTypes.STRING(60), allowNull: false },
      name: { type: DataTypes.STRING(80), allowNull: false },
      timber: { type: DataTypes.STRING(40), allowNull: false },
      brake: { type: DataTypes.STRING(10), allowNull: false },
      beadSeatMm: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      rides: { type: DataTypes.JSON, allowNull: false },
      useCondition: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      assistRated: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
      buildKind: { type: DataTypes.STRING(10), allowNull: false },
      onSale: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: true },
      version: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false, defaultValue: 1 },
      inventedNote: { type: DataTypes.STRING(120), allowNull: true },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'wheelsets', underscored: true },
  )
