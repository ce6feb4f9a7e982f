/**
 * Posting a count: every variance becomes movements with its reason. What is booked is counted less the ledger at the
 * moment of counting, applied to the lots as they are now, so picks in between are neither undone nor booked twice.
 */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { bin, countEntry, lot } from '@/db/schema/stores';
import { id, words } from '@/lib/api/fields';
import { Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { type CountedLot, type OpenPromise, spreadVariance } from '@/lib/planning/spread-variance';
import { COUNT_STATES } from './count-states';
import { countAfter, COUNTERS, lockCount, moveCount } from './locked-count';
import { type Movement, recordMovements } from './record-movements';

const released = z.object({
  batchId: id(),
  number: z.string(),
  circuit: z.string(),
  partName: z.string(),
  quantity: z.number().int(),
});

interface LotHere extends CountedLot {
  readonly partId: string;
  readonly binId: string;
}

export const postCount = command({
  name: 'counts.post',
  http: 'POST /counts/{countId}/post',
  summary:
    'Book the variances of a finished count as movements, each with its reason; promises of units that are not there are given up, the youngest first.',
  roles: COUNTERS,
  input: z.strictObject({
    countId: id(),
    reasons: z
      .array(z.strictObject({ entryId: id(), reason: words(200) }))
      .max(1_000)
      .default([]),
  }),
  output: z.object({
    id: id(),
    number: z.string(),
    state: z.enum(COUNT_STATES),
    movements: z.number().int(),
    correctedUnits: z.number().int(),
    releasedUnits: z.number().int(),
    released: z.array(released),
  }),
  async run(context) {
    const { tx, actor, input, record } = context;
    const count = await lockCount(tx, actor.workshopId, input.countId);
    const next = countAfter(count, 'post');
    await tx.execute(sql`
      select b.id from bin b where b.workshop_id = ${actor.workshopId} and b.id in (select bin_id from count_bin where workshop_id = ${actor.workshopId} and count_id = ${count.id})
       order by b.id for no key update`);
    const entries = await tx
      .select()
      .from(countEntry)
      .where(and(eq(countEntry.workshopId, actor.workshopId), eq(countEntry.countId, count.id)))
      .orderBy(countEntry.partId, countEntry.binId);
    const lots = await lockLotsOfCount(tx, actor.workshopId, count.id);
    const reasons = new Map(input.reasons.map((one) => [one.entryId, one.reason]));
    const movements: Movement[] = [];
    const newLots: { id: string; partId: string; binId: string }[] = [];
    const releases: { reservationId: string; quantity: number }[] = [];
    for (const entry of entries) {
      if (entry.counted === null || entry.ledgerAtCount === null)
        throw new Error(`entry ${entry.id} of a counted count has no figure`);
      const variance = entry.counted - entry.ledgerAtCount;
      if (variance === 0) continue;
      const why =
        reasons.get(entry.id) ??
        (entry.found ? 'found, not in the ledger' : variance < 0 ? 'fewer than the ledger' : 'more than the ledger');
      const place = {
        partId: entry.partId,
        binId: entry.binId,
        kind: 'count' as const,
        referenceType: 'count-entry',
        referenceId: entry.id,
        reason: `count ${count.number}: ${why}`,
      };
      const here = lots.filter((one) => one.partId === entry.partId && one.binId === entry.binId);
      if (here.length === 0) {
        // Found where the ledger knew nothing: a lot of unknown origin, at no cost.
        const made = { id: newId(), partId: entry.partId, binId: entry.binId };
        newLots.push(made);
        movements.push({ ...place, lotId: made.id, quantity: variance });
        continue;
      }
      const spread = spreadVariance(variance, here);
      if (spread.uncovered > 0) {
        throw new Refusal(
          'conflict',
          `Since it was counted, so much was taken that ${spread.uncovered} units can’t be booked off any more. Count that bin again; nothing was booked.`,
          { more: { entryId: entry.id } },
        );
      }
      releases.push(...spread.releases);
      movements.push(...spread.changes.map((change) => ({ ...place, lotId: change.lotId, quantity: change.quantity })));
    }
    if (newLots.length > 0)
      await tx.insert(lot).values(newLots.map((one) => ({ ...one, workshopId: actor.workshopId })));
    // First the promises give way, then the units go: no moment has more promised than there is.
    const given = await giveUp(tx, actor.workshopId, releases);
    await recordMovements(context, movements);
    await clearDue(tx, actor.workshopId, count.id);
    await moveCount(tx, count, next, { postedBy: actor.personId, postedAt: new Date() });
    const correctedUnits = movements.reduce((sum, one) => sum + Math.abs(one.quantity), 0);
    const releasedUnits = given.reduce((sum, one) => sum + one.quantity, 0);
    record(count.id, {
      number: count.number,
      movements: movements.length,
      correctedUnits,
      released: given.map((one) => [one.number, one.partName, one.quantity]),
    });
    return {
      id: count.id,
      number: count.number,
      state: next,
      movements: movements.length,
      correctedUnits,
      releasedUnits,
      released: given,
    };
  },
});

/** The lots of every counted place with their open promises; lots locked in the fixed order, then the promises. */
async function lockLotsOfCount(tx: Tx, workshopId: string, countId: string): Promise<LotHere[]> {
  const lots = await tx.execute<{
    id: string;
    part_id: string;
    bin_id: string;
    on_hand: number;
    received_ms: string;
  }>(sql`
    select t.id, t.part_id, t.bin_id, t.on_hand, extract(epoch from t.received_at) * 1000 as received_ms
      from lot t
     where t.workshop_id = ${workshopId} and (t.bin_id, t.part_id) in (select bin_id, part_id from count_entry where workshop_id = ${workshopId} and count_id = ${countId})
     order by t.part_id, t.id for update`);
  if (lots.rows.length === 0) return [];
  const promises = await tx.execute<{ id: string; lot_id: string; open: number; made_ms: string }>(sql`
    select r.id, r.lot_id, r.open, extract(epoch from r.created_at) * 1000 as made_ms from reservation r
     where r.workshop_id = ${workshopId} and r.lot_id in (${sql.join(
       lots.rows.map((one) => sql`${one.id}::uuid`),
       sql`, `,
     )}) and r.quantity - r.picked - r.released > 0
     order by r.id for update`);
  const byLot = new Map<string, OpenPromise[]>();
  for (const { id: reservationId, lot_id, open, made_ms } of promises.rows) {
    byLot.set(lot_id, [...(byLot.get(lot_id) ?? []), { reservationId, open, madeAtMs: Number(made_ms) }]);
  }
  return lots.rows.map((one) => ({
    lotId: one.id,
    partId: one.part_id,
    binId: one.bin_id,
    onHand: one.on_hand,
    receivedAtMs: Number(one.received_ms),
    promises: byLot.get(one.id) ?? [],
  }));
}

/** Units that are not there can't stay promised: says whose promises were given up, for their batches are short again. */
async function giveUp(
  tx: Tx,
  workshopId: string,
  releases: readonly { reservationId: string; quantity: number }[],
): Promise<z.output<typeof released>[]> {
  if (releases.length === 0) return [];
  const values = sql.join(
    releases.map((one) => sql`(${one.reservationId}::uuid, ${one.quantity}::int)`),
    sql`, `,
  );
  await tx.execute(
    sql`update reservation r set released = r.released + v.quantity from (values ${values}) as v (id, quantity) where r.workshop_id = ${workshopId} and r.id = v.id`,
  );
  const found = await tx.execute<{ row: z.output<typeof released> }>(sql`
    select json_build_object('batchId', b.id, 'number', b.number, 'circuit', c.name, 'partName', p.name, 'quantity', sum(v.quantity)) as row
      from (values ${values}) as v (id, quantity)
      join reservation r on r.workshop_id = ${workshopId} and r.id = v.id
      join lot t on t.workshop_id = r.workshop_id and t.id = r.lot_id join part p on p.workshop_id = t.workshop_id and p.id = t.part_id
      join batch b on b.workshop_id = r.workshop_id and b.id = r.batch_id
      join revision k on k.workshop_id = b.workshop_id and k.id = b.revision_id join circuit c on c.workshop_id = k.workshop_id and c.id = k.circuit_id
     group by b.id, b.number, c.name, p.name order by b.number, p.name`);
  return found.rows.map(({ row }) => row);
}

async function clearDue(tx: Tx, workshopId: string, countId: string): Promise<void> {
  await tx
    .update(bin)
    .set({ countDueSince: null, countDueReason: null, doubtful: false })
    .where(
      and(
        eq(bin.workshopId, workshopId),
        sql`${bin.id} in (select bin_id from count_bin where workshop_id = ${workshopId} and count_id = ${countId})`,
      ),
    );
}
