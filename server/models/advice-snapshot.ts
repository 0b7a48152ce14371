/** One fitting, frozen: the answers, the advice and the version of the rules. Never changed after it is written. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class AdviceSnapshot extends Model<InferAttributes<AdviceSnapshot>, InferCreationAttributes<AdviceSnapshot>> {
  declare id: string // UUID
  declare userId: CreationOptional<number | null>
  declare answers: Record<string, unknown>
  declare advice: Record<string, unknown>
  declare rulesVersion: string
  declare sha256: string // of the JSON text of answers and advice
  declare createdAt: CreationOptional<Date>
}

export const initAdviceSnapshot = (sequelize: Sequelize) =>
  AdviceSnapshot.init(
    {
      id: { type: DataTypes.CHAR(36), primaryKey: true },
      userId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: true },
      answers: { type: DataTypes.JSON, allowNull: false },
      advice: { type: DataTypes.JSON, allowNull: false },
      rulesVersion: { type: DataTypes.STRING(60), allowNull: false },
      sha256: { type: DataTypes.CHAR(64), allowNull: false },
      createdAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'advice_snapshots', underscored: true, updatedAt: false },
  )
