/** A mail to send, written with the change that causes it and sent after that change is committed. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute, Sequelize } from 'sequelize'
import type { Order } from './order.ts'

export class OutboxMail extends Model<InferAttributes<OutboxMail>, InferCreationAttributes<OutboxMail>> {
  declare id: CreationOptional<number>
  declare orderId: CreationOptional<number | null>
  declare kind: string
  declare ref: string // with kind: what the mail is about, once
  declare recipient: string
  declare locale: 'en' | 'pt'
  declare subject: string
  declare text: string
  declare html: string
  declare state: CreationOptional<'queued' | 'sent' | 'failed'>
  declare attempts: CreationOptional<number>
  declare nextTryAt: CreationOptional<Date | null>
  declare sentAt: CreationOptional<Date | null>
  declare lastError: CreationOptional<string | null>
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>

  declare order?: NonAttribute<Order>
}

export const initOutboxMail = (sequelize: Sequelize) =>
  OutboxMail.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      orderId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: true },
      kind: { type: DataTypes.STRING(40), allowNull: false },
      ref: { type: DataTypes.STRING(120), allowNull: false },
      recipient: { type: DataTypes.STRING(190), allowNull: false },
      locale: { type: DataTypes.STRING(5), allowNull: false },
      subject: { type: DataTypes.STRING(250), allowNull: false },
      text: { type: DataTypes.TEXT, allowNull: false },
      html: { type: DataTypes.TEXT, allowNull: false },
      state: { type: DataTypes.STRING(10), allowNull: false, defaultValue: 'queued' },
      attempts: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false, defaultValue: 0 },
      nextTryAt: { type: DataTypes.DATE(3), allowNull: true },
      sentAt: { type: DataTypes.DATE(3), allowNull: true },
      lastError: { type: DataTypes.STRING(500), allowNull: true },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'outbox_mails', underscored: true },
  )
