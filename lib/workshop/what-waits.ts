/** Today: what waits for the signed-in person, by role, each one press from the work; and the last lines of the ledger. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { query } from '@/lib/api/use-case';
import type { Role } from '@/lib/auth/actor';

const waiting = z.object({
  what: z.string(),
  count: z.number().int(),
  title: z.string(),
  detail: z.string(),
  href: z.string(),
  act: z.string(),
});
const recent = z.object({ at: z.string(), person: z.string(), said: z.string(), binCode: z.string() });
export type Waiting = z.output<typeof waiting>;

interface Row extends Record<string, unknown> {
  count: number;
  detail: string | null;
  href: string | null;
}

interface Kind {
  readonly what: string;
  readonly roles: readonly Role[];
  readonly title: (count: number) => string;
  readonly act: string;
  readonly list: string;
}

const many = (one: string, several: string) => (count: number) => (count === 1 ? one : several);

/** In the order of the page: what blocks somebody else first. */
const KINDS = {
  approve: {
    what: 'orders-to-approve',
    roles: ['lead'],
    title: many('order to approve', 'orders to approve'),
    act: 'Look',
    list: '/orders?state=submitted',
  },
  settle: {
    what: 'lines-to-settle',
    roles: ['builder', 'lead'],
    title: many('question on a parts list', 'questions on parts lists'),
    act: 'Answer',
    list: '/circuits',
  },
  decide: {
    what: 'lines-to-decide',
    roles: ['builder', 'lead'],
    title: many('batch line without a part', 'batch lines without a part'),
    act: 'Choose',
    list: '/batches',
  },
  pick: {
    what: 'stops-to-pick',
    roles: ['storekeeper', 'builder'],
    title: many('stop to pick', 'stops to pick'),
    act: 'Pick',
    list: '/batches',
  },
  kits: {
    what: 'kits-complete',
    roles: ['builder'],
    title: many('kit complete', 'kits complete'),
    act: 'Take it',
    list: '/batches?show=kitted',
  },
  bags: {
    what: 'deliveries-expected',
    roles: ['storekeeper', 'buyer'],
    title: many('delivery to put away', 'deliveries to put away'),
    act: 'Put away',
    list: '/receive',
  },
  late: {
    what: 'deliveries-late',
    roles: ['buyer', 'lead'],
    title: many('delivery late', 'deliveries late'),
    act: 'Chase',
    list: '/orders?state=sent',
  },
  counts: {
    what: 'bins-due',
    roles: ['storekeeper'],
    title: many('bin due for a count', 'bins due for a count'),
    act: 'Count',
    list: '/counts',
  },
  opened: {
    what: 'counts-open',
    roles: ['storekeeper', 'lead'],
    title: many('count under way', 'counts under way'),
    act: 'Go on',
    list: '/counts',
  },
  short: {
    what: 'parts-short',
    roles: ['buyer'],
    title: many('part short', 'parts short'),
    act: 'Buy',
    list: '/shortfalls',
  },
  pay: {
    what: 'orders-to-pay',
    roles: ['buyer', 'lead'],
    title: many('approved order to pay', 'approved orders to pay'),
    act: 'Pay',
    list: '/orders?state=approved',
  },
  send: {
    what: 'orders-to-send',
    roles: ['buyer', 'lead'],
    title: many('paid order to send', 'paid orders to send'),
    act: 'Send',
    list: '/orders?state=paid',
  },
} as const satisfies Record<string, Kind>;

type Key = keyof typeof KINDS;

