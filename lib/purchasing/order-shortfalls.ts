/** Turns shortfalls into draft orders, one a supplier: each part where it is cheapest, or where the buyer says. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id } from '@/lib/api/fields';
import { Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { makeDraft, type WantedLine } from './draft-order';
import { findShortfalls } from './shortfalls';

export const orderShortfalls = command({
  name: 'orders.from-shortfalls',
  http: 'POST /orders/from-shortfalls',
  summary:
    'Raise draft orders for shortfalls: all of them, or the parts named, each from the offer named or the cheapest.',
  roles: ['buyer', 'lead'],
  input: z.strictObject({
    parts: z
      .array(z.strictObject({ partId: id(), offerId: id().optional() }))
      .min(1)
      .max(500)
      .optional(),
  }),
  output: z.object({
    orders: z.array(
      z.object({
        id: id(),
        number: z.string(),
        supplierName: z.string(),
        lines: z.number().int(),
        totalMinor: z.number().int(),
        currency: z.string(),
      }),
    ),
    notOrdered: z.array(z.object({ partId: id(), partName: z.string(), why: z.string() })),
  }),
  async run({ tx, actor, input, record }) {
    // Two buyers pressing at once would both see the same shortfalls: the second waits, then sees the first one's drafts.
    await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended(${`shortfalls:${actor.workshopId}`}, 0))`);
    const all = await findShortfalls(tx, actor.workshopId);
    const wishes = input.parts === undefined ? null : new Map(input.parts.map((part) => [part.partId, part.offerId]));
    const chosen = wishes === null ? all : all.filter((one) => wishes.has(one.partId));
    const notOrdered: { partId: string; partName: string; why: string }[] = [];
    const bySupplier = new Map<string, { name: string; lines: WantedLine[] }>();
    for (const one of chosen) {
      const wished = wishes?.get(one.partId);
      const purchase =
        wished === undefined ? one.purchases[0] : one.purchases.find((candidate) => candidate.offerId === wished);
      if (!purchase) {
        notOrdered.push({
          partId: one.partId,
          partName: one.partName,
          why: wished === undefined ? 'no supplier offers it' : 'that offer is not for this part',
        });
        continue;
      }
      const group = bySupplier.get(purchase.supplierId) ?? { name: purchase.supplierName, lines: [] };
      group.lines.push({ offerId: purchase.offerId, quantity: purchase.quantity });
      bySupplier.set(purchase.supplierId, group);
    }
    if (bySupplier.size === 0)
      throw new Refusal(
        'rule.forbids',
        chosen.length === 0 ? 'Nothing of that is short.' : 'No supplier offers what is short.',
        { more: { notOrdered } },
      );
    const orders = [];
    for (const [supplierId, group] of [...bySupplier].sort(([a], [b]) => (a < b ? -1 : 1))) {
      const made = await makeDraft(tx, actor, supplierId, group.lines);
      orders.push({ ...made, supplierName: group.name, lines: group.lines.length });
      record(made.id, { number: made.number, fromShortfalls: group.lines.length });
    }
    return { orders, notOrdered };
  },
});
