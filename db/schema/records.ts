/** What was done and what follows from it: audit events, idempotency keys, the outbox, document counters, progress. */
import { sql } from 'drizzle-orm';
import {
  bigint,
  bigserial,
  check,
  index,
  integer,
  jsonb,
  pgPolicy,
  pgTable,
  primaryKey,
  text,
  uuid,
  varchar,
} from 'drizzle-orm/pg-core';
import {
  applicationRole,
  at,
  createdAt,
  ownWorkshopOnly,
  ownWorkshopOr,
  rowId,
  scopeOnly,
  workshopId,
} from './columns';

/** One row a command, written in the command's own transaction. */
export const auditEvent = pgTable(
  'audit_event',
  {
    workshopId: workshopId(),
    id: rowId(),
    at: at('at').notNull().defaultNow(),
    /** Null for the job process and provider callbacks. */
    personId: uuid('person_id'),
    command: text('command').notNull(),
    subjectId: text('subject_id'),
    detail: jsonb('detail').notNull().default({}),
    requestId: text('request_id').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    index('audit_event_by_subject').on(t.workshopId, t.subjectId, t.at),
    ownWorkshopOnly(),
  ],
).enableRLS();

/** A key holds the first answer of one command by one person; the same key with another body is refused. */
export const idempotencyKey = pgTable(
  'idempotency_key',
  {
    workshopId: workshopId(),
    personId: uuid('person_id').notNull(),
    command: text('command').notNull(),
    key: text('key').notNull(),
    bodyHash: text('body_hash').notNull(),
    /** `running` outlives a crash; its lease tells when another attempt may take over. */
    state: text('state').notNull(),
    leaseUntil: at('lease_until').notNull(),
    answer: jsonb('answer'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.personId, t.command, t.key] }),
    check('idempotency_key_state', sql`${t.state} in ('running', 'done')`),
    check('idempotency_key_length', sql`length(${t.key}) between 1 and 200`),
    index('idempotency_key_by_age').on(t.createdAt),
    ownWorkshopOnly(),
  ],
).enableRLS();

/** Jobs to hand to the queue, written with the change that asks for them; the relay passes each on once, by its id. */
export const outbox = pgTable(
  'outbox',
  {
    workshopId: workshopId(),
    id: rowId(),
    sequence: bigserial('sequence', { mode: 'number' }).notNull(),
    queue: text('queue').notNull(),
    payload: jsonb('payload').notNull(),
    runAfter: at('run_after').notNull().defaultNow(),
    relayedAt: at('relayed_at'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    // The relay reads only what still waits; the index stays small however long the table grows.
    index('outbox_waiting').on(t.sequence).where(sql`relayed_at is null`),
    ownWorkshopOr('inbox'),
  ],
).enableRLS();

/** Mails that belong to no workshop (sign-in links, password resets) wait here for the same relay. */
export const authMail = pgTable(
  'auth_mail',
  {
    id: rowId().primaryKey(),
    payload: jsonb('payload').notNull(),
    relayedAt: at('relayed_at'),
    createdAt: createdAt(),
  },
  () => [scopeOnly('auth')],
).enableRLS();

/** Numbers of documents (orders, batches, receipts, counts), a year at a time, without gaps: locked, then raised. */
export const counter = pgTable(
  'counter',
  {
    workshopId: workshopId(),
    name: text('name').notNull(),
    value: integer('value').notNull().default(0),
  },
  (t) => [primaryKey({ columns: [t.workshopId, t.name] }), ownWorkshopOnly()],
).enableRLS();

/** Events of the payment service, stored by their own id before anything is done about them, so that each acts once. */
export const paymentEvent = pgTable(
  'payment_event',
  {
    id: text('id').primaryKey(),
    type: text('type').notNull(),
    payload: jsonb('payload').notNull(),
    receivedAt: at('received_at').notNull().defaultNow(),
    processedAt: at('processed_at'),
    outcome: text('outcome'),
    attempts: integer('attempts').notNull().default(0),
  },
  () => [scopeOnly('inbox')],
).enableRLS();

/** How far long work has come; the browser shows it as a real bar. */
export const progress = pgTable(
  'progress',
  {
    workshopId: workshopId(),
    id: rowId(),
    what: text('what').notNull(),
    done: bigint('done', { mode: 'number' }).notNull().default(0),
    total: bigint('total', { mode: 'number' }),
    state: text('state').notNull().default('running'),
    problem: jsonb('problem'),
    updatedAt: at('updated_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    check('progress_state', sql`${t.state} in ('running', 'done', 'failed', 'cancelled')`),
    ownWorkshopOnly(),
  ],
).enableRLS();

/** When the job processes last said that they run; the health route reads it. */
export const heartbeat = pgTable(
  'heartbeat',
  { name: text('name').primaryKey(), at: at('at').notNull().defaultNow() },
  () => [pgPolicy('any_process', { for: 'all', to: applicationRole, using: sql`true`, withCheck: sql`true` })],
).enableRLS();

/** The shape that rate-limiter-flexible's PostgreSQL store expects (`tableCreated: true`). Keys are hashed addresses and accounts. */
export const rateLimit = pgTable(
  'rate_limit',
  {
    key: varchar('key', { length: 255 }).primaryKey(),
    points: integer('points').notNull().default(0),
    expire: bigint('expire', { mode: 'number' }),
  },
  () => [pgPolicy('any_process', { for: 'all', to: applicationRole, using: sql`true`, withCheck: sql`true` })],
).enableRLS();
