/**
 * What is short, of which part, for whom: needs of batches under way that nothing is reserved for, and reorder points,
 * netted against free stock and what is on order (drafts count too, so that nothing is ordered twice).
 */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { id } from '@/lib/api/fields';
import { query } from '@/lib/api/use-case';
import { type Break, cheapestPurchase, moneyText } from './order-money';
import { ON_ORDER_STATES } from './order-states';

const MOST_SHORTFALLS = 2_000;

const waiting = z.object({
  batchId: id(),
  number: z.string(),
  circuit: z.string(),
  quantity: z.number().int(),
  neededBy: z.string().nullable(),
  designators: z.array(z.string()),
});
const purchase = z.object({
  offerId: id(),
  supplierId: id(),
  supplierName: z.string(),
  supplierCode: z.string(),
  currency: z.string(),
  quantity: z.number().int(),
  unitPrice: z.string(),
  totalMinor: z.number().int(),
  leadTimeDays: z.number().int(),
});
const shortfall = z.object({
  partId: id(),
  partName: z.string(),
  kind: z.string(),
  short: z.number().int(),
  needed: z.number().int(),
  free: z.number().int(),
  onOrder: z.number().int(),
  reorderPoint: z.number().int().nullable(),
  /** `batch`: a batch waits; `reorder`: only the shelf is low. */
  because: z.enum(['batch', 'reorder']),
  waiting: z.array(waiting),
  /** What each supplier would charge for it, cheapest first (per currency). */
  purchases: z.array(purchase),
});
export type Shortfall = z.output<typeof shortfall>;
const undecided = z.object({
  batchId: id(),
  number: z.string(),
  circuit: z.string(),
  lineId: id(),
  revisionId: id(),
  text: z.string(),
  designators: z.array(z.string()),
  quantity: z.number().int(),
});

interface Row extends Record<string, unknown> {
  part_id: string;
  part_name: string;
  kind: string;
  needed: number;
  free: number;
  on_order: number;
  reorder_point: number | null;
  reorder_quantity: number | null;
  waiting: z.output<typeof waiting>[] | null;
  offers:
    | {
        offerId: string;
        supplierId: string;
        supplierName: string;
        supplierCode: string;
        currency: string;
        orderMultiple: number;
        minimumQuantity: number;
        leadTimeDays: number;
        breaks: Break[];
      }[]
    | null;
}

export async function findShortfalls(tx: Tx, workshopId: string): Promise<Shortfall[]> {
  const states = sql.join(
    ON_ORDER_STATES.map((state) => sql`${state}`),
    sql`, `,
  );
  const found = await tx.execute<Row>(sql`
    with need as (
      select n.part_id, n.batch_id, b.number, c.name as circuit, b.needed_by, l.designators,
             n.quantity - coalesce(sum(r.quantity - r.released), 0)::int as open
        from batch b
        join batch_need n on n.workshop_id = b.workshop_id and n.batch_id = b.id
        join line l on l.workshop_id = n.workshop_id and l.id = n.line_id
        join revision v on v.workshop_id = b.workshop_id and v.id = b.revision_id
        join circuit c on c.workshop_id = v.workshop_id and c.id = v.circuit_id
        left join reservation r on r.workshop_id = n.workshop_id and r.need_id = n.id
       where b.workshop_id = ${workshopId} and b.state in ('planned', 'reserved', 'picking') and n.part_id is not null
       group by n.part_id, n.batch_id, b.number, c.name, b.needed_by, b.priority, b.created_at, l.designators, n.quantity
      having n.quantity - coalesce(sum(r.quantity - r.released), 0) > 0
    ), needed as (
      select part_id, sum(open)::int as needed,
             json_agg(json_build_object('batchId', batch_id, 'number', number, 'circuit', circuit, 'quantity', open, 'neededBy', needed_by, 'designators', designators) order by needed_by nulls last, number) as waiting
        from need group by part_id
    ), shelf as (
      select part_id, sum(on_hand - reserved)::int as free from lot where workshop_id = ${workshopId} group by part_id
    ), coming as (
      select l.part_id, sum(greatest(l.quantity - l.cancelled - l.received, 0))::int as on_order
        from order_line l join purchase_order o on o.workshop_id = l.workshop_id and o.id = l.order_id
       where l.workshop_id = ${workshopId} and o.state in (${states})
       group by l.part_id
    )
    select p.id as part_id, p.name as part_name, p.kind, coalesce(n.needed, 0) as needed, coalesce(s.free, 0) as free, coalesce(k.on_order, 0) as on_order,
           p.reorder_point, p.reorder_quantity, n.waiting,
           (select json_agg(json_build_object('offerId', f.id, 'supplierId', u.id, 'supplierName', u.name, 'supplierCode', f.supplier_code, 'currency', u.currency,
                   'orderMultiple', f.order_multiple, 'minimumQuantity', f.minimum_quantity, 'leadTimeDays', coalesce(f.lead_time_days, u.lead_time_days),
                   'breaks', (select coalesce(json_agg(json_build_object('fromQuantity', b.from_quantity, 'unitPrice', trim_scale(b.unit_price)::text) order by b.from_quantity), '[]')
                                from offer_break b where b.workshop_id = f.workshop_id and b.offer_id = f.id)))
              from offer f join supplier u on u.workshop_id = f.workshop_id and u.id = f.supplier_id
             where f.workshop_id = p.workshop_id and f.part_id = p.id and f.retired_at is null and u.retired_at is null) as offers
      from part p
      left join needed n on n.part_id = p.id
      left join shelf s on s.part_id = p.id
      left join coming k on k.part_id = p.id
     where p.workshop_id = ${workshopId} and p.retired_at is null
       and (coalesce(n.needed, 0) > coalesce(s.free, 0) + coalesce(k.on_order, 0)
            or coalesce(s.free, 0) + coalesce(k.on_order, 0) - coalesce(n.needed, 0) < p.reorder_point)
     order by (n.needed is null), p.kind, p.name
     limit ${MOST_SHORTFALLS}`);
  return found.rows.map(toShortfall);
}

