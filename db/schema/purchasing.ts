/** Suppliers and their offers, orders and their money, deliveries. Order money is minor units of the order's currency. */
import { sql } from 'drizzle-orm';
import {
  bigint,
  boolean,
  check,
  date,
  foreignKey,
  index,
  integer,
  jsonb,
  numeric,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { part } from './catalogue';
import { at, createdAt, ownWorkshopOnly, rowId, workshopId } from './columns';
import { bin, lot } from './stores';

const minor = (name: string) => bigint(name, { mode: 'number' });

export const supplier = pgTable(
  'supplier',
  {
    workshopId: workshopId(),
    id: rowId(),
    name: text('name').notNull(),
    email: text('email').notNull(),
    address: text('address').notNull().default(''),
    currency: text('currency').notNull(),
    /** Connected account at the payment service; null for suppliers who are paid on account. */
    paymentAccount: text('payment_account'),
    postageMinor: minor('postage_minor').notNull().default(0),
    /** Goods from this total go without postage; null: never. */
    postageFreeFromMinor: minor('postage_free_from_minor'),
    minimumOrderMinor: minor('minimum_order_minor').notNull().default(0),
    leadTimeDays: integer('lead_time_days').notNull().default(7),
    version: integer('version').notNull().default(1),
    retiredAt: at('retired_at'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    uniqueIndex('supplier_name_once').on(t.workshopId, t.name),
    check('supplier_currency', sql`${t.currency} ~ '^[A-Z]{3}$'`),
    check(
      'supplier_money',
      sql`${t.postageMinor} >= 0 and ${t.minimumOrderMinor} >= 0 and (${t.postageFreeFromMinor} is null or ${t.postageFreeFromMinor} >= 0)`,
    ),
    check('supplier_lead_time', sql`${t.leadTimeDays} between 0 and 730`),
    ownWorkshopOnly(),
  ],
).enableRLS();

export const offer = pgTable(
  'offer',
  {
    workshopId: workshopId(),
    id: rowId(),
    supplierId: uuid('supplier_id').notNull(),
    partId: uuid('part_id').notNull(),
    supplierCode: text('supplier_code').notNull(),
    orderMultiple: integer('order_multiple').notNull().default(1),
    minimumQuantity: integer('minimum_quantity').notNull().default(1),
    /** Overrides the supplier's own where set. */
    leadTimeDays: integer('lead_time_days'),
    retiredAt: at('retired_at'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.supplierId], foreignColumns: [supplier.workshopId, supplier.id] }),
    foreignKey({ columns: [t.workshopId, t.partId], foreignColumns: [part.workshopId, part.id] }),
    uniqueIndex('offer_code_once').on(t.workshopId, t.supplierId, t.supplierCode),
    index('offer_by_part').on(t.workshopId, t.partId),
    check('offer_quantities', sql`${t.orderMultiple} >= 1 and ${t.minimumQuantity} >= 1`),
    ownWorkshopOnly(),
  ],
).enableRLS();

export const offerBreak = pgTable(
  'offer_break',
  {
    workshopId: workshopId(),
    offerId: uuid('offer_id').notNull(),
    fromQuantity: integer('from_quantity').notNull(),
    unitPrice: numeric('unit_price', { precision: 18, scale: 6 }).notNull(),
  },
  (t) => [
    // Two breaks at one quantity can't be.
    primaryKey({ columns: [t.workshopId, t.offerId, t.fromQuantity] }),
    foreignKey({ columns: [t.workshopId, t.offerId], foreignColumns: [offer.workshopId, offer.id] }),
    check('offer_break_from', sql`${t.fromQuantity} >= 1`),
    check('offer_break_price', sql`${t.unitPrice} > 0`),
    ownWorkshopOnly(),
  ],
).enableRLS();

