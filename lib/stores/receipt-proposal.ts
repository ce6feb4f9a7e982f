/** What is expected at the door, where each bag should go, and who waits for it. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { partCautions } from '@/lib/planning/part-cautions';
import { caution, partFacts, partFactsJson } from './part-facts';

const binChoice = z.object({ binId: id(), code: z.string(), onHand: z.number().int() });
const fromDatabase = z.object({
  orderLineId: id(),
  position: z.number().int(),
  part: partFacts,
  supplierCode: z.string(),
  ordered: z.number().int(),
  received: z.number().int(),
  missing: z.number().int(),
  /** Most of it that may still be received: what is missing, and the workshop's allowed over-delivery. */
  most: z.number().int(),
  /** Where the part lies already, fullest first; else an empty bin, a different one for each line. */
  bins: z.array(binChoice),
  /** Batches that wait for it. */
  waiting: z.array(z.string()),
});
const expected = fromDatabase.extend({ cautions: z.array(caution) });

export const receiptProposal = query({
  name: 'receipts.proposal',
  http: 'GET /orders/{orderId}/expected',
  summary: 'What of an order is still to come, each with the bin proposed for it and who waits for it.',
  roles: 'everyone',
  input: z.strictObject({ orderId: id() }),
  output: z.object({
    orderId: id(),
    number: z.string(),
    state: z.string(),
    supplierName: z.string(),
    lines: z.array(expected),
  }),
  async run({ tx, actor, input }) {
    const head = await tx.execute<{ number: string; state: string; name: string }>(sql`
      select o.number, o.state, s.name from purchase_order o join supplier s on s.workshop_id = o.workshop_id and s.id = o.supplier_id where o.workshop_id = ${actor.workshopId} and o.id = ${input.orderId}`);
    const order = head.rows[0];
    if (!order) throw notFound('order');
    const found = await tx.execute<{ row: z.output<typeof fromDatabase> }>(sql`
      select json_build_object('orderLineId', l.id, 'position', l.position, 'part', ${partFactsJson('p')}, 'supplierCode', l.supplier_code, 'ordered', l.quantity - l.cancelled, 'received', l.received,
               'missing', greatest(l.quantity - l.cancelled - l.received, 0),
               'most', greatest(l.quantity - l.cancelled - l.received, 0) + ceil(l.quantity * g.over_delivery_percent / 100.0)::int - greatest(l.received - (l.quantity - l.cancelled), 0),
               'bins', (select coalesce(json_agg(x.choice), '[]') from (
                          select json_build_object('binId', b.id, 'code', b.code, 'onHand', sum(t.on_hand)) as choice
                            from lot t join bin b on b.workshop_id = t.workshop_id and b.id = t.bin_id
                           where t.workshop_id = l.workshop_id and t.part_id = l.part_id and b.retired_at is null
                           group by b.id, b.code order by sum(t.on_hand) desc, b.code limit 3) x),
               'waiting', (select coalesce(json_agg(distinct c.number), '[]') from batch_need n join batch c on c.workshop_id = n.workshop_id and c.id = n.batch_id
                            where n.workshop_id = l.workshop_id and n.part_id = l.part_id and c.state in ('planned', 'reserved', 'picking')
                              and n.quantity > coalesce((select sum(r.quantity - r.released) from reservation r where r.workshop_id = n.workshop_id and r.need_id = n.id), 0))) as row
        from order_line l join part p on p.workshop_id = l.workshop_id and p.id = l.part_id join workshop g on g.id = l.workshop_id
       where l.workshop_id = ${actor.workshopId} and l.order_id = ${input.orderId}
       order by l.position`);
    const empty = await tx.execute<{ binId: string; code: string }>(sql`
      select b.id as "binId", b.code from bin b join cabinet k on k.workshop_id = b.workshop_id and k.id = b.cabinet_id
       where b.workshop_id = ${actor.workshopId} and b.retired_at is null
         and not exists (select 1 from lot t where t.workshop_id = b.workshop_id and t.bin_id = b.id and t.on_hand > 0)
       order by k.walk_order, b."column", b.row limit ${found.rows.length}`);
    let nextEmpty = 0;
    const lines = found.rows.map(({ row }) => {
      const cautions = partCautions(row.part);
      if (row.bins.length > 0) return { ...row, cautions };
      const place = empty.rows[nextEmpty];
      nextEmpty += 1;
      return { ...row, cautions, bins: place ? [{ ...place, onHand: 0 }] : [] };
    });
    return { orderId: input.orderId, number: order.number, state: order.state, supplierName: order.name, lines };
  },
});
