/**
 * Taking reserved units out of their bins. A pick raises the reservation's picked figure first (which lowers the lot's
 * promise) and then enters the movement, so that no moment has more promised than there is.
 */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { id } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { BATCH_STATES } from '@/lib/circuits/batch-states';
import { type BatchRow, batchAfter, lockBatch, moveBatch, nothingReservedIn } from './locked-batch';
import { openUnits, pickFrom, stateAfterPick } from './pick-units';
import { recordMovements } from './record-movements';

interface LockedReservation extends Record<string, unknown> {
  readonly id: string;
  readonly lot_id: string;
  readonly part_id: string;
  readonly part_name: string;
  readonly bin_id: string;
  readonly bin_code: string;
  readonly open: number;
}

export const picked = z.object({
  id: id(),
  number: z.string(),
  state: z.enum(BATCH_STATES),
  pickedUnits: z.number().int(),
  openUnits: z.number().int(),
});

export const pickBatch = command({
  name: 'batches.pick',
  http: 'POST /batches/{batchId}/pick',
  summary: 'Take reserved units out of their bins; without `picks`, everything that is reserved.',
  roles: ['builder', 'storekeeper', 'lead'],
  input: z.strictObject({
    batchId: id(),
    picks: z
      .array(
        z.strictObject({
          reservationId: id(),
          quantity: z.number().int('must be a whole number').min(1).max(10_000_000),
        }),
      )
      .min(1)
      .max(1_000)
      .refine((list) => new Set(list.map((one) => one.reservationId)).size === list.length, 'names a reservation twice')
      .optional(),
  }),
  output: picked,
  async run(context) {
    const { tx, actor, input, record } = context;
    const batch = await lockBatch(tx, actor.workshopId, input.batchId);
    batchAfter(batch, 'pick');
    const held = await lockReservations(tx, batch, input.picks?.map((one) => one.reservationId) ?? null);
    const wished =
      input.picks ??
      [...held.values()].filter((one) => one.open > 0).map((one) => ({ reservationId: one.id, quantity: one.open }));
    if (wished.length === 0) throw nothingReservedIn(batch);
    const picks = wished.map((one, index) => {
      const reserved = held.get(one.reservationId);
      if (!reserved) throw notFound('reservation of this batch');
      if (one.quantity > reserved.open) {
        const detail = `${reserved.open} × ${reserved.part_name} are reserved in ${reserved.bin_code}, not ${one.quantity}.`;
        throw new Refusal('rule.forbids', `${detail} Nothing was taken.`, {
          errors: [{ pointer: `/picks/${index}/quantity`, code: 'more-than-reserved', detail }],
        });
      }
      return { ...one, reserved };
    });
    await tx.execute(sql`
      update reservation r set picked = r.picked + v.quantity
        from (values ${sql.join(
          picks.map((one) => sql`(${one.reservationId}::uuid, ${one.quantity}::int)`),
          sql`, `,
        )}) as v (id, quantity)
       where r.workshop_id = ${batch.workshopId} and r.id = v.id`);
    await recordMovements(
      context,
      picks.map(({ reserved, quantity }) => pickFrom(batch, reserved, quantity)),
    );
    const state = await stateAfterPick(tx, batch);
    if (state !== batch.state) await moveBatch(tx, batch, state);
    const units = picks.reduce((sum, one) => sum + one.quantity, 0);
    record(batch.id, { picks: picks.length, units });
    return { id: batch.id, number: batch.number, state, pickedUnits: units, openUnits: await openUnits(tx, batch) };
  },
});

/** Locks the lots of the batch's reservations (part id, then lot id), then the reservations; all open ones where none are named. */
async function lockReservations(
  tx: Tx,
  batch: BatchRow,
  ids: readonly string[] | null,
): Promise<Map<string, LockedReservation>> {
  const meant =
    ids === null
      ? sql`r.open > 0`
      : sql`r.id in (${sql.join(
          ids.map((one) => sql`${one}::uuid`),
          sql`, `,
        )})`;
  await tx.execute(sql`
    select t.id from lot t
     where t.workshop_id = ${batch.workshopId}
       and t.id in (select r.lot_id from reservation r where r.workshop_id = ${batch.workshopId} and r.batch_id = ${batch.id} and ${meant})
     order by t.part_id, t.id for update`);
  const found = await tx.execute<LockedReservation>(sql`
    select r.id, r.lot_id, t.part_id, p.name as part_name, t.bin_id, b.code as bin_code, r.open
      from reservation r
      join lot t on t.workshop_id = r.workshop_id and t.id = r.lot_id
      join part p on p.workshop_id = t.workshop_id and p.id = t.part_id
      join bin b on b.workshop_id = t.workshop_id and b.id = t.bin_id
     where r.workshop_id = ${batch.workshopId} and r.batch_id = ${batch.id} and ${meant}
     order by t.part_id, t.id, r.id
       for update of r`);
  return new Map(found.rows.map((row) => [row.id, row]));
}
