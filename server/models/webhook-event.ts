/** An event that the payment service sent, kept so that each is worked on once. */
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'

export class WebhookEvent extends Model<InferAttributes<WebhookEvent>, InferCreationAttributes<WebhookEvent>> {
  declare eventId: string
  declare type: string
  declare objectId: CreationOptional<string | null>
  declare created: Date // when the payment service made it
  declare payload: Record<string, unknown>
  declare receivedAt: Date
}

export const initWebhookEvent = (sequelize: Sequelize) =>
  WebhookEvent.init(
    {
      eventId: { type: DataTypes.STRING(255), primaryKey: true },
      type: { type: DataTypes.STRING(80), allowNull: false },
      objectId: { type: DataTypes.STRING(190), allowNull: true },
      created: { type: DataTypes.DATE(3), allowNull: false },
      payload: { type: DataTypes.JSON, allowNull: false },
      receivedAt: { type: DataTypes.DATE(3), allowNull: false },
    },
    { sequelize, tableName: 'webhook_events', underscored: true, timestamps: false },
  )
