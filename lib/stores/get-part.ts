/** A part's page: stock by lot, what moved lately, where it is used, who offers it, how its stock went. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { partCautions } from '@/lib/planning/part-cautions';
import { chosenPart } from './create-batch';
import { movementRow, movementsPage } from './list-movements';
import { caution } from './part-facts';
import { partRow, partRowJson, partStockSql } from './part-row';

const RECENT_MOVEMENTS = 12;

const lotOfPart = z.object({
  lotId: id(),
  binId: id(),
  binCode: z.string(),
  onHand: z.number().int(),
  reserved: z.number().int(),
  unitCost: z.string(),
  receivedAt: z.string(),
  lotCode: z.string().nullable(),
  dateCode: z.string().nullable(),
});

const fromDatabase = partRow.extend({
  version: z.number().int(),
  reorderQuantity: z.number().int().nullable(),
  lots: z.array(lotOfPart),
  /** Open promises, by batch. */
  promisedTo: z.array(z.object({ batchId: id(), number: z.string(), circuit: z.string(), quantity: z.number().int() })),
  /** Lines for which it is the chosen part: decided, or the best candidate without a doubt. */
  usedIn: z.array(
    z.object({
      revisionId: id(),
      circuit: z.string(),
      revision: z.string(),
      designators: z.array(z.string()),
      quantity: z.number().int(),
    }),
  ),
  offers: z.array(
    z.object({
      supplierId: id(),
      supplierName: z.string(),
      supplierCode: z.string(),
      currency: z.string(),
      fromPrice: z.string(),
      leadTimeDays: z.number().int(),
    }),
  ),
  /** Balance at the end of each day on which something moved; days in UTC. */
  stockHistory: z.array(z.object({ day: z.string(), balance: z.number().int() })),
});
const partPage = fromDatabase.extend({ cautions: z.array(caution), recent: z.array(movementRow) });

export const getPart = query({
  name: 'parts.get',
  http: 'GET /parts/{partId}',
  summary: 'A part: stock by bin and lot, who it is promised to, what moved lately, where it is used, who offers it.',
  roles: 'everyone',
  input: z.strictObject({ partId: id() }),
  output: partPage,
  async run({ tx, actor, input }) {
    const found = await tx.execute<{ row: z.output<typeof fromDatabase> }>(sql`
      select ${partRowJson} || jsonb_build_object('version', p.version, 'reorderQuantity', p.reorder_quantity,
        'lots', (select coalesce(json_agg(json_build_object('lotId', t.id, 'binId', b.id, 'binCode', b.code, 'onHand', t.on_hand, 'reserved', t.reserved, 'unitCost', trim_scale(t.unit_cost)::text,
                   'receivedAt', to_char(t.received_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'lotCode', t.lot_code, 'dateCode', t.date_code) order by t.received_at, t.id), '[]')
                   from lot t join bin b on b.workshop_id = t.workshop_id and b.id = t.bin_id where t.workshop_id = p.workshop_id and t.part_id = p.id and t.on_hand > 0),
        'promisedTo', (select coalesce(json_agg(json_build_object('batchId', x.id, 'number', x.number, 'circuit', x.name, 'quantity', x.open) order by x.number), '[]') from (
                   select b.id, b.number, c.name, sum(r.open)::int as open
                     from lot t join reservation r on r.workshop_id = t.workshop_id and r.lot_id = t.id and r.quantity - r.picked - r.released > 0
                     join batch b on b.workshop_id = r.workshop_id and b.id = r.batch_id
                     join revision v on v.workshop_id = b.workshop_id and v.id = b.revision_id join circuit c on c.workshop_id = v.workshop_id and c.id = v.circuit_id
                    where t.workshop_id = p.workshop_id and t.part_id = p.id group by b.id, b.number, c.name) x),
        'usedIn', (select coalesce(json_agg(x.u), '[]') from (select json_build_object('revisionId', v.id, 'circuit', c.name, 'revision', v.name, 'designators', l.designators, 'quantity', l.quantity) as u
                     from line l join revision v on v.workshop_id = l.workshop_id and v.id = l.revision_id
                     join circuit c on c.workshop_id = v.workshop_id and c.id = v.circuit_id
                    where l.workshop_id = p.workshop_id and l.fitted
                      and l.id in (select k.line_id from candidate k where k.workshop_id = p.workshop_id and k.part_id = p.id
                                   union select d.line_id from decision d where d.workshop_id = p.workshop_id and d.part_id = p.id)
                      and ${chosenPart} = p.id
                    order by c.name, v.name, l.position limit 50) x),
        'offers', (select coalesce(json_agg(json_build_object('supplierId', u.id, 'supplierName', u.name, 'supplierCode', f.supplier_code, 'currency', u.currency, 'leadTimeDays', coalesce(f.lead_time_days, u.lead_time_days),
                     'fromPrice', (select trim_scale(min(o.unit_price))::text from offer_break o where o.workshop_id = f.workshop_id and o.offer_id = f.id)) order by u.name), '[]')
                     from offer f join supplier u on u.workshop_id = f.workshop_id and u.id = f.supplier_id where f.workshop_id = p.workshop_id and f.part_id = p.id and f.retired_at is null
                      and exists (select 1 from offer_break o where o.workshop_id = f.workshop_id and o.offer_id = f.id)),
        'stockHistory', (select coalesce(json_agg(json_build_object('day', h.day, 'balance', h.balance) order by h.day), '[]') from (
                     select d.day, (sum(d.units) over (order by d.day))::int as balance
                       from (select (m.at at time zone 'UTC')::date as day, sum(m.quantity) as units from movement m where m.workshop_id = p.workshop_id and m.part_id = p.id group by 1) d) h)
      ) as row
      from part p ${partStockSql}
      where p.workshop_id = ${actor.workshopId} and p.id = ${input.partId}`);
    const row = found.rows[0]?.row;
    if (!row) throw notFound('part');
    const recent = await movementsPage(
      tx,
      [sql`m.workshop_id = ${actor.workshopId}`, sql`m.part_id = ${input.partId}`],
      RECENT_MOVEMENTS,
    );
    return { ...row, cautions: partCautions(row), recent };
  },
});
