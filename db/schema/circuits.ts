/** Circuits, their revisions and lines, what lines were matched to, what people decided, and the batches made of them. */
import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
  customType,
  date,
  foreignKey,
  index,
  integer,
  jsonb,
  numeric,
  pgTable,
  primaryKey,
  text,
  unique,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { part } from './catalogue';
import { at, createdAt, ownWorkshopOnly, rowId, workshopId } from './columns';

const bytes = customType<{ data: Uint8Array; driverData: Buffer }>({
  dataType: () => 'bytea',
  toDriver: (value) => Buffer.from(value),
  fromDriver: (value) => new Uint8Array(value),
});

export const circuit = pgTable(
  'circuit',
  {
    workshopId: workshopId(),
    id: rowId(),
    name: text('name').notNull(),
    description: text('description').notNull().default(''),
    /** Supply rails in volts, signed, such as {12,-12}; the stand-in checks run against them. */
    railsVolts: numeric('rails_volts', { mode: 'number' }).array().notNull().default(sql`'{}'`),
    version: integer('version').notNull().default(1),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    uniqueIndex('circuit_name_once').on(t.workshopId, t.name),
    ownWorkshopOnly(),
  ],
).enableRLS();

/** A file or pasted table on its way to a revision. The original stays, whatever became of the reading. */
export const upload = pgTable(
  'upload',
  {
    workshopId: workshopId(),
    id: rowId(),
    circuitId: uuid('circuit_id'),
    fileName: text('file_name').notNull(),
    /** Key in the upload store; null where the bytes came by the API or by pasting and stand in `content`. */
    storeKey: text('store_key'),
    content: bytes('content'),
    sizeBytes: integer('size_bytes').notNull(),
    state: text('state').notNull().default('received'),
    /** Problem details of a refused file. */
    problem: jsonb('problem'),
    uploadedBy: uuid('uploaded_by').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.circuitId], foreignColumns: [circuit.workshopId, circuit.id] }),
    // A replayed upload callback finds the row that the first one made.
    unique('upload_store_key').on(t.workshopId, t.storeKey),
    check('upload_has_bytes', sql`(${t.storeKey} is null) <> (${t.content} is null)`),
    check('upload_state', sql`${t.state} in ('received', 'read', 'settled', 'frozen', 'rejected')`),
    ownWorkshopOnly(),
  ],
).enableRLS();

export const revision = pgTable(
  'revision',
  {
    workshopId: workshopId(),
    id: rowId(),
    circuitId: uuid('circuit_id').notNull(),
    /** What people call it: A, B, `1.2`. */
    name: text('name').notNull(),
    uploadId: uuid('upload_id'),
    /** `draft` while its lines are being settled; `frozen` never changes again (a trigger sees to it). */
    state: text('state').notNull().default('draft'),
    /** The table as read, with column roles and reasons; rows that are no parts; so that the import page can show its thinking. */
    reading: jsonb('reading').notNull().default({}),
    createdBy: uuid('created_by').notNull(),
    frozenAt: at('frozen_at'),
    frozenBy: uuid('frozen_by'),
    version: integer('version').notNull().default(1),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.circuitId], foreignColumns: [circuit.workshopId, circuit.id] }),
    foreignKey({ columns: [t.workshopId, t.uploadId], foreignColumns: [upload.workshopId, upload.id] }),
    uniqueIndex('revision_name_once').on(t.workshopId, t.circuitId, t.name),
    check('revision_state', sql`${t.state} in ('draft', 'frozen')`),
    check('revision_frozen_at', sql`(${t.state} = 'frozen') = (${t.frozenAt} is not null)`),
    ownWorkshopOnly(),
  ],
).enableRLS();

export const line = pgTable(
  'line',
  {
    workshopId: workshopId(),
    id: rowId(),
    revisionId: uuid('revision_id').notNull(),
    /** Order in the revision, from 1. */
    position: integer('position').notNull(),
    /** Where it stood in the file: sheet and 1-based row. */
    sheet: text('sheet'),
    sourceRow: integer('source_row').notNull(),
    designators: text('designators').array().notNull(),
    /** Units a circuit needs; not-fitted lines need none but keep their number. */
    quantity: integer('quantity').notNull(),
    fitted: boolean('fitted').notNull(),
    kind: text('kind').notNull(),
    /** The text as written. */
    text: text('text').notNull(),
    /** lib/electronics PartSpec as understood (and corrected). */
    spec: jsonb('spec').notNull(),
    partNumber: text('part_number'),
    family: text('family'),
    value: numeric('value'),
    unit: text('unit'),
    /** What the part does in the circuit, where someone said so: timing, audio, control, decoupling, logic, power, safety. */
    use: text('use'),
    /** What decisions are remembered by: the understood specification in one canonical text. */
    specKey: text('spec_key').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.revisionId], foreignColumns: [revision.workshopId, revision.id] }),
    uniqueIndex('line_position_once').on(t.workshopId, t.revisionId, t.position),
    index('line_by_spec').on(t.workshopId, t.specKey),
    check('line_quantity', sql`${t.quantity} >= 0`),
    check(
      'line_use',
      sql`${t.use} is null or ${t.use} in ('timing', 'audio', 'control', 'decoupling', 'logic', 'power', 'safety')`,
    ),
    ownWorkshopOnly(),
  ],
).enableRLS();

