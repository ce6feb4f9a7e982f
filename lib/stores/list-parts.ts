/** Parts with their stock, a page at a time; filtered as a storekeeper or a builder asks. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id, pageFields, pageOf } from '@/lib/api/fields';
import { query } from '@/lib/api/use-case';
import { PART_KINDS } from '@/lib/electronics/part-spec';
import { type PartRow, partRow, partRowJson, partStockSql } from './part-row';
import { searchCondition } from './part-search';

const flag = z.enum(['true', 'false']).optional();

export const listParts = query({
  name: 'parts.list',
  http: 'GET /parts',
  summary:
    'List parts with their stock; by words, kind, family, value (`4k7 1%`), bin, what is in stock or below its reorder point.',
  roles: 'everyone',
  input: z.strictObject({
    ...pageFields,
    search: z.string().trim().max(100).optional(),
    kind: z.enum(PART_KINDS).optional(),
    family: z.string().max(60).optional(),
    inStock: flag,
    belowReorderPoint: z.enum(['true']).optional(),
    retired: z.enum(['true']).optional(),
    binId: id().optional(),
    sort: z.enum(['name', 'free', 'kind', 'value']).default('name'),
    direction: z.enum(['up', 'down']).default('up'),
  }),
  output: pageOf(partRow),
  async run({ tx, actor, input }) {
    const lots = sql`from lot t where t.workshop_id = p.workshop_id and t.part_id = p.id`;
    const free = sql`(select coalesce(sum(t.on_hand - t.reserved), 0) ${lots})`;
    const conditions = [
      sql`p.workshop_id = ${actor.workshopId}`,
      sql`p.retired_at is ${input.retired ? sql`not null` : sql`null`}`,
    ];
    if (input.kind) conditions.push(sql`p.kind = ${input.kind}`);
    if (input.family) conditions.push(sql`p.family = ${input.family}`);
    if (input.inStock)
      conditions.push(sql`${input.inStock === 'true' ? sql`` : sql`not`} exists (select 1 ${lots} and t.on_hand > 0)`);
    if (input.belowReorderPoint) conditions.push(sql`p.reorder_point is not null and ${free} < p.reorder_point`);
    if (input.binId) conditions.push(sql`exists (select 1 ${lots} and t.bin_id = ${input.binId} and t.on_hand > 0)`);
    if (input.search) conditions.push(searchCondition(input.search, input.kind ?? null));
    const column = { name: sql`p.name`, free, kind: sql`p.kind`, value: sql`p.value` }[input.sort];
    const direction = input.direction === 'down' ? sql`desc nulls last` : sql`asc nulls last`;
    // The page is cut before stock is summed, so that a catalogue of a hundred thousand costs one page of sums.
    const found = await tx.execute<{ row: PartRow; total: number }>(sql`
      with page as (
        select p.*, count(*) over ()::int as total, row_number() over (order by ${column} ${direction}, p.name, p.id) as place
          from part p where ${sql.join(conditions, sql` and `)}
         order by place limit ${input.size} offset ${(input.page - 1) * input.size})
      select ${partRowJson} as row, p.total from page p ${partStockSql} order by p.place`);
    return {
      rows: found.rows.map(({ row }) => row),
      total: found.rows[0]?.total ?? 0,
      page: input.page,
      size: input.size,
    };
  },
});
