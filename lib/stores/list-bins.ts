/** Bins as a cabinet is drawn: what lies in each, how full, due for a count, and lit for the pick under way. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id, pageFields, pageOf } from '@/lib/api/fields';
import { query } from '@/lib/api/use-case';
import { pickStops } from './pick-list';

const content = z.object({
  partId: id(),
  name: z.string(),
  kind: z.string(),
  onHand: z.number().int(),
  free: z.number().int(),
});
const fromDatabase = z.object({
  id: id(),
  code: z.string(),
  cabinetId: id(),
  cabinet: z.string(),
  column: z.number().int(),
  row: z.number().int(),
  capacity: z.number().int().nullable(),
  countDueSince: z.string().nullable(),
  countDueReason: z.string().nullable(),
  doubtful: z.boolean(),
  contents: z.array(content),
});
/** A bin that the batch's pick stops at: the number of its first stop, all its stops, and whether they are taken. */
const lit = z.object({
  stop: z.number().int(),
  stops: z.array(z.number().int()),
  take: z.number().int(),
  done: z.boolean(),
});
const binRow = fromDatabase.extend({
  /** 0 … 1; against its capacity, or against the fullest bin of the list where none is set. */
  fill: z.number(),
  lit: lit.nullable(),
});

/** What the ledger has, or lately had, in bin `b`: an emptied drawer still shows what belongs there. */
export const binContents = sql.raw(`
  (select coalesce(json_agg(json_build_object('partId', x.part_id, 'name', x.name, 'kind', x.kind, 'onHand', x.on_hand, 'free', x.free) order by x.on_hand desc, x.name), '[]')
     from (select t.part_id, p.name, p.kind, sum(t.on_hand)::int as on_hand, sum(t.on_hand - t.reserved)::int as free
             from lot t join part p on p.workshop_id = t.workshop_id and p.id = t.part_id
            where t.workshop_id = b.workshop_id and t.bin_id = b.id group by t.part_id, p.name, p.kind
           having sum(t.on_hand) > 0 or max(t.received_at) > now() - interval '1 year') x)`);

export const listBins = query({
  name: 'bins.list',
  http: 'GET /bins',
  summary:
    'List bins in walking order of columns, with what lies in them; by cabinet, code, part, due for a count, or empty; lit for a batch.',
  roles: 'everyone',
  input: z.strictObject({
    ...pageFields,
    size: z.coerce.number().int().min(1).max(3_600).default(200),
    cabinetId: id().optional(),
    search: z.string().trim().max(60).optional(),
    due: z.enum(['true']).optional(),
    empty: z.enum(['true']).optional(),
    partId: id().optional(),
    /** Lights the bins of this batch's pick. */
    batchId: id().optional(),
  }),
  output: pageOf(binRow),
  async run({ tx, actor, input }) {
    const lots = sql`select 1 from lot t where t.workshop_id = b.workshop_id and t.bin_id = b.id`;
    const conditions = [sql`b.workshop_id = ${actor.workshopId}`, sql`b.retired_at is null`];
    if (input.cabinetId) conditions.push(sql`b.cabinet_id = ${input.cabinetId}`);
    if (input.search) conditions.push(sql`b.code ilike ${`${input.search.replace(/[\\%_]/g, '\\$&')}%`}`);
    if (input.due) conditions.push(sql`b.count_due_since is not null`);
    if (input.empty) conditions.push(sql`not exists (${lots} and t.on_hand > 0)`);
    if (input.partId) conditions.push(sql`exists (${lots} and t.part_id = ${input.partId})`);
    const found = await tx.execute<{ row: z.output<typeof fromDatabase>; total: number }>(sql`
      with page as (
        select b.*, k.code as cabinet_code, count(*) over ()::int as total, row_number() over (order by k.walk_order, k.code, b."column", b.row) as place
          from bin b join cabinet k on k.workshop_id = b.workshop_id and k.id = b.cabinet_id
         where ${sql.join(conditions, sql` and `)}
         order by place limit ${input.size} offset ${(input.page - 1) * input.size})
      select json_build_object('id', b.id, 'code', b.code, 'cabinetId', b.cabinet_id, 'cabinet', b.cabinet_code, 'column', b."column", 'row', b.row, 'capacity', b.capacity,
               'countDueSince', to_char(b.count_due_since at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'countDueReason', b.count_due_reason, 'doubtful', b.doubtful,
               'contents', ${binContents}) as row, b.total
        from page b order by b.place`);
    const stops = input.batchId === undefined ? [] : await pickStops(tx, actor.workshopId, input.batchId);
    const units = (row: { contents: { onHand: number }[] }) => row.contents.reduce((sum, one) => sum + one.onHand, 0);
    const fullest = Math.max(1, ...found.rows.map(({ row }) => units(row)));
    return {
      rows: found.rows.map(({ row }) => {
        const here = stops.filter((stop) => stop.binId === row.id);
        const first = here[0];
        return {
          ...row,
          // Without a capacity the square root keeps a drawer of ten visible beside one of two thousand.
          fill: Math.min(1, row.capacity === null ? Math.sqrt(units(row) / fullest) : units(row) / row.capacity),
          lit: first
            ? {
                stop: first.stop,
                stops: here.map((stop) => stop.stop),
                take: here.reduce((sum, stop) => sum + stop.take, 0),
                done: here.every((stop) => stop.take === 0),
              }
            : null,
        };
      }),
      total: found.rows[0]?.total ?? 0,
      page: input.page,
      size: input.size,
    };
  },
});
