/** A batch's page: what each line needs, has and lacks, and what can be done now. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { BATCH_ACTS, batchActsIn } from '@/lib/circuits/batch-states';
import { batchRow, type BatchRowShown, batchRowJoins, batchRowJson } from './batch-row';
import { partFacts, partFactsJson } from './part-facts';

const need = z.object({
  needId: id(),
  lineId: id(),
  designators: z.array(z.string()),
  text: z.string(),
  part: partFacts.nullable(),
  quantity: z.number().int(),
  /** Promised and not given up, with what is picked already; picked of it. */
  promised: z.number().int(),
  picked: z.number().int(),
  /** Neither promised nor picked. */
  short: z.number().int(),
  /** Free on the shelf now: what reserving again would find. */
  free: z.number().int(),
  onOrder: z.number().int(),
  /** Bins it is promised from, still to be taken. */
  bins: z.array(z.string()),
});

export const getBatch = query({
  name: 'batches.get',
  http: 'GET /batches/{batchId}',
  summary: 'A batch with what each line needs, has and lacks.',
  roles: 'everyone',
  input: z.strictObject({ batchId: id() }),
  output: batchRow.extend({ needsList: z.array(need), acts: z.array(z.enum(BATCH_ACTS)) }),
  async run({ tx, actor, input }) {
    const found = await tx.execute<{ row: BatchRowShown }>(sql`
      select ${batchRowJson} as row from batch b ${batchRowJoins} where b.workshop_id = ${actor.workshopId} and b.id = ${input.batchId}`);
    const row = found.rows[0]?.row;
    if (!row) throw notFound('batch');
    const needs = await tx.execute<{ row: z.output<typeof need> }>(sql`
      select json_build_object('needId', n.id, 'lineId', l.id, 'designators', l.designators, 'text', l.text, 'part', case when p.id is null then null else ${partFactsJson('p')} end,
               'quantity', n.quantity, 'promised', x.promised, 'picked', x.picked, 'short', n.quantity - x.promised, 'bins', x.bins,
               'free', coalesce((select sum(t.on_hand - t.reserved) from lot t where t.workshop_id = n.workshop_id and t.part_id = n.part_id), 0),
               'onOrder', coalesce((select sum(greatest(ol.quantity - ol.cancelled - ol.received, 0)) from order_line ol join purchase_order o on o.workshop_id = ol.workshop_id and o.id = ol.order_id
                                     where ol.workshop_id = n.workshop_id and ol.part_id = n.part_id and o.state not in ('received', 'closed', 'cancelled')), 0)) as row
        from batch_need n
        join line l on l.workshop_id = n.workshop_id and l.id = n.line_id
        left join part p on p.workshop_id = n.workshop_id and p.id = n.part_id
        cross join lateral (select coalesce(sum(r.quantity - r.released), 0)::int as promised, coalesce(sum(r.picked), 0)::int as picked,
                                   coalesce(json_agg(distinct g.code) filter (where r.open > 0), '[]') as bins
                              from reservation r join lot t on t.workshop_id = r.workshop_id and t.id = r.lot_id join bin g on g.workshop_id = t.workshop_id and g.id = t.bin_id
                             where r.workshop_id = n.workshop_id and r.need_id = n.id) x
       where n.workshop_id = ${actor.workshopId} and n.batch_id = ${input.batchId}
       order by l.position`);
    return { ...row, needsList: needs.rows.map((one) => one.row), acts: [...batchActsIn(row.state)] };
  },
});
