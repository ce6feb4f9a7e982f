/**
 * The pool and the only ways to a transaction. withWorkshop() sets the workshop that row-level security compares with;
 * a query outside it sees no rows. withScope() is for what runs before a workshop is known: signing in, and the
 * inboxes of providers and of the job relay.
 */
import { sql } from 'drizzle-orm';
import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres';
import pg from 'pg';
import * as catalogue from './schema/catalogue';
import * as circuits from './schema/circuits';
import * as people from './schema/people';
import * as purchasing from './schema/purchasing';
import * as records from './schema/records';
import * as stores from './schema/stores';

const schema = { ...people, ...records, ...catalogue, ...circuits, ...stores, ...purchasing };
type Schema = typeof schema;
type Database = NodePgDatabase<Schema>;
/** A transaction in a workshop. Everything below a use case takes one; nothing opens its own. */
export type Tx = Parameters<Parameters<Database['transaction']>[0]>[0];

const POOL_SIZE = 10;

// Next's bundles may load this module more than once in a process; the pool must still be one.
const holder = globalThis as typeof globalThis & { ohmsteadDatabase?: { pool: pg.Pool; db: Database } };

function database(): { pool: pg.Pool; db: Database } {
  if (!holder.ohmsteadDatabase) {
    const connectionString = process.env.DATABASE_URL;
    if (!connectionString)
      throw new Error('DATABASE_URL is not set: expected postgres://ohmstead_app:…@127.0.0.1:PORT/NAME');
    const pool = new pg.Pool({
      connectionString,
      max: POOL_SIZE,
      connectionTimeoutMillis: 5_000,
      idleTimeoutMillis: 30_000,
      statement_timeout: 60_000,
      application_name: 'ohmstead',
    });
    // An idle connection that the server cuts raises here; the pool replaces it by itself.
    pool.on('error', () => undefined);
    holder.ohmsteadDatabase = { pool, db: drizzle(pool, { schema }) };
  }
  return holder.ohmsteadDatabase;
}

/** For the rate limiter's store only, which brings its own statements on a table that no workshop owns. */
export const rateLimitPool = (): pg.Pool => database().pool;

export async function closeDatabase(): Promise<void> {
  const open = holder.ohmsteadDatabase;
  holder.ohmsteadDatabase = undefined;
  await open?.pool.end();
}

const RETRIED_STATES = new Set(['40001', '40P01']);
const MOST_TRIES = 5;

export interface DatabaseFault {
  readonly code: string;
  readonly constraint: string | null;
}

/** The SQLSTATE and constraint behind an error, through Drizzle's wrapping; null where it is no database error. */
export function databaseFault(error: unknown): DatabaseFault | null {
  for (let cause = error, depth = 0; cause instanceof Error && depth < 5; cause = cause.cause, depth += 1) {
    if ('code' in cause && typeof cause.code === 'string') {
      const constraint = 'constraint' in cause && typeof cause.constraint === 'string' ? cause.constraint : null;
      return { code: cause.code, constraint };
    }
  }
  return null;
}

async function transact<T>(
  setting: ReturnType<typeof sql>,
  run: (tx: Tx) => Promise<T>,
  readOnly: boolean,
): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await database().db.transaction(
        async (tx) => {
          await tx.execute(setting);
          return run(tx);
        },
        { accessMode: readOnly ? 'read only' : 'read write' },
      );
    } catch (error) {
      const fault = databaseFault(error);
      if (!fault || !RETRIED_STATES.has(fault.code) || attempt >= MOST_TRIES) throw error;
      await new Promise((resume) => setTimeout(resume, 5 * 2 ** attempt * Math.random()));
    }
  }
}

/**
 * Runs `run` in one transaction of the workshop. Serialization failures and deadlocks run it again, at most five times,
 * so it must not touch anything outside the transaction.
 */
export function withWorkshop<T>(
  workshopId: string,
  run: (tx: Tx) => Promise<T>,
  { readOnly = false } = {},
): Promise<T> {
  return transact(sql`select set_config('app.workshop_id', ${workshopId}, true)`, run, readOnly);
}

export function withScope<T>(scope: 'auth' | 'inbox', run: (tx: Tx) => Promise<T>): Promise<T> {
  return transact(sql`select set_config('app.scope', ${scope}, true)`, run, false);
}

/** Widens a running transaction to a scope for one question, on the same connection (a second one could starve the pool). */
export async function inScope<T>(tx: Tx, scope: 'auth' | 'inbox', run: () => Promise<T>): Promise<T> {
  await tx.execute(sql`select set_config('app.scope', ${scope}, true)`);
  const result = await run();
  await tx.execute(sql`select set_config('app.scope', '', true)`);
  return result;
}

/** One row when the database answers; for the health route. */
export async function databaseAnswers(): Promise<boolean> {
  await database().pool.query('select 1');
  return true;
}
