/** The ledger and the lots behind it, a page at a time. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { MOVEMENT_KINDS } from '@/db/schema/stores';
import { day, id, listOf, pageFields, pageOf } from '@/lib/api/fields';
import { query } from '@/lib/api/use-case';

const movementRow = z.object({
  id: id(),
  sequence: z.number().int(),
  at: z.string(),
  kind: z.enum(MOVEMENT_KINDS),
  partId: id(),
  partName: z.string(),
  binId: id(),
  binCode: z.string(),
  lotId: id(),
  quantity: z.number().int(),
  balanceAfter: z.number().int(),
  reason: z.string(),
  /** What caused it, for a person, and the page that shows it. */
  cause: z.string(),
  causeHref: z.string().nullable(),
  person: z.string().nullable(),
});

export const listMovements = query({
  name: 'ledger.list',
  http: 'GET /ledger',
  summary: 'The ledger, newest first; by part, bin, lot, kind, person and dates. Page on with `before` (a sequence number).',
  roles: 'everyone',
  input: z.strictObject({
    size: pageFields.size,
    before: z.coerce.number().int().min(1).optional(),
    partId: id().optional(),
    binId: id().optional(),
    lotId: id().optional(),
    personId: id().optional(),
    kind: listOf(z.enum(MOVEMENT_KINDS), 7).optional(),
    from: day().optional(),
    to: day().optional(),
  }),
  output: z.object({ rows: z.array(movementRow), before: z.number().int().nullable() }),
  async run({ tx, actor, input }) {
    const conditions = [sql`m.workshop_id = ${actor.workshopId}`];
    if (input.before) conditions.push(sql`m.sequence < ${input.before}`);
    if (input.partId) conditions.push(sql`m.part_id = ${input.partId}`);
    if (input.binId) conditions.push(sql`m.bin_id = ${input.binId}`);
    if (input.lotId) conditions.push(sql`m.lot_id = ${input.lotId}`);
    if (input.personId) conditions.push(sql`m.person_id = ${input.personId}`);
    if (input.kind && input.kind.length > 0) conditions.push(sql`m.kind in (${sql.join(input.kind.map((one) => sql`${one}`), sql`, `)})`);
    if (input.from) conditions.push(sql`m.at >= ${input.from}::date`);
    if (input.to) conditions.push(sql`m.at < ${input.to}::date + 1`);
    // The page is cut before anything is joined, so that it costs the same in a ledger of a million lines.
    const found = await tx.execute<{ row: z.output<typeof movementRow> }>(sql`
      with page as (select * from movement m where ${sql.join(conditions, sql` and `)} order by m.sequence desc limit ${input.size + 1})
      select json_build_object('id', m.id, 'sequence', m.sequence, 'at', to_char(m.at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'kind', m.kind, 'partId', m.part_id, 'partName', p.name,
               'binId', m.bin_id, 'binCode', b.code, 'lotId', m.lot_id, 'quantity', m.quantity, 'balanceAfter', m.balance_after, 'reason', m.reason, 'person', w.name,
               'cause', case m.reference_type
                 when 'batch' then 'batch ' || coalesce(bt.number, '?') when 'receipt-line' then 'delivery ' || coalesce(rc.number, '?') when 'count-entry' then 'count ' || coalesce(ct.number, '?')
                 when 'move' then 'move' when 'scrap' then 'scrap' else m.reference_type end,
               'causeHref', case m.reference_type when 'batch' then '/batches/' || m.reference_id when 'count-entry' then '/counts/' || ct.id when 'receipt-line' then case when rc.order_id is null then null else '/orders/' || rc.order_id end end) as row
        from page m
        join part p on p.workshop_id = m.workshop_id and p.id = m.part_id
        join bin b on b.workshop_id = m.workshop_id and b.id = m.bin_id
        left join person w on w.id = m.person_id
        left join batch bt on m.reference_type = 'batch' and bt.workshop_id = m.workshop_id and bt.id = m.reference_id
        left join receipt_line rl on m.reference_type = 'receipt-line' and rl.workshop_id = m.workshop_id and rl.id = m.reference_id
        left join receipt rc on rc.workshop_id = rl.workshop_id and rc.id = rl.receipt_id
        left join count_entry ce on m.reference_type = 'count-entry' and ce.workshop_id = m.workshop_id and ce.id = m.reference_id
        left join stock_count ct on ct.workshop_id = ce.workshop_id and ct.id = ce.count_id
       order by m.sequence desc`);
    const rows = found.rows.map(({ row }) => row);
    const more = rows.length > input.size;
    const page = rows.slice(0, input.size);
    return { rows: page, before: more ? (page.at(-1)?.sequence ?? null) : null };
  },
});

const lotRow = z.object({ id: id(), partId: id(), partName: z.string(), binId: id(), binCode: z.string(), onHand: z.number().int(), reserved: z.number().int(), free: z.number().int(), unitCost: z.string(), receivedAt: z.string(), lotCode: z.string().nullable(), dateCode: z.string().nullable() });

export const listLots = query({
  name: 'lots.list',
  http: 'GET /lots',
  summary: 'List lots; by part or bin, by default only those with something in them.',
  roles: 'everyone',
  input: z.strictObject({ ...pageFields, partId: id().optional(), binId: id().optional(), empty: z.enum(['true']).optional() }),
  output: pageOf(lotRow),
  async run({ tx, actor, input }) {
    const conditions = [sql`t.workshop_id = ${actor.workshopId}`];
    if (input.partId) conditions.push(sql`t.part_id = ${input.partId}`);
    if (input.binId) conditions.push(sql`t.bin_id = ${input.binId}`);
    if (!input.empty) conditions.push(sql`t.on_hand > 0`);
    const found = await tx.execute<{ row: z.output<typeof lotRow>; total: number }>(sql`
      select json_build_object('id', t.id, 'partId', t.part_id, 'partName', p.name, 'binId', t.bin_id, 'binCode', b.code, 'onHand', t.on_hand, 'reserved', t.reserved, 'free', t.on_hand - t.reserved,
               'unitCost', trim_scale(t.unit_cost)::text, 'receivedAt', to_char(t.received_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'lotCode', t.lot_code, 'dateCode', t.date_code) as row,
             count(*) over ()::int as total
        from lot t join part p on p.workshop_id = t.workshop_id and p.id = t.part_id join bin b on b.workshop_id = t.workshop_id and b.id = t.bin_id
       where ${sql.join(conditions, sql` and `)}
       order by p.name, t.received_at, t.id limit ${input.size} offset ${(input.page - 1) * input.size}`);
    return { rows: found.rows.map(({ row }) => row), total: found.rows[0]?.total ?? 0, page: input.page, size: input.size };
  },
});
