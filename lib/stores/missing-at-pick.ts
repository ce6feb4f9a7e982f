/**
 * "Not there": the units found are taken, the rest of the stop is given up, the bin is flagged for a count and left for
 * last until then, and the next lots that have the part are reserved instead.
 */
import 'server-only';
import { and, eq, inArray, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { bin, reservation } from '@/db/schema/stores';
import { id } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { chooseLots } from '@/lib/planning/choose-lots';
import { type BatchRow, batchAfter, lockBatch, moveBatch } from './locked-batch';
import { lockShelf, takeOff } from './locked-shelf';
import { picked } from './pick-batch';
import { openUnits, pickFrom, stateAfterPick } from './pick-units';
import { recordMovements } from './record-movements';

interface Stop extends Record<string, unknown> {
  readonly bin_id: string;
  readonly bin_code: string;
  readonly part_id: string;
  readonly part_name: string;
}

interface Promised extends Record<string, unknown> {
  readonly id: string;
  readonly need_id: string;
  readonly lot_id: string;
  readonly open: number;
}

export const missingAtPick = command({
  name: 'batches.not-there',
  http: 'POST /batches/{batchId}/not-there',
  summary:
    'Say how many of a stop’s units were in the bin: those are taken, the rest is given up, the bin is flagged for a count, and the next lot is reserved.',
  roles: ['builder', 'storekeeper', 'lead'],
  input: z.strictObject({
    batchId: id(),
    /** Any reservation of the stop: `found` counts for all that the batch takes of this part from this bin. */
    reservationId: id(),
    found: z.number().int('must be a whole number').min(0, 'can’t be negative').max(10_000_000),
  }),
  output: picked.extend({
    binCode: z.string(),
    reservedInstead: z.number().int(),
    insteadBins: z.array(z.string()),
    stillShort: z.number().int(),
  }),
  async run(context) {
    const { tx, actor, input, record } = context;
    const batch = await lockBatch(tx, actor.workshopId, input.batchId);
    batchAfter(batch, 'pick');
    const stop = await stopOf(tx, batch, input.reservationId);
    // Bins before lots, lots before reservations, as everywhere. All lots of the part, since another may serve instead.
    await tx.execute(
      sql`select id from bin where workshop_id = ${batch.workshopId} and id = ${stop.bin_id} for no key update`,
    );
    const shelf = (await lockShelf(tx, batch.workshopId, [stop.part_id])).get(stop.part_id) ?? [];
    const promises = await lockPromises(tx, batch, stop);
    const reserved = promises.reduce((sum, one) => sum + one.open, 0);
    if (reserved === 0)
      throw new Refusal(
        'state.refused',
        `Nothing of ${stop.part_name} in ${stop.bin_code} is left to take for batch ${batch.number}.`,
      );
    if (input.found >= reserved) {
      throw new Refusal(
        'rule.forbids',
        `${reserved} are reserved in ${stop.bin_code}; with ${input.found} there, nothing is missing. Take them instead.`,
      );
    }
    const missing = reserved - input.found;

    let left = input.found;
    const shares = promises.map((one) => {
      const taken = Math.min(left, one.open);
      left -= taken;
      return { ...one, taken, given: one.open - taken };
    });
    await tx.execute(sql`
      update reservation r set picked = r.picked + v.taken, released = r.released + v.given
        from (values ${sql.join(
          shares.map((one) => sql`(${one.id}::uuid, ${one.taken}::int, ${one.given}::int)`),
          sql`, `,
        )}) as v (id, taken, given)
       where r.workshop_id = ${batch.workshopId} and r.id = v.id`);
    await recordMovements(
      context,
      shares.filter((one) => one.taken > 0).map((one) => pickFrom(batch, { ...stop, lot_id: one.lot_id }, one.taken)),
    );
    await tx
      .update(bin)
      .set({
        countDueSince: sql`coalesce(${bin.countDueSince}, now())`,
        countDueReason: `${missing} × ${stop.part_name} missing at a pick for batch ${batch.number}`,
        doubtful: true,
      })
      .where(and(eq(bin.workshopId, batch.workshopId), eq(bin.id, stop.bin_id)));

    // The bin whose figure is in doubt is not asked again for this batch.
    let elsewhere = shelf.filter((lot) => lot.binId !== stop.bin_id);
    const instead: { needId: string; lotId: string; quantity: number }[] = [];
    for (const { need_id: needId, given } of shares) {
      const chosen = given > 0 ? chooseLots(given, elsewhere) : [];
      elsewhere = takeOff(elsewhere, chosen);
      instead.push(...chosen.map((one) => ({ ...one, needId })));
    }
    if (instead.length > 0)
      await tx
        .insert(reservation)
        .values(instead.map((one) => ({ ...one, workshopId: batch.workshopId, batchId: batch.id })));
    const reservedInstead = instead.reduce((sum, one) => sum + one.quantity, 0);
    const usedBins = shelf.filter((lot) => instead.some((one) => one.lotId === lot.lotId)).map((lot) => lot.binId);

    const state = await stateAfterPick(tx, batch);
    if (state !== batch.state) await moveBatch(tx, batch, state);
    record(batch.id, { bin: stop.bin_code, part: stop.part_name, found: input.found, missing, reservedInstead });
    return {
      id: batch.id,
      number: batch.number,
      state,
      pickedUnits: input.found,
      openUnits: await openUnits(tx, batch),
      binCode: stop.bin_code,
      reservedInstead,
      insteadBins: await binCodes(tx, batch.workshopId, usedBins),
      stillShort: missing - reservedInstead,
    };
  },
});

/** Where the reservation is; a lot never changes part or bin, so this needs no lock. */
async function stopOf(tx: Tx, batch: BatchRow, reservationId: string): Promise<Stop> {
  const found = await tx.execute<Stop>(sql`
    select t.bin_id, b.code as bin_code, t.part_id, p.name as part_name
      from reservation r
      join lot t on t.workshop_id = r.workshop_id and t.id = r.lot_id
      join bin b on b.workshop_id = t.workshop_id and b.id = t.bin_id
      join part p on p.workshop_id = t.workshop_id and p.id = t.part_id
     where r.workshop_id = ${batch.workshopId} and r.batch_id = ${batch.id} and r.id = ${reservationId}`);
  const stop = found.rows[0];
  if (!stop) throw notFound('reservation of this batch');
  return stop;
}

/** The batch's open promises of the stop, in the order of their lines, so that what is found makes whole lines first. */
async function lockPromises(tx: Tx, batch: BatchRow, stop: Stop): Promise<Promised[]> {
  const found = await tx.execute<Promised>(sql`
    select r.id, r.need_id, r.lot_id, r.open
      from reservation r
      join lot t on t.workshop_id = r.workshop_id and t.id = r.lot_id
      join batch_need n on n.workshop_id = r.workshop_id and n.id = r.need_id
      join line l on l.workshop_id = n.workshop_id and l.id = n.line_id
     where r.workshop_id = ${batch.workshopId} and r.batch_id = ${batch.id} and t.bin_id = ${stop.bin_id} and t.part_id = ${stop.part_id} and r.open > 0
     order by l.position, t.received_at, r.id
       for update of r`);
  return found.rows;
}

async function binCodes(tx: Tx, workshopId: string, binIds: readonly string[]): Promise<string[]> {
  if (binIds.length === 0) return [];
  const rows = await tx
    .select({ code: bin.code })
    .from(bin)
    .where(and(eq(bin.workshopId, workshopId), inArray(bin.id, [...new Set(binIds)])))
    .orderBy(bin.code);
  return rows.map((row) => row.code);
}
