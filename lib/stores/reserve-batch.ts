/**
 * Promising real lots to a batch. Needs, then lots are locked in the fixed order (part id, lot id), a pure function
 * chooses, and the reservations are written at once; the lot's own check makes a double promise impossible besides.
 * Called again, it tops up what was short.
 */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { reservation } from '@/db/schema/stores';
import { id } from '@/lib/api/fields';
import { command } from '@/lib/api/use-case';
import { BATCH_STATES } from '@/lib/circuits/batch-states';
import { chooseLots, freeOn } from '@/lib/planning/choose-lots';
import { refreshNeeds } from './create-batch';
import { batchAfter, lockBatch, moveBatch } from './locked-batch';
import { lockShelf, takeOff } from './locked-shelf';

interface OpenNeed {
  readonly needId: string;
  readonly lineId: string;
  readonly partId: string | null;
  readonly partName: string | null;
  readonly text: string;
  readonly designators: string[];
  readonly quantity: number;
  /** Units already promised or picked. */
  readonly covered: number;
}

/** Needs that are not wholly covered, in the order lots are locked: by part, then by line. */
async function openNeeds(tx: Tx, workshopId: string, batchId: string): Promise<OpenNeed[]> {
  const found = await tx.execute<{ row: OpenNeed }>(sql`
    select json_build_object('needId', n.id, 'lineId', n.line_id, 'partId', n.part_id, 'partName', p.name, 'text', l.text, 'designators', l.designators, 'quantity', n.quantity,
             'covered', coalesce((select sum(r.quantity - r.released) from reservation r where r.workshop_id = n.workshop_id and r.need_id = n.id), 0)) as row
      from batch_need n
      join line l on l.workshop_id = n.workshop_id and l.id = n.line_id
      left join part p on p.workshop_id = n.workshop_id and p.id = n.part_id
     where n.workshop_id = ${workshopId} and n.batch_id = ${batchId}
     order by n.part_id nulls last, l.position`);
  return found.rows.map(({ row }) => row).filter((need) => need.covered < need.quantity);
}

const shortfallOf = z.object({
  needId: id(),
  lineId: id(),
  partId: id().nullable(),
  partName: z.string().nullable(),
  text: z.string(),
  designators: z.array(z.string()),
  short: z.number().int(),
});

export const reserveBatch = command({
  name: 'batches.reserve',
  http: 'POST /batches/{batchId}/reserve',
  summary:
    'Promise lots to the batch: whole lines, or also parts of lines with allowPart. Answers what was promised and what is short.',
  roles: ['builder', 'storekeeper', 'lead'],
  input: z.strictObject({ batchId: id(), allowPart: z.boolean().default(false) }),
  output: z.object({
    id: id(),
    number: z.string(),
    state: z.enum(BATCH_STATES),
    reserved: z.array(z.object({ reservationId: id(), needId: id(), lotId: id(), quantity: z.number().int() })),
    shortfalls: z.array(shortfallOf),
  }),
  async run({ tx, actor, input, record }) {
    const batch = await lockBatch(tx, actor.workshopId, input.batchId);
    const next = batchAfter(batch, 'reserve');
    await refreshNeeds(tx, batch.workshopId, batch.id);
    const needs = await openNeeds(tx, batch.workshopId, batch.id);
    const shelf = await lockShelf(
      tx,
      batch.workshopId,
      needs.flatMap((need) => need.partId ?? []),
    );
    const promises: { needId: string; lotId: string; quantity: number }[] = [];
    const shortfalls: z.output<typeof shortfallOf>[] = [];
    for (const { covered, quantity, ...need } of needs) {
      const lots = need.partId === null ? [] : (shelf.get(need.partId) ?? []);
      const open = quantity - covered;
      const free = freeOn(lots);
      const wanted = free >= open ? open : input.allowPart ? free : 0;
      const chosen = wanted > 0 ? chooseLots(wanted, lots) : [];
      if (need.partId !== null) shelf.set(need.partId, takeOff(lots, chosen));
      promises.push(...chosen.map((one) => ({ ...one, needId: need.needId })));
      if (wanted < open) shortfalls.push({ ...need, short: open - wanted });
    }
    const made =
      promises.length === 0
        ? []
        : await tx
            .insert(reservation)
            .values(promises.map((promise) => ({ ...promise, workshopId: batch.workshopId, batchId: batch.id })))
            .returning({
              reservationId: reservation.id,
              needId: reservation.needId,
              lotId: reservation.lotId,
              quantity: reservation.quantity,
            });
    // A batch for which nothing at all could be promised stays planned, so that it is not taken for one to pick.
    const state = batch.state === 'planned' && made.length === 0 && shortfalls.length > 0 ? 'planned' : next;
    if (state !== batch.state) await moveBatch(tx, batch, state);
    record(batch.id, { reservations: made.length, shortfalls: shortfalls.length, allowPart: input.allowPart });
    return { id: batch.id, number: batch.number, state, reserved: made, shortfalls };
  },
});
