/** A count of chosen bins: what the ledger has there, and what lately lay there, is to be counted. */
import 'server-only';
import { and, asc, eq, inArray, sql } from 'drizzle-orm';
import { z } from 'zod';
import { newId } from '@/db/schema/new-id';
import { bin, countBin, stockCount } from '@/db/schema/stores';
import { id, words } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { nextNumber } from '@/lib/workshop/next-number';
import { COUNTERS } from './locked-count';

const MOST_BINS = 200;

export const openCount = command({
  name: 'counts.open',
  http: 'POST /counts',
  summary: 'Open a count of chosen bins; a bin is in one count at a time.',
  roles: COUNTERS,
  input: z.strictObject({
    binIds: z.array(id()).min(1, 'choose at least one bin').max(MOST_BINS),
    reason: words(200).default('chosen bins'),
  }),
  output: z.object({ id: id(), number: z.string(), bins: z.number().int(), entries: z.number().int() }),
  async run({ tx, actor, input, record }) {
    const binIds = [...new Set(input.binIds)];
    // Held so that the same bin can't be put into two counts at once: its variance would be booked twice.
    const bins = await tx
      .select({ id: bin.id, code: bin.code, retiredAt: bin.retiredAt })
      .from(bin)
      .where(and(eq(bin.workshopId, actor.workshopId), inArray(bin.id, binIds)))
      .orderBy(asc(bin.id))
      .for('no key update');
    if (bins.length !== binIds.length) throw notFound('bin');
    const retired = bins.find((one) => one.retiredAt !== null);
    if (retired)
      throw new Refusal(
        'rule.forbids',
        `Bin ${retired.code} is retired; there is nothing to count. No count was opened.`,
      );
    const list = sql.join(
      binIds.map((one) => sql`${one}::uuid`),
      sql`, `,
    );
    const busy = await tx.execute<{ code: string; number: string }>(sql`
      select b.code, c.number from count_bin x
        join stock_count c on c.workshop_id = x.workshop_id and c.id = x.count_id
        join bin b on b.workshop_id = x.workshop_id and b.id = x.bin_id
       where x.workshop_id = ${actor.workshopId} and x.bin_id in (${list}) and c.state in ('open', 'counted', 'recount') order by b.code limit 1`);
    const other = busy.rows[0];
    if (other)
      throw new Refusal(
        'state.refused',
        `Bin ${other.code} is being counted already (${other.number}). Post or abandon that count first; none was opened.`,
        { more: other },
      );
    const number = await nextNumber(tx, actor.workshopId, 'count');
    const countId = newId();
    await tx
      .insert(stockCount)
      .values({ workshopId: actor.workshopId, id: countId, number, reason: input.reason, openedBy: actor.personId });
    await tx.insert(countBin).values(binIds.map((binId) => ({ workshopId: actor.workshopId, countId, binId })));
    // Also parts that lay there and are booked out: a drawer emptied on paper is looked into, not skipped.
    const entries = await tx.execute<{ id: string }>(sql`
      insert into count_entry (workshop_id, id, count_id, bin_id, part_id)
      select ${actor.workshopId}, gen_random_uuid(), ${countId}, t.bin_id, t.part_id
        from lot t
       where t.workshop_id = ${actor.workshopId} and t.bin_id in (${list})
       group by t.bin_id, t.part_id
      having sum(t.on_hand) > 0 or max(t.received_at) > now() - interval '1 year'
      returning id`);
    record(countId, { number, bins: bins.length, entries: entries.rows.length });
    return { id: countId, number, bins: bins.length, entries: entries.rows.length };
  },
});
