/** Moving units to another bin: out of one lot, into a new one that keeps their age, cost and codes. */
import 'server-only';
import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import { newId } from '@/db/schema/new-id';
import { bin, lot } from '@/db/schema/stores';
import { id } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { lockLot, refuseMoreThanFree } from './locked-lot';
import { recordMovements } from './record-movements';
import { usableBins } from './usable-bins';

export const units = z.number().int('must be a whole number').min(1, 'must be at least 1').max(100_000_000);

export const moveStock = command({
  name: 'stock.move',
  http: 'POST /movements/move',
  summary: 'Move free units of a lot to another bin; age, cost and codes go with them.',
  roles: ['storekeeper', 'lead'],
  input: z.strictObject({ lotId: id(), toBinId: id(), quantity: units }),
  output: z.object({ fromLotId: id(), toLotId: id(), toBin: z.string() }),
  async run(context) {
    const { tx, actor, input, record } = context;
    const to = (await usableBins(tx, actor.workshopId, [input.toBinId])).get(input.toBinId);
    if (!to) throw notFound('bin');
    const from = await lockLot(tx, actor.workshopId, input.lotId);
    if (to.id === from.binId) throw new Refusal('rule.forbids', `It lies in ${to.code} already.`);
    refuseMoreThanFree(from, input.quantity);
    const [left] = await tx
      .select({ code: bin.code })
      .from(bin)
      .where(and(eq(bin.workshopId, actor.workshopId), eq(bin.id, from.binId)));
    const toLotId = newId();
    await tx.insert(lot).values({
      workshopId: actor.workshopId,
      id: toLotId,
      partId: from.partId,
      binId: to.id,
      unitCost: from.unitCost,
      receivedAt: from.receivedAt,
      lotCode: from.lotCode,
      dateCode: from.dateCode,
    });
    // Both halves name the new lot, so that the ledger can show them as one move.
    const moved = { kind: 'move' as const, partId: from.partId, referenceType: 'move', referenceId: toLotId };
    await recordMovements(context, [
      { ...moved, lotId: from.id, binId: from.binId, quantity: -input.quantity, reason: `to ${to.code}` },
      { ...moved, lotId: toLotId, binId: to.id, quantity: input.quantity, reason: `from ${left?.code ?? '?'}` },
    ]);
    record(from.id, { to: to.code, quantity: input.quantity });
    return { fromLotId: from.id, toLotId, toBin: to.code };
  },
});
