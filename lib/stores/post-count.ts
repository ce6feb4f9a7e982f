/** Posting a count: every variance becomes a movement with its reason; the bins' due flags are cleared. */
import 'server-only';
import { and, eq, inArray, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { bin, countEntry, lot } from '@/db/schema/stores';
import { id } from '@/lib/api/fields';
import { Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { spreadVariance } from '@/lib/planning/spread-variance';
import { countAfter, lockCount, lotsCounted, moveCount } from './count-bins';
import { COUNT_STATES } from './count-states';
import { type Movement, recordMovements } from './record-movements';

export const postCount = command({
  name: 'counts.post',
  http: 'POST /counts/{countId}/post',
  summary: 'Book the variances of a finished count as movements; each with its reason.',
  roles: ['storekeeper', 'lead'],
  input: z.strictObject({
    countId: id(),
    reasons: z.array(z.strictObject({ entryId: id(), reason: z.string().trim().min(1).max(200) })).max(1_000).default([]),
  }),
  output: z.object({ id: id(), number: z.string(), state: z.enum(COUNT_STATES), movements: z.number().int(), correctedUnits: z.number().int(), releasedUnits: z.number().int() }),
  async run(context) {
    const { tx, actor, input, record } = context;
    const count = await lockCount(tx, actor.workshopId, input.countId);
    const next = countAfter(count, 'post');
    const entries = await tx
      .select()
      .from(countEntry)
      .where(and(eq(countEntry.workshopId, actor.workshopId), eq(countEntry.countId, count.id)))
      .orderBy(countEntry.partId, countEntry.binId);
    const lots = await lotsCounted(tx, actor.workshopId, count.id);
    const reasons = new Map(input.reasons.map((one) => [one.entryId, one.reason]));
    const movements: Movement[] = [];
    const newLots: { id: string; partId: string; binId: string }[] = [];
    const releases: { lotId: string; quantity: number }[] = [];
    for (const entry of entries) {
      if (entry.counted === null || entry.ledgerAtCount === null) throw new Error(`entry ${entry.id} of a counted count has no figure`);
      const variance = entry.counted - entry.ledgerAtCount;
      if (variance === 0) continue;
      const reason = `count ${count.number}: ${reasons.get(entry.id) ?? (entry.found ? 'found, not in the ledger' : variance < 0 ? 'fewer than the ledger' : 'more than the ledger')}`;
      const place = { partId: entry.partId, binId: entry.binId, kind: 'count' as const, referenceType: 'count-entry', referenceId: entry.id, reason };
      const here = lots.filter((one) => one.partId === entry.partId && one.binId === entry.binId);
      if (here.length === 0) {
        // Found where the ledger knew nothing: a lot of unknown origin, at no cost.
        const made = { id: newId(), partId: entry.partId, binId: entry.binId };
        newLots.push(made);
        movements.push({ ...place, lotId: made.id, quantity: variance });
        continue;
      }
      const spread = spreadVariance(
        variance,
        here.map((one) => ({ lotId: one.id, onHand: one.onHand, reserved: one.reserved, receivedAtMs: one.receivedAt.getTime() })),
      );
      if (spread.uncovered > 0) {
        throw new Refusal('conflict', `Since it was counted, so much was taken that ${spread.uncovered} units can’t be booked off any more. Count that bin again.`, { more: { entryId: entry.id } });
      }
      releases.push(...spread.release);
      movements.push(...spread.changes.map((change) => ({ ...place, lotId: change.lotId, quantity: change.quantity })));
    }
    if (newLots.length > 0) await tx.insert(lot).values(newLots.map((one) => ({ ...one, workshopId: actor.workshopId })));
    const releasedUnits = await releaseYoungest(tx, actor.workshopId, releases);
    await recordMovements(context, movements);
    const binIds = [...new Set(entries.map((entry) => entry.binId))];
    if (binIds.length > 0) {
      await tx
        .update(bin)
        .set({ countDueSince: null, countDueReason: null })
        .where(and(eq(bin.workshopId, actor.workshopId), inArray(bin.id, binIds)));
    }
    await moveCount(tx, count, next, { postedBy: actor.personId, postedAt: new Date() });
    const correctedUnits = movements.reduce((sum, one) => sum + Math.abs(one.quantity), 0);
    record(count.id, { number: count.number, movements: movements.length, correctedUnits, releasedUnits });
    return { id: count.id, number: count.number, state: next, movements: movements.length, correctedUnits, releasedUnits };
  },
});

/** Units that are not there can't stay promised: the youngest promises give way, and their batches are short again. */
async function releaseYoungest(tx: Tx, workshopId: string, releases: readonly { lotId: string; quantity: number }[]): Promise<number> {
  let released = 0;
  for (const { lotId, quantity } of releases) {
    const promises = await tx.execute<{ id: string; open: number }>(sql`
      select id, open from reservation where workshop_id = ${workshopId} and lot_id = ${lotId} and open > 0 order by created_at desc, id desc for update`);
    let left = quantity;
    for (const promise of promises.rows) {
      const units = Math.min(left, promise.open);
      if (units === 0) break;
      await tx.execute(sql`update reservation set released = released + ${units} where workshop_id = ${workshopId} and id = ${promise.id}`);
      left -= units;
      released += units;
    }
  }
  return released;
}
