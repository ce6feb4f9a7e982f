/** A count under its row lock, and the change of its state: where every count command starts and ends. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { stockCount } from '@/db/schema/stores';
import { notFound, Refusal } from '@/lib/api/problem';
import { COUNT_STATES, type CountAct, type CountState, countStateAfter } from './count-states';

export type CountRow = Omit<typeof stockCount.$inferSelect, 'state'> & { readonly state: CountState };

/** Who counts, and who may correct the ledger by it. */
export const COUNTERS = ['storekeeper', 'lead'] as const;

export async function lockCount(tx: Tx, workshopId: string, countId: string): Promise<CountRow> {
  const [row] = await tx
    .select()
    .from(stockCount)
    .where(and(eq(stockCount.workshopId, workshopId), eq(stockCount.id, countId)))
    .for('update');
  if (!row) throw notFound('count');
  const state = COUNT_STATES.find((one) => one === row.state);
  if (!state) throw new Error(`unknown count state ${row.state}`);
  return { ...row, state };
}

const ACT_WORDS: Record<CountAct, string> = {
  enter: 'counted',
  complete: 'completed',
  'ask-again': 'counted again',
  post: 'posted',
  abandon: 'abandoned',
};

/** The state the act leads to; refuses with the state it is in. */
export function countAfter(row: CountRow, act: CountAct): CountState {
  const next = countStateAfter(row.state, act);
  if (next === null)
    throw new Refusal('state.refused', `Count ${row.number} is ${row.state}; it can’t be ${ACT_WORDS[act]} now.`, {
      more: { state: row.state },
    });
  return next;
}

/** Writes the new state; the row is locked, so a miss is a bug. */
export async function moveCount(
  tx: Tx,
  row: CountRow,
  state: CountState,
  changes: Partial<typeof stockCount.$inferInsert> = {},
): Promise<void> {
  const changed = await tx
    .update(stockCount)
    .set({ ...changes, state, version: sql`${stockCount.version} + 1` })
    .where(and(eq(stockCount.workshopId, row.workshopId), eq(stockCount.id, row.id), eq(stockCount.state, row.state)))
    .returning({ id: stockCount.id });
  if (changed.length !== 1) throw new Error(`count ${row.id} changed state under its lock`);
}
