/** Starts every model on one connection and joins them. Call once for each Sequelize instance, before the first query. */
import type { Sequelize } from 'sequelize'
import { AdviceSnapshot, initAdviceSnapshot } from './advice-snapshot.ts'
import { initAuditRow } from './audit-row.ts'
import { Basket, initBasket } from './basket.ts'
import { BasketLine, initBasketLine } from './basket-line.ts'
import { Bike, initBike } from './bike.ts'
import { initDemoMarker } from './demo-marker.ts'
import { Hub, initHub } from './hub.ts'
import { initIdempotencyKey } from './idempotency-key.ts'
import { LedgerEntry, initLedgerEntry } from './ledger-entry.ts'
import { LimitVersion, initLimitVersion } from './limit-version.ts'
import { initMarket } from './market.ts'
import { Order, initOrder } from './order.ts'
import { OrderEvent, initOrderEvent } from './order-event.ts'
import { OrderLine, initOrderLine } from './order-line.ts'
import { OutboxMail, initOutboxMail } from './outbox-mail.ts'
import { Price, initPrice } from './price.ts'
import { Refund, initRefund } from './refund.ts'
import { Rim, initRim } from './rim.ts'
import { initRuleTable, RuleTable } from './rule-table.ts'
import { Session, initSession } from './session.ts'
import { Spoke, initSpoke } from './spoke.ts'
import { Stock, initStock } from './stock.ts'
import { User, initUser } from './user.ts'
import { initWebhookEvent } from './webhook-event.ts'
import { Wheelset, initWheelset } from './wheelset.ts'
import { WheelsetText, initWheelsetText } from './wheelset-text.ts'
import { WheelsetWheel, initWheelsetWheel } from './wheelset-wheel.ts'

export function initModels(sequelize: Sequelize) {
  for (const init of [
    initRim,
    initHub,
    initSpoke,
    initWheelset,
    initWheelsetWheel,
    initWheelsetText,
    initLimitVersion,
    initPrice,
    initMarket,
    initStock,
    initUser,
    initSession,
    initBike,
    initAdviceSnapshot,
    initBasket,
    initBasketLine,
    initOrder,
    initOrderLine,
    initOrderEvent,
    initLedgerEntry,
    initRefund,
    initWebhookEvent,
    initIdempotencyKey,
    initOutboxMail,
    initAuditRow,
    initRuleTable,
    initDemoMarker,
  ]) {
    init(sequelize)
  }
  joinCatalogue()
  joinPeople()
  joinBaskets()
  joinOrders()
}

function joinCatalogue() {
  Wheelset.hasMany(WheelsetWheel, { as: 'wheels', foreignKey: 'wheelsetId' })
  WheelsetWheel.belongsTo(Wheelset, { as: 'wheelset', foreignKey: 'wheelsetId' })
  WheelsetWheel.belongsTo(Rim, { as: 'rim', foreignKey: 'rimId' })
  WheelsetWheel.belongsTo(Hub, { as: 'hub', foreignKey: 'hubId' })
  WheelsetWheel.belongsTo(Spoke, { as: 'spoke', foreignKey: 'spokeId' })
  Wheelset.hasMany(WheelsetText, { as: 'texts', foreignKey: 'wheelsetId' })
  Wheelset.hasMany(Price, { as: 'prices', foreignKey: 'wheelsetId' })
  Wheelset.hasOne(Stock, { as: 'stock', foreignKey: 'wheelsetId' })
  Wheelset.hasMany(LimitVersion, { as: 'limits', foreignKey: 'wheelsetId' })
  LimitVersion.belongsTo(Wheelset, { as: 'wheelset', foreignKey: 'wheelsetId' })
  LimitVersion.belongsTo(User, { as: 'draftedBy', foreignKey: 'draftedById' })
  LimitVersion.belongsTo(User, { as: 'secondedBy', foreignKey: 'secondedById' })
  RuleTable.belongsTo(User, { as: 'draftedBy', foreignKey: 'draftedById' })
  RuleTable.belongsTo(User, { as: 'secondedBy', foreignKey: 'secondedById' })
}

function joinPeople() {
  User.hasMany(Bike, { as: 'bikes', foreignKey: 'userId' })
  Session.belongsTo(User, { as: 'user', foreignKey: 'userId' })
}

function joinBaskets() {
  Basket.hasMany(BasketLine, { as: 'lines', foreignKey: 'basketId' })
  Basket.belongsTo(AdviceSnapshot, { as: 'advice', foreignKey: 'adviceId' })
  BasketLine.belongsTo(Wheelset, { as: 'wheelset', foreignKey: 'wheelsetId' })
  BasketLine.belongsTo(AdviceSnapshot, { as: 'advice', foreignKey: 'adviceId' })
}

function joinOrders() {
  Order.hasMany(OrderLine, { as: 'lines', foreignKey: 'orderId' })
  Order.hasMany(OrderEvent, { as: 'events', foreignKey: 'orderId' })
  Order.hasMany(LedgerEntry, { as: 'ledger', foreignKey: 'orderId' })
  Order.hasMany(Refund, { as: 'refunds', foreignKey: 'orderId' })
  Order.hasMany(OutboxMail, { as: 'mails', foreignKey: 'orderId' })
  Order.belongsTo(User, { as: 'user', foreignKey: 'userId' })
  OrderLine.belongsTo(Order, { as: 'order', foreignKey: 'orderId' })
  OrderLine.belongsTo(Wheelset, { as: 'wheelset', foreignKey: 'wheelsetId' })
  OrderLine.belongsTo(AdviceSnapshot, { as: 'advice', foreignKey: 'adviceId' })
  OrderEvent.belongsTo(User, { as: 'actor', foreignKey: 'actorId' })
  Refund.belongsTo(Order, { as: 'order', foreignKey: 'orderId' })
  Refund.belongsTo(User, { as: 'author', foreignKey: 'authorId' })
  OutboxMail.belongsTo(Order, { as: 'order', foreignKey: 'orderId' })
}
