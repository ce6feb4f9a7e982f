/**
 * The stores: cabinets, bins, lots, and the ledger of movements that lots are the sum of.
 * Triggers (see the hand-written migration) make the ledger the only way to change a lot: on_hand follows inserted
 * movements and reserved follows reservations, so no code can set either directly.
 */
import { sql } from 'drizzle-orm';
import {
  bigserial,
  boolean,
  check,
  foreignKey,
  index,
  integer,
  numeric,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { part } from './catalogue';
import { batch, batchNeed } from './circuits';
import { at, createdAt, ownWorkshopOnly, rowId, workshopId } from './columns';

export const cabinet = pgTable(
  'cabinet',
  {
    workshopId: workshopId(),
    id: rowId(),
    code: text('code').notNull(),
    name: text('name').notNull().default(''),
    room: text('room').notNull(),
    columns: integer('columns').notNull(),
    rows: integer('rows').notNull(),
    /** Order in which a person walks past the cabinets. */
    walkOrder: integer('walk_order').notNull().default(0),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    uniqueIndex('cabinet_code_once').on(t.workshopId, t.code),
    check('cabinet_size', sql`${t.columns} between 1 and 60 and ${t.rows} between 1 and 60`),
    ownWorkshopOnly(),
  ],
).enableRLS();

export const bin = pgTable(
  'bin',
  {
    workshopId: workshopId(),
    id: rowId(),
    cabinetId: uuid('cabinet_id').notNull(),
    /** Printed on the drawer and in its label's code: `A-06-1` (cabinet, column, row). */
    code: text('code').notNull(),
    column: integer('column').notNull(),
    row: integer('row').notNull(),
    /** Units that fill it, for the drawn level; null where nobody said. */
    capacity: integer('capacity'),
    /** Set by a failed pick or the count plan; cleared by a posted count. */
    countDueSince: at('count_due_since'),
    countDueReason: text('count_due_reason'),
    /** A pick found fewer here than the ledger says: reserving takes from it last until a posted count clears it. */
    doubtful: boolean('doubtful').notNull().default(false),
    retiredAt: at('retired_at'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.cabinetId], foreignColumns: [cabinet.workshopId, cabinet.id] }),
    uniqueIndex('bin_code_once').on(t.workshopId, t.code),
    uniqueIndex('bin_place_once').on(t.workshopId, t.cabinetId, t.column, t.row),
    check('bin_place', sql`${t.column} > 0 and ${t.row} > 0`),
    check('bin_capacity', sql`${t.capacity} is null or ${t.capacity} > 0`),
    ownWorkshopOnly(),
  ],
).enableRLS();

export const lot = pgTable(
  'lot',
  {
    workshopId: workshopId(),
    id: rowId(),
    partId: uuid('part_id').notNull(),
    binId: uuid('bin_id').notNull(),
    /** Never set by code: the sum of the lot's movements, kept by trigger. */
    onHand: integer('on_hand').notNull().default(0),
    /** Never set by code: the sum of open reservations on it, kept by trigger. */
    reserved: integer('reserved').notNull().default(0),
    /** Cost of one unit in the workshop's currency. */
    unitCost: numeric('unit_cost', { precision: 18, scale: 6 }).notNull().default('0'),
    receivedAt: at('received_at').notNull().defaultNow(),
    lotCode: text('lot_code'),
    /** Year and week as on the bag: 2638. */
    dateCode: text('date_code'),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.partId], foreignColumns: [part.workshopId, part.id] }),
    foreignKey({ columns: [t.workshopId, t.binId], foreignColumns: [bin.workshopId, bin.id] }),
    // Invariant 3, and no unit promised twice.
    check('lot_reserved_within_on_hand', sql`${t.reserved} between 0 and ${t.onHand}`),
    check('lot_unit_cost', sql`${t.unitCost} >= 0`),
    index('lot_by_part').on(t.workshopId, t.partId, t.receivedAt),
    index('lot_by_bin').on(t.workshopId, t.binId),
    ownWorkshopOnly(),
  ],
).enableRLS();

