/** Somebody who signs in. An e-mail address is held once, whatever its upper and lower case. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class User extends Model<InferAttributes<User>, InferCreationAttributes<User>> {
  declare id: CreationOptional<number>
  declare email: string
  declare name: string
  declare role: 'rider' | 'support' | 'product' | 'admin'
  declare passwordHash: string
  declare locale: 'en' | 'pt'
  declare activeFrom: CreationOptional<Date | null>
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>
}

export const initUser = (sequelize: Sequelize) =>
  User.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      email: { type: DataTypes.STRING(190), allowNull: false },
      name: { type: DataTypes.STRING(120), allowNull: false },
      role: { type: DataTypes.STRING(10), allowNull: false },
      passwordHash: { type: DataTypes.STRING(255), allowNull: false },
      locale: { type: DataTypes.STRING(5), allowNull: false },
      activeFrom: { type: DataTypes.DATE(3), allowNull: true },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'users', underscored: true },
  )
