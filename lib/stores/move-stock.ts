/** Moving, scrapping and opening stock: each a pair or a line of the ledger with its reason. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { part } from '@/db/schema/catalogue';
import { newId } from '@/db/schema/new-id';
import { bin, lot } from '@/db/schema/stores';
import { id, words } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { recordMovements } from './record-movements';

const KEEPERS = ['storekeeper', 'lead'] as const;
const units = z.number().int('must be a whole number').min(1, 'must be at least 1').max(100_000_000);

async function usableBin(tx: Tx, workshopId: string, binId: string): Promise<{ id: string; code: string }> {
  const [row] = await tx
    .select({ id: bin.id, code: bin.code, retiredAt: bin.retiredAt })
    .from(bin)
    .where(and(eq(bin.workshopId, workshopId), eq(bin.id, binId)))
    .for('share');
  if (!row) throw notFound('bin');
  if (row.retiredAt !== null) throw new Refusal('rule.forbids', `Bin ${row.code} is retired. Choose another.`);
  return row;
}

async function lockLot(tx: Tx, workshopId: string, lotId: string): Promise<typeof lot.$inferSelect> {
  const [row] = await tx
    .select()
    .from(lot)
    .where(and(eq(lot.workshopId, workshopId), eq(lot.id, lotId)))
    .for('update');
  if (!row) throw notFound('lot');
  return row;
}

function refuseMoreThanFree(row: { onHand: number; reserved: number }, quantity: number): void {
  const free = row.onHand - row.reserved;
  if (quantity <= free) return;
  const promised = row.reserved > 0 ? ` (${row.reserved} more are promised to batches)` : '';
  throw new Refusal('stock.short', `Only ${free} are free in that lot${promised}. Nothing was moved.`, { errors: [{ pointer: '/quantity', code: 'more-than-free', detail: `${free} free` }] });
}

export const moveStock = command({
  name: 'stock.move',
  http: 'POST /movements/move',
  summary: 'Move units of a lot to another bin; age, cost and codes go with them.',
  roles: KEEPERS,
  input: z.strictObject({ lotId: id(), toBinId: id(), quantity: units }),
  output: z.object({ fromLotId: id(), toLotId: id(), toBin: z.string() }),
  async run(context) {
    const { tx, actor, input, record } = context;
    const from = await lockLot(tx, actor.workshopId, input.lotId);
    const to = await usableBin(tx, actor.workshopId, input.toBinId);
    if (to.id === from.binId) throw new Refusal('rule.forbids', `It lies in ${to.code} already.`);
    refuseMoreThanFree(from, input.quantity);
    const toLotId = newId();
    await tx.insert(lot).values({ workshopId: actor.workshopId, id: toLotId, partId: from.partId, binId: to.id, unitCost: from.unitCost, receivedAt: from.receivedAt, lotCode: from.lotCode, dateCode: from.dateCode });
    const moved = { kind: 'move' as const, partId: from.partId, referenceType: 'move', referenceId: toLotId };
    await recordMovements(context, [
      { ...moved, lotId: from.id, binId: from.binId, quantity: -input.quantity, reason: `to ${to.code}` },
      { ...moved, lotId: toLotId, binId: to.id, quantity: input.quantity, reason: 'moved in' },
    ]);
    record(from.id, { to: to.code, quantity: input.quantity });
    return { fromLotId: from.id, toLotId, toBin: to.code };
  },
});

export const scrapStock = command({
  name: 'stock.scrap',
  http: 'POST /movements/scrap',
  summary: 'Take units of a lot out for good, with the reason.',
  roles: KEEPERS,
  input: z.strictObject({ lotId: id(), quantity: units, reason: words(200) }),
  output: z.object({ lotId: id(), left: z.number().int() }),
  async run(context) {
    const { tx, actor, input, record } = context;
    const from = await lockLot(tx, actor.workshopId, input.lotId);
    refuseMoreThanFree(from, input.quantity);
    await recordMovements(context, [{ kind: 'scrap', lotId: from.id, partId: from.partId, binId: from.binId, quantity: -input.quantity, referenceType: 'scrap', referenceId: from.id, reason: input.reason }]);
    record(from.id, { quantity: input.quantity, reason: input.reason });
    return { lotId: from.id, left: from.onHand - input.quantity };
  },
});

export const openingStock = command({
  name: 'stock.open',
  http: 'POST /movements/opening',
  summary: 'Enter what is on the shelf when the workshop begins to keep its ledger here.',
  roles: KEEPERS,
  input: z.strictObject({
    entries: z.array(z.strictObject({ partId: id(), binId: id(), quantity: units, unitCost: z.string().regex(/^\d{1,9}(\.\d{1,6})?$/).default('0') })).min(1).max(1_000),
  }),
  output: z.object({ lots: z.number().int() }),
  async run(context) {
    const { tx, actor, input, record } = context;
    for (const binId of new Set(input.entries.map((one) => one.binId))) await usableBin(tx, actor.workshopId, binId);
    const partIds = [...new Set(input.entries.map((one) => one.partId))];
    const known = await tx
      .select({ id: part.id })
      .from(part)
      .where(and(eq(part.workshopId, actor.workshopId), sql`${part.id} in (${sql.join(partIds.map((one) => sql`${one}::uuid`), sql`, `)})`));
    if (known.length !== partIds.length) throw notFound('part');
    const lots = input.entries.map((entry) => ({ ...entry, lotId: newId() }));
    await tx.insert(lot).values(lots.map((one) => ({ workshopId: actor.workshopId, id: one.lotId, partId: one.partId, binId: one.binId, unitCost: one.unitCost })));
    await recordMovements(
      context,
      lots.map((one) => ({ kind: 'opening', lotId: one.lotId, partId: one.partId, binId: one.binId, quantity: one.quantity, referenceType: 'opening', referenceId: one.lotId, reason: 'opening stock' })),
    );
    record(actor.workshopId, { lots: lots.length });
    return { lots: lots.length };
  },
});