export const MOVEMENT_KINDS = ['receipt', 'pick', 'return', 'move', 'count', 'scrap', 'opening'] as const;

/** The ledger: append-only (no UPDATE or DELETE right, and a trigger besides). A correction is a new movement. */
export const movement = pgTable(
  'movement',
  {
    workshopId: workshopId(),
    id: rowId(),
    /** Order of entry; what pages of the ledger are cut by. */
    sequence: bigserial('sequence', { mode: 'number' }).notNull(),
    at: at('at').notNull().defaultNow(),
    kind: text('kind').notNull(),
    lotId: uuid('lot_id').notNull(),
    partId: uuid('part_id').notNull(),
    binId: uuid('bin_id').notNull(),
    /** Signed; in the part's stock unit. */
    quantity: integer('quantity').notNull(),
    /** Filled by trigger: the lot's on_hand after it. */
    balanceAfter: integer('balance_after').notNull().default(0),
    /** What caused it: a receipt line, a reservation, a count entry … */
    referenceType: text('reference_type').notNull(),
    referenceId: uuid('reference_id').notNull(),
    reason: text('reason').notNull().default(''),
    personId: uuid('person_id'),
    /** Invariant 4: command and idempotency key (or request id), with the place in the request. */
    requestKey: text('request_key').notNull(),
    requestLine: integer('request_line').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.lotId], foreignColumns: [lot.workshopId, lot.id] }),
    foreignKey({ columns: [t.workshopId, t.partId], foreignColumns: [part.workshopId, part.id] }),
    foreignKey({ columns: [t.workshopId, t.binId], foreignColumns: [bin.workshopId, bin.id] }),
    uniqueIndex('movement_request_once').on(t.workshopId, t.requestKey, t.requestLine),
    uniqueIndex('movement_by_sequence').on(t.workshopId, t.sequence),
    index('movement_by_lot').on(t.workshopId, t.lotId, t.sequence),
    index('movement_by_part').on(t.workshopId, t.partId, t.sequence),
    index('movement_by_bin').on(t.workshopId, t.binId, t.sequence),
    // The ledger by dates; `at` is the transaction's start, so it nearly follows the sequence but can't replace it.
    index('movement_by_time').on(t.workshopId, t.at),
    index('movement_by_reference').on(t.workshopId, t.referenceType, t.referenceId),
    check('movement_kind', sql`${t.kind} in ('receipt', 'pick', 'return', 'move', 'count', 'scrap', 'opening')`),
    check('movement_moves', sql`${t.quantity} <> 0`),
    check(
      'movement_sign',
      sql`(${t.kind} not in ('receipt', 'return', 'opening') or ${t.quantity} > 0) and (${t.kind} not in ('pick', 'scrap') or ${t.quantity} < 0)`,
    ),
    check('movement_count_has_reason', sql`${t.kind} not in ('count', 'scrap') or ${t.reason} <> ''`),
    ownWorkshopOnly(),
  ],
).enableRLS();

/** Units of one lot promised to one need of a batch. open = quantity − picked − released. */
export const reservation = pgTable(
  'reservation',
  {
    workshopId: workshopId(),
    id: rowId(),
    batchId: uuid('batch_id').notNull(),
    needId: uuid('need_id').notNull(),
    lotId: uuid('lot_id').notNull(),
    quantity: integer('quantity').notNull(),
    picked: integer('picked').notNull().default(0),
    released: integer('released').notNull().default(0),
    open: integer('open').notNull().generatedAlwaysAs(sql`quantity - picked - released`),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.batchId], foreignColumns: [batch.workshopId, batch.id] }),
    foreignKey({ columns: [t.workshopId, t.needId], foreignColumns: [batchNeed.workshopId, batchNeed.id] }),
    foreignKey({ columns: [t.workshopId, t.lotId], foreignColumns: [lot.workshopId, lot.id] }),
    index('reservation_by_batch').on(t.workshopId, t.batchId),
    index('reservation_by_need').on(t.workshopId, t.needId),
    index('reservation_open_by_lot').on(t.workshopId, t.lotId).where(sql`quantity - picked - released > 0`),
    check(
      'reservation_amounts',
      sql`${t.quantity} > 0 and ${t.picked} >= 0 and ${t.released} >= 0 and ${t.picked} + ${t.released} <= ${t.quantity}`,
    ),
    ownWorkshopOnly(),
  ],
).enableRLS();