function toShortfall(row: Row): Shortfall {
  const forBatches = Math.max(0, row.needed - row.free - row.on_order);
  const left = row.free + row.on_order - row.needed;
  const low = row.reorder_point !== null && left < row.reorder_point;
  // Buying for a batch and the shelf at once: up to the reorder point at least, by the usual quantity where one is set.
  const short = Math.max(
    forBatches,
    low ? forBatches + Math.max(row.reorder_quantity ?? 0, (row.reorder_point ?? 0) - Math.max(left, 0)) : 0,
  );
  const purchases = (row.offers ?? []).flatMap(({ orderMultiple, minimumQuantity, breaks, ...offer }) => {
    const best = cheapestPurchase(short, { orderMultiple, minimumQuantity, breaks, currency: offer.currency });
    return best === null ? [] : [{ ...offer, ...best }];
  });
  purchases.sort(
    (a, b) => a.currency.localeCompare(b.currency) || a.totalMinor - b.totalMinor || a.leadTimeDays - b.leadTimeDays,
  );
  return {
    partId: row.part_id,
    partName: row.part_name,
    kind: row.kind,
    short,
    needed: row.needed,
    free: row.free,
    onOrder: row.on_order,
    reorderPoint: row.reorder_point,
    because: forBatches > 0 ? 'batch' : 'reorder',
    waiting: row.waiting ?? [],
    purchases,
  };
}

export const listShortfalls = query({
  name: 'shortfalls.list',
  http: 'GET /shortfalls',
  summary: 'What is short for batches and below reorder points, with who waits and what each supplier would charge.',
  roles: 'everyone',
  input: z.strictObject({}),
  output: z.object({
    shortfalls: z.array(shortfall),
    undecided: z.array(undecided),
    totals: z.array(z.object({ currency: z.string(), totalMinor: z.number().int(), text: z.string() })),
  }),
  async run({ tx, actor }) {
    const shortfalls = await findShortfalls(tx, actor.workshopId);
    const open = await tx.execute<{ row: z.output<typeof undecided> }>(sql`
      select json_build_object('batchId', b.id, 'number', b.number, 'circuit', c.name, 'lineId', l.id, 'revisionId', v.id, 'text', l.text, 'designators', l.designators, 'quantity', n.quantity) as row
        from batch b
        join batch_need n on n.workshop_id = b.workshop_id and n.batch_id = b.id
        join line l on l.workshop_id = n.workshop_id and l.id = n.line_id
        join revision v on v.workshop_id = b.workshop_id and v.id = b.revision_id
        join circuit c on c.workshop_id = v.workshop_id and c.id = v.circuit_id
       where b.workshop_id = ${actor.workshopId} and b.state in ('planned', 'reserved', 'picking') and n.part_id is null
       order by b.number, l.position
       limit ${MOST_SHORTFALLS}`);
    const totals = new Map<string, number>();
    for (const { purchases } of shortfalls) {
      const first = purchases[0];
      if (first) totals.set(first.currency, (totals.get(first.currency) ?? 0) + first.totalMinor);
    }
    return {
      shortfalls,
      undecided: open.rows.map(({ row }) => row),
      totals: [...totals].map(([currency, totalMinor]) => ({
        currency,
        totalMinor,
        text: moneyText(totalMinor, currency),
      })),
    };
  },
});
