/** Giving a batch up: promises are released, what was picked goes back. */
import 'server-only';
import { z } from 'zod';
import { id } from '@/lib/api/fields';
import { command } from '@/lib/api/use-case';
import { ended } from './finish-batch';
import { batchAfter, lockBatch, moveBatch } from './locked-batch';
import { releaseOpen } from './pick-units';
import { recordMovements } from './record-movements';
import { pickedOf, prepareReturns } from './returned-units';

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
    const out = await pickedOf(tx, batch);
    const movements = await prepareReturns(
      tx,
      batch,
      out.map((from) => ({ from, quantity: from.picked, binId: null })),
      `batch ${batch.number} cancelled`,
    );
    const releasedReservations = await releaseOpen(tx, batch);
    await recordMovements(context, movements);
    await moveBatch(tx, batch, next);
    const returnedUnits = out.reduce((sum, row) => sum + row.picked, 0);
    record(batch.id, { reason: input.reason, returnedUnits, releasedReservations });
    return { id: batch.id, number: batch.number, state: next, returnedUnits, releasedReservations };
  },
});
