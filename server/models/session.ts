/** A browser that is signed in or has a basket. The cookie value itself is never stored, only its SHA-256. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class Session extends Model<InferAttributes<Session>, InferCreationAttributes<Session>> {
  declare sidHash: string
  declare userId: CreationOptional<number | null>
  declare data: Record<string, unknown>
  declare expiresAt: Date
}

export const initSession = (sequelize: Sequelize) =>
  Session.init(
    {
      sidHash: { type: DataTypes.CHAR(64), primaryKey: true },
      userId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: true },
      data: { type: DataTypes.JSON, allowNull: false },
      expiresAt: { type: DataTypes.DATE(3), allowNull: false },
    },
    { sequelize, tableName: 'sessions', underscored: true, timestamps: false },
  )
