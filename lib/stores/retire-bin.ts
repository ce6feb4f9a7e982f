/** Taking a bin out of use; its history stays. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { bin } from '@/db/schema/stores';
import { id } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';

export const retireBin = command({
  name: 'bins.retire',
  http: 'POST /bins/{binId}/retire',
  summary: 'Retire an empty bin that is not being counted; its history stays.',
  roles: ['storekeeper', 'lead'],
  input: z.strictObject({ binId: id() }),
  output: z.object({ id: id(), code: z.string() }),
  async run({ tx, actor, input, record }) {
    const own = and(eq(bin.workshopId, actor.workshopId), eq(bin.id, input.binId));
    // Waits for whoever is putting something in (usableBins) and makes the next one see it retired.
    const [row] = await tx
      .select({ id: bin.id, code: bin.code, retiredAt: bin.retiredAt })
      .from(bin)
      .where(own)
      .for('update');
    if (!row) throw notFound('bin');
    if (row.retiredAt !== null) throw new Refusal('state.refused', `Bin ${row.code} is retired already.`);
    const found = await tx.execute<{ units: number; counts: string | null }>(sql`
      select (select coalesce(sum(on_hand), 0)::int from lot where workshop_id = ${actor.workshopId} and bin_id = ${row.id}) as units,
             (select min(c.number) from count_bin x join stock_count c on c.workshop_id = x.workshop_id and c.id = x.count_id
               where x.workshop_id = ${actor.workshopId} and x.bin_id = ${row.id} and c.state in ('open', 'counted', 'recount')) as counts`);
    const { units = 0, counts = null } = found.rows[0] ?? {};
    if (units > 0)
      throw new Refusal(
        'rule.forbids',
        `${units} units still lie in ${row.code}. Move them first; it was not retired.`,
        { more: { units } },
      );
    if (counts !== null)
      throw new Refusal(
        'rule.forbids',
        `${row.code} is being counted (${counts}). Post or abandon that count first; the bin was not retired.`,
      );
    await tx
      .update(bin)
      .set({ retiredAt: new Date(), countDueSince: null, countDueReason: null, doubtful: false })
      .where(own);
    record(row.id, { code: row.code });
    return { id: row.id, code: row.code };
  },
});
