/** Batches for the list, the batch's page, and the pick list in walking order. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id, listOf, pageFields, pageOf } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { BATCH_ACTS, BATCH_STATES, batchActsIn } from '@/lib/circuits/batch-states';
import { byWalkingOrder } from '@/lib/planning/walking-order';
import { type PartFacts, partFacts, partFactsJson } from './part-facts';

const state = z.enum(BATCH_STATES);

const batchRow = z.object({
  id: id(),
  number: z.string(),
  state,
  units: z.number().int(),
  circuitId: id(),
  circuit: z.string(),
  revisionId: id(),
  revision: z.string(),
  neededBy: z.string().nullable(),
  priority: z.number().int(),
  needs: z.number().int(),
  /** Lines wholly promised or picked; lines still short. */
  covered: z.number().int(),
  picked: z.number().int(),
  createdBy: z.string(),
  createdAt: z.string(),
});

const rowSql = sql.raw(`
  select b.workshop_id, b.created_at as sort_at, b.state as sort_state, c.id as circuit_ref, v.id as revision_ref,
         json_build_object('id', b.id, 'number', b.number, 'state', b.state, 'units', b.units, 'circuitId', c.id, 'circuit', c.name, 'revisionId', v.id, 'revision', v.name,
           'neededBy', b.needed_by, 'priority', b.priority, 'createdBy', p.name, 'createdAt', to_char(b.created_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'),
           'needs', n.needs, 'covered', n.covered, 'picked', n.picked) as row
    from batch b
    join revision v on v.workshop_id = b.workshop_id and v.id = b.revision_id
    join circuit c on c.workshop_id = v.workshop_id and c.id = v.circuit_id
    join person p on p.id = b.created_by
    cross join lateral (
      select count(*)::int as needs, count(*) filter (where x.promised >= x.quantity)::int as covered, count(*) filter (where x.picked >= x.quantity)::int as picked
        from (select n.quantity, coalesce(sum(r.quantity - r.released), 0) as promised, coalesce(sum(r.picked), 0) as picked
                from batch_need n left join reservation r on r.workshop_id = n.workshop_id and r.need_id = n.id
               where n.workshop_id = b.workshop_id and n.batch_id = b.id group by n.id, n.quantity) x) n`);

export const listBatches = query({
  name: 'batches.list',
  http: 'GET /batches',
  summary: 'List batches, newest first; by state, circuit or revision.',
  roles: 'everyone',
  input: z.strictObject({ ...pageFields, state: listOf(state, 10).optional(), circuitId: id().optional(), revisionId: id().optional() }),
  output: pageOf(batchRow),
  async run({ tx, actor, input }) {
    const states = input.state && input.state.length > 0 ? sql`and sort_state in (${sql.join(input.state.map((one) => sql`${one}`), sql`, `)})` : sql``;
    const ofCircuit = input.circuitId === undefined ? sql`` : sql`and circuit_ref = ${input.circuitId}`;
    const ofRevision = input.revisionId === undefined ? sql`` : sql`and revision_ref = ${input.revisionId}`;
    const found = await tx.execute<{ row: z.output<typeof batchRow>; total: number }>(sql`
      select row, count(*) over ()::int as total from (${rowSql}) as batches
       where workshop_id = ${actor.workshopId} ${states} ${ofCircuit} ${ofRevision}
       order by sort_at desc limit ${input.size} offset ${(input.page - 1) * input.size}`);
    return { rows: found.rows.map(({ row }) => row), total: found.rows[0]?.total ?? 0, page: input.page, size: input.size };
  },
});

const need = z.object({
  needId: id(),
  lineId: id(),
  designators: z.array(z.string()),
  text: z.string(),
  part: partFacts.nullable(),
  quantity: z.number().int(),
  promised: z.number().int(),
  picked: z.number().int(),
  short: z.number().int(),
  /** Free elsewhere now: what reserving again would find. */
  free: z.number().int(),
  onOrder: z.number().int(),
});

