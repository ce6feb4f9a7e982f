/** The circuits of the workshop with their newest revision and how many batches are under way. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id, instant, pageFields, pageOf } from '@/lib/api/fields';
import { query } from '@/lib/api/use-case';

const circuitRow = z.object({
  id: id(),
  name: z.string(),
  description: z.string(),
  railsVolts: z.array(z.number()),
  newestRevision: z
    .object({ id: id(), name: z.string(), state: z.enum(['draft', 'frozen']), createdAt: instant() })
    .nullable(),
  revisions: z.number().int(),
  batchesUnderWay: z.number().int(),
});

export const listCircuits = query({
  name: 'circuits.list',
  http: 'GET /circuits',
  summary: 'List circuits, by name.',
  roles: 'everyone',
  input: z.strictObject({ ...pageFields, search: z.string().trim().max(100).optional() }),
  output: pageOf(circuitRow),
  async run({ tx, actor, input }) {
    const pattern = input.search ? `%${input.search.replace(/[\\%_]/g, '\\$&')}%` : '%';
    // One round trip: the page, each row with its newest revision, and the total beside every row.
    const found = await tx.execute<{ row: z.input<typeof circuitRow>; total: number }>(sql`
      select json_build_object(
               'id', c.id, 'name', c.name, 'description', c.description, 'railsVolts', to_json(c.rails_volts),
               'newestRevision', (
                 select json_build_object('id', r.id, 'name', r.name, 'state', r.state, 'createdAt', to_char(r.created_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'))
                   from revision r where r.workshop_id = c.workshop_id and r.circuit_id = c.id order by r.created_at desc, r.id desc limit 1),
               'revisions', (select count(*) from revision r where r.workshop_id = c.workshop_id and r.circuit_id = c.id),
               'batchesUnderWay', (
                 select count(*) from batch b join revision r on r.workshop_id = b.workshop_id and r.id = b.revision_id
                  where r.workshop_id = c.workshop_id and r.circuit_id = c.id and b.state not in ('finished', 'cancelled'))
             ) as row,
             count(*) over ()::int as total
        from circuit c
       where c.workshop_id = ${actor.workshopId} and c.name ilike ${pattern}
       order by c.name
       limit ${input.size} offset ${(input.page - 1) * input.size}`);
    return {
      rows: found.rows.map(({ row }) => row),
      total: found.rows[0]?.total ?? 0,
      page: input.page,
      size: input.size,
    };
  },
});
