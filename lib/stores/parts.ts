/** The catalogue: listing, looking at, adding and changing parts. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { part } from '@/db/schema/catalogue';
import { PART_KINDS } from '@/lib/electronics/part-spec';
import { toDecimal } from '@/lib/electronics/quantity';
import { readPartText } from '@/lib/electronics/read-part-text';
import { id, pageFields, pageOf, words } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command, query } from '@/lib/api/use-case';
import { partFacts, partFactsJson } from './part-facts';

const kind = z.enum(PART_KINDS);
const partRow = partFacts.extend({ onHand: z.number().int(), free: z.number().int(), onOrder: z.number().int(), reorderPoint: z.number().int().nullable(), bins: z.array(z.string()) });

const stockSql = sql.raw(`
  cross join lateral (select coalesce(sum(t.on_hand), 0)::int as on_hand, coalesce(sum(t.on_hand - t.reserved), 0)::int as free,
      coalesce((select json_agg(distinct b.code) from lot t2 join bin b on b.workshop_id = t2.workshop_id and b.id = t2.bin_id where t2.workshop_id = p.workshop_id and t2.part_id = p.id and t2.on_hand > 0), '[]') as bins
    from lot t where t.workshop_id = p.workshop_id and t.part_id = p.id) s
  cross join lateral (select coalesce(sum(greatest(ol.quantity - ol.cancelled - ol.received, 0)), 0)::int as on_order from order_line ol join purchase_order o on o.workshop_id = ol.workshop_id and o.id = ol.order_id
    where ol.workshop_id = p.workshop_id and ol.part_id = p.id and o.state not in ('received', 'closed', 'cancelled')) w`);
const rowJson = sql`(${partFactsJson('p')}::jsonb || jsonb_build_object('onHand', s.on_hand, 'free', s.free, 'onOrder', w.on_order, 'reorderPoint', p.reorder_point, 'bins', s.bins))`;

export const listParts = query({
  name: 'parts.list',
  http: 'GET /parts',
  summary: 'List parts with their stock; by words, kind, family or value (`4k7`).',
  roles: 'everyone',
  input: z.strictObject({
    ...pageFields,
    search: z.string().trim().max(100).optional(),
    kind: kind.optional(),
    family: z.string().max(60).optional(),
    inStock: z.enum(['true', 'false']).optional(),
    binId: id().optional(),
    sort: z.enum(['name', 'free', 'kind', 'value']).default('name'),
    direction: z.enum(['up', 'down']).default('up'),
  }),
  output: pageOf(partRow),
  async run({ tx, actor, input }) {
    const conditions = [sql`p.workshop_id = ${actor.workshopId}`, sql`p.retired_at is null`];
    if (input.kind) conditions.push(sql`p.kind = ${input.kind}`);
    if (input.family) conditions.push(sql`p.family = ${input.family}`);
    if (input.inStock === 'true') conditions.push(sql`exists (select 1 from lot t where t.workshop_id = p.workshop_id and t.part_id = p.id and t.on_hand > 0)`);
    if (input.binId) conditions.push(sql`exists (select 1 from lot t where t.workshop_id = p.workshop_id and t.part_id = p.id and t.bin_id = ${input.binId})`);
    if (input.search) conditions.push(searchCondition(input.search, input.kind ?? null));
    const column = { name: sql`p.name`, free: sql`s.free`, kind: sql`p.kind`, value: sql`p.value` }[input.sort];
    const direction = input.direction === 'down' ? sql`desc nulls last` : sql`asc nulls last`;
    const found = await tx.execute<{ row: z.output<typeof partRow>; total: number }>(sql`
      select ${rowJson} as row, count(*) over ()::int as total
        from part p ${stockSql}
       where ${sql.join(conditions, sql` and `)}
       order by ${column} ${direction}, p.name, p.id
       limit ${input.size} offset ${(input.page - 1) * input.size}`);
    return { rows: found.rows.map(({ row }) => row), total: found.rows[0]?.total ?? 0, page: input.page, size: input.size };
  },
});

/** Words match the name, number or description; a value (`4k7`, `100n`) matches by what it is, however the part spells it. */
export function searchCondition(text: string, kind: string | null) {
  const pattern = `%${text.replace(/[\\%_]/g, '\\$&')}%`;
  const byWords = sql`(p.name || ' ' || coalesce(p.part_number, '') || ' ' || p.description) ilike ${pattern}`;
  const spec = readPartText(text, { kind: PART_KINDS.find((one) => one === kind) ?? null });
  const options = [byWords];
  if (spec.value) options.push(sql`(p.unit = ${spec.value.unit} and p.value = ${toDecimal(spec.value)}::numeric)`);
  if (spec.family) options.push(sql`p.family = ${spec.family}`);
  return sql`(${sql.join(options, sql` or `)})`;
}

