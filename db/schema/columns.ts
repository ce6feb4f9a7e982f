/**
 * The columns, keys and policies that every workshop-owned table shares.
 * Keys are (workshop_id, id) and foreign keys composite, so that a row can't point into another workshop and the schema
 * can be distributed by workshop_id as it stands.
 */
import { sql } from 'drizzle-orm';
import { pgPolicy, pgRole, timestamp, uuid } from 'drizzle-orm/pg-core';
import { newId } from './new-id';

/** The role the web and job processes connect as. It owns nothing; migrations make it (see drizzle/0000). */
export const applicationRole = pgRole('ohmstead_app').existing();

export const workshopId = () => uuid('workshop_id').notNull();
export const rowId = () => uuid('id').notNull().$defaultFn(newId);
export const at = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' });
export const createdAt = () => at('created_at').notNull().defaultNow();

/** Rows of the workshop that withWorkshop() set for the transaction; without one, none. */
const isOwnWorkshop = sql`workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid`;
/** Sign-in and provider inboxes run before a workshop is known; only db/client.ts opens these scopes. */
const isScope = (scope: 'auth' | 'inbox') => sql.raw(`current_setting('app.scope', true) = '${scope}'`);

export const ownWorkshopOnly = () =>
  pgPolicy('own_workshop', { for: 'all', to: applicationRole, using: isOwnWorkshop, withCheck: isOwnWorkshop });

export const ownWorkshopOr = (scope: 'auth' | 'inbox') =>
  pgPolicy('own_workshop_or_scope', {
    for: 'all',
    to: applicationRole,
    using: sql`${isOwnWorkshop} or ${isScope(scope)}`,
    withCheck: sql`${isOwnWorkshop} or ${isScope(scope)}`,
  });

export const scopeOnly = (scope: 'auth' | 'inbox') =>
  pgPolicy('scope_only', { for: 'all', to: applicationRole, using: isScope(scope), withCheck: isScope(scope) });
