/** A dated system limit of a wheelset. In force = the newest seconded or in-force row whose inForceFrom has come. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute, Sequelize } from 'sequelize'
import type { User } from './user.ts'
import type { Wheelset } from './wheelset.ts'

export type LimitState = 'drafted' | 'seconded' | 'in-force' | 'rejected'

export class LimitVersion extends Model<InferAttributes<LimitVersion>, InferCreationAttributes<LimitVersion>> {
  declare id: CreationOptional<number>
  declare wheelsetId: number
  declare limitKg: number // rider, kit, bike and luggage together
  declare proof: string
  declare reason: string
  declare state: LimitState
  declare draftedById: CreationOptional<number | null> // null for the demo seed
  declare secondedById: CreationOptional<number | null>
  declare inForceFrom: CreationOptional<Date | null>
  declare createdAt: CreationOptional<Date>

  declare wheelset?: NonAttribute<Wheelset>
  declare draftedBy?: NonAttribute<User>
  declare secondedBy?: NonAttribute<User>
}

export const initLimitVersion = (sequelize: Sequelize) =>
  LimitVersion.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      wheelsetId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      limitKg: { type: DataTypes.DOUBLE, allowNull: false },
      proof: { type: DataTypes.TEXT, allowNull: false },
      reason: { type: DataTypes.TEXT, allowNull: false },
      state: { type: DataTypes.STRING(20), allowNull: false },
      draftedById: { type: DataTypes.INTEGER.UNSIGNED, allowNull: true },
      secondedById: { type: DataTypes.INTEGER.UNSIGNED, allowNull: true },
      inForceFrom: { type: DataTypes.DATE(3), allowNull: true },
      createdAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'limit_versions', underscored: true, updatedAt: false },
  )
