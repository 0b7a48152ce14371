/** A hub. PCD = pitch-circle diameter of the spoke holes; flange = centre plane to flange; all mm. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class Hub extends Model<InferAttributes<Hub>, InferCreationAttributes<Hub>> {
  declare id: CreationOptional<number>
  declare code: string
  declare name: string
  declare position: 'front' | 'rear'
  declare brake: 'rim' | 'disc'
  declare axles: string[]
  declare freehubs: string[] // empty on a front hub
  declare rotorMount: CreationOptional<'centre-lock' | 'six-bolt' | null>
  declare pcdLeftMm: number
  declare pcdRightMm: number
  declare flangeLeftMm: number
  declare flangeRightMm: number
  declare assistRated: CreationOptional<boolean>
  declare maxAxleLoadKg: CreationOptional<number | null> // most that this axle carries; null where its maker states none
  declare massG: number
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>
}

export const initHub = (sequelize: Sequelize) =>
  Hub.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      code: { type: DataTypes.STRING(40), allowNull: false },
      name: { type: DataTypes.STRING(80), allowNull: false },
      position: { type: DataTypes.STRING(10), allowNull: false },
      brake: { type: DataTypes.STRING(10), allowNull: false },
      axles: { type: DataTypes.JSON, allowNull: false },
      freehubs: { type: DataTypes.JSON, allowNull: false },
      rotorMount: { type: DataTypes.STRING(20), allowNull: true },
      pcdLeftMm: { type: DataTypes.DOUBLE, allowNull: false },
      pcdRightMm: { type: DataTypes.DOUBLE, allowNull: false },
      flangeLeftMm: { type: DataTypes.DOUBLE, allowNull: false },
      flangeRightMm: { type: DataTypes.DOUBLE, allowNull: false },
      assistRated: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
      maxAxleLoadKg: { type: DataTypes.DOUBLE, allowNull: true },
      massG: { type: DataTypes.DOUBLE, allowNull: false },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'hubs', underscored: true },
  )
