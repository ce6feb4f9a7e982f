/** Receipts, newest first. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id, pageFields, pageOf } from '@/lib/api/fields';
import { query } from '@/lib/api/use-case';

export const receiptRow = z.object({
  id: id(),
  number: z.string(),
  orderId: id().nullable(),
  orderNumber: z.string().nullable(),
  supplierName: z.string().nullable(),
  deliveryNote: z.string(),
  receivedBy: z.string(),
  receivedAt: z.string(),
  bags: z.number().int(),
  units: z.number().int(),
});

/** ReceiptRow for receipts under the alias `c`: its text and the joins it reads. */
export const receiptRowJson = sql.raw(`
  json_build_object('id', c.id, 'number', c.number, 'orderId', c.order_id, 'orderNumber', o.number, 'supplierName', s.name, 'deliveryNote', c.delivery_note, 'receivedBy', w.name,
    'receivedAt', to_char(c.received_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'bags', x.bags, 'units', x.units)`);
export const receiptRowJoins = sql.raw(`
  join person w on w.id = c.received_by
  left join purchase_order o on o.workshop_id = c.workshop_id and o.id = c.order_id
  left join supplier s on s.workshop_id = c.workshop_id and s.id = c.supplier_id
  cross join lateral (select count(*)::int as bags, coalesce(sum(l.quantity), 0)::int as units from receipt_line l where l.workshop_id = c.workshop_id and l.receipt_id = c.id) x`);

export const listReceipts = query({
  name: 'receipts.list',
  http: 'GET /receipts',
  summary: 'List deliveries received, newest first.',
  roles: 'everyone',
  input: z.strictObject({ ...pageFields, orderId: id().optional() }),
  output: pageOf(receiptRow),
  async run({ tx, actor, input }) {
    const ofOrder = input.orderId === undefined ? sql`` : sql`and c.order_id = ${input.orderId}`;
    const found = await tx.execute<{ row: z.output<typeof receiptRow>; total: number }>(sql`
      with page as (
        select c.*, count(*) over ()::int as total from receipt c where c.workshop_id = ${actor.workshopId} ${ofOrder}
         order by c.received_at desc, c.id desc limit ${input.size} offset ${(input.page - 1) * input.size})
      select ${receiptRowJson} as row, c.total from page c ${receiptRowJoins} order by c.received_at desc, c.id desc`);
    return {
      rows: found.rows.map(({ row }) => row),
      total: found.rows[0]?.total ?? 0,
      page: input.page,
      size: input.size,
    };
  },
});
