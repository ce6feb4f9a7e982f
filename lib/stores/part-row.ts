/** A part with what is on the shelf and on its way: the row that lists and the part's page share. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { partFacts, partFactsJson } from './part-facts';

export const partRow = partFacts.extend({
  onHand: z.number().int(),
  /** On hand less what is promised to batches. */
  free: z.number().int(),
  onOrder: z.number().int(),
  reorderPoint: z.number().int().nullable(),
  bins: z.array(z.string()),
  retired: z.boolean(),
});
export type PartRow = z.output<typeof partRow>;

/** Joins stock (s) and what is on order (w) to parts under the alias `p`. */
export const partStockSql = sql.raw(`
  cross join lateral (select coalesce(sum(t.on_hand), 0)::int as on_hand, coalesce(sum(t.on_hand - t.reserved), 0)::int as free,
      coalesce((select json_agg(x.code order by x.code) from (select distinct b.code from lot t2 join bin b on b.workshop_id = t2.workshop_id and b.id = t2.bin_id
        where t2.workshop_id = p.workshop_id and t2.part_id = p.id and t2.on_hand > 0) x), '[]') as bins
    from lot t where t.workshop_id = p.workshop_id and t.part_id = p.id) s
  cross join lateral (select coalesce(sum(greatest(ol.quantity - ol.cancelled - ol.received, 0)), 0)::int as on_order
    from order_line ol join purchase_order o on o.workshop_id = ol.workshop_id and o.id = ol.order_id
    where ol.workshop_id = p.workshop_id and ol.part_id = p.id and o.state not in ('received', 'closed', 'cancelled')) w`);

/** PartRow of `p` with the joins above. */
export const partRowJson = sql`(${partFactsJson('p')}::jsonb || jsonb_build_object('onHand', s.on_hand, 'free', s.free, 'onOrder', w.on_order,
  'reorderPoint', p.reorder_point, 'bins', s.bins, 'retired', p.retired_at is not null))`;
