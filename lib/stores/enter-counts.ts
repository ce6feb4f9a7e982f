/**
 * Entering what was counted, blind. The ledger's figure is taken under the lots' locks at that moment, so that picking
 * may go on before and after: what is posted later is only the difference seen here.
 */
import 'server-only';
import { and, eq, inArray, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { part } from '@/db/schema/catalogue';
import { countBin, countEntry } from '@/db/schema/stores';
import { id } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { COUNT_STATES } from './count-states';
import { countAfter, COUNTERS, lockCount, moveCount } from './locked-count';
import { usableBins } from './usable-bins';

/** What every step of a count answers: how much is entered and how much is still open, never a figure. */
export const entered = z.object({
  id: id(),
  number: z.string(),
  state: z.enum(COUNT_STATES),
  entered: z.number().int(),
  open: z.number().int(),
  binsOpen: z.number().int(),
});

const figure = z.strictObject({
  binId: id(),
  partId: id(),
  counted: z.number().int('must be a whole number').min(0, 'can’t be negative').max(100_000_000),
});
type Figure = z.output<typeof figure>;
const keyOf = (one: { readonly binId: string; readonly partId: string }): string => `${one.binId} ${one.partId}`;

export const enterCounts = command({
  name: 'counts.enter',
  http: 'POST /counts/{countId}/entries',
  summary: 'Enter what was counted. A part that the ledger does not know in that bin is taken up as found.',
  roles: COUNTERS,
  input: z
    .strictObject({
      countId: id(),
      entries: z
        .array(figure)
        .max(1_000)
        .refine((list) => new Set(list.map(keyOf)).size === list.length, 'names a part in a bin twice')
        .default([]),
      /** Bins in which nothing else lies: parts expected there and not entered count as none. */
      emptyBinIds: z.array(id()).max(200).default([]),
    })
    .refine((input) => input.entries.length + input.emptyBinIds.length > 0, 'enters nothing'),
  output: entered,
  async run({ tx, actor, input, record }) {
    const count = await lockCount(tx, actor.workshopId, input.countId);
    countAfter(count, 'enter');
    const ofCount = and(eq(countEntry.workshopId, actor.workshopId), eq(countEntry.countId, count.id));
    const known = await tx
      .select({ binId: countEntry.binId, partId: countEntry.partId, counted: countEntry.counted })
      .from(countEntry)
      .where(ofCount);
    const places = new Set(known.map(keyOf));
    const inCount = await tx
      .select({ binId: countBin.binId })
      .from(countBin)
      .where(and(eq(countBin.workshopId, actor.workshopId), eq(countBin.countId, count.id)));
    const bins = await usableBins(tx, actor.workshopId, [
      ...input.entries.map((one) => one.binId),
      ...input.emptyBinIds,
    ]);
    for (const { id: binId, code } of bins.values()) {
      if (!inCount.some((one) => one.binId === binId))
        throw new Refusal(
          'rule.forbids',
          `Bin ${code} is not in this count. Open a count for it; nothing was entered.`,
        );
    }
    const found = input.entries.filter((one) => !places.has(keyOf(one)));
    await refuseUnknownParts(tx, actor.workshopId, found);
    const given = new Set(input.entries.map(keyOf));
    const none = known.filter(
      (one) => one.counted === null && input.emptyBinIds.includes(one.binId) && !given.has(keyOf(one)),
    );
    const figures: Figure[] = [...input.entries, ...none.map(({ binId, partId }) => ({ binId, partId, counted: 0 }))];
    if (figures.length > 0)
      await enter(tx, { workshopId: actor.workshopId, countId: count.id, personId: actor.personId }, figures);
    await tx
      .update(countBin)
      .set({ lookedAt: new Date(), lookedBy: actor.personId })
      .where(
        and(
          eq(countBin.workshopId, actor.workshopId),
          eq(countBin.countId, count.id),
          inArray(countBin.binId, [...bins.keys()]),
        ),
      );
    const left = await openIn(tx, actor.workshopId, count.id);
    const state = left.open === 0 && left.binsOpen === 0 ? countAfter(count, 'complete') : count.state;
    if (state !== count.state) await moveCount(tx, count, state);
    record(count.id, { entered: figures.length, found: found.length });
    return { id: count.id, number: count.number, state, entered: figures.length, ...left };
  },
});

/** What is still to be counted: entries without a figure, bins nobody looked into. */
export async function openIn(tx: Tx, workshopId: string, countId: string): Promise<{ open: number; binsOpen: number }> {
  const found = await tx.execute<{ open: number; binsOpen: number }>(sql`
    select (select count(*)::int from count_entry where workshop_id = ${workshopId} and count_id = ${countId} and counted is null) as open,
           (select count(*)::int from count_bin where workshop_id = ${workshopId} and count_id = ${countId} and looked_at is null) as "binsOpen"`);
  return found.rows[0] ?? { open: 0, binsOpen: 0 };
}

async function enter(
  tx: Tx,
  by: { workshopId: string; countId: string; personId: string },
  figures: readonly Figure[],
): Promise<void> {
  const places = sql.join(
    figures.map((one) => sql`(${one.binId}::uuid, ${one.partId}::uuid)`),
    sql`, `,
  );
  // In the fixed order; held until commit, so the figure taken is the figure at this moment.
  await tx.execute(
    sql`select t.id from lot t where t.workshop_id = ${by.workshopId} and (t.bin_id, t.part_id) in (${places}) order by t.part_id, t.id for update`,
  );
  const values = sql.join(
    figures.map((one) => sql`(${one.binId}::uuid, ${one.partId}::uuid, ${one.counted}::int)`),
    sql`, `,
  );
  await tx.execute(sql`
    insert into count_entry (workshop_id, id, count_id, bin_id, part_id, counted, ledger_at_count, counted_by, counted_at, attempt, found)
    select ${by.workshopId}::uuid, gen_random_uuid(), ${by.countId}::uuid, v.bin_id, v.part_id, v.counted,
           coalesce((select sum(t.on_hand) from lot t where t.workshop_id = ${by.workshopId} and t.bin_id = v.bin_id and t.part_id = v.part_id), 0)::int,
           ${by.personId}::uuid, now(), 1, true
      from (values ${values}) as v (bin_id, part_id, counted)
    on conflict (workshop_id, count_id, bin_id, part_id) do update
      set counted = excluded.counted, ledger_at_count = excluded.ledger_at_count, counted_by = excluded.counted_by, counted_at = excluded.counted_at, attempt = count_entry.attempt + 1`);
}

async function refuseUnknownParts(tx: Tx, workshopId: string, found: readonly Figure[]): Promise<void> {
  const partIds = [...new Set(found.map((one) => one.partId))];
  if (partIds.length === 0) return;
  const parts = await tx
    .select({ id: part.id })
    .from(part)
    .where(and(eq(part.workshopId, workshopId), inArray(part.id, partIds)));
  if (parts.length !== partIds.length) throw notFound('part');
}
