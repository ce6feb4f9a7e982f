/** The invariants of the ledger, recomputed from its lines for one workshop. Numbered as in DEVELOPERS.md. */
import 'server-only';
import { sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';

export interface InvariantReport {
  readonly number: number;
  readonly says: string;
  /** Rows looked at, and those that break it (at most 20 named). */
  readonly checked: number;
  readonly broken: readonly string[];
}

const INVARIANTS: readonly { readonly says: string; readonly query: (workshopId: string) => ReturnType<typeof sql> }[] =
  [
    {
      says: 'for every lot, the sum of its movements is what is on hand',
      query: (w) =>
        sql`select t.id::text as name, t.on_hand <> coalesce(sum(m.quantity), 0) as broken from lot t left join movement m on m.workshop_id = t.workshop_id and m.lot_id = t.id where t.workshop_id = ${w} group by t.id, t.on_hand`,
    },
    {
      says: 'for every lot, the sum of open reservations is what is reserved',
      query: (w) =>
        sql`select t.id::text as name, t.reserved <> coalesce(sum(r.quantity - r.picked - r.released), 0) as broken from lot t left join reservation r on r.workshop_id = t.workshop_id and r.lot_id = t.id where t.workshop_id = ${w} group by t.id, t.reserved`,
    },
    {
      says: 'nothing is negative, ever',
      query: (
        w,
      ) => sql`select m.id::text as name, m.balance_after < 0 or m.balance_after <> sum(m.quantity) over (partition by m.lot_id order by m.sequence) as broken from movement m where m.workshop_id = ${w}
      union all select t.id::text, t.on_hand < 0 or t.reserved < 0 or t.reserved > t.on_hand from lot t where t.workshop_id = ${w}`,
    },
    {
      says: 'a request moves stock at most once',
      query: (w) =>
        sql`select request_key || '/' || request_line as name, count(*) > 1 as broken from movement where workshop_id = ${w} group by request_key, request_line`,
    },
    {
      says: 'for every order line, received is within ordered and allowed, and every received unit has a movement',
      query: (w) => sql`
      select l.id::text as name,
             l.received > l.quantity + ceil(l.quantity * s.over_delivery_percent / 100.0)
             or l.received <> coalesce((select sum(m.quantity) from receipt_line c join movement m on m.workshop_id = c.workshop_id and m.reference_type = 'receipt-line' and m.reference_id = c.id
                                         where c.workshop_id = l.workshop_id and c.order_line_id = l.id), 0) as broken
        from order_line l join workshop s on s.id = l.workshop_id where l.workshop_id = ${w}`,
    },
    {
      says: 'for every batch, picked less returned is what its movements say',
      query: (w) => sql`
      select b.id::text as name,
             (b.state <> 'finished' and b.state <> 'cancelled' and coalesce((select sum(r.picked) from reservation r where r.workshop_id = b.workshop_id and r.batch_id = b.id), 0)
               <> -coalesce((select sum(m.quantity) from movement m where m.workshop_id = b.workshop_id and m.reference_type = 'batch' and m.reference_id = b.id), 0))
             or (b.state = 'cancelled' and coalesce((select sum(m.quantity) from movement m where m.workshop_id = b.workshop_id and m.reference_type = 'batch' and m.reference_id = b.id), 0) <> 0) as broken
        from batch b where b.workshop_id = ${w}`,
    },
  ];

const MOST_NAMED = 20;

export async function checkLedger(tx: Tx, workshopId: string): Promise<InvariantReport[]> {
  const reports: InvariantReport[] = [];
  for (const [index, invariant] of INVARIANTS.entries()) {
    const found = await tx.execute<{ checked: number; broken: string[] | null }>(
      sql`select count(*)::int as checked, (array_agg(name) filter (where broken))[1:${sql.raw(String(MOST_NAMED))}] as broken from (${invariant.query(workshopId)}) as facts`,
    );
    const row = found.rows[0];
    reports.push({ number: index + 1, says: invariant.says, checked: row?.checked ?? 0, broken: row?.broken ?? [] });
  }
  return reports;
}
