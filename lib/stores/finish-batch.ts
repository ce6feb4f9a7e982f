/** Ending a batch that was made: leftovers come back, the rest is used up. */
import 'server-only';
import { z } from 'zod';
import { id } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { BATCH_STATES } from '@/lib/circuits/batch-states';
import { batchAfter, lockBatch, moveBatch } from './locked-batch';
import { recordMovements } from './record-movements';
import { pickedOf, prepareReturns, type Return } from './returned-units';

export const ended = z.object({
  id: id(),
  number: z.string(),
  state: z.enum(BATCH_STATES),
  returnedUnits: z.number().int(),
  releasedReservations: z.number().int(),
});

export const finishBatch = command({
  name: 'batches.finish',
  http: 'POST /batches/{batchId}/finish',
  summary: 'Finish a kitted batch; leftovers go back to the lots they came from, or to another bin.',
  roles: ['builder', 'lead'],
  input: z.strictObject({
    batchId: id(),
    returns: z
      .array(
        z.strictObject({
          needId: id(),
          quantity: z.number().int('must be a whole number').min(1).max(10_000_000),
          binId: id().optional(),
        }),
      )
      .max(1_000)
      .refine((list) => new Set(list.map((one) => one.needId)).size === list.length, 'names a line twice')
      .default([]),
  }),
  output: ended,
  async run(context) {
    const { tx, actor, input, record } = context;
    const batch = await lockBatch(tx, actor.workshopId, input.batchId);
    const next = batchAfter(batch, 'finish');
    const out = await pickedOf(tx, batch);
    const returns: Return[] = [];
    input.returns.forEach((back, index) => {
      // To the newest lot first: the oldest is what the next pick looks for.
      const lots = out.filter((row) => row.need_id === back.needId).reverse();
      if (lots.length === 0) throw notFound('line that was picked for this batch');
      const total = lots.reduce((sum, row) => sum + row.picked, 0);
      if (back.quantity > total) {
        const detail = `${total} were taken for that line, ${back.quantity} can’t come back.`;
        throw new Refusal('rule.forbids', `${detail} Nothing was booked.`, {
          errors: [{ pointer: `/returns/${index}/quantity`, code: 'more-than-picked', detail }],
        });
      }
      let left = back.quantity;
      for (const from of lots) {
        const quantity = Math.min(left, from.picked);
        if (quantity > 0) returns.push({ from, quantity, binId: back.binId ?? null });
        left -= quantity;
      }
    });
    await recordMovements(context, await prepareReturns(tx, batch, returns, `left over from batch ${batch.number}`));
    await moveBatch(tx, batch, next);
    const returnedUnits = returns.reduce((sum, one) => sum + one.quantity, 0);
    record(batch.id, { returnedUnits });
    return { id: batch.id, number: batch.number, state: next, returnedUnits, releasedReservations: 0 };
  },
});
