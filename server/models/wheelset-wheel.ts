/** The front or the rear wheel of a wheelset: which parts, how many spokes, how laced, how tight. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute, Sequelize } from 'sequelize'
import type { WheelStrength } from '#core/rider-limits.ts'
import type { WheelStructure } from '#core/wheel-structure.ts'
import type { Hub } from './hub.ts'
import type { Rim } from './rim.ts'
import type { Spoke } from './spoke.ts'
import type { Wheelset } from './wheelset.ts'

export class WheelsetWheel extends Model<InferAttributes<WheelsetWheel>, InferCreationAttributes<WheelsetWheel>> {
  declare id: CreationOptional<number>
  declare wheelsetId: number
  declare position: 'front' | 'rear'
  declare rimId: number
  declare hubId: number
  declare spokeId: number
  declare spokeCount: number
  declare crossesLeft: number
  declare crossesRight: number
  declare tensionTightN: number // on the tighter side
  declare massG: number // whole wheel without rim tape
  declare designDigest: CreationOptional<string | null>
  declare strength: CreationOptional<WheelStrength | null> // what the criteria read
  declare structure: CreationOptional<WheelStructure | null> // all that the model found
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>

  declare wheelset?: NonAttribute<Wheelset>
  declare rim?: NonAttribute<Rim>
  declare hub?: NonAttribute<Hub>
  declare spoke?: NonAttribute<Spoke>
}

export const initWheelsetWheel = (sequelize: Sequelize) =>
  WheelsetWheel.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      wheelsetId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      position: { type: DataTypes.STRING(10), allowNull: false },
      rimId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      hubId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      spokeId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      spokeCount: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      crossesLeft: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      crossesRight: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      tensionTightN: { type: DataTypes.DOUBLE, allowNull: false },
      massG: { type: DataTypes.DOUBLE, allowNull: false },
      designDigest: { type: DataTypes.CHAR(16), allowNull: true },
      strength: { type: DataTypes.JSON, allowNull: true },
      structure: { type: DataTypes.JSON, allowNull: true },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'wheelset_wheels', underscored: true },
  )
