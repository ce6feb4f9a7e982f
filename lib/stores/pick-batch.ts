/**
 * Taking reserved units out of their bins, saying that something is not there, and what happens when a kit is whole.
 * A pick raises the reservation's picked figure first (which lowers the lot's promise) and then enters the movement, so
 * that no moment has more promised than there is.
 */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { bin, reservation } from '@/db/schema/stores';
import { id } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { BATCH_STATES, type BatchState } from '@/lib/circuits/batch-states';
import { chooseLots } from '@/lib/planning/choose-lots';
import { type BatchRow, batchAfter, lockBatch, moveBatch, nothingReservedIn } from './locked-batch';
import { recordMovements } from './record-movements';
import { lockShelf } from './reserve-batch';

interface LockedReservation extends Record<string, unknown> {
  readonly id: string;
  readonly need_id: string;
  readonly lot_id: string;
  readonly part_id: string;
  readonly part_name: string;
  readonly bin_id: string;
  readonly bin_code: string;
  readonly open: number;
}

/** Locks the lots of the reservations (part id, then lot id) and then the reservations themselves. */
async function lockReservations(tx: Tx, batch: BatchRow, ids: readonly string[]): Promise<Map<string, LockedReservation>> {
  const list = sql.join(
    ids.map((one) => sql`${one}::uuid`),
    sql`, `,
  );
  await tx.execute(sql`
    select t.id from lot t
     where t.workshop_id = ${batch.workshopId}
       and t.id in (select r.lot_id from reservation r where r.workshop_id = ${batch.workshopId} and r.batch_id = ${batch.id} and r.id in (${list}))
     order by t.part_id, t.id for update`);
  const found = await tx.execute<LockedReservation>(sql`
    select r.id, r.need_id, r.lot_id, t.part_id, p.name as part_name, t.bin_id, b.code as bin_code, r.open
      from reservation r
      join lot t on t.workshop_id = r.workshop_id and t.id = r.lot_id
      join part p on p.workshop_id = t.workshop_id and p.id = t.part_id
      join bin b on b.workshop_id = t.workshop_id and b.id = t.bin_id
     where r.workshop_id = ${batch.workshopId} and r.batch_id = ${batch.id} and r.id in (${list})
     order by t.part_id, t.id, r.id
       for update of r`);
  return new Map(found.rows.map((row) => [row.id, row]));
}

/** Kitted when every need is picked in full; otherwise it is being picked. */
async function stateAfterPick(tx: Tx, batch: BatchRow): Promise<BatchState> {
  const open = await tx.execute<{ open: number }>(sql`
    select count(*)::int as open from batch_need n
     where n.workshop_id = ${batch.workshopId} and n.batch_id = ${batch.id}
       and n.quantity > coalesce((select sum(r.picked) from reservation r where r.workshop_id = n.workshop_id and r.need_id = n.id), 0)`);
  return open.rows[0]?.open === 0 ? batchAfter(batch, 'complete-kit') : batchAfter(batch, 'pick');
}

const picked = z.object({ id: id(), number: z.string(), state: z.enum(BATCH_STATES), pickedUnits: z.number().int(), openUnits: z.number().int() });

async function openUnits(tx: Tx, batch: BatchRow): Promise<number> {
  const found = await tx.execute<{ open: number }>(sql`select coalesce(sum(open), 0)::int as open from reservation where workshop_id = ${batch.workshopId} and batch_id = ${batch.id}`);
  return found.rows[0]?.open ?? 0;
}

