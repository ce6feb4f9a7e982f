/** Counts for the list and the count's page. While a figure is still to be counted nobody sees the ledger's. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id, listOf, pageFields, pageOf } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { COUNT_STATES } from './count-states';
import { partFacts, partFactsJson } from './part-facts';

const state = z.enum(COUNT_STATES);
const countRow = z.object({ id: id(), number: z.string(), state, reason: z.string(), bins: z.number().int(), entries: z.number().int(), counted: z.number().int(), openedBy: z.string(), createdAt: z.string(), postedBy: z.string().nullable() });

const headSql = sql.raw(`
  select c.workshop_id, c.created_at as sort_at, c.state as sort_state,
         json_build_object('id', c.id, 'number', c.number, 'state', c.state, 'reason', c.reason, 'bins', x.bins, 'entries', x.entries, 'counted', x.counted,
           'openedBy', p.name, 'createdAt', to_char(c.created_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'postedBy', q.name) as row
    from stock_count c
    join person p on p.id = c.opened_by
    left join person q on q.id = c.posted_by
    cross join lateral (select count(distinct e.bin_id)::int as bins, count(*)::int as entries, count(e.counted)::int as counted from count_entry e where e.workshop_id = c.workshop_id and e.count_id = c.id) x`);

export const listCounts = query({
  name: 'counts.list',
  http: 'GET /counts',
  summary: 'List stock counts, newest first.',
  roles: 'everyone',
  input: z.strictObject({ ...pageFields, state: listOf(state, 5).optional() }),
  output: pageOf(countRow),
  async run({ tx, actor, input }) {
    const states = input.state && input.state.length > 0 ? sql`and sort_state in (${sql.join(input.state.map((one) => sql`${one}`), sql`, `)})` : sql``;
    const found = await tx.execute<{ row: z.output<typeof countRow>; total: number }>(sql`
      select row, count(*) over ()::int as total from (${headSql}) as counts where workshop_id = ${actor.workshopId} ${states} order by sort_at desc limit ${input.size} offset ${(input.page - 1) * input.size}`);
    return { rows: found.rows.map(({ row }) => row), total: found.rows[0]?.total ?? 0, page: input.page, size: input.size };
  },
});

const entryRow = z.object({
  id: id(),
  binId: id(),
  binCode: z.string(),
  part: partFacts,
  found: z.boolean(),
  isCounted: z.boolean(),
  attempt: z.number().int(),
  /** Null while the count is blind. */
  counted: z.number().int().nullable(),
  ledger: z.number().int().nullable(),
  variance: z.number().int().nullable(),
  countedBy: z.string().nullable(),
});

export const getCount = query({
  name: 'counts.get',
  http: 'GET /counts/{countId}',
  summary: 'A count with its entries in walking order; figures only once everything is counted.',
  roles: 'everyone',
  input: z.strictObject({ countId: id() }),
  output: countRow.extend({ entryList: z.array(entryRow) }),
  async run({ tx, actor, input }) {
    const head = await tx.execute<{ row: z.output<typeof countRow> }>(sql`select row from (${headSql}) as counts where workshop_id = ${actor.workshopId} and row ->> 'id' = ${input.countId}`);
    const row = head.rows[0]?.row;
    if (!row) throw notFound('count');
    // The figures don't leave the database while the count is blind.
    const blind = row.state === 'open' || row.state === 'recount';
    const figure = (column: string) => (blind ? sql`null` : sql.raw(column));
    const entries = await tx.execute<{ row: z.output<typeof entryRow> }>(sql`
      select json_build_object('id', e.id, 'binId', b.id, 'binCode', b.code, 'part', ${partFactsJson('p')}, 'found', e.found, 'isCounted', e.counted is not null, 'attempt', e.attempt,
               'counted', ${figure('e.counted')}, 'ledger', ${figure('e.ledger_at_count')}, 'variance', ${figure('e.counted - e.ledger_at_count')}, 'countedBy', w.name) as row
        from count_entry e
        join bin b on b.workshop_id = e.workshop_id and b.id = e.bin_id
        join cabinet k on k.workshop_id = b.workshop_id and k.id = b.cabinet_id
        join part p on p.workshop_id = e.workshop_id and p.id = e.part_id
        left join person w on w.id = e.counted_by
       where e.workshop_id = ${actor.workshopId} and e.count_id = ${input.countId}
       order by k.walk_order, k.code, b."column", b.row, p.name`);
    return { ...row, entryList: entries.rows.map((one) => one.row) };
  },
});