const lotRow = z.object({ lotId: id(), binId: id(), binCode: z.string(), onHand: z.number().int(), reserved: z.number().int(), unitCost: z.string(), receivedAt: z.string(), lotCode: z.string().nullable(), dateCode: z.string().nullable() });

const partPage = partRow.extend({
  version: z.number().int(),
  reorderQuantity: z.number().int().nullable(),
  lots: z.array(lotRow),
  usedIn: z.array(z.object({ revisionId: id(), circuit: z.string(), revision: z.string(), designators: z.array(z.string()), quantity: z.number().int() })),
  offers: z.array(z.object({ supplierName: z.string(), supplierCode: z.string(), currency: z.string(), fromPrice: z.string(), leadTimeDays: z.number().int() })),
  stockHistory: z.array(z.object({ day: z.string(), balance: z.number().int() })),
});

export const getPart = query({
  name: 'parts.get',
  http: 'GET /parts/{partId}',
  summary: 'A part: stock by bin and lot, where it is used, who offers it.',
  roles: 'everyone',
  input: z.strictObject({ partId: id() }),
  output: partPage,
  async run({ tx, actor, input }) {
    const found = await tx.execute<{ row: z.output<typeof partPage> }>(sql`
      select ${rowJson} || jsonb_build_object('version', p.version, 'reorderQuantity', p.reorder_quantity,
        'lots', (select coalesce(json_agg(json_build_object('lotId', t.id, 'binId', b.id, 'binCode', b.code, 'onHand', t.on_hand, 'reserved', t.reserved, 'unitCost', trim_scale(t.unit_cost)::text,
                   'receivedAt', to_char(t.received_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'lotCode', t.lot_code, 'dateCode', t.date_code) order by t.received_at), '[]')
                   from lot t join bin b on b.workshop_id = t.workshop_id and b.id = t.bin_id where t.workshop_id = p.workshop_id and t.part_id = p.id and t.on_hand > 0),
        'usedIn', (select coalesce(json_agg(x.u), '[]') from (select json_build_object('revisionId', v.id, 'circuit', c.name, 'revision', v.name, 'designators', l.designators, 'quantity', l.quantity) as u
                     from candidate k join line l on l.workshop_id = k.workshop_id and l.id = k.line_id join revision v on v.workshop_id = l.workshop_id and v.id = l.revision_id
                     join circuit c on c.workshop_id = v.workshop_id and c.id = v.circuit_id
                    where k.workshop_id = p.workshop_id and k.part_id = p.id and k.rank = 1 and k.verdict in ('same', 'drop-in') order by c.name, v.name limit 50) x),
        'offers', (select coalesce(json_agg(json_build_object('supplierName', u.name, 'supplierCode', f.supplier_code, 'currency', u.currency, 'leadTimeDays', coalesce(f.lead_time_days, u.lead_time_days),
                     'fromPrice', (select trim_scale(min(o.unit_price))::text from offer_break o where o.workshop_id = f.workshop_id and o.offer_id = f.id)) order by u.name), '[]')
                     from offer f join supplier u on u.workshop_id = f.workshop_id and u.id = f.supplier_id where f.workshop_id = p.workshop_id and f.part_id = p.id and f.retired_at is null
                      and exists (select 1 from offer_break o where o.workshop_id = f.workshop_id and o.offer_id = f.id)),
        'stockHistory', (select coalesce(json_agg(json_build_object('day', h.day, 'balance', h.balance) order by h.day), '[]') from (
                     select d.day, (sum(d.units) over (order by d.day))::int as balance from (select m.at::date as day, sum(m.quantity) as units from movement m where m.workshop_id = p.workshop_id and m.part_id = p.id group by m.at::date) d) h)
      ) as row
      from part p ${stockSql}
      where p.workshop_id = ${actor.workshopId} and p.id = ${input.partId}`);
    const row = found.rows[0]?.row;
    if (!row) throw notFound('part');
    return row;
  },
});

