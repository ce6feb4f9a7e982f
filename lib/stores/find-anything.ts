/** The one field: says what a text or scan is (bin, part, value, order, batch, count, circuit, supplier) and where that is. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { query } from '@/lib/api/use-case';
import { searchCondition } from './part-search';

const hit = z.object({
  what: z.enum(['bin', 'part', 'order', 'batch', 'count', 'circuit', 'supplier', 'lot']),
  title: z.string(),
  detail: z.string(),
  href: z.string(),
  exact: z.boolean(),
});

export const findAnything = query({
  name: 'find.anything',
  http: 'GET /find',
  summary: 'Recognise a text or scan: part number, value, bin code, order or batch number, circuit, supplier.',
  roles: 'everyone',
  input: z.strictObject({ q: z.string().trim().min(1).max(200) }),
  output: z.object({ q: z.string(), hits: z.array(hit) }),
  async run({ tx, actor, input }) {
    const { q } = input;
    const starts = `${q.replace(/[\\%_]/g, '\\$&')}%`;
    const within = `%${starts}`;
    const found = await tx.execute<z.output<typeof hit>>(sql`
      (select 'bin' as what, 'Bin ' || b.code as title, coalesce((select string_agg(distinct p.name, ', ') from lot t join part p on p.workshop_id = t.workshop_id and p.id = t.part_id where t.workshop_id = b.workshop_id and t.bin_id = b.id and t.on_hand > 0), 'empty') as detail,
              '/bins?cabinet=' || b.cabinet_id || '&bin=' || b.id as href, upper(b.code) = upper(${q}) as exact
         from bin b where b.workshop_id = ${actor.workshopId} and b.retired_at is null and b.code ilike ${starts} order by exact desc, b.code limit 5)
      union all
      (select 'order', 'Order ' || o.number, s.name || ', ' || o.state, '/orders/' || o.id, o.number = ${q} from purchase_order o join supplier s on s.workshop_id = o.workshop_id and s.id = o.supplier_id
        where o.workshop_id = ${actor.workshopId} and o.number ilike ${starts} order by o.number desc limit 5)
      union all
      (select 'batch', 'Batch ' || b.number, c.name || ' × ' || b.units || ', ' || b.state, '/batches/' || b.id, upper(b.number) = upper(${q}) from batch b join revision v on v.workshop_id = b.workshop_id and v.id = b.revision_id
         join circuit c on c.workshop_id = v.workshop_id and c.id = v.circuit_id where b.workshop_id = ${actor.workshopId} and b.number ilike ${within} order by b.number desc limit 5)
      union all
      (select 'count', 'Count ' || t.number, t.state, '/counts/' || t.id, upper(t.number) = upper(${q}) from stock_count t where t.workshop_id = ${actor.workshopId} and t.number ilike ${within} order by t.number desc limit 3)
      union all
      (select 'circuit', c.name, c.description, '/circuits/' || c.id, lower(c.name) = lower(${q}) from circuit c where c.workshop_id = ${actor.workshopId} and c.name ilike ${within} order by c.name limit 5)
      union all
      (select 'supplier', s.name, s.email, '/suppliers?supplier=' || s.id, lower(s.name) = lower(${q}) from supplier s where s.workshop_id = ${actor.workshopId} and s.name ilike ${within} order by s.name limit 3)
      union all
      (select 'lot', 'Lot ' || t.lot_code, p.name || ' in ' || b.code, '/parts/' || p.id, t.lot_code = ${q} from lot t join part p on p.workshop_id = t.workshop_id and p.id = t.part_id join bin b on b.workshop_id = t.workshop_id and b.id = t.bin_id
        where t.workshop_id = ${actor.workshopId} and t.lot_code = ${q} limit 3)
      union all
      (select 'part', p.name, p.kind || coalesce(', ' || nullif(p.description, ''), ''), '/parts/' || p.id, upper(p.name) = upper(${q}) or p.part_key = upper(regexp_replace(${q}, '[^A-Za-z0-9]', '', 'g'))
         from part p where p.workshop_id = ${actor.workshopId} and p.retired_at is null and ${searchCondition(q, null)}
        order by (upper(p.name) = upper(${q}) or p.part_key = upper(regexp_replace(${q}, '[^A-Za-z0-9]', '', 'g'))) desc nulls last, length(p.name), p.name limit 12)`);
    const hits = found.rows.map((row) => ({ ...row, exact: row.exact === true }));
    return { q, hits: hits.sort((a, b) => Number(b.exact) - Number(a.exact)) };
  },
});
