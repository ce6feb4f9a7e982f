/** Lots: units of one part in one bin from one receipt. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id, pageFields, pageOf } from '@/lib/api/fields';
import { query } from '@/lib/api/use-case';

const lotRow = z.object({
  id: id(),
  partId: id(),
  partName: z.string(),
  binId: id(),
  binCode: z.string(),
  onHand: z.number().int(),
  reserved: z.number().int(),
  free: z.number().int(),
  unitCost: z.string(),
  receivedAt: z.string(),
  lotCode: z.string().nullable(),
  dateCode: z.string().nullable(),
});

export const listLots = query({
  name: 'lots.list',
  http: 'GET /lots',
  summary: 'List lots; by part, bin or lot code, by default only those with something in them.',
  roles: 'everyone',
  input: z.strictObject({
    ...pageFields,
    partId: id().optional(),
    binId: id().optional(),
    lotCode: z.string().trim().max(60).optional(),
    empty: z.enum(['true']).optional(),
  }),
  output: pageOf(lotRow),
  async run({ tx, actor, input }) {
    const conditions = [sql`t.workshop_id = ${actor.workshopId}`];
    if (input.partId) conditions.push(sql`t.part_id = ${input.partId}`);
    if (input.binId) conditions.push(sql`t.bin_id = ${input.binId}`);
    if (input.lotCode) conditions.push(sql`t.lot_code = ${input.lotCode}`);
    if (!input.empty) conditions.push(sql`t.on_hand > 0`);
    const found = await tx.execute<{ row: z.output<typeof lotRow>; total: number }>(sql`
      select json_build_object('id', t.id, 'partId', t.part_id, 'partName', p.name, 'binId', t.bin_id, 'binCode', b.code, 'onHand', t.on_hand, 'reserved', t.reserved, 'free', t.on_hand - t.reserved,
               'unitCost', trim_scale(t.unit_cost)::text, 'receivedAt', to_char(t.received_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'lotCode', t.lot_code, 'dateCode', t.date_code) as row,
             count(*) over ()::int as total
        from lot t join part p on p.workshop_id = t.workshop_id and p.id = t.part_id join bin b on b.workshop_id = t.workshop_id and b.id = t.bin_id
       where ${sql.join(conditions, sql` and `)}
       order by p.name, t.received_at, t.id limit ${input.size} offset ${(input.page - 1) * input.size}`);
    return {
      rows: found.rows.map(({ row }) => row),
      total: found.rows[0]?.total ?? 0,
      page: input.page,
      size: input.size,
    };
  },
});