const partFields = {
  name: words(80),
  description: z.string().trim().max(500).default(''),
  partNumber: words(80).nullable().default(null),
  reorderPoint: z.number().int().min(0).max(100_000_000).nullable().default(null),
  reorderQuantity: z.number().int().min(1).max(100_000_000).nullable().default(null),
};

export const createPart = command({
  name: 'parts.create',
  http: 'POST /parts',
  summary: 'Add a part from a text that the reader understands, such as `4k7 1 % 0.25 W` or `TL072CP`.',
  roles: ['storekeeper', 'buyer', 'lead'],
  input: z.strictObject({
    ...partFields,
    name: words(80).optional(),
    text: words(200),
    kind: kind.optional(),
    stockUnit: z.enum(['piece', 'mm', 'mg']).default('piece'),
    safety: z.boolean().default(false),
  }),
  output: z.object({ id: id(), name: z.string(), kind }),
  async run({ tx, actor, input, record }) {
    const spec = readPartText(input.text, { kind: input.kind ?? null, taperConvention: 'letters' });
    if (spec.kind === null) throw new Refusal('input.invalid', `“${input.text}” does not say what kind of part it is. Choose the kind.`, { errors: [{ pointer: '/kind', code: 'required', detail: 'choose the kind' }] });
    const name = input.name ?? input.text;
    const [made] = await tx
      .insert(part)
      .values({
        workshopId: actor.workshopId,
        name,
        description: input.description,
        kind: spec.kind,
        partNumber: input.partNumber ?? spec.partNumber,
        family: spec.family,
        value: spec.value ? toDecimal(spec.value) : null,
        unit: spec.value?.unit ?? null,
        tolerancePercent: spec.tolerancePercent,
        ratedVolts: spec.ratedVolts,
        ratedWatts: spec.ratedWatts,
        ratedAmperes: spec.ratedAmperes,
        dielectric: spec.dielectric,
        technology: spec.technology,
        taper: spec.taper,
        mounting: spec.mounting,
        package: spec.package,
        safety: input.safety || spec.kind === 'fuse' || spec.kind === 'transformer',
        stockUnit: input.stockUnit,
        reorderPoint: input.reorderPoint,
        reorderQuantity: input.reorderQuantity,
      })
      .returning({ id: part.id });
    if (!made) throw new Error('the insert returned no row');
    record(made.id, { name, text: input.text });
    return { id: made.id, name, kind: spec.kind };
  },
});

export const changePart = command({
  name: 'parts.change',
  http: 'PATCH /parts/{partId}',
  summary: 'Change a part’s name, description, number or reorder figures; carries the version it was seen at.',
  roles: ['storekeeper', 'buyer', 'lead'],
  input: z.strictObject({ partId: id(), version: z.number().int(), ...partFields }),
  output: z.object({ id: id(), version: z.number().int() }),
  async run({ tx, actor, input, record }) {
    const { partId, version, ...fields } = input;
    const [row] = await tx
      .update(part)
      .set({ ...fields, version: version + 1 })
      .where(and(eq(part.workshopId, actor.workshopId), eq(part.id, partId), eq(part.version, version)))
      .returning({ id: part.id, version: part.version });
    if (!row) {
      const [held] = await tx
        .select()
        .from(part)
        .where(and(eq(part.workshopId, actor.workshopId), eq(part.id, partId)));
      if (!held) throw notFound('part');
      throw new Refusal('version.stale', 'Somebody changed this part since you looked.', { more: { version: held.version, name: held.name } });
    }
    record(partId, fields);
    return row;
  },
});
