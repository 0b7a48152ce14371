/** What a wheelset is called and described as in one language. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class WheelsetText extends Model<InferAttributes<WheelsetText>, InferCreationAttributes<WheelsetText>> {
  declare id: CreationOptional<number>
  declare wheelsetId: number
  declare locale: 'en' | 'pt'
  declare tagline: string
  declare description: string
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>
}

export const initWheelsetText = (sequelize: Sequelize) =>
  WheelsetText.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      wheelsetId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      locale: { type: DataTypes.STRING(5), allowNull: false },
      tagline: { type: DataTypes.STRING(200), allowNull: false },
      description: { type: DataTypes.TEXT, allowNull: false },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'wheelset_texts', underscored: true },
  )
