/** A batch under its row lock, and the conditional change of its state: where every batch command starts and ends. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { batch } from '@/db/schema/circuits';
import { notFound, Refusal } from '@/lib/api/problem';
import { BATCH_STATES, type BatchAct, type BatchState, batchStateAfter } from '@/lib/circuits/batch-states';

export type BatchRow = Omit<typeof batch.$inferSelect, 'state'> & { readonly state: BatchState };

function toState(text: string): BatchState {
  const state = BATCH_STATES.find((one) => one === text);
  if (!state) throw new Error(`unknown batch state ${text}`);
  return state;
}

export async function lockBatch(tx: Tx, workshopId: string, batchId: string): Promise<BatchRow> {
  const [row] = await tx
    .select()
    .from(batch)
    .where(and(eq(batch.workshopId, workshopId), eq(batch.id, batchId)))
    .for('update');
  if (!row) throw notFound('batch');
  return { ...row, state: toState(row.state) };
}

const ACT_WORDS: Record<BatchAct, string> = {
  reserve: 'reserved for',
  pick: 'picked',
  'complete-kit': 'kitted',
  finish: 'finished',
  cancel: 'cancelled',
};

/** The state the act leads to; refuses with the state it is in. */
export function batchAfter(row: BatchRow, act: BatchAct): BatchState {
  const next = batchStateAfter(row.state, act);
  if (next === null)
    throw new Refusal('state.refused', `Batch ${row.number} is ${row.state}; it can’t be ${ACT_WORDS[act]} now.`, {
      more: { state: row.state },
    });
  return next;
}

/** Writes the new state; the row is locked, so a miss is a bug. */
export async function moveBatch(tx: Tx, row: BatchRow, state: BatchState): Promise<void> {
  const changed = await tx
    .update(batch)
    .set({ state, version: sql`${batch.version} + 1` })
    .where(and(eq(batch.workshopId, row.workshopId), eq(batch.id, row.id), eq(batch.state, row.state)))
    .returning({ id: batch.id });
  if (changed.length !== 1) throw new Error(`batch ${row.id} changed state under its lock`);
}

/** For commands that need at least one open reservation to work on. */
export function nothingReservedIn(row: BatchRow): Refusal {
  return new Refusal('state.refused', `Nothing is reserved for batch ${row.number}. Reserve first.`);
}
