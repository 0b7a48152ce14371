/** A rim as the product desk lists it. Measures in mm, bar and g. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class Rim extends Model<InferAttributes<Rim>, InferCreationAttributes<Rim>> {
  declare id: CreationOptional<number>
  declare code: string
  declare name: string
  declare material: 'carbon' | 'alloy'
  declare beadSeatMm: number
  declare depthMm: number
  declare innerWidthMm: number
  declare outerWidthMm: number
  declare seat: 'hooked' | 'hookless'
  declare brake: 'rim' | 'disc'
  declare maxPressureBar: number
  declare tyreMinMm: number
  declare tyreMaxMm: number
  declare massG: number
  declare nippleSeatDiameterMm: number // twice the radius at which the nipple heads sit
  declare offsetMm: CreationOptional<number> // nipple line off the centre plane, negative = moved to the left
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>
}

export const initRim = (sequelize: Sequelize) =>
  Rim.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      code: { type: DataTypes.STRING(40), allowNull: false },
      name: { type: DataTypes.STRING(80), allowNull: false },
      material: { type: DataTypes.STRING(10), allowNull: false },
      beadSeatMm: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      depthMm: { type: DataTypes.DOUBLE, allowNull: false },
      innerWidthMm: { type: DataTypes.DOUBLE, allowNull: false },
      outerWidthMm: { type: DataTypes.DOUBLE, allowNull: false },
      seat: { type: DataTypes.STRING(10), allowNull: false },
      brake: { type: DataTypes.STRING(10), allowNull: false },
      maxPressureBar: { type: DataTypes.DOUBLE, allowNull: false },
      tyreMinMm: { type: DataTypes.DOUBLE, allowNull: false },
      tyreMaxMm: { type: DataTypes.DOUBLE, allowNull: false },
      massG: { type: DataTypes.DOUBLE, allowNull: false },
      nippleSeatDiameterMm: { type: DataTypes.DOUBLE, allowNull: false },
      offsetMm: { type: DataTypes.DOUBLE, allowNull: false, defaultValue: 0 },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'rims', underscored: true },
  )