export const pickBatch = command({
  name: 'batches.pick',
  http: 'POST /batches/{batchId}/pick',
  summary: 'Take reserved units out of their bins; without `picks`, everything that is reserved.',
  roles: ['builder', 'storekeeper', 'lead'],
  input: z.strictObject({
    batchId: id(),
    picks: z
      .array(z.strictObject({ reservationId: id(), quantity: z.number().int('must be a whole number').min(1).max(10_000_000) }))
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
    const wished = input.picks ?? (await everythingOpen(tx, batch));
    if (wished.length === 0) throw nothingReservedIn(batch);
    const held = await lockReservations(
      tx,
      batch,
      wished.map((one) => one.reservationId),
    );
    const picks = wished.map((one, index) => {
      const reserved = held.get(one.reservationId);
      if (!reserved) throw notFound('reservation of this batch');
      if (one.quantity > reserved.open) {
        const detail = `${reserved.open} × ${reserved.part_name} are reserved in ${reserved.bin_code}, not ${one.quantity}.`;
        throw new Refusal('rule.forbids', `${detail} Nothing was taken.`, { errors: [{ pointer: `/picks/${index}/quantity`, code: 'more-than-reserved', detail }] });
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
      picks.map(({ reserved, quantity }) => ({ kind: 'pick', lotId: reserved.lot_id, partId: reserved.part_id, binId: reserved.bin_id, quantity: -quantity, referenceType: 'batch', referenceId: batch.id })),
    );
    const state = await stateAfterPick(tx, batch);
    if (state !== batch.state) await moveBatch(tx, batch, state);
    const units = picks.reduce((sum, one) => sum + one.quantity, 0);
    record(batch.id, { picks: picks.length, units });
    return { id: batch.id, number: batch.number, state, pickedUnits: units, openUnits: await openUnits(tx, batch) };
  },
});

async function everythingOpen(tx: Tx, batch: BatchRow): Promise<{ reservationId: string; quantity: number }[]> {
  const rows = await tx
    .select({ reservationId: reservation.id, quantity: reservation.open })
    .from(reservation)
    .where(and(eq(reservation.workshopId, batch.workshopId), eq(reservation.batchId, batch.id), sql`${reservation.open} > 0`));
  return rows;
}

export const missingAtPick = command({
  name: 'batches.not-there',
  http: 'POST /batches/{batchId}/not-there',
  summary: 'Say how many of a reservation were in the bin: those are taken, the rest is released, the bin is flagged for a count, and the next lot is offered.',
  roles: ['builder', 'storekeeper', 'lead'],
  input: z.strictObject({ batchId: id(), reservationId: id(), found: z.number().int().min(0).max(10_000_000) }),
  output: picked.extend({ binCode: z.string(), reservedInstead: z.number().int(), stillShort: z.number().int() }),
  async run(context) {
    const { tx, actor, input, record } = context;
    const batch = await lockBatch(tx, actor.workshopId, input.batchId);
    batchAfter(batch, 'pick');
    const held = (await lockReservations(tx, batch, [input.reservationId])).get(input.reservationId);
    if (!held) throw notFound('reservation of this batch');
    if (input.found >= held.open) throw new Refusal('rule.forbids', `${held.open} are reserved in ${held.bin_code}; with ${input.found} there, nothing is missing. Take them instead.`);
    const missing = held.open - input.found;
    // Lock what might serve instead before anything is written, in the same order as always.
    const shelf = (await lockShelf(tx, batch.workshopId, [held.part_id])).get(held.part_id) ?? [];
    await tx
      .update(reservation)
      .set({ picked: sql`${reservation.picked} + ${input.found}`, released: sql`${reservation.released} + ${missing}` })
      .where(and(eq(reservation.workshopId, batch.workshopId), eq(reservation.id, held.id)));
    if (input.found > 0) {
      await recordMovements(context, [{ kind: 'pick', lotId: held.lot_id, partId: held.part_id, binId: held.bin_id, quantity: -input.found, referenceType: 'batch', referenceId: batch.id }]);
    }
    await tx
      .update(bin)
      .set({ countDueSince: sql`coalesce(${bin.countDueSince}, now())`, countDueReason: `${missing} × ${held.part_name} missing at a pick for batch ${batch.number}` })
      .where(and(eq(bin.workshopId, batch.workshopId), eq(bin.id, held.bin_id)));
    // The bin whose figure is in doubt is not asked again.
    const elsewhere = shelf.filter((lot) => lot.binId !== held.bin_id);
    const instead = chooseLots(missing, elsewhere);
    if (instead.length > 0) await tx.insert(reservation).values(instead.map((one) => ({ ...one, workshopId: batch.workshopId, batchId: batch.id, needId: held.need_id })));
    const reservedInstead = instead.reduce((sum, one) => sum + one.quantity, 0);
    const state = await stateAfterPick(tx, batch);
    if (state !== batch.state) await moveBatch(tx, batch, state);
    record(batch.id, { bin: held.bin_code, part: held.part_name, found: input.found, missing, reservedInstead });
    return { id: batch.id, number: batch.number, state, pickedUnits: input.found, openUnits: await openUnits(tx, batch), binCode: held.bin_code, reservedInstead, stillShort: missing - reservedInstead };
  },
});