export const stockCount = pgTable(
  'stock_count',
  {
    workshopId: workshopId(),
    id: rowId(),
    number: text('number').notNull(),
    state: text('state').notNull().default('open'),
    /** Why it was opened: chosen bins, a failed pick, the plan. */
    reason: text('reason').notNull(),
    openedBy: uuid('opened_by').notNull(),
    postedBy: uuid('posted_by'),
    postedAt: at('posted_at'),
    version: integer('version').notNull().default(1),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    uniqueIndex('stock_count_number_once').on(t.workshopId, t.number),
    check('stock_count_state', sql`${t.state} in ('open', 'counted', 'recount', 'posted', 'abandoned')`),
    ownWorkshopOnly(),
  ],
).enableRLS();

/**
 * The bins of a count, also those the ledger thinks empty: somebody must look into them as well. A bin is in at most one
 * count under way (openCount holds its row lock), or one variance would be booked twice.
 */
export const countBin = pgTable(
  'count_bin',
  {
    workshopId: workshopId(),
    countId: uuid('count_id').notNull(),
    binId: uuid('bin_id').notNull(),
    /** When somebody said that nothing lies in it beside what was entered. */
    lookedAt: at('looked_at'),
    lookedBy: uuid('looked_by'),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.countId, t.binId] }),
    foreignKey({ columns: [t.workshopId, t.countId], foreignColumns: [stockCount.workshopId, stockCount.id] }),
    foreignKey({ columns: [t.workshopId, t.binId], foreignColumns: [bin.workshopId, bin.id] }),
    index('count_bin_by_bin').on(t.workshopId, t.binId),
    check('count_bin_looked', sql`(${t.lookedAt} is null) = (${t.lookedBy} is null)`),
    ownWorkshopOnly(),
  ],
).enableRLS();

/** One part in one bin to be counted. Lots of one part in one bin can't be told apart by eye, so they count together. */
export const countEntry = pgTable(
  'count_entry',
  {
    workshopId: workshopId(),
    id: rowId(),
    countId: uuid('count_id').notNull(),
    binId: uuid('bin_id').notNull(),
    partId: uuid('part_id').notNull(),
    counted: integer('counted'),
    /** The ledger's figure at the moment of counting, taken under lock, so that picking may go on. */
    ledgerAtCount: integer('ledger_at_count'),
    countedBy: uuid('counted_by'),
    countedAt: at('counted_at'),
    /** How often it was counted; a recount replaces the figure and raises this. */
    attempt: integer('attempt').notNull().default(0),
    /** A part found that the ledger did not know in this bin. */
    found: boolean('found').notNull().default(false),
    reason: text('reason').notNull().default(''),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.countId], foreignColumns: [stockCount.workshopId, stockCount.id] }),
    foreignKey({ columns: [t.workshopId, t.binId], foreignColumns: [bin.workshopId, bin.id] }),
    foreignKey({ columns: [t.workshopId, t.partId], foreignColumns: [part.workshopId, part.id] }),
    uniqueIndex('count_entry_once').on(t.workshopId, t.countId, t.binId, t.partId),
    check('count_entry_not_negative', sql`${t.counted} is null or ${t.counted} >= 0`),
    check('count_entry_with_ledger', sql`(${t.counted} is null) = (${t.ledgerAtCount} is null)`),
    ownWorkshopOnly(),
  ],
).enableRLS();