/** A doubt of the reader about one row; a revision with an open one can't be frozen. */
export const question = pgTable(
  'question',
  {
    workshopId: workshopId(),
    id: rowId(),
    revisionId: uuid('revision_id').notNull(),
    lineId: uuid('line_id'),
    sheet: text('sheet'),
    sourceRow: integer('source_row').notNull(),
    code: text('code').notNull(),
    ask: text('ask').notNull(),
    options: text('options').array().notNull(),
    answer: text('answer'),
    answeredBy: uuid('answered_by'),
    answeredAt: at('answered_at'),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.revisionId], foreignColumns: [revision.workshopId, revision.id] }),
    index('question_by_revision').on(t.workshopId, t.revisionId),
    ownWorkshopOnly(),
  ],
).enableRLS();

/** Candidates for a line with the verdict of the stand-in checks, best first. Written by matching, never by hand. */
export const candidate = pgTable(
  'candidate',
  {
    workshopId: workshopId(),
    lineId: uuid('line_id').notNull(),
    partId: uuid('part_id').notNull(),
    rank: integer('rank').notNull(),
    verdict: text('verdict').notNull(),
    /** The checks with their reasons, as lib/electronics gave them. */
    checks: jsonb('checks').notNull(),
    /** Deviation of the offered value from the asked one, in percent, where both have one. */
    deviationPercent: numeric('deviation_percent', { mode: 'number' }),
    matchedAt: at('matched_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.lineId, t.partId] }),
    foreignKey({ columns: [t.workshopId, t.lineId], foreignColumns: [line.workshopId, line.id] }),
    foreignKey({ columns: [t.workshopId, t.partId], foreignColumns: [part.workshopId, part.id] }),
    check('candidate_verdict', sql`${t.verdict} in ('same', 'drop-in', 'with-effect', 'ask', 'refused')`),
    ownWorkshopOnly(),
  ],
).enableRLS();

/** This part for that line, because …; the newest row of a line holds. Remembered by specKey for other lines alike. */
export const decision = pgTable(
  'decision',
  {
    workshopId: workshopId(),
    id: rowId(),
    lineId: uuid('line_id').notNull(),
    /** Null: leave the line open (buy the part asked for). */
    partId: uuid('part_id'),
    verdict: text('verdict').notNull(),
    reason: text('reason').notNull(),
    specKey: text('spec_key').notNull(),
    decidedBy: uuid('decided_by').notNull(),
    decidedAt: at('decided_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.lineId], foreignColumns: [line.workshopId, line.id] }),
    foreignKey({ columns: [t.workshopId, t.partId], foreignColumns: [part.workshopId, part.id] }),
    index('decision_by_line').on(t.workshopId, t.lineId, t.decidedAt),
    index('decision_by_spec').on(t.workshopId, t.specKey, t.decidedAt),
    ownWorkshopOnly(),
  ],
).enableRLS();

export const batch = pgTable(
  'batch',
  {
    workshopId: workshopId(),
    id: rowId(),
    /** Year and running number, such as 2026-0007. */
    number: text('number').notNull(),
    revisionId: uuid('revision_id').notNull(),
    units: integer('units').notNull(),
    state: text('state').notNull().default('planned'),
    neededBy: date('needed_by', { mode: 'string' }),
    /** 1 first; equal ones by creation. */
    priority: integer('priority').notNull().default(5),
    createdBy: uuid('created_by').notNull(),
    version: integer('version').notNull().default(1),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.revisionId], foreignColumns: [revision.workshopId, revision.id] }),
    uniqueIndex('batch_number_once').on(t.workshopId, t.number),
    index('batch_by_state').on(t.workshopId, t.state),
    check('batch_units', sql`${t.units} between 1 and 10000`),
    check('batch_priority', sql`${t.priority} between 1 and 9`),
    check('batch_state', sql`${t.state} in ('planned', 'reserved', 'picking', 'kitted', 'finished', 'cancelled')`),
    ownWorkshopOnly(),
  ],
).enableRLS();

/** What a batch needs of one line: units × quantity of the chosen part (null until one is chosen). */
export const batchNeed = pgTable(
  'batch_need',
  {
    workshopId: workshopId(),
    id: rowId(),
    batchId: uuid('batch_id').notNull(),
    lineId: uuid('line_id').notNull(),
    partId: uuid('part_id'),
    quantity: integer('quantity').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    foreignKey({ columns: [t.workshopId, t.batchId], foreignColumns: [batch.workshopId, batch.id] }),
    foreignKey({ columns: [t.workshopId, t.lineId], foreignColumns: [line.workshopId, line.id] }),
    foreignKey({ columns: [t.workshopId, t.partId], foreignColumns: [part.workshopId, part.id] }),
    uniqueIndex('batch_need_once').on(t.workshopId, t.batchId, t.lineId),
    index('batch_need_by_part').on(t.workshopId, t.partId),
    check('batch_need_quantity', sql`${t.quantity} > 0`),
    ownWorkshopOnly(),
  ],
).enableRLS();
