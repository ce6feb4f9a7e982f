/** Ending a batch: finished, with leftovers back in a bin, or cancelled, with everything given back. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { lot } from '@/db/schema/stores';
import { id } from '@/lib/api/fields';
import { Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { BATCH_STATES } from '@/lib/circuits/batch-states';
import { type BatchRow, batchAfter, lockBatch, moveBatch } from './locked-batch';
import { type Movement, recordMovements } from './record-movements';
import { releaseOpen } from './reserve-batch';

const ended = z.object({ id: id(), number: z.string(), state: z.enum(BATCH_STATES), returnedUnits: z.number().int(), releasedReservations: z.number().int() });

interface PickedUnits extends Record<string, unknown> {
  readonly need_id: string;
  readonly lot_id: string;
  readonly part_id: string;
  readonly bin_id: string;
  readonly bin_retired: boolean;
  readonly picked: number;
}

/** What was picked for the batch and is still out, by lot; the lots are locked in the fixed order. */
async function lockPicked(tx: Tx, batch: BatchRow): Promise<PickedUnits[]> {
  const found = await tx.execute<PickedUnits>(sql`
    select r.need_id, t.id as lot_id, t.part_id, t.bin_id, b.retired_at is not null as bin_retired, sum(r.picked)::int as picked
      from reservation r
      join lot t on t.workshop_id = r.workshop_id and t.id = r.lot_id
      join bin b on b.workshop_id = t.workshop_id and b.id = t.bin_id
     where r.workshop_id = ${batch.workshopId} and r.batch_id = ${batch.id} and r.picked > 0
     group by r.need_id, t.id, t.part_id, t.bin_id, b.retired_at
     order by t.part_id, t.id`);
  if (found.rows.length > 0) {
    await tx.execute(sql`select id from lot where workshop_id = ${batch.workshopId} and id in (${sql.join(
      [...new Set(found.rows.map((row) => row.lot_id))].map((one) => sql`${one}::uuid`),
      sql`, `,
    )}) order by part_id, id for update`);
  }
  return found.rows;
}

const returnTo = (batch: BatchRow, row: PickedUnits, quantity: number, reason: string): Movement => ({
  kind: 'return',
  lotId: row.lot_id,
  partId: row.part_id,
  binId: row.bin_id,
  quantity,
  referenceType: 'batch',
  referenceId: batch.id,
  reason,
});

export const finishBatch = command({
  name: 'batches.finish',
  http: 'POST /batches/{batchId}/finish',
  summary: 'Finish a kitted batch; leftovers go back to the lots they came from.',
  roles: ['builder', 'lead'],
  input: z.strictObject({
    batchId: id(),
    returns: z
      .array(z.strictObject({ needId: id(), quantity: z.number().int().min(1).max(10_000_000) }))
      .max(1_000)
      .refine((list) => new Set(list.map((one) => one.needId)).size === list.length, 'names a line twice')
      .default([]),
  }),
  output: ended,
  async run(context) {
    const { tx, actor, input, record } = context;
    const batch = await lockBatch(tx, actor.workshopId, input.batchId);
    const next = batchAfter(batch, 'finish');
    const out = await lockPicked(tx, batch);
    const movements: Movement[] = [];
    input.returns.forEach((back, index) => {
      // To the newest lot first: the oldest is what the next pick looks for.
      const lots = out.filter((row) => row.need_id === back.needId).reverse();
      const total = lots.reduce((sum, row) => sum + row.picked, 0);
      if (back.quantity > total) {
        const detail = `${total} were taken for that line, ${back.quantity} can’t come back.`;
        throw new Refusal('rule.forbids', `${detail} Nothing was booked.`, { errors: [{ pointer: `/returns/${index}/quantity`, code: 'more-than-picked', detail }] });
      }
      let left = back.quantity;
      for (const row of lots) {
        const quantity = Math.min(left, row.picked);
        if (quantity > 0) movements.push(returnTo(batch, row, quantity, `left over from batch ${batch.number}`));
        left -= quantity;
      }
    });
    await recordMovements(context, movements);
    await moveBatch(tx, batch, next);
    const returnedUnits = movements.reduce((sum, one) => sum + one.quantity, 0);
    record(batch.id, { returnedUnits });
    return { id: batch.id, number: batch.number, state: next, returnedUnits, releasedReservations: 0 };
  },
});

export const cancelBatch = command({
  name: 'batches.cancel',
  http: 'POST /batches/{batchId}/cancel',
  summary: 'Cancel a batch: what is reserved is released, what was picked goes back to its lots.',
  roles: ['builder', 'lead'],
  input: z.strictObject({ batchId: id(), reason: z.string().trim().max(500).default('') }),
  output: ended,
  async run(context) {
    const { tx, actor, input, record } = context;
    const batch = await lockBatch(tx, actor.workshopId, input.batchId);
    const next = batchAfter(batch, 'cancel');
    await lockReserved(tx, batch);
    const out = await lockPicked(tx, batch);
    const released = await releaseOpen(tx, batch.workshopId, batch.id);
    await recordMovements(
      context,
      out.map((row) => returnTo(batch, row, row.picked, `batch ${batch.number} cancelled`)),
    );
    await moveBatch(tx, batch, next);
    const returnedUnits = out.reduce((sum, row) => sum + row.picked, 0);
    record(batch.id, { reason: input.reason, returnedUnits, released });
    return { id: batch.id, number: batch.number, state: next, returnedUnits, releasedReservations: released };
  },
});

/** Every lot the batch has to do with, in the fixed order and in one pass. */
async function lockReserved(tx: Tx, batch: BatchRow): Promise<void> {
  await tx
    .select({ id: lot.id })
    .from(lot)
    .where(and(eq(lot.workshopId, batch.workshopId), sql`${lot.id} in (select lot_id from reservation r where r.workshop_id = ${batch.workshopId} and r.batch_id = ${batch.id})`))
    .orderBy(lot.partId, lot.id)
    .for('update');
}
