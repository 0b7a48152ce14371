/** One wheelset in a basket with the fittings picked for it. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute, Sequelize } from 'sequelize'
import type { AdviceSnapshot } from './advice-snapshot.ts'
import type { Wheelset } from './wheelset.ts'

/** Which axle, gear body and rotor mount the buyer picked; null where the hub leaves no choice. */
export interface LineOptions {
  frontAxle?: string | null | undefined
  rearAxle?: string | null | undefined
  freehub?: string | null | undefined
  rotorMount?: string | null | undefined
}

export class BasketLine extends Model<InferAttributes<BasketLine>, InferCreationAttributes<BasketLine>> {
  declare id: CreationOptional<number>
  declare basketId: string
  declare wheelsetId: number
  declare quantity: number
  declare options: LineOptions
  declare adviceId: CreationOptional<string | null>
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>

  declare wheelset?: NonAttribute<Wheelset>
  declare advice?: NonAttribute<AdviceSnapshot>
}

export const initBasketLine = (sequelize: Sequelize) =>
  BasketLine.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      basketId: { type: DataTypes.CHAR(36), allowNull: false },
      wheelsetId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      quantity: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      options: { type: DataTypes.JSON, allowNull: false },
      adviceId: { type: DataTypes.CHAR(36), allowNull: true },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'basket_lines', underscored: true },
  )