export const whatWaits = query({
  name: 'today.what-waits',
  http: 'GET /today',
  summary: 'What waits for you, by your roles, and what moved since yesterday.',
  roles: 'everyone',
  input: z.strictObject({}),
  output: z.object({ waiting: z.array(waiting), recent: z.array(recent) }),
  async run({ tx, actor }) {
    const w = actor.workshopId;
    // One round trip for all: each part counts and names one example.
    const found = await tx.execute<Row & { key: Key }>(sql`
      select 'approve' as key, count(*)::int as count, max(s.name || ', order ' || o.number) as detail, case when count(*) = 1 then '/orders/' || max(o.id::text) end as href
        from purchase_order o join supplier s on s.workshop_id = o.workshop_id and s.id = o.supplier_id where o.workshop_id = ${w} and o.state = 'submitted' and o.submitted_by is distinct from ${actor.personId}
      union all select 'settle', count(*)::int, (array_agg(c.name || ' ' || v.name order by v.id))[1], (array_agg('/revisions/' || v.id || '/import' order by v.id))[1]
        from question q join revision v on v.workshop_id = q.workshop_id and v.id = q.revision_id join circuit c on c.workshop_id = v.workshop_id and c.id = v.circuit_id where q.workshop_id = ${w} and q.answer is null and v.state = 'draft'
      union all select 'decide', count(*)::int, (array_agg(c.name || ', batch ' || b.number order by b.needed_by nulls last, b.id))[1],
             (array_agg('/revisions/' || v.id || '?standing=ask&units=' || b.units order by b.needed_by nulls last, b.id))[1]
        from batch_need n join batch b on b.workshop_id = n.workshop_id and b.id = n.batch_id join revision v on v.workshop_id = b.workshop_id and v.id = b.revision_id join circuit c on c.workshop_id = v.workshop_id and c.id = v.circuit_id
       where n.workshop_id = ${w} and n.part_id is null and b.state in ('planned', 'reserved', 'picking')
      union all select 'pick', count(*)::int, (array_agg(c.name || ' × ' || b.units || ', batch ' || b.number order by b.needed_by nulls last, b.id))[1],
             (array_agg('/batches/' || b.id || '/pick' order by b.needed_by nulls last, b.id))[1]
        from reservation r join batch b on b.workshop_id = r.workshop_id and b.id = r.batch_id join revision v on v.workshop_id = b.workshop_id and v.id = b.revision_id join circuit c on c.workshop_id = v.workshop_id and c.id = v.circuit_id
       where r.workshop_id = ${w} and r.open > 0 and b.state in ('reserved', 'picking')
      union all select 'kits', count(*)::int, max(c.name || ' × ' || b.units), case when count(*) = 1 then '/batches/' || max(b.id::text) end
        from batch b join revision v on v.workshop_id = b.workshop_id and v.id = b.revision_id join circuit c on c.workshop_id = v.workshop_id and c.id = v.circuit_id where b.workshop_id = ${w} and b.state = 'kitted'
      union all select 'bags', count(*)::int, max(s.name || ', order ' || o.number), case when count(*) = 1 then '/receive/' || max(o.id::text) end
        from purchase_order o join supplier s on s.workshop_id = o.workshop_id and s.id = o.supplier_id where o.workshop_id = ${w} and o.state in ('sent', 'part-received')
      union all select 'late', count(*)::int, max(s.name || ', order ' || o.number || ', expected ' || o.expected_on), case when count(*) = 1 then '/orders/' || max(o.id::text) end
        from purchase_order o join supplier s on s.workshop_id = o.workshop_id and s.id = o.supplier_id where o.workshop_id = ${w} and o.state in ('sent', 'part-received') and o.expected_on < current_date
      union all select 'counts', count(*)::int, max(b.code || coalesce(': ' || b.count_due_reason, '')), null from bin b where b.workshop_id = ${w} and b.count_due_since is not null and b.retired_at is null
      union all select 'opened', count(*)::int, max('count ' || t.number), case when count(*) = 1 then '/counts/' || max(t.id::text) end from stock_count t where t.workshop_id = ${w} and t.state in ('open', 'counted', 'recount')
      union all select 'short', count(*)::int, 'for batches under way', null from (
          select n.part_id from batch_need n join batch b on b.workshop_id = n.workshop_id and b.id = n.batch_id
           where n.workshop_id = ${w} and n.part_id is not null and b.state in ('planned', 'reserved', 'picking')
           group by n.part_id
          having sum(n.quantity - (select coalesce(sum(r.quantity - r.released), 0) from reservation r where r.workshop_id = n.workshop_id and r.need_id = n.id))
               > (select coalesce(sum(t.on_hand - t.reserved), 0) from lot t where t.workshop_id = ${w} and t.part_id = n.part_id)
               + (select coalesce(sum(greatest(ol.quantity - ol.cancelled - ol.received, 0)), 0) from order_line ol join purchase_order o on o.workshop_id = ol.workshop_id and o.id = ol.order_id
                   where ol.workshop_id = ${w} and ol.part_id = n.part_id and o.state not in ('received', 'closed', 'cancelled'))) x
      union all select 'pay', count(*)::int, max('order ' || o.number), case when count(*) = 1 then '/orders/' || max(o.id::text) end from purchase_order o where o.workshop_id = ${w} and o.state = 'approved'
      union all select 'send', count(*)::int, max('order ' || o.number), case when count(*) = 1 then '/orders/' || max(o.id::text) end from purchase_order o where o.workshop_id = ${w} and o.state in ('paid', 'on-account')`);
    const byKey = new Map(found.rows.map((row) => [row.key, row]));
    const list = (Object.keys(KINDS) as Key[]).flatMap((key): Waiting[] => {
      const kind: Kind = KINDS[key];
      const row = byKey.get(key);
      if (!row || row.count === 0 || !kind.roles.some((role) => actor.roles.includes(role))) return [];
      return [
        {
          what: kind.what,
          count: row.count,
          title: kind.title(row.count),
          detail: row.detail ?? '',
          href: row.href ?? kind.list,
          act: kind.act,
        },
      ];
    });
    const moved = await tx.execute<{ row: z.output<typeof recent> }>(sql`
      with page as (select * from movement where workshop_id = ${w} and at > now() - interval '2 days' and kind <> 'opening' order by sequence desc limit 12)
      select json_build_object('at', to_char(m.at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'person', coalesce(q.name, 'Ohmstead'), 'binCode', b.code,
               'said', case m.kind when 'pick' then 'took ' || -m.quantity || ' × ' || p.name when 'receipt' then 'put away ' || m.quantity || ' × ' || p.name when 'return' then 'gave back ' || m.quantity || ' × ' || p.name
                 when 'count' then 'counted ' || m.balance_after || ' × ' || p.name || ', ' || abs(m.quantity) || case when m.quantity < 0 then ' fewer' else ' more' end || ' than the ledger'
                 when 'scrap' then 'scrapped ' || -m.quantity || ' × ' || p.name else 'moved ' || abs(m.quantity) || ' × ' || p.name || case when m.quantity < 0 then ' out' else ' in' end end) as row
        from page m join part p on p.workshop_id = m.workshop_id and p.id = m.part_id join bin b on b.workshop_id = m.workshop_id and b.id = m.bin_id left join person q on q.id = m.person_id
       order by m.sequence desc`);
    return { waiting: list, recent: moved.rows.map(({ row }) => row) };
  },
});
