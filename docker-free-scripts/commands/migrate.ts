/**
 * Brings a database up to date as its owner (DATABASE_OWNER_URL): the migrations of drizzle/, then the schema and queues
 * of the job store, then the application's rights on them. May run any number of times, and from several machines at
 * once. Exit status 1 with one line on standard error when it can't.
 */
import './load-environment';
import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import pg from 'pg';
import PgBoss from 'pg-boss';
import type { Job } from '@/lib/api/use-case';
import { type AppliedMigration, journalProblem, MIGRATIONS_FOLDER, readJournal } from './migration-journal';

const LOCK_KEY = 4_600_001;
const LOCK_WAIT = '120s';

/**
 * The application may not make tables, and a queue is one, so queues are made here. A job that a killed process held
 * runs again after `expireInSeconds`; all retries together span about an hour, longer than a service's short outage.
 */
const QUEUES = {
  'send-mail': { retryLimit: 8, retryDelay: 15, retryBackoff: true, expireInSeconds: 120 },
  'send-order': { retryLimit: 8, retryDelay: 15, retryBackoff: true, expireInSeconds: 180 },
  'payment-event': { retryLimit: 10, retryDelay: 5, retryBackoff: true, expireInSeconds: 60 },
  'refund-payment': { retryLimit: 10, retryDelay: 5, retryBackoff: true, expireInSeconds: 60 },
  'read-upload': { retryLimit: 3, retryDelay: 5, retryBackoff: true, expireInSeconds: 600 },
  'match-revision': { retryLimit: 3, retryDelay: 5, retryBackoff: true, expireInSeconds: 600 },
  'match-stock-changed': { retryLimit: 3, retryDelay: 5, retryBackoff: true, expireInSeconds: 600 },
} satisfies Record<Job['queue'], Omit<PgBoss.Queue, 'name'>>;

/** pg-boss's own queue for schedules; it would make it itself at start if it had the right to. */
const SCHEDULE_QUEUE = '__pgboss__send-it';

async function appliedMigrations(client: pg.Client): Promise<AppliedMigration[]> {
  const table = await client.query<{ name: string | null }>(
    `select to_regclass('drizzle.__drizzle_migrations')::text as name`,
  );
  if (!table.rows[0]?.name) return [];
  const { rows } = await client.query<{ created_at: string; hash: string }>(
    'select created_at, hash from drizzle.__drizzle_migrations',
  );
  return rows.map((row) => ({ when: Number(row.created_at), hash: row.hash }));
}

async function applyMigrations(client: pg.Client): Promise<void> {
  const journal = readJournal();
  const before = await appliedMigrations(client);
  const problem = journalProblem(journal, before);
  if (problem) throw new Error(problem);

  await migrate(drizzle(client), { migrationsFolder: MIGRATIONS_FOLDER });

  const had = new Set(before.map((migration) => migration.when));
  const has = new Set((await appliedMigrations(client)).map((migration) => migration.when));
  const missed = journal.filter((entry) => !has.has(entry.when));
  if (missed.length > 0) throw new Error(`not applied: ${missed.map((entry) => entry.tag).join(', ')}`);
  for (const entry of journal) if (!had.has(entry.when)) console.log(`applied ${entry.tag}`);
  if (journal.every((entry) => had.has(entry.when))) console.log(`up to date with ${journal.length} migrations`);
}

async function prepareJobStore(connectionString: string, client: pg.Client): Promise<void> {
  const boss = new PgBoss({
    connectionString,
    schema: 'pgboss',
    migrate: true,
    supervise: false,
    schedule: false,
    max: 2,
  });
  const faults: Error[] = [];
  boss.on('error', (error) => faults.push(error));
  await boss.start();
  try {
    await boss.createQueue(SCHEDULE_QUEUE);
    for (const [name, options] of Object.entries(QUEUES)) {
      await boss.createQueue(name, { name, ...options });
      await boss.updateQueue(name, { name, ...options });
    }
  } finally {
    await boss.stop({ graceful: false, wait: true });
  }
  const [fault] = faults;
  if (fault) throw fault;
  await client.query(`
    GRANT USAGE ON SCHEMA pgboss TO ohmstead_app;
    GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA pgboss TO ohmstead_app;
    REVOKE ALL ON FUNCTION pgboss.create_queue(text, json), pgboss.delete_queue(text) FROM PUBLIC;
  `);
}

async function main(): Promise<void> {
  const connectionString = process.env.DATABASE_OWNER_URL;
  if (!connectionString)
    throw new Error(
      'DATABASE_OWNER_URL is not set: expected postgres://ohmstead_owner:…@HOST:PORT/NAME (docker-free-scripts/db.sh url owner prints it).',
    );
  const client = new pg.Client({
    connectionString,
    connectionTimeoutMillis: 10_000,
    application_name: 'ohmstead migrate',
  });
  await client.connect();
  try {
    // The server's own limits are meant for requests; a migration may rewrite a large table.
    await client.query(
      `SET lock_timeout = '${LOCK_WAIT}'; SET idle_in_transaction_session_timeout = 0; SET client_min_messages = warning`,
    );
    await client.query('SELECT pg_advisory_lock($1)', [LOCK_KEY]);
    await applyMigrations(client);
    await prepareJobStore(connectionString, client);
  } finally {
    await client.end();
  }
}

main().catch((error: unknown) => {
  const cause = error instanceof Error && error.cause instanceof Error ? `: ${error.cause.message}` : '';
  console.error(`migrate: ${error instanceof Error ? error.message : String(error)}${cause}`);
  process.exitCode = 1;
});
