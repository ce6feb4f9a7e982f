/** Asking for entries to be counted again, blind, before anything is posted. The earlier figures stay in the audit log only. */
import 'server-only';
import { and, eq, inArray } from 'drizzle-orm';
import { z } from 'zod';
import { countEntry } from '@/db/schema/stores';
import { id } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { entered } from './enter-counts';
import { countAfter, COUNTERS, lockCount, moveCount } from './locked-count';

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
    const asked = and(
      eq(countEntry.workshopId, actor.workshopId),
      eq(countEntry.countId, count.id),
      inArray(countEntry.id, input.entryIds),
    );
    const before = await tx
      .select({
        entryId: countEntry.id,
        counted: countEntry.counted,
        ledger: countEntry.ledgerAtCount,
        by: countEntry.countedBy,
      })
      .from(countEntry)
      .where(asked);
    if (before.length !== new Set(input.entryIds).size) throw notFound('entry of this count');
    await tx
      .update(countEntry)
      .set({ counted: null, ledgerAtCount: null, countedBy: null, countedAt: null })
      .where(asked);
    await moveCount(tx, count, next);
    record(count.id, { again: before });
    return { id: count.id, number: count.number, state: next, entered: 0, open: before.length, binsOpen: 0 };
  },
});
