/** Cabinets and bins: making them by the cabinet, listing them as they are drawn, retiring them. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { bin, cabinet } from '@/db/schema/stores';
import { id, pageFields, pageOf, words } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command, query } from '@/lib/api/use-case';

const KEEPERS = ['storekeeper', 'lead'] as const;

export const createCabinet = command({
  name: 'cabinets.create',
  http: 'POST /cabinets',
  summary: 'Add a cabinet with all its bins, coded cabinet-column-row: A-06-1.',
  roles: KEEPERS,
  input: z.strictObject({
    code: z.string().regex(/^[A-Z][A-Z0-9]{0,5}$/, 'is a letter, or a letter and digits, such as A or B2'),
    name: z.string().trim().max(80).default(''),
    room: words(80),
    columns: z.number().int().min(1).max(60),
    rows: z.number().int().min(1).max(60),
    walkOrder: z.number().int().min(0).max(10_000).default(0),
    capacity: z.number().int().min(1).max(100_000_000).nullable().default(null),
  }),
  output: z.object({ id: id(), bins: z.number().int() }),
  async run({ tx, actor, input, record }) {
    const { capacity, ...fields } = input;
    const [made] = await tx.insert(cabinet).values({ ...fields, workshopId: actor.workshopId }).returning({ id: cabinet.id });
    if (!made) throw new Error('the insert returned no row');
    const places = Array.from({ length: input.columns * input.rows }, (_, index) => ({ column: Math.floor(index / input.rows) + 1, row: (index % input.rows) + 1 }));
    await tx.insert(bin).values(
      places.map((place) => ({ ...place, workshopId: actor.workshopId, cabinetId: made.id, code: `${input.code}-${String(place.column).padStart(2, '0')}-${place.row}`, capacity })),
    );
    record(made.id, { code: input.code, bins: places.length });
    return { id: made.id, bins: places.length };
  },
});

const cabinetRow = z.object({ id: id(), code: z.string(), name: z.string(), room: z.string(), columns: z.number().int(), rows: z.number().int(), bins: z.number().int(), dueForCount: z.number().int(), empty: z.number().int() });

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
       where k.workshop_id = ${actor.workshopId} order by k.walk_order, k.code limit 200`);
    return found.rows.map(({ row }) => row);
  },
});

const content = z.object({ partId: id(), name: z.string(), kind: z.string(), onHand: z.number().int(), free: z.number().int() });
const binRow = z.object({
  id: id(),
  code: z.string(),
  cabinetId: id(),
  cabinet: z.string(),
  column: z.number().int(),
  row: z.number().int(),
  capacity: z.number().int().nullable(),
  /** 0 … 1; against its capacity, or against the fullest bin of the list where none is set. */
  fill: z.number(),
  countDueSince: z.string().nullable(),
  countDueReason: z.string().nullable(),
  contents: z.array(content),
});

export const listBins = query({
  name: 'bins.list',
  http: 'GET /bins',
  summary: 'List bins with what lies in them; by cabinet, by code, only those due for a count, or only empty ones.',
  roles: 'everyone',
  input: z.strictObject({
    ...pageFields,
    size: z.coerce.number().int().min(1).max(3_600).default(200),
    cabinetId: id().optional(),
    search: z.string().trim().max(60).optional(),
    due: z.enum(['true']).optional(),
    empty: z.enum(['true']).optional(),
    partId: id().optional(),
  }),
  output: pageOf(binRow),
  async run({ tx, actor, input }) {
    const conditions = [sql`b.workshop_id = ${actor.workshopId}`, sql`b.retired_at is null`];
    if (input.cabinetId) conditions.push(sql`b.cabinet_id = ${input.cabinetId}`);
    if (input.search) conditions.push(sql`b.code ilike ${`${input.search.replace(/[\\%_]/g, '\\$&')}%`}`);
    if (input.due) conditions.push(sql`b.count_due_since is not null`);
    if (input.empty) conditions.push(sql`not exists (select 1 from lot t where t.workshop_id = b.workshop_id and t.bin_id = b.id and t.on_hand > 0)`);
    if (input.partId) conditions.push(sql`exists (select 1 from lot t where t.workshop_id = b.workshop_id and t.bin_id = b.id and t.part_id = ${input.partId})`);
    const found = await tx.execute<{ row: Omit<z.output<typeof binRow>, 'fill'>; total: number }>(sql`
      select json_build_object('id', b.id, 'code', b.code, 'cabinetId', k.id, 'cabinet', k.code, 'column', b."column", 'row', b.row, 'capacity', b.capacity,
               'countDueSince', to_char(b.count_due_since at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'countDueReason', b.count_due_reason,
               'contents', (select coalesce(json_agg(json_build_object('partId', x.part_id, 'name', x.name, 'kind', x.kind, 'onHand', x.on_hand, 'free', x.free) order by x.on_hand desc), '[]')
                              from (select t.part_id, p.name, p.kind, sum(t.on_hand)::int as on_hand, sum(t.on_hand - t.reserved)::int as free
                                      from lot t join part p on p.workshop_id = t.workshop_id and p.id = t.part_id
                                     where t.workshop_id = b.workshop_id and t.bin_id = b.id group by t.part_id, p.name, p.kind
                                    having sum(t.on_hand) > 0 or max(t.received_at) > now() - interval '1 year') x)) as row,
             count(*) over ()::int as total
        from bin b join cabinet k on k.workshop_id = b.workshop_id and k.id = b.cabinet_id
       where ${sql.join(conditions, sql` and `)}
       order by k.walk_order, k.code, b."column", b.row
       limit ${input.size} offset ${(input.page - 1) * input.size}`);
    const units = (row: { contents: { onHand: number }[] }) => row.contents.reduce((sum, one) => sum + one.onHand, 0);
    const fullest = Math.max(1, ...found.rows.map(({ row }) => units(row)));
    return {
      // Without a capacity the square root keeps a drawer of ten visible beside one of two thousand.
      rows: found.rows.map(({ row }) => ({ ...row, fill: Math.min(1, row.capacity === null ? Math.sqrt(units(row) / fullest) : units(row) / row.capacity) })),
      total: found.rows[0]?.total ?? 0,
      page: input.page,
      size: input.size,
    };
  },
});

export const retireBin = command({
  name: 'bins.retire',
  http: 'POST /bins/{binId}/retire',
  summary: 'Retire an empty bin; its history stays.',
  roles: KEEPERS,
  input: z.strictObject({ binId: id() }),
  output: z.object({ id: id(), code: z.string() }),
  async run({ tx, actor, input, record }) {
    const [row] = await tx
      .select({ id: bin.id, code: bin.code, retiredAt: bin.retiredAt })
      .from(bin)
      .where(and(eq(bin.workshopId, actor.workshopId), eq(bin.id, input.binId)))
      .for('update');
    if (!row) throw notFound('bin');
    if (row.retiredAt !== null) throw new Refusal('state.refused', `Bin ${row.code} is retired already.`);
    const left = await tx.execute<{ units: number }>(sql`select coalesce(sum(on_hand), 0)::int as units from lot where workshop_id = ${actor.workshopId} and bin_id = ${row.id}`);
    const units = left.rows[0]?.units ?? 0;
    if (units > 0) throw new Refusal('rule.forbids', `${units} units still lie in ${row.code}. Move them first.`);
    await tx
      .update(bin)
      .set({ retiredAt: new Date() })
      .where(and(eq(bin.workshopId, actor.workshopId), eq(bin.id, row.id)));
    record(row.id, { code: row.code });
    return { id: row.id, code: row.code };
  },
});
