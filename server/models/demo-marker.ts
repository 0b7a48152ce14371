/** One row that says the database holds invented demo data. */
import { DataTypes, Model } from 'sequelize'
import type { InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class DemoMarker extends Model<InferAttributes<DemoMarker>, InferCreationAttributes<DemoMarker>> {
  declare id: number
  declare note: string
  declare seededAt: Date
}

export const initDemoMarker = (sequelize: Sequelize) =>
  DemoMarker.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, primaryKey: true },
      note: { type: DataTypes.STRING(250), allowNull: false },
      seededAt: { type: DataTypes.DATE(3), allowNull: false },
    },
    { sequelize, tableName: 'demo_marker', underscored: true, timestamps: false },
  )
