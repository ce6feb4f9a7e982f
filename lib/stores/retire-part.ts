/** Taking a part out of the catalogue: it is offered for nothing any more; its history stays. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { part } from '@/db/schema/catalogue';
import { id } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';

export const retirePart = command({
  name: 'parts.retire',
  http: 'POST /parts/{partId}/retire',
  summary: 'Retire a part that is neither on the shelf, nor on order, nor needed by a batch under way.',
  roles: ['storekeeper', 'lead'],
  input: z.strictObject({ partId: id() }),
  output: z.object({ id: id(), name: z.string() }),
  async run({ tx, actor, input, record, enqueue }) {
    const own = and(eq(part.workshopId, actor.workshopId), eq(part.id, input.partId));
    const [row] = await tx
      .select({ id: part.id, name: part.name, retiredAt: part.retiredAt })
      .from(part)
      .where(own)
      .for('update');
    if (!row) throw notFound('part');
    if (row.retiredAt !== null) throw new Refusal('state.refused', `${row.name} is retired already.`);
    const found = await tx.execute<{ units: number; ordered: number; needed: number }>(sql`
      select (select coalesce(sum(t.on_hand), 0)::int from lot t where t.workshop_id = ${actor.workshopId} and t.part_id = ${row.id}) as units,
             (select count(*)::int from order_line l join purchase_order o on o.workshop_id = l.workshop_id and o.id = l.order_id
               where l.workshop_id = ${actor.workshopId} and l.part_id = ${row.id} and o.state not in ('received', 'closed', 'cancelled')) as ordered,
             (select count(*)::int from batch_need n join batch b on b.workshop_id = n.workshop_id and b.id = n.batch_id
               where n.workshop_id = ${actor.workshopId} and n.part_id = ${row.id} and b.state not in ('finished', 'cancelled')) as needed`);
    const { units = 0, ordered = 0, needed = 0 } = found.rows[0] ?? {};
    const refuse = (why: string) =>
      new Refusal('rule.forbids', `${row.name} ${why} It was not retired.`, { more: { units, ordered, needed } });
    if (units > 0) throw refuse(`is still on the shelf (${units}). Scrap or use it up first.`);
    if (ordered > 0) throw refuse('is on an order that is not received. Settle that first.');
    if (needed > 0) throw refuse('is needed by a batch under way. Choose another part for its lines first.');
    await tx
      .update(part)
      .set({ retiredAt: new Date(), version: sql`${part.version} + 1` })
      .where(own);
    await enqueue({ queue: 'match-stock-changed', payload: { partIds: [row.id] } });
    record(row.id, { name: row.name });
    return { id: row.id, name: row.name };
  },
});
