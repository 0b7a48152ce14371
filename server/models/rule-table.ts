/** A dated version of a table that the sums use, with where it comes from. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute, Sequelize } from 'sequelize'
import type { User } from './user.ts'

export class RuleTable extends Model<InferAttributes<RuleTable>, InferCreationAttributes<RuleTable>> {
  declare id: CreationOptional<number>
  declare name: string
  declare version: string
  /** Null only while it is a draft: from the moment it is seconded. */
  declare inForceFrom: CreationOptional<Date | null>
  declare data: unknown
  declare source: string
  declare label: 'read' | 'memory' | 'derived' | 'practice'
  declare state: CreationOptional<'drafted' | 'seconded' | 'in-force' | 'rejected'>
  declare reason: CreationOptional<string>
  /** The version that this one was written over. */
  declare basedOn: CreationOptional<string | null>
  declare draftedById: CreationOptional<number | null> // null for the demo seed
  declare secondedById: CreationOptional<number | null>
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>

  declare draftedBy?: NonAttribute<User>
  declare secondedBy?: NonAttribute<User>
}

export const initRuleTable = (sequelize: Sequelize) =>
  RuleTable.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      name: { type: DataTypes.STRING(80), allowNull: false },
      version: { type: DataTypes.STRING(20), allowNull: false },
      inForceFrom: { type: DataTypes.DATE(3), allowNull: true },
      data: { type: DataTypes.JSON, allowNull: false },
      source: { type: DataTypes.TEXT, allowNull: false },
      label: { type: DataTypes.STRING(10), allowNull: false },
      state: { type: DataTypes.STRING(20), allowNull: false, defaultValue: 'in-force' },
      reason: { type: DataTypes.TEXT, allowNull: false, defaultValue: '' },
      basedOn: { type: DataTypes.STRING(20), allowNull: true },
      draftedById: { type: DataTypes.INTEGER.UNSIGNED, allowNull: true },
      secondedById: { type: DataTypes.INTEGER.UNSIGNED, allowNull: true },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'rule_tables', underscored: true },
  )