export const getBatch = query({
  name: 'batches.get',
  http: 'GET /batches/{batchId}',
  summary: 'A batch with what each line needs, has and lacks.',
  roles: 'everyone',
  input: z.strictObject({ batchId: id() }),
  output: batchRow.extend({ needsList: z.array(need), acts: z.array(z.enum(BATCH_ACTS)) }),
  async run({ tx, actor, input }) {
    const found = await tx.execute<{ row: z.output<typeof batchRow> }>(sql`select row from (${rowSql}) as batches where workshop_id = ${actor.workshopId} and (row ->> 'id') = ${input.batchId}`);
    const row = found.rows[0]?.row;
    if (!row) throw notFound('batch');
    const needs = await tx.execute<{ row: z.output<typeof need> }>(sql`
      select json_build_object('needId', n.id, 'lineId', l.id, 'designators', l.designators, 'text', l.text, 'part', case when p.id is null then null else ${partFactsJson('p')} end,
               'quantity', n.quantity, 'promised', x.promised, 'picked', x.picked, 'short', n.quantity - x.promised,
               'free', coalesce((select sum(t.on_hand - t.reserved) from lot t where t.workshop_id = n.workshop_id and t.part_id = n.part_id), 0),
               'onOrder', coalesce((select sum(greatest(ol.quantity - ol.cancelled - ol.received, 0)) from order_line ol join purchase_order o on o.workshop_id = ol.workshop_id and o.id = ol.order_id
                                     where ol.workshop_id = n.workshop_id and ol.part_id = n.part_id and o.state not in ('received', 'closed', 'cancelled')), 0)) as row
        from batch_need n
        join line l on l.workshop_id = n.workshop_id and l.id = n.line_id
        left join part p on p.workshop_id = n.workshop_id and p.id = n.part_id
        cross join lateral (select coalesce(sum(r.quantity - r.released), 0)::int as promised, coalesce(sum(r.picked), 0)::int as picked from reservation r where r.workshop_id = n.workshop_id and r.need_id = n.id) x
       where n.workshop_id = ${actor.workshopId} and n.batch_id = ${input.batchId}
       order by l.position`);
    return { ...row, needsList: needs.rows.map((one) => one.row), acts: [...batchActsIn(row.state)] };
  },
});

const stop = z.object({
  reservationId: id(),
  needId: id(),
  lotId: id(),
  binId: id(),
  binCode: z.string(),
  cabinetId: id(),
  cabinet: z.string(),
  column: z.number().int(),
  row: z.number().int(),
  part: partFacts,
  designators: z.array(z.string()),
  /** Units still to take; units taken already. */
  take: z.number().int(),
  picked: z.number().int(),
  lotCode: z.string().nullable(),
});

export const pickList = query({
  name: 'batches.pick-list',
  http: 'GET /batches/{batchId}/pick-list',
  summary: 'The stops of a pick in walking order, with what to look for.',
  roles: 'everyone',
  input: z.strictObject({ batchId: id() }),
  output: z.object({ batchId: id(), number: z.string(), circuit: z.string(), units: z.number().int(), state, stops: z.array(stop) }),
  async run({ tx, actor, input }) {
    const head = await tx.execute<{ number: string; circuit: string; units: number; state: z.output<typeof state> }>(sql`
      select b.number, c.name as circuit, b.units, b.state from batch b
        join revision v on v.workshop_id = b.workshop_id and v.id = b.revision_id join circuit c on c.workshop_id = v.workshop_id and c.id = v.circuit_id
       where b.workshop_id = ${actor.workshopId} and b.id = ${input.batchId}`);
    const batch = head.rows[0];
    if (!batch) throw notFound('batch');
    const found = await tx.execute<{ row: z.output<typeof stop>; walk_order: number }>(sql`
      select k.walk_order, json_build_object('reservationId', r.id, 'needId', r.need_id, 'lotId', t.id, 'binId', b.id, 'binCode', b.code, 'cabinetId', k.id, 'cabinet', k.code, 'column', b."column", 'row', b.row,
               'part', ${partFactsJson('p')}, 'designators', l.designators, 'take', r.open, 'picked', r.picked, 'lotCode', t.lot_code) as row
        from reservation r
        join lot t on t.workshop_id = r.workshop_id and t.id = r.lot_id
        join part p on p.workshop_id = t.workshop_id and p.id = t.part_id
        join bin b on b.workshop_id = t.workshop_id and b.id = t.bin_id
        join cabinet k on k.workshop_id = b.workshop_id and k.id = b.cabinet_id
        join batch_need n on n.workshop_id = r.workshop_id and n.id = r.need_id
        join line l on l.workshop_id = n.workshop_id and l.id = n.line_id
       where r.workshop_id = ${actor.workshopId} and r.batch_id = ${input.batchId} and (r.open > 0 or r.picked > 0)
       limit 5000`);
    const place = (one: { row: z.output<typeof stop>; walk_order: number }) => ({ cabinetWalkOrder: one.walk_order, cabinetCode: one.row.cabinet, column: one.row.column, row: one.row.row });
    const stops = found.rows.sort((a, b) => byWalkingOrder(place(a), place(b)) || a.row.part.name.localeCompare(b.row.part.name)).map((one) => one.row);
    return { batchId: input.batchId, ...batch, stops };
  },
});

export type PickStop = z.output<typeof stop>;
export type { PartFacts };
