/** The facts of one bike that a rider keeps. null = not known, so not checked. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class Bike extends Model<InferAttributes<Bike>, InferCreationAttributes<Bike>> {
  declare id: CreationOptional<number>
  declare userId: number
  declare name: string
  declare brakes: CreationOptional<'rim' | 'disc' | null>
  declare beadSeatMm: CreationOptional<number | null>
  declare frontAxle: CreationOptional<string | null>
  declare rearAxle: CreationOptional<string | null>
  declare freehub: CreationOptional<string | null>
  declare rotorMount: CreationOptional<'centre-lock' | 'six-bolt' | null>
  declare maxTyreMm: CreationOptional<number | null>
  declare caliperOpeningMm: CreationOptional<number | null>
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>
}

export const initBike = (sequelize: Sequelize) =>
  Bike.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      userId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      name: { type: DataTypes.STRING(60), allowNull: false },
      brakes: { type: DataTypes.STRING(10), allowNull: true },
      beadSeatMm: { type: DataTypes.INTEGER.UNSIGNED, allowNull: true },
      frontAxle: { type: DataTypes.STRING(20), allowNull: true },
      rearAxle: { type: DataTypes.STRING(20), allowNull: true },
      freehub: { type: DataTypes.STRING(30), allowNull: true },
      rotorMount: { type: DataTypes.STRING(20), allowNull: true },
      maxTyreMm: { type: DataTypes.DOUBLE, allowNull: true },
      caliperOpeningMm: { type: DataTypes.DOUBLE, allowNull: true },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'bikes', underscored: true },
  )
