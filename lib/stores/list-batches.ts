/** Batches, newest first or in the order they should be made. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id, listOf, pageFields, pageOf } from '@/lib/api/fields';
import { query } from '@/lib/api/use-case';
import { BATCH_STATES } from '@/lib/circuits/batch-states';
import { batchRow, type BatchRowShown, batchRowJoins, batchRowJson } from './batch-row';

export const listBatches = query({
  name: 'batches.list',
  http: 'GET /batches',
  summary: 'List batches, newest first or by when they are needed; by state, circuit or revision.',
  roles: 'everyone',
  input: z.strictObject({
    ...pageFields,
    state: listOf(z.enum(BATCH_STATES), 10).optional(),
    circuitId: id().optional(),
    revisionId: id().optional(),
    sort: z.enum(['newest', 'needed']).default('newest'),
  }),
  output: pageOf(batchRow),
  async run({ tx, actor, input }) {
    const conditions = [sql`b.workshop_id = ${actor.workshopId}`];
    if (input.state && input.state.length > 0)
      conditions.push(
        sql`b.state in (${sql.join(
          input.state.map((one) => sql`${one}`),
          sql`, `,
        )})`,
      );
    if (input.circuitId)
      conditions.push(
        sql`exists (select 1 from revision v where v.workshop_id = b.workshop_id and v.id = b.revision_id and v.circuit_id = ${input.circuitId})`,
      );
    if (input.revisionId) conditions.push(sql`b.revision_id = ${input.revisionId}`);
    const order =
      input.sort === 'needed'
        ? sql`b.priority, b.needed_by nulls last, b.created_at, b.id`
        : sql`b.created_at desc, b.id desc`;
    const found = await tx.execute<{ row: BatchRowShown; total: number }>(sql`
      with page as (
        select b.*, count(*) over ()::int as total, row_number() over (order by ${order}) as place
          from batch b where ${sql.join(conditions, sql` and `)}
         order by place limit ${input.size} offset ${(input.page - 1) * input.size})
      select ${batchRowJson} as row, b.total from page b ${batchRowJoins} order by b.place`);
    return {
      rows: found.rows.map(({ row }) => row),
      total: found.rows[0]?.total ?? 0,
      page: input.page,
      size: input.size,
    };
  },
});
