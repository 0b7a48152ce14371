/** A dated version of a table that the sums use, with where it comes from. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class RuleTable extends Model<InferAttributes<RuleTable>, InferCreationAttributes<RuleTable>> {
  declare id: CreationOptional<number>
  declare name: string
  declare version: string
  declare inForceFrom: Date
  declare data: unknown
  declare source: string
  declare label: 'read' | 'memory' | 'derived' | 'practice'
  declare state: CreationOptional<'drafted' | 'seconded' | 'in-force' | 'rejected'>
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>
}

export const initRuleTable = (sequelize: Sequelize) =>
  RuleTable.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      name: { type: DataTypes.STRING(80), allowNull: false },
      version: { type: DataTypes.STRING(20), allowNull: false },
      inForceFrom: { type: DataTypes.DATE(3), allowNull: false },
      data: { type: DataTypes.JSON, allowNull: false },
      source: { type: DataTypes.TEXT, allowNull: false },
      label: { type: DataTypes.STRING(10), allowNull: false },
      state: { type: DataTypes.STRING(20), allowNull: false, defaultValue: 'in-force' },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'rule_tables', underscored: true },
  )
