/** A write by staff: who, what, why, before and after. Rows are only added. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class AuditRow extends Model<InferAttributes<AuditRow>, InferCreationAttributes<AuditRow>> {
  declare id: CreationOptional<number>
  declare actorId: CreationOptional<number | null>
  declare actorName: string
  declare actorRole: string
  declare action: string
  declare subjectType: string
  declare subjectId: string
  declare reason: string
  declare before: CreationOptional<Record<string, unknown> | null>
  declare after: CreationOptional<Record<string, unknown> | null>
  declare createdAt: CreationOptional<Date>
}

export const initAuditRow = (sequelize: Sequelize) =>
  AuditRow.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      actorId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: true },
      actorName: { type: DataTypes.STRING(120), allowNull: false },
      actorRole: { type: DataTypes.STRING(20), allowNull: false },
      action: { type: DataTypes.STRING(60), allowNull: false },
      subjectType: { type: DataTypes.STRING(40), allowNull: false },
      subjectId: { type: DataTypes.STRING(64), allowNull: false },
      reason: { type: DataTypes.TEXT, allowNull: false },
      before: { type: DataTypes.JSON, allowNull: true },
      after: { type: DataTypes.JSON, allowNull: true },
      createdAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'audit_rows', underscored: true, updatedAt: false },
  )
