/** The ledger, newest first, a page at a time by keyset: the millionth line costs what the first does. */
import 'server-only';
import { type SQL, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { MOVEMENT_KINDS } from '@/db/schema/stores';
import { day, id, listOf, pageFields } from '@/lib/api/fields';
import { query } from '@/lib/api/use-case';

export const movementRow = z.object({
  id: id(),
  sequence: z.number().int(),
  at: z.string(),
  kind: z.enum(MOVEMENT_KINDS),
  partId: id(),
  partName: z.string(),
  binId: id(),
  binCode: z.string(),
  lotId: id(),
  lotCode: z.string().nullable(),
  quantity: z.number().int(),
  /** Of the lot, after this line. */
  balanceAfter: z.number().int(),
  stockUnit: z.string(),
  reason: z.string(),
  /** What caused it, for a person, and the page that shows it. */
  cause: z.string(),
  causeHref: z.string().nullable(),
  personId: id().nullable(),
  person: z.string().nullable(),
});
export type MovementRow = z.output<typeof movementRow>;

/**
 * The newest movements (alias `m`) that meet all conditions, which must name the workshop. The page is cut before
 * anything is joined.
 */
export async function movementsPage(tx: Tx, conditions: readonly SQL[], size: number): Promise<MovementRow[]> {
  const found = await tx.execute<{ row: MovementRow }>(sql`
    with page as (select * from movement m where ${sql.join([...conditions], sql` and `)} order by m.sequence desc limit ${size})
    select json_build_object('id', m.id, 'sequence', m.sequence, 'at', to_char(m.at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'kind', m.kind, 'partId', m.part_id, 'partName', p.name,
             'binId', m.bin_id, 'binCode', b.code, 'lotId', m.lot_id, 'lotCode', t.lot_code, 'quantity', m.quantity, 'balanceAfter', m.balance_after, 'stockUnit', p.stock_unit, 'reason', m.reason,
             'personId', m.person_id, 'person', w.name,
             'cause', case m.reference_type
               when 'batch' then 'batch ' || coalesce(bt.number, '?') when 'receipt-line' then 'delivery ' || coalesce(rc.number, '?') when 'count-entry' then 'count ' || coalesce(ct.number, '?')
               when 'opening' then 'opening stock' else m.reference_type end,
             'causeHref', case m.reference_type when 'batch' then '/batches/' || m.reference_id when 'count-entry' then '/counts/' || ct.id
               when 'receipt-line' then case when rc.order_id is null then '/receive' else '/orders/' || rc.order_id end end) as row
      from page m
      join part p on p.workshop_id = m.workshop_id and p.id = m.part_id
      join bin b on b.workshop_id = m.workshop_id and b.id = m.bin_id
      join lot t on t.workshop_id = m.workshop_id and t.id = m.lot_id
      left join person w on w.id = m.person_id
      left join batch bt on m.reference_type = 'batch' and bt.workshop_id = m.workshop_id and bt.id = m.reference_id
      left join receipt_line rl on m.reference_type = 'receipt-line' and rl.workshop_id = m.workshop_id and rl.id = m.reference_id
      left join receipt rc on rc.workshop_id = rl.workshop_id and rc.id = rl.receipt_id
      left join count_entry ce on m.reference_type = 'count-entry' and ce.workshop_id = m.workshop_id and ce.id = m.reference_id
      left join stock_count ct on ct.workshop_id = ce.workshop_id and ct.id = ce.count_id
     order by m.sequence desc`);
  return found.rows.map(({ row }) => row);
}

/** Midnight UTC that begins the day. */
const startOf = (date: string): SQL => sql`(${date}::date::timestamp at time zone 'UTC')`;

export const listMovements = query({
  name: 'ledger.list',
  http: 'GET /ledger',
  summary:
    'The ledger, newest first; by part, bin, lot, batch, kind, person and dates (UTC days, both inclusive). Page on with `before` (a sequence number).',
  roles: 'everyone',
  input: z.strictObject({
    size: pageFields.size,
    before: z.coerce.number().int().min(1).optional(),
    partId: id().optional(),
    binId: id().optional(),
    lotId: id().optional(),
    batchId: id().optional(),
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
    if (input.batchId) conditions.push(sql`m.reference_type = 'batch' and m.reference_id = ${input.batchId}`);
    if (input.personId) conditions.push(sql`m.person_id = ${input.personId}`);
    if (input.kind && input.kind.length > 0)
      conditions.push(
        sql`m.kind in (${sql.join(
          input.kind.map((one) => sql`${one}`),
          sql`, `,
        )})`,
      );
    if (input.from) conditions.push(sql`m.at >= ${startOf(input.from)}`);
    if (input.to) conditions.push(sql`m.at < ${startOf(input.to)} + interval '1 day'`);
    const rows = await movementsPage(tx, conditions, input.size + 1);
    const page = rows.slice(0, input.size);
    return { rows: page, before: rows.length > input.size ? (page.at(-1)?.sequence ?? null) : null };
  },
});
