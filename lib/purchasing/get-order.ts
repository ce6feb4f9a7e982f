/** Orders for the list and for the order's page: order, payments, refunds, mails and deliveries side by side. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id, listOf, pageFields, pageOf } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { ORDER_ACTS, ORDER_STATES, orderActsIn } from './order-states';

const state = z.enum(ORDER_STATES);

const orderRow = z.object({
  id: id(),
  number: z.string(),
  state,
  supplierId: id(),
  supplierName: z.string(),
  currency: z.string(),
  totalMinor: z.number().int(),
  lines: z.number().int(),
  expectedOn: z.string().nullable(),
  late: z.boolean(),
  createdAt: z.string(),
  createdBy: z.string(),
});

export const listOrders = query({
  name: 'orders.list',
  http: 'GET /orders',
  summary: 'List orders, newest first; by state or supplier.',
  roles: 'everyone',
  input: z.strictObject({ ...pageFields, state: listOf(state, 10).optional(), supplierId: id().optional() }),
  output: pageOf(orderRow).extend({ byState: z.array(z.object({ state, count: z.number().int() })) }),
  async run({ tx, actor, input }) {
    const states =
      input.state && input.state.length > 0
        ? sql`and o.state in (${sql.join(
            input.state.map((one) => sql`${one}`),
            sql`, `,
          )})`
        : sql``;
    const ofSupplier = input.supplierId === undefined ? sql`` : sql`and o.supplier_id = ${input.supplierId}`;
    const found = await tx.execute<{ row: z.output<typeof orderRow>; total: number }>(sql`
      select json_build_object('id', o.id, 'number', o.number, 'state', o.state, 'supplierId', s.id, 'supplierName', s.name, 'currency', o.currency, 'totalMinor', o.total_minor,
               'lines', (select count(*) from order_line l where l.workshop_id = o.workshop_id and l.order_id = o.id), 'expectedOn', o.expected_on,
               'late', coalesce(o.expected_on < current_date and o.state in ('sent', 'part-received'), false),
               'createdAt', to_char(o.created_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'createdBy', p.name) as row,
             count(*) over ()::int as total
        from purchase_order o
        join supplier s on s.workshop_id = o.workshop_id and s.id = o.supplier_id
        join person p on p.id = o.created_by
       where o.workshop_id = ${actor.workshopId} ${states} ${ofSupplier}
       order by o.created_at desc, o.id desc
       limit ${input.size} offset ${(input.page - 1) * input.size}`);
    const counts = await tx.execute<{ state: z.output<typeof state>; count: number }>(
      sql`select state, count(*)::int as count from purchase_order where workshop_id = ${actor.workshopId} group by state`,
    );
    return {
      rows: found.rows.map(({ row }) => row),
      total: found.rows[0]?.total ?? 0,
      page: input.page,
      size: input.size,
      byState: counts.rows.map(({ state: one, count }) => ({ state: one, count })),
    };
  },
});

const orderPage = z.object({
  id: id(),
  number: z.string(),
  state,
  version: z.number().int(),
  supplier: z.object({
    id: id(),
    name: z.string(),
    email: z.string(),
    takesCards: z.boolean(),
    minimumOrderMinor: z.number().int(),
    leadTimeDays: z.number().int(),
  }),
  currency: z.string(),
  goodsMinor: z.number().int(),
  postageMinor: z.number().int(),
  totalMinor: z.number().int(),
  note: z.string(),
  createdBy: z.string(),
  submittedBy: z.string().nullable(),
  submittedByYou: z.boolean(),
  approvedBy: z.string().nullable(),
  createdAt: z.string(),
  sentAt: z.string().nullable(),
  expectedOn: z.string().nullable(),
  late: z.boolean(),
  acts: z.array(z.enum(ORDER_ACTS)),
  lines: z.array(
    z.object({
      id: id(),
      position: z.number().int(),
      partId: id(),
      partName: z.string(),
      offerId: id(),
      supplierCode: z.string(),
      description: z.string(),
      quantity: z.number().int(),
      unitPrice: z.string(),
      totalMinor: z.number().int(),
      received: z.number().int(),
      cancelled: z.number().int(),
      orderMultiple: z.number().int(),
      waiting: z.array(z.object({ batchId: id(), number: z.string() })),
    }),
  ),
  payments: z.array(
    z.object({
      id: id(),
      attempt: z.number().int(),
      state: z.string(),
      amountMinor: z.number().int(),
      checkoutUrl: z.string().nullable(),
      lastProblem: z.string().nullable(),
      paidAt: z.string().nullable(),
    }),
  ),
  refunds: z.array(z.object({ id: id(), amountMinor: z.number().int(), reason: z.string(), state: z.string() })),
  mails: z.array(z.object({ to: z.string(), subject: z.string(), sentAt: z.string().nullable() })),
  receipts: z.array(
    z.object({
      id: id(),
      number: z.string(),
      receivedAt: z.string(),
      receivedBy: z.string(),
      deliveryNote: z.string(),
      units: z.number().int(),
    }),
  ),
});

const utc = (column: string) => sql.raw(`to_char(${column} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"')`);

export const getOrder = query({
  name: 'orders.get',
  http: 'GET /orders/{orderId}',
  summary: 'An order with its lines, payments, refunds, mails and deliveries.',
  roles: 'everyone',
  input: z.strictObject({ orderId: id() }),
  output: orderPage,
  async run({ tx, actor, input }) {
    const found = await tx.execute<{ row: Omit<z.output<typeof orderPage>, 'acts'> }>(sql`
      select json_build_object(
        'id', o.id, 'number', o.number, 'state', o.state, 'version', o.version,
        'supplier', json_build_object('id', s.id, 'name', s.name, 'email', s.email, 'takesCards', s.payment_account is not null, 'minimumOrderMinor', s.minimum_order_minor, 'leadTimeDays', s.lead_time_days),
        'currency', o.currency, 'goodsMinor', o.goods_minor, 'postageMinor', o.postage_minor, 'totalMinor', o.total_minor, 'note', o.note,
        'createdBy', maker.name, 'submittedBy', sender.name, 'submittedByYou', coalesce(o.submitted_by = ${actor.personId}, false), 'approvedBy', approver.name,
        'createdAt', ${utc('o.created_at')}, 'sentAt', ${utc('o.sent_at')}, 'expectedOn', o.expected_on,
        'late', coalesce(o.expected_on < current_date and o.state in ('sent', 'part-received'), false),
        'lines', (select coalesce(json_agg(json_build_object('id', l.id, 'position', l.position, 'partId', l.part_id, 'partName', p.name, 'offerId', l.offer_id, 'supplierCode', l.supplier_code,
                    'description', l.description, 'quantity', l.quantity, 'unitPrice', trim_scale(l.unit_price)::text, 'totalMinor', l.total_minor, 'received', l.received, 'cancelled', l.cancelled, 'orderMultiple', f.order_multiple,
                    'waiting', (select coalesce(json_agg(distinct jsonb_build_object('batchId', b.id, 'number', b.number)), '[]') from batch_need n join batch b on b.workshop_id = n.workshop_id and b.id = n.batch_id
                                 where n.workshop_id = l.workshop_id and n.part_id = l.part_id and b.state in ('planned', 'reserved', 'picking')
                                   and n.quantity > (select coalesce(sum(r.quantity - r.released), 0) from reservation r where r.workshop_id = n.workshop_id and r.need_id = n.id))
                  ) order by l.position), '[]')
                    from order_line l join part p on p.workshop_id = l.workshop_id and p.id = l.part_id join offer f on f.workshop_id = l.workshop_id and f.id = l.offer_id
                   where l.workshop_id = o.workshop_id and l.order_id = o.id),
        'payments', (select coalesce(json_agg(json_build_object('id', y.id, 'attempt', y.attempt, 'state', y.state, 'amountMinor', y.amount_minor, 'checkoutUrl', case when y.state in ('open', 'declined') then y.checkout_url end,
                       'lastProblem', y.last_problem, 'paidAt', ${utc('y.paid_at')}) order by y.attempt), '[]') from payment y where y.workshop_id = o.workshop_id and y.order_id = o.id),
        'refunds', (select coalesce(json_agg(json_build_object('id', r.id, 'amountMinor', r.amount_minor, 'reason', r.reason, 'state', r.state) order by r.created_at), '[]')
                      from refund r join payment y on y.workshop_id = r.workshop_id and y.id = r.payment_id where y.workshop_id = o.workshop_id and y.order_id = o.id),
        'mails', (select coalesce(json_agg(json_build_object('to', m."to", 'subject', m.subject, 'sentAt', ${utc('m.sent_at')}) order by m.created_at), '[]') from order_mail m where m.workshop_id = o.workshop_id and m.order_id = o.id),
        'receipts', (select coalesce(json_agg(json_build_object('id', c.id, 'number', c.number, 'receivedAt', ${utc('c.received_at')}, 'receivedBy', w.name, 'deliveryNote', c.delivery_note,
                       'units', (select coalesce(sum(cl.quantity), 0) from receipt_line cl where cl.workshop_id = c.workshop_id and cl.receipt_id = c.id)) order by c.received_at), '[]')
                       from receipt c join person w on w.id = c.received_by where c.workshop_id = o.workshop_id and c.order_id = o.id)
      ) as row
      from purchase_order o
      join supplier s on s.workshop_id = o.workshop_id and s.id = o.supplier_id
      join person maker on maker.id = o.created_by
      left join person sender on sender.id = o.submitted_by
      left join person approver on approver.id = o.approved_by
      where o.workshop_id = ${actor.workshopId} and o.id = ${input.orderId}`);
    const row = found.rows[0]?.row;
    if (!row) throw notFound('order');
    return { ...row, acts: [...orderActsIn(row.state)] };
  },
});
