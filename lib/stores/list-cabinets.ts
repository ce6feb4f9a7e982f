/** Cabinets in the order a person walks past them, with how many bins are empty and due. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id } from '@/lib/api/fields';
import { query } from '@/lib/api/use-case';

const MOST_CABINETS = 200;

const cabinetRow = z.object({
  id: id(),
  code: z.string(),
  name: z.string(),
  room: z.string(),
  columns: z.number().int(),
  rows: z.number().int(),
  bins: z.number().int(),
  dueForCount: z.number().int(),
  empty: z.number().int(),
});

export const listCabinets = query({
  name: 'cabinets.list',
  http: 'GET /cabinets',
  summary: 'List cabinets in walking order.',
  roles: 'everyone',
  input: z.strictObject({}),
  output: z.array(cabinetRow),
  async run({ tx, actor }) {
    const found = await tx.execute<{ row: z.output<typeof cabinetRow> }>(sql`
      select json_build_object('id', k.id, 'code', k.code, 'name', k.name, 'room', k.room, 'columns', k.columns, 'rows', k.rows, 'bins', x.bins, 'dueForCount', x.due, 'empty', x.empty) as row
        from cabinet k
        cross join lateral (select count(*)::int as bins, count(b.count_due_since)::int as due,
            count(*) filter (where not exists (select 1 from lot t where t.workshop_id = b.workshop_id and t.bin_id = b.id and t.on_hand > 0))::int as empty
          from bin b where b.workshop_id = k.workshop_id and b.cabinet_id = k.id and b.retired_at is null) x
       where k.workshop_id = ${actor.workshopId} order by k.walk_order, k.code limit ${MOST_CABINETS}`);
    return found.rows.map(({ row }) => row);
  },
});
