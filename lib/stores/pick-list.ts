/** The stops of a pick in walking order: one drawer opened once for a part, with what to look for and to beware of. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { id } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { BATCH_STATES } from '@/lib/circuits/batch-states';
import { groupStops } from '@/lib/planning/group-stops';
import { partCautions } from '@/lib/planning/part-cautions';
import { caution, partFacts, partFactsJson } from './part-facts';

/** A line of the largest batch has a handful of lots; more rows than this is no list to walk. */
const MOST_RESERVATIONS = 20_000;

const lineOfStop = z.object({
  reservationId: id(),
  needId: id(),
  lotId: id(),
  lotCode: z.string().nullable(),
  designators: z.array(z.string()),
  take: z.number().int(),
  picked: z.number().int(),
});
const stopOfPick = z.object({
  /** From 1, in walking order; a stop keeps its number while others are taken. */
  stop: z.number().int(),
  binId: id(),
  binCode: z.string(),
  cabinetId: id(),
  cabinet: z.string(),
  room: z.string(),
  column: z.number().int(),
  row: z.number().int(),
  part: partFacts,
  cautions: z.array(caution),
  /** Units still to take, and taken already. */
  take: z.number().int(),
  picked: z.number().int(),
  designators: z.array(z.string()),
  lines: z.array(lineOfStop),
});
export type StopOfPick = z.output<typeof stopOfPick>;

interface Reserved {
  readonly reservationId: string;
  readonly needId: string;
  readonly lotId: string;
  readonly lotCode: string | null;
  readonly designators: string[];
  readonly take: number;
  readonly picked: number;
  readonly position: number;
  readonly binId: string;
  readonly binCode: string;
  readonly cabinetId: string;
  readonly cabinet: string;
  readonly cabinetWalkOrder: number;
  readonly room: string;
  readonly column: number;
  readonly row: number;
  readonly part: z.output<typeof partFacts>;
}

/** Everything reserved or picked for the batch, as stops. */
export async function pickStops(tx: Tx, workshopId: string, batchId: string): Promise<StopOfPick[]> {
  const found = await tx.execute<{ row: Reserved }>(sql`
    select json_build_object('reservationId', r.id, 'needId', r.need_id, 'lotId', t.id, 'lotCode', t.lot_code, 'designators', l.designators, 'take', r.open, 'picked', r.picked, 'position', l.position,
             'binId', b.id, 'binCode', b.code, 'cabinetId', k.id, 'cabinet', k.code, 'cabinetWalkOrder', k.walk_order, 'room', k.room, 'column', b."column", 'row', b.row, 'part', ${partFactsJson('p')}) as row
      from reservation r
      join lot t on t.workshop_id = r.workshop_id and t.id = r.lot_id
      join part p on p.workshop_id = t.workshop_id and p.id = t.part_id
      join bin b on b.workshop_id = t.workshop_id and b.id = t.bin_id
      join cabinet k on k.workshop_id = b.workshop_id and k.id = b.cabinet_id
      join batch_need n on n.workshop_id = r.workshop_id and n.id = r.need_id
      join line l on l.workshop_id = n.workshop_id and l.id = n.line_id
     where r.workshop_id = ${workshopId} and r.batch_id = ${batchId} and (r.open > 0 or r.picked > 0)
     order by t.received_at, r.id
     limit ${MOST_RESERVATIONS}`);
  const lines = found.rows.map(({ row }) => ({
    ...row,
    cabinetCode: row.cabinet,
    partId: row.part.id,
    partName: row.part.name,
  }));
  return groupStops(lines).map((group, index) => {
    const [first] = group;
    return {
      stop: index + 1,
      binId: first.binId,
      binCode: first.binCode,
      cabinetId: first.cabinetId,
      cabinet: first.cabinet,
      room: first.room,
      column: first.column,
      row: first.row,
      part: first.part,
      cautions: partCautions(first.part),
      take: group.reduce((sum, line) => sum + line.take, 0),
      picked: group.reduce((sum, line) => sum + line.picked, 0),
      designators: [...new Set(group.flatMap((line) => line.designators))],
      lines: group.map(({ reservationId, needId, lotId, lotCode, designators, take, picked }) => ({
        reservationId,
        needId,
        lotId,
        lotCode,
        designators,
        take,
        picked,
      })),
    };
  });
}

export const pickList = query({
  name: 'batches.pick-list',
  http: 'GET /batches/{batchId}/pick-list',
  summary: 'The stops of a pick in walking order, with what to look for and cautions.',
  roles: 'everyone',
  input: z.strictObject({ batchId: id() }),
  output: z.object({
    batchId: id(),
    number: z.string(),
    circuit: z.string(),
    revision: z.string(),
    units: z.number().int(),
    state: z.enum(BATCH_STATES),
    stops: z.array(stopOfPick),
  }),
  async run({ tx, actor, input }) {
    const head = await tx.execute<{
      number: string;
      circuit: string;
      revision: string;
      units: number;
      state: (typeof BATCH_STATES)[number];
    }>(sql`
      select b.number, c.name as circuit, v.name as revision, b.units, b.state from batch b
        join revision v on v.workshop_id = b.workshop_id and v.id = b.revision_id join circuit c on c.workshop_id = v.workshop_id and c.id = v.circuit_id
       where b.workshop_id = ${actor.workshopId} and b.id = ${input.batchId}`);
    const batch = head.rows[0];
    if (!batch) throw notFound('batch');
    return { batchId: input.batchId, ...batch, stops: await pickStops(tx, actor.workshopId, input.batchId) };
  },
});
