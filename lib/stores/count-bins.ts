/**
 * Counting bins blind: who counts sees neither the ledger's figure nor an earlier one. The ledger's figure is taken under
 * lock at the moment of counting, so picking may go on; posting books only the difference, as movements with reasons.
 */
import 'server-only';
import { and, eq, inArray, isNull, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { part } from '@/db/schema/catalogue';
import { newId } from '@/db/schema/new-id';
import { bin, countEntry, lot, stockCount } from '@/db/schema/stores';
import { id, words } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { nextNumber } from '@/lib/workshop/next-number';
import { COUNT_STATES, type CountAct, type CountState, countStateAfter } from './count-states';

const MOST_BINS = 200;

export type CountRow = Omit<typeof stockCount.$inferSelect, 'state'> & { readonly state: CountState };

export async function lockCount(tx: Tx, workshopId: string, countId: string): Promise<CountRow> {
  const [row] = await tx
    .select()
    .from(stockCount)
    .where(and(eq(stockCount.workshopId, workshopId), eq(stockCount.id, countId)))
    .for('update');
  if (!row) throw notFound('count');
  const state = COUNT_STATES.find((one) => one === row.state);
  if (!state) throw new Error(`unknown count state ${row.state}`);
  return { ...row, state };
}

const ACT_WORDS: Record<CountAct, string> = { enter: 'counted', complete: 'completed', 'ask-again': 'counted again', post: 'posted', abandon: 'abandoned' };

export function countAfter(row: CountRow, act: CountAct): CountState {
  const next = countStateAfter(row.state, act);
  if (next === null) throw new Refusal('state.refused', `Count ${row.number} is ${row.state}; it can’t be ${ACT_WORDS[act]} now.`, { more: { state: row.state } });
  return next;
}

export async function moveCount(tx: Tx, row: CountRow, state: CountState, changes: Partial<typeof stockCount.$inferInsert> = {}): Promise<void> {
  await tx
    .update(stockCount)
    .set({ ...changes, state, version: sql`${stockCount.version} + 1` })
    .where(and(eq(stockCount.workshopId, row.workshopId), eq(stockCount.id, row.id)));
}

const COUNTERS = ['storekeeper', 'lead'] as const;

export const openCount = command({
  name: 'counts.open',
  http: 'POST /counts',
  summary: 'Open a count of chosen bins; what the ledger has there is to be counted.',
  roles: COUNTERS,
  input: z.strictObject({ binIds: z.array(id()).min(1, 'choose at least one bin').max(MOST_BINS), reason: words(200).default('chosen bins') }),
  output: z.object({ id: id(), number: z.string(), bins: z.number().int(), entries: z.number().int() }),
  async run({ tx, actor, input, record }) {
    const binIds = [...new Set(input.binIds)];
    const bins = await tx
      .select({ id: bin.id, code: bin.code, retiredAt: bin.retiredAt })
      .from(bin)
      .where(and(eq(bin.workshopId, actor.workshopId), inArray(bin.id, binIds)));
    if (bins.length !== binIds.length) throw notFound('bin');
    const retired = bins.find((one) => one.retiredAt !== null);
    if (retired) throw new Refusal('rule.forbids', `Bin ${retired.code} is retired; there is nothing to count.`);
    const number = await nextNumber(tx, actor.workshopId, 'count');
    const countId = newId();
    await tx.insert(stockCount).values({ workshopId: actor.workshopId, id: countId, number, reason: input.reason, openedBy: actor.personId });
    // Also parts that lay there and are booked out: an empty drawer is counted as zero, not skipped.
    const entries = await tx.execute<{ id: string }>(sql`
      insert into count_entry (workshop_id, id, count_id, bin_id, part_id)
      select ${actor.workshopId}, gen_random_uuid(), ${countId}, t.bin_id, t.part_id
        from lot t
       where t.workshop_id = ${actor.workshopId} and t.bin_id in (${sql.join(binIds.map((one) => sql`${one}::uuid`), sql`, `)})
       group by t.bin_id, t.part_id
      having sum(t.on_hand) > 0 or max(t.received_at) > now() - interval '1 year'
      returning id`);
    record(countId, { number, bins: bins.length, entries: entries.rows.length });
    return { id: countId, number, bins: bins.length, entries: entries.rows.length };
  },
});

const entered = z.object({ id: id(), number: z.string(), state: z.enum(COUNT_STATES), entered: z.number().int(), open: z.number().int() });

export const enterCounts = command({
  name: 'counts.enter',
  http: 'POST /counts/{countId}/entries',
  summary: 'Enter what was counted. A part that the ledger does not know in that bin is taken up as found.',
  roles: COUNTERS,
  input: z.strictObject({
    countId: id(),
    entries: z
      .array(z.strictObject({ binId: id(), partId: id(), counted: z.number().int('must be a whole number').min(0, 'can’t be negative').max(100_000_000) }))
      .min(1)
      .max(1_000)
      .refine((list) => new Set(list.map((one) => `${one.binId} ${one.partId}`)).size === list.length, 'names a part in a bin twice'),
  }),
  output: entered,
  async run({ tx, actor, input, record }) {
    const count = await lockCount(tx, actor.workshopId, input.countId);
    countAfter(count, 'enter');
    const known = await tx
      .select()
      .from(countEntry)
      .where(and(eq(countEntry.workshopId, actor.workshopId), eq(countEntry.countId, count.id)));
    const binsCounted = new Set(known.map((one) => one.binId));
    const keyOf = (one: { binId: string; partId: string }) => `${one.binId} ${one.partId}`;
    const byPlace = new Map(known.map((one) => [keyOf(one), one]));
    const found = input.entries.filter((one) => !byPlace.has(keyOf(one)));
    await refuseForeignPlaces(tx, actor.workshopId, found, binsCounted);
    // In the fixed order; held until commit, so the figure taken is the figure at this moment.
    await tx.execute(sql`
      select t.id from lot t where t.workshop_id = ${actor.workshopId} and (t.bin_id, t.part_id) in (${sql.join(
        input.entries.map((one) => sql`(${one.binId}::uuid, ${one.partId}::uuid)`),
        sql`, `,
      )}) order by t.part_id, t.id for update`);
    await tx.execute(sql`
      insert into count_entry (workshop_id, id, count_id, bin_id, part_id, counted, ledger_at_count, counted_by, counted_at, attempt, found)
      select ${actor.workshopId}::uuid, gen_random_uuid(), ${count.id}::uuid, v.bin_id, v.part_id, v.counted,
             coalesce((select sum(t.on_hand) from lot t where t.workshop_id = ${actor.workshopId} and t.bin_id = v.bin_id and t.part_id = v.part_id), 0)::int,
             ${actor.personId}::uuid, now(), 1, v.found
        from (values ${sql.join(
          input.entries.map((one) => sql`(${one.binId}::uuid, ${one.partId}::uuid, ${one.counted}::int, ${!byPlace.has(keyOf(one))}::boolean)`),
          sql`, `,
        )}) as v (bin_id, part_id, counted, found)
      on conflict (workshop_id, count_id, bin_id, part_id) do update
        set counted = excluded.counted, ledger_at_count = excluded.ledger_at_count, counted_by = excluded.counted_by, counted_at = excluded.counted_at, attempt = count_entry.attempt + 1`);
    const left = await tx
      .select({ id: countEntry.id })
      .from(countEntry)
      .where(and(eq(countEntry.workshopId, actor.workshopId), eq(countEntry.countId, count.id), isNull(countEntry.counted)));
    const state = left.length === 0 ? countAfter(count, 'complete') : count.state;
    if (state !== count.state) await moveCount(tx, count, state);
    record(count.id, { entered: input.entries.length, found: found.length });
    return { id: count.id, number: count.number, state, entered: input.entries.length, open: left.length };
  },
});

async function refuseForeignPlaces(tx: Tx, workshopId: string, found: readonly { binId: string; partId: string }[], binsCounted: ReadonlySet<string>): Promise<void> {
  if (found.length === 0) return;
  const bins = await tx
    .select({ id: bin.id, code: bin.code, retiredAt: bin.retiredAt })
    .from(bin)
    .where(and(eq(bin.workshopId, workshopId), inArray(bin.id, found.map((one) => one.binId))));
  for (const one of found) {
    const place = bins.find((candidate) => candidate.id === one.binId);
    if (!place) throw notFound('bin');
    if (place.retiredAt !== null) throw new Refusal('rule.forbids', `Bin ${place.code} is retired. Nothing was entered.`);
    if (binsCounted.size > 0 && !binsCounted.has(one.binId)) throw new Refusal('rule.forbids', `Bin ${place.code} is not in this count. Open a count for it; nothing was entered.`);
  }
  const partIds = [...new Set(found.map((one) => one.partId))];
  const parts = await tx
    .select({ id: part.id })
    .from(part)
    .where(and(eq(part.workshopId, workshopId), inArray(part.id, partIds)));
  if (parts.length !== partIds.length) throw notFound('part');
}

export const recountEntries = command({
  name: 'counts.recount',
  http: 'POST /counts/{countId}/recount',
  summary: 'Ask for entries to be counted again, blind, before anything is posted.',
  roles: COUNTERS,
  input: z.strictObject({ countId: id(), entryIds: z.array(id()).min(1).max(1_000) }),
  output: entered,
  async run({ tx, actor, input, record }) {
    const count = await lockCount(tx, actor.workshopId, input.countId);
    const next = countAfter(count, 'ask-again');
    const cleared = await tx
      .update(countEntry)
      .set({ counted: null, ledgerAtCount: null, countedBy: null, countedAt: null })
      .where(and(eq(countEntry.workshopId, actor.workshopId), eq(countEntry.countId, count.id), inArray(countEntry.id, input.entryIds)))
      .returning({ id: countEntry.id });
    if (cleared.length !== new Set(input.entryIds).size) throw notFound('entry of this count');
    await moveCount(tx, count, next);
    record(count.id, { again: cleared.length });
    return { id: count.id, number: count.number, state: next, entered: 0, open: cleared.length };
  },
});

export const abandonCount = command({
  name: 'counts.abandon',
  http: 'POST /counts/{countId}/abandon',
  summary: 'Give a count up; nothing of it is booked.',
  roles: COUNTERS,
  input: z.strictObject({ countId: id() }),
  output: entered,
  async run({ tx, actor, input, record }) {
    const count = await lockCount(tx, actor.workshopId, input.countId);
    const next = countAfter(count, 'abandon');
    await moveCount(tx, count, next);
    record(count.id);
    return { id: count.id, number: count.number, state: next, entered: 0, open: 0 };
  },
});

export const lotsCounted = (tx: Tx, workshopId: string, countId: string) =>
  tx
    .select({ id: lot.id, partId: lot.partId, binId: lot.binId, onHand: lot.onHand, reserved: lot.reserved, receivedAt: lot.receivedAt })
    .from(lot)
    .where(and(eq(lot.workshopId, workshopId), sql`(${lot.binId}, ${lot.partId}) in (select bin_id, part_id from count_entry where workshop_id = ${workshopId} and count_id = ${countId})`))
    .orderBy(lot.partId, lot.id)
    .for('update');