export const purchaseOrder = pgTable(
  'purchase_order',
  {
    workshopId: workshopId(),
    id: rowId(),
    number: text('number').notNull(),
    supplierId: uuid('supplier_id').notNull(),
    state: text('state').notNull().default('draft'),
    currency: text('currency').notNull(),
    goodsMinor: minor('goods_minor').notNull().default(0),
    postageMinor: minor('postage_minor').notNull().default(0),
    totalMinor: minor('total_minor').notNull().default(0),
    createdBy: uuid('created_by').notNull(),
    submittedBy: uuid('submitted_by'),
    approvedBy: uuid('approved_by'),
    sentAt: at('sent_at'),
    expectedOn: date('expected_on', { mode: 'string' }),
    note: text('note').notNull().default(''),
    version: integer('version').notNull().default(1),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.supplierId], foreignColumns: [supplier.workshopId, supplier.id] }),
    uniqueIndex('purchase_order_number_once').on(t.workshopId, t.number),
    index('purchase_order_by_state').on(t.workshopId, t.state),
    check(
      'purchase_order_total',
      sql`${t.totalMinor} = ${t.goodsMinor} + ${t.postageMinor} and ${t.goodsMinor} >= 0 and ${t.postageMinor} >= 0`,
    ),
    check(
      'purchase_order_state',
      sql`${t.state} in ('draft', 'submitted', 'approved', 'paid', 'on-account', 'sent', 'part-received', 'received', 'closed', 'cancelled')`,
    ),
    ownWorkshopOnly(),
  ],
).enableRLS();

export const orderLine = pgTable(
  'order_line',
  {
    workshopId: workshopId(),
    id: rowId(),
    orderId: uuid('order_id').notNull(),
    position: integer('position').notNull(),
    partId: uuid('part_id').notNull(),
    offerId: uuid('offer_id').notNull(),
    /** Frozen when the order is submitted, whatever the offer says later. */
    supplierCode: text('supplier_code').notNull(),
    description: text('description').notNull(),
    quantity: integer('quantity').notNull(),
    unitPrice: numeric('unit_price', { precision: 18, scale: 6 }).notNull(),
    totalMinor: minor('total_minor').notNull(),
    received: integer('received').notNull().default(0),
    /** Units that will not come and are not owed any more (short delivery settled, line cancelled). */
    cancelled: integer('cancelled').notNull().default(0),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.orderId], foreignColumns: [purchaseOrder.workshopId, purchaseOrder.id] }),
    foreignKey({ columns: [t.workshopId, t.partId], foreignColumns: [part.workshopId, part.id] }),
    foreignKey({ columns: [t.workshopId, t.offerId], foreignColumns: [offer.workshopId, offer.id] }),
    uniqueIndex('order_line_position_once').on(t.workshopId, t.orderId, t.position),
    index('order_line_by_part').on(t.workshopId, t.partId),
    check(
      'order_line_amounts',
      sql`${t.quantity} > 0 and ${t.received} >= 0 and ${t.cancelled} >= 0 and ${t.cancelled} <= ${t.quantity} and ${t.totalMinor} >= 0`,
    ),
    ownWorkshopOnly(),
  ],
).enableRLS();

/** One attempt to pay an order by card. The webhook, never the return page, makes it paid. */
export const payment = pgTable(
  'payment',
  {
    workshopId: workshopId(),
    id: rowId(),
    orderId: uuid('order_id').notNull(),
    attempt: integer('attempt').notNull(),
    state: text('state').notNull().default('started'),
    amountMinor: minor('amount_minor').notNull(),
    currency: text('currency').notNull(),
    checkoutSessionId: text('checkout_session_id'),
    paymentIntentId: text('payment_intent_id'),
    checkoutUrl: text('checkout_url'),
    lastProblem: text('last_problem'),
    paidAt: at('paid_at'),
    createdBy: uuid('created_by').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.orderId], foreignColumns: [purchaseOrder.workshopId, purchaseOrder.id] }),
    uniqueIndex('payment_attempt_once').on(t.workshopId, t.orderId, t.attempt),
    uniqueIndex('payment_session_once').on(t.workshopId, t.checkoutSessionId),
    check('payment_state', sql`${t.state} in ('started', 'open', 'declined', 'paid', 'abandoned', 'failed')`),
    check('payment_amount', sql`${t.amountMinor} > 0`),
    ownWorkshopOnly(),
  ],
).enableRLS();

