/** Calling a kit complete though lines are missing: somebody decides to build without them, and says why. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id, words } from '@/lib/api/fields';
import { Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { BATCH_STATES } from '@/lib/circuits/batch-states';
import { batchAfter, lockBatch, moveBatch } from './locked-batch';
import { lockLotsOf, releaseOpen } from './pick-units';

const missingLine = z.object({
  needId: id(),
  text: z.string(),
  designators: z.array(z.string()),
  missing: z.number().int(),
});

export const completeKit = command({
  name: 'batches.complete-kit',
  http: 'POST /batches/{batchId}/complete-kit',
  summary:
    'Call a picked kit complete without the lines that are missing; what is still reserved is released, and nothing more is bought for it.',
  roles: ['builder', 'lead'],
  input: z.strictObject({ batchId: id(), reason: words(500) }),
  output: z.object({
    id: id(),
    number: z.string(),
    state: z.enum(BATCH_STATES),
    missing: z.array(missingLine),
    releasedReservations: z.number().int(),
  }),
  async run({ tx, actor, input, record }) {
    const batch = await lockBatch(tx, actor.workshopId, input.batchId);
    const next = batchAfter(batch, 'complete-kit');
    await lockLotsOf(tx, batch);
    const found = await tx.execute<{ row: z.output<typeof missingLine>; picked: number }>(sql`
      select json_build_object('needId', n.id, 'text', l.text, 'designators', l.designators, 'missing', n.quantity - x.picked) as row, x.picked
        from batch_need n
        join line l on l.workshop_id = n.workshop_id and l.id = n.line_id
        cross join lateral (select coalesce(sum(r.picked), 0)::int as picked from reservation r where r.workshop_id = n.workshop_id and r.need_id = n.id) x
       where n.workshop_id = ${batch.workshopId} and n.batch_id = ${batch.id} order by l.position`);
    if (found.rows.every((row) => row.picked === 0))
      throw new Refusal(
        'rule.forbids',
        `Nothing has been picked for batch ${batch.number} yet; there is no kit to complete.`,
      );
    const missing = found.rows.map(({ row }) => row).filter((row) => row.missing > 0);
    const releasedReservations = await releaseOpen(tx, batch);
    await moveBatch(tx, batch, next);
    record(batch.id, {
      reason: input.reason,
      missing: missing.map((one) => [one.needId, one.missing]),
      releasedReservations,
    });
    return { id: batch.id, number: batch.number, state: next, missing, releasedReservations };
  },
});
