/** One purchase. Money in minor units: goods + delivery = total with tax inside, or plus tax where the market excludes it. */
import type { OrderState } from '#contract/checkout.ts'
import { DataTypes, Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute, Sequelize } from 'sequelize'
import type { LedgerEntry } from './ledger-entry.ts'
import type { OrderEvent } from './order-event.ts'
import type { OrderLine } from './order-line.ts'
import type { OutboxMail } from './outbox-mail.ts'
import type { Refund } from './refund.ts'
import type { User } from './user.ts'

export interface DeliveryAddress {
  name: string
  line1: string
  line2?: string
  postcode: string
  city: string
  region?: string
  country: string
  phone?: string
}

export class Order extends Model<InferAttributes<Order>, InferCreationAttributes<Order>> {
  declare id: CreationOptional<number>
  declare number: string
  declare basketId: CreationOptional<string | null>
  declare userId: CreationOptional<number | null>
  declare email: string
  declare name: string
  declare locale: 'en' | 'pt'
  declare market: string
  declare currency: 'EUR' | 'GBP' | 'USD'
  declare delivery: DeliveryAddress
  declare postcode: string // copied from delivery for the desk's search
  declare state: CreationOptional<OrderState>
  declare goodsCents: number
  declare deliveryCents: number
  declare taxCents: number
  declare totalCents: number
  declare tokenHash: string // SHA-256 of the token in the order link
  declare stripeSessionId: CreationOptional<string | null>
  declare stripePaymentIntent: CreationOptional<string | null>
  declare payUrl: CreationOptional<string | null>
  declare holdExpiresAt: CreationOptional<Date | null>
  declare placedAt: CreationOptional<Date | null>
  declare adviceSummary: CreationOptional<string | null>
  declare createdAt: CreationOptional<Date>
  declare updatedAt: CreationOptional<Date>

  declare lines?: NonAttribute<OrderLine[]>
  declare events?: NonAttribute<OrderEvent[]>
  declare ledger?: NonAttribute<LedgerEntry[]>
  declare refunds?: NonAttribute<Refund[]>
  declare mails?: NonAttribute<OutboxMail[]>
  declare user?: NonAttribute<User>
}

export const initOrder = (sequelize: Sequelize) =>
  Order.init(
    {
      id: { type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true },
      number: { type: DataTypes.STRING(20), allowNull: false },
      basketId: { type: DataTypes.CHAR(36), allowNull: true },
      userId: { type: DataTypes.INTEGER.UNSIGNED, allowNull: true },
      email: { type: DataTypes.STRING(190), allowNull: false },
      name: { type: DataTypes.STRING(120), allowNull: false },
      locale: { type: DataTypes.STRING(5), allowNull: false },
      market: { type: DataTypes.CHAR(2), allowNull: false },
      currency: { type: DataTypes.CHAR(3), allowNull: false },
      delivery: { type: DataTypes.JSON, allowNull: false },
      postcode: { type: DataTypes.STRING(20), allowNull: false },
      state: { type: DataTypes.STRING(20), allowNull: false, defaultValue: 'holding' },
      goodsCents: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      deliveryCents: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      taxCents: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      totalCents: { type: DataTypes.INTEGER.UNSIGNED, allowNull: false },
      tokenHash: { type: DataTypes.CHAR(64), allowNull: false },
      stripeSessionId: { type: DataTypes.STRING(190), allowNull: true },
      stripePaymentIntent: { type: DataTypes.STRING(190), allowNull: true },
      payUrl: { type: DataTypes.TEXT, allowNull: true },
      holdExpiresAt: { type: DataTypes.DATE(3), allowNull: true },
      placedAt: { type: DataTypes.DATE(3), allowNull: true },
      adviceSummary: { type: DataTypes.STRING(500), allowNull: true },
      createdAt: DataTypes.DATE(3),
      updatedAt: DataTypes.DATE(3),
    },
    { sequelize, tableName: 'orders', underscored: true },
  )
