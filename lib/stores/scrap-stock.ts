/** Taking units out for good: broken, aged, lost. Always with the reason. */
import 'server-only';
import { z } from 'zod';
import { id, words } from '@/lib/api/fields';
import { command } from '@/lib/api/use-case';
import { lockLot, refuseMoreThanFree } from './locked-lot';
import { units } from './move-stock';
import { recordMovements } from './record-movements';

export const scrapStock = command({
  name: 'stock.scrap',
  http: 'POST /movements/scrap',
  summary: 'Take free units of a lot out for good, with the reason.',
  roles: ['storekeeper', 'lead'],
  input: z.strictObject({ lotId: id(), quantity: units, reason: words(200) }),
  output: z.object({ lotId: id(), left: z.number().int() }),
  async run(context) {
    const { tx, actor, input, record } = context;
    const from = await lockLot(tx, actor.workshopId, input.lotId);
    refuseMoreThanFree(from, input.quantity);
    await recordMovements(context, [
      {
        kind: 'scrap',
        lotId: from.id,
        partId: from.partId,
        binId: from.binId,
        quantity: -input.quantity,
        referenceType: 'scrap',
        referenceId: from.id,
        reason: input.reason,
      },
    ]);
    record(from.id, { quantity: input.quantity, reason: input.reason });
    return { lotId: from.id, left: from.onHand - input.quantity };
  },
});