export const refund = pgTable(
  'refund',
  {
    workshopId: workshopId(),
    id: rowId(),
    paymentId: uuid('payment_id').notNull(),
    amountMinor: minor('amount_minor').notNull(),
    reason: text('reason').notNull(),
    state: text('state').notNull().default('asked'),
    providerId: text('provider_id'),
    lastProblem: text('last_problem'),
    createdBy: uuid('created_by'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.paymentId], foreignColumns: [payment.workshopId, payment.id] }),
    check('refund_state', sql`${t.state} in ('asked', 'done', 'failed')`),
    check('refund_amount', sql`${t.amountMinor} > 0`),
    ownWorkshopOnly(),
  ],
).enableRLS();

/** Mails of an order to its supplier, with what was sent, for the order's page. */
export const orderMail = pgTable(
  'order_mail',
  {
    workshopId: workshopId(),
    id: rowId(),
    orderId: uuid('order_id').notNull(),
    messageId: text('message_id').notNull(),
    to: text('to').notNull(),
    subject: text('subject').notNull(),
    sentAt: at('sent_at'),
    detail: jsonb('detail').notNull().default({}),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.orderId], foreignColumns: [purchaseOrder.workshopId, purchaseOrder.id] }),
    uniqueIndex('order_mail_message_once').on(t.workshopId, t.messageId),
    ownWorkshopOnly(),
  ],
).enableRLS();

export const receipt = pgTable(
  'receipt',
  {
    workshopId: workshopId(),
    id: rowId(),
    number: text('number').notNull(),
    /** Null for a delivery without an order. */
    orderId: uuid('order_id'),
    supplierId: uuid('supplier_id'),
    deliveryNote: text('delivery_note').notNull().default(''),
    receivedBy: uuid('received_by').notNull(),
    receivedAt: at('received_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.orderId], foreignColumns: [purchaseOrder.workshopId, purchaseOrder.id] }),
    foreignKey({ columns: [t.workshopId, t.supplierId], foreignColumns: [supplier.workshopId, supplier.id] }),
    uniqueIndex('receipt_number_once').on(t.workshopId, t.number),
    index('receipt_by_order').on(t.workshopId, t.orderId),
    ownWorkshopOnly(),
  ],
).enableRLS();

/** One bag: so many of a part into a bin, as a lot of its own. */
export const receiptLine = pgTable(
  'receipt_line',
  {
    workshopId: workshopId(),
    id: rowId(),
    receiptId: uuid('receipt_id').notNull(),
    orderLineId: uuid('order_line_id'),
    partId: uuid('part_id').notNull(),
    binId: uuid('bin_id').notNull(),
    lotId: uuid('lot_id').notNull(),
    quantity: integer('quantity').notNull(),
    /** Lead-bearing, lithium or otherwise marked; shown at receipt. */
    cautioned: boolean('cautioned').notNull().default(false),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.receiptId], foreignColumns: [receipt.workshopId, receipt.id] }),
    foreignKey({ columns: [t.workshopId, t.orderLineId], foreignColumns: [orderLine.workshopId, orderLine.id] }),
    foreignKey({ columns: [t.workshopId, t.partId], foreignColumns: [part.workshopId, part.id] }),
    foreignKey({ columns: [t.workshopId, t.binId], foreignColumns: [bin.workshopId, bin.id] }),
    foreignKey({ columns: [t.workshopId, t.lotId], foreignColumns: [lot.workshopId, lot.id] }),
    check('receipt_line_quantity', sql`${t.quantity} > 0`),
    ownWorkshopOnly(),
  ],
).enableRLS();
