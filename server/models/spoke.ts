/** A spoke. eaKn = tensile stiffness EA in kN; massG = one spoke of a usual length with its nipple. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class Spoke extends Model<InferAttributes<Spoke>, InferCreationAttributes<Spoke>> {
  declare id: CreationOptional<number>
  declare code: string
  declare name: string
  declare material: 'steel' | 'carbon'
  declare profile: string
  declare eaKn: number
  declare massG: number
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>
}

export const initSpoke = (sequelize: Sequelize) =>
  Spoke.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      code: { type: DataTypes.STRING(40), allowNull: false },
      name: { type: DataTypes.STRING(80), allowNull: false },
      material: { type: DataTypes.STRING(10), allowNull: false },
      profile: { type: DataTypes.STRING(40), allowNull: false },
      eaKn: { type: DataTypes.DOUBLE, allowNull: false },
      massG: { type: DataTypes.DOUBLE, allowNull: false },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'spokes', underscored: true },
  )
