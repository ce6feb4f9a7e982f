/** What is on the shelf when the workshop begins to keep its ledger here. */
import 'server-only';
import { and, eq, inArray } from 'drizzle-orm';
import { z } from 'zod';
import { part } from '@/db/schema/catalogue';
import { newId } from '@/db/schema/new-id';
import { lot } from '@/db/schema/stores';
import { id, instant, words } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { units } from './move-stock';
import { dateCode, unitCost } from './receive-delivery';
import { recordMovements } from './record-movements';
import { usableBins } from './usable-bins';

export const openingStock = command({
  name: 'stock.open',
  http: 'POST /movements/opening',
  summary: 'Enter opening stock: each entry becomes a lot.',
  roles: ['storekeeper', 'lead'],
  input: z.strictObject({
    entries: z
      .array(
        z.strictObject({
          partId: id(),
          binId: id(),
          quantity: units,
          unitCost: unitCost.default('0'),
          lotCode: words(60).optional(),
          dateCode: dateCode.optional(),
          /** When it came, where somebody knows; oldest lots are used first. */
          receivedAt: instant().optional(),
        }),
      )
      .min(1)
      .max(1_000),
  }),
  output: z.object({ lots: z.array(z.object({ lotId: id(), partId: id(), binId: id(), quantity: z.number().int() })) }),
  async run(context) {
    const { tx, actor, input, record } = context;
    await usableBins(
      tx,
      actor.workshopId,
      input.entries.map((one) => one.binId),
    );
    const partIds = [...new Set(input.entries.map((one) => one.partId))];
    const known = await tx
      .select({ id: part.id })
      .from(part)
      .where(and(eq(part.workshopId, actor.workshopId), inArray(part.id, partIds)));
    if (known.length !== partIds.length) throw notFound('part');
    const lots = input.entries.map((entry) => ({ ...entry, lotId: newId() }));
    await tx.insert(lot).values(
      lots.map((one) => ({
        workshopId: actor.workshopId,
        id: one.lotId,
        partId: one.partId,
        binId: one.binId,
        unitCost: one.unitCost,
        lotCode: one.lotCode ?? null,
        dateCode: one.dateCode ?? null,
        ...(one.receivedAt === undefined ? {} : { receivedAt: new Date(one.receivedAt) }),
      })),
    );
    await recordMovements(
      context,
      lots.map((one) => ({
        kind: 'opening',
        lotId: one.lotId,
        partId: one.partId,
        binId: one.binId,
        quantity: one.quantity,
        referenceType: 'opening',
        referenceId: one.lotId,
        reason: 'opening stock',
      })),
    );
    record(actor.workshopId, { lots: lots.length });
    return { lots: lots.map(({ lotId, partId, binId, quantity }) => ({ lotId, partId, binId, quantity })) };
  },
});
