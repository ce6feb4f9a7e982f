/**
 * The queue: pg-boss on our own database, fed from the outbox. A command writes its job beside its change; the relay
 * hands each outbox row to pg-boss under the row's own id, so a relay that dies between the two steps repeats itself
 * without making a second job. Handlers run at least once and must bear a repeat; how often each queue retries is set
 * where migrate.ts makes the queues.
 */
import 'server-only';
import { asc, inArray, isNull, lte, and, sql } from 'drizzle-orm';
import PgBoss from 'pg-boss';
import { withScope } from '@/db/client';
import { authMail, heartbeat, outbox } from '@/db/schema/records';
import type { Job } from '@/lib/api/use-case';
import { log } from '@/lib/api/log';

export type Queue = Job['queue'];
export interface HandledJob {
  readonly id: string;
  readonly workshopId: string;
  readonly payload: Record<string, unknown>;
}
export type JobHandler = (job: HandledJob) => Promise<void>;

const RELAY_EVERY_MS = 250;
const RELAY_AT_ONCE = 100;
const HEARTBEAT_EVERY_MS = 5_000;
export const HEARTBEAT_NAME = 'jobs';

export async function startJobs(
  connectionString: string,
  handlers: Partial<Record<Queue, JobHandler>>,
): Promise<{ stop(): Promise<void> }> {
  const boss = new PgBoss({
    connectionString,
    schema: 'pgboss',
    migrate: false,
    max: 4,
    application_name: 'ohmstead-jobs',
  });
  boss.on('error', (error) => log.warn({ err: error }, 'queue error'));
  await boss.start();
  for (const [queue, handle] of Object.entries(handlers) as [Queue, JobHandler][]) {
    await boss.work<{ workshopId: string; payload: Record<string, unknown> }>(
      queue,
      { pollingIntervalSeconds: 0.5, batchSize: 1 },
      async (jobs) => {
        for (const job of jobs) {
          try {
            await handle({ id: job.id, workshopId: job.data.workshopId, payload: job.data.payload });
          } catch (error) {
            log.warn({ queue, job: job.id, err: error }, 'job failed; it will be tried again');
            throw error;
          }
        }
      },
    );
  }
  let stopped = false;
  const loops = [
    repeat(
      RELAY_EVERY_MS,
      () => relay(boss),
      () => stopped,
    ),
    repeat(
      RELAY_EVERY_MS,
      () => relayAuthMail(boss),
      () => stopped,
    ),
    repeat(HEARTBEAT_EVERY_MS, beat, () => stopped),
  ];
  return {
    async stop() {
      stopped = true;
      await boss.stop({ graceful: true, timeout: 8_000 });
      await Promise.all(loops);
    },
  };
}

async function repeat(everyMs: number, work: () => Promise<void>, isStopped: () => boolean): Promise<void> {
  while (!isStopped()) {
    try {
      await work();
    } catch (error) {
      // The database may be away for a while; the loop outlives it.
      log.warn({ err: error }, 'job loop');
    }
    await new Promise((resume) => setTimeout(resume, everyMs));
  }
}

async function relay(boss: PgBoss): Promise<void> {
  await withScope('inbox', async (tx) => {
    const waiting = await tx
      .select()
      .from(outbox)
      .where(and(isNull(outbox.relayedAt), lte(outbox.runAfter, sql`now()`)))
      .orderBy(asc(outbox.sequence))
      .limit(RELAY_AT_ONCE)
      .for('update', { skipLocked: true });
    if (waiting.length === 0) return;
    await boss.insert(
      waiting.map((row) => ({
        id: row.id,
        name: row.queue,
        data: { workshopId: row.workshopId, payload: row.payload },
      })),
    );
    await tx
      .update(outbox)
      .set({ relayedAt: new Date() })
      .where(
        inArray(
          outbox.id,
          waiting.map((row) => row.id),
        ),
      );
  });
}

/** Mails written before a workshop was known (links, resets) join the same queue. */
async function relayAuthMail(boss: PgBoss): Promise<void> {
  await withScope('auth', async (tx) => {
    const waiting = await tx
      .select()
      .from(authMail)
      .where(isNull(authMail.relayedAt))
      .orderBy(asc(authMail.createdAt))
      .limit(RELAY_AT_ONCE)
      .for('update', { skipLocked: true });
    if (waiting.length === 0) return;
    await boss.insert(
      waiting.map((row) => ({ id: row.id, name: 'send-mail', data: { workshopId: '', payload: row.payload } })),
    );
    // The link in the mail is a secret: once relayed, only the queue holds it, until the mail is out.
    await tx
      .update(authMail)
      .set({ relayedAt: new Date(), payload: {} })
      .where(
        inArray(
          authMail.id,
          waiting.map((row) => row.id),
        ),
      );
  });
}

async function beat(): Promise<void> {
  await withScope('inbox', (tx) =>
    tx
      .insert(heartbeat)
      .values({ name: HEARTBEAT_NAME, at: new Date() })
      .onConflictDoUpdate({ target: heartbeat.name, set: { at: new Date() } }),
  );
}

/** True when a job process said within the last half minute that it runs. */
export async function jobsAnswer(): Promise<boolean> {
  const rows = await withScope('inbox', (tx) => tx.select().from(heartbeat).limit(1));
  const last = rows[0];
  return last !== undefined && Date.now() - last.at.getTime() < 6 * HEARTBEAT_EVERY_MS;
}
