/** Workshops, people, who does what where, and the ways in: invitations, one-time links, API tokens. */
import { sql } from 'drizzle-orm';
import {
  bigint,
  check,
  foreignKey,
  index,
  integer,
  pgPolicy,
  pgTable,
  primaryKey,
  text,
  unique,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { applicationRole, at, createdAt, ownWorkshopOr, rowId, scopeOnly, workshopId } from './columns';
import { newId } from './new-id';

export const workshop = pgTable(
  'workshop',
  {
    id: uuid('id').primaryKey().$defaultFn(newId),
    name: text('name').notNull(),
    /** ISO 4217; orders in it need no exchange rate. */
    currency: text('currency').notNull().default('EUR'),
    /** An order above this total (minor units) needs the approval of a lead. */
    approvalLimitMinor: bigint('approval_limit_minor', { mode: 'number' }).notNull().default(25_000),
    /** How a bare taper letter is read: `letters` A log, B linear (current makers); `old-european` A linear, B log; `ask` every time. */
    taperConvention: text('taper_convention').notNull().default('ask'),
    /** A receipt may exceed the ordered quantity by this share; more is refused. */
    overDeliveryPercent: integer('over_delivery_percent').notNull().default(10),
    letterhead: text('letterhead').notNull().default(''),
    createdAt: createdAt(),
  },
  (t) => [
    check('workshop_currency_iso4217', sql`${t.currency} ~ '^[A-Z]{3}$'`),
    check('workshop_limit_not_negative', sql`${t.approvalLimitMinor} >= 0`),
    check('workshop_taper_convention', sql`${t.taperConvention} in ('ask', 'letters', 'old-european')`),
    check('workshop_over_delivery', sql`${t.overDeliveryPercent} between 0 and 100`),
    pgPolicy('own_workshop_or_scope', {
      for: 'all',
      to: applicationRole,
      using: sql`id = nullif(current_setting('app.workshop_id', true), '')::uuid or current_setting('app.scope', true) = 'auth'`,
      withCheck: sql`id = nullif(current_setting('app.workshop_id', true), '')::uuid`,
    }),
  ],
).enableRLS();

export const person = pgTable(
  'person',
  {
    id: uuid('id').primaryKey().$defaultFn(newId),
    /** Stored in lower case; one person an address. */
    email: text('email').notNull().unique(),
    name: text('name').notNull(),
    /** argon2id in PHC form; null until the person sets one (link sign-in works without). */
    passwordHash: text('password_hash'),
    /** Raised to end every session and link of the person at once. */
    sessionEpoch: integer('session_epoch').notNull().default(0),
    theme: text('theme'),
    createdAt: createdAt(),
  },
  (t) => [
    check('person_email_lower', sql`${t.email} = lower(${t.email})`),
    pgPolicy('member_of_workshop_or_scope', {
      for: 'select',
      to: applicationRole,
      using: sql`current_setting('app.scope', true) = 'auth' or exists (select 1 from membership m where m.person_id = person.id and m.workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid)`,
    }),
    pgPolicy('auth_scope_writes', {
      for: 'all',
      to: applicationRole,
      using: sql`current_setting('app.scope', true) = 'auth'`,
      withCheck: sql`current_setting('app.scope', true) = 'auth'`,
    }),
  ],
).enableRLS();

export const membership = pgTable(
  'membership',
  {
    workshopId: workshopId().references(() => workshop.id),
    personId: uuid('person_id')
      .notNull()
      .references(() => person.id),
    roles: text('roles').array().notNull(),
    /** A person who left keeps their name in the ledger but no way in. */
    endedAt: at('ended_at'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.personId] }),
    index('membership_by_person').on(t.personId),
    check(
      'membership_roles_known',
      sql`${t.roles} <@ array['builder','storekeeper','buyer','lead']::text[] and cardinality(${t.roles}) > 0`,
    ),
    ownWorkshopOr('auth'),
  ],
).enableRLS();

export const invitation = pgTable(
  'invitation',
  {
    workshopId: workshopId().references(() => workshop.id),
    id: rowId(),
    email: text('email').notNull(),
    roles: text('roles').array().notNull(),
    /** SHA-256 of the one-time token; the token itself is only in the mail. */
    tokenHash: text('token_hash').notNull(),
    invitedBy: uuid('invited_by').notNull(),
    expiresAt: at('expires_at').notNull(),
    acceptedAt: at('accepted_at'),
    withdrawnAt: at('withdrawn_at'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    unique('invitation_token').on(t.tokenHash),
    foreignKey({ columns: [t.workshopId, t.invitedBy], foreignColumns: [membership.workshopId, membership.personId] }),
    check(
      'invitation_roles_known',
      sql`${t.roles} <@ array['builder','storekeeper','buyer','lead']::text[] and cardinality(${t.roles}) > 0`,
    ),
    ownWorkshopOr('auth'),
  ],
).enableRLS();

/** One-time links by mail: sign in, or set a new password. */
export const oneTimeLink = pgTable(
  'one_time_link',
  {
    tokenHash: text('token_hash').primaryKey(),
    personId: uuid('person_id')
      .notNull()
      .references(() => person.id),
    purpose: text('purpose').notNull(),
    expiresAt: at('expires_at').notNull(),
    usedAt: at('used_at'),
    createdAt: createdAt(),
  },
  (t) => [check('one_time_link_purpose', sql`${t.purpose} in ('sign-in', 'password-reset')`), scopeOnly('auth')],
).enableRLS();

export const apiToken = pgTable(
  'api_token',
  {
    workshopId: workshopId().references(() => workshop.id),
    id: rowId(),
    personId: uuid('person_id').notNull(),
    name: text('name').notNull(),
    /** SHA-256 of the bearer token. */
    tokenHash: text('token_hash').notNull(),
    /** `read` may ask; `write` may also command. Roles are always the person's own at the time of the call. */
    scope: text('scope').notNull().default('write'),
    expiresAt: at('expires_at').notNull(),
    revokedAt: at('revoked_at'),
    lastUsedAt: at('last_used_at'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    uniqueIndex('api_token_hash').on(t.tokenHash),
    foreignKey({ columns: [t.workshopId, t.personId], foreignColumns: [membership.workshopId, membership.personId] }),
    check('api_token_scope', sql`${t.scope} in ('read', 'write')`),
    ownWorkshopOr('auth'),
  ],
).enableRLS();
