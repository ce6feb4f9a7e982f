/** Stock counts, newest first. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id, listOf, pageFields, pageOf } from '@/lib/api/fields';
import { query } from '@/lib/api/use-case';
import { COUNT_STATES } from './count-states';

export const countRow = z.object({
  id: id(),
  number: z.string(),
  state: z.enum(COUNT_STATES),
  reason: z.string(),
  bins: z.number().int(),
  /** Bins somebody has looked into. */
  binsDone: z.number().int(),
  entries: z.number().int(),
  counted: z.number().int(),
  openedBy: z.string(),
  createdAt: z.string(),
  postedBy: z.string().nullable(),
  postedAt: z.string().nullable(),
});

/** CountRow for counts under the alias `c`: its text and the joins it reads. */
export const countRowJson = sql.raw(`
  json_build_object('id', c.id, 'number', c.number, 'state', c.state, 'reason', c.reason, 'bins', y.bins, 'binsDone', y.done, 'entries', x.entries, 'counted', x.counted,
    'openedBy', w.name, 'createdAt', to_char(c.created_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'postedBy', q.name, 'postedAt', to_char(c.posted_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'))`);
export const countRowJoins = sql.raw(`
  join person w on w.id = c.opened_by
  left join person q on q.id = c.posted_by
  cross join lateral (select count(*)::int as entries, count(e.counted)::int as counted from count_entry e where e.workshop_id = c.workshop_id and e.count_id = c.id) x
  cross join lateral (select count(*)::int as bins, count(k.looked_at)::int as done from count_bin k where k.workshop_id = c.workshop_id and k.count_id = c.id) y`);

export const listCounts = query({
  name: 'counts.list',
  http: 'GET /counts',
  summary: 'List stock counts, newest first.',
  roles: 'everyone',
  input: z.strictObject({ ...pageFields, state: listOf(z.enum(COUNT_STATES), 5).optional() }),
  output: pageOf(countRow),
  async run({ tx, actor, input }) {
    const states =
      input.state && input.state.length > 0
        ? sql`and c.state in (${sql.join(
            input.state.map((one) => sql`${one}`),
            sql`, `,
          )})`
        : sql``;
    const found = await tx.execute<{ row: z.output<typeof countRow>; total: number }>(sql`
      with page as (
        select c.*, count(*) over ()::int as total from stock_count c where c.workshop_id = ${actor.workshopId} ${states}
         order by c.created_at desc, c.id desc limit ${input.size} offset ${(input.page - 1) * input.size})
      select ${countRowJson} as row, c.total from page c ${countRowJoins} order by c.created_at desc, c.id desc`);
    return {
      rows: found.rows.map(({ row }) => row),
      total: found.rows[0]?.total ?? 0,
      page: input.page,
      size: input.size,
    };
  },
});
