/** Units that come back from a batch: to the lots they came from, or to another bin with their age, cost and codes. */
import 'server-only';
import { sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { lot } from '@/db/schema/stores';
import { Refusal } from '@/lib/api/problem';
import type { BatchRow } from './locked-batch';
import { lockLotsOf } from './pick-units';
import type { Movement } from './record-movements';
import { usableBins } from './usable-bins';

export interface PickedUnits extends Record<string, unknown> {
  readonly need_id: string;
  readonly lot_id: string;
  readonly part_id: string;
  readonly part_name: string;
  readonly bin_id: string;
  readonly bin_retired: boolean;
  readonly unit_cost: string;
  readonly received_at: string;
  readonly lot_code: string | null;
  readonly date_code: string | null;
  readonly picked: number;
}

export interface Return {
  readonly from: PickedUnits;
  readonly quantity: number;
  /** Where it goes; null: where it came from, or, that bin being retired, where the part lies, or an empty bin. */
  readonly binId: string | null;
}

/** What was picked for the batch, by need and lot, oldest lot first. The batch's row lock keeps it so. */
export async function pickedOf(tx: Tx, batch: BatchRow): Promise<PickedUnits[]> {
  const found = await tx.execute<PickedUnits>(sql`
    select r.need_id, t.id as lot_id, t.part_id, p.name as part_name, t.bin_id, b.retired_at is not null as bin_retired, t.unit_cost, t.received_at::text as received_at, t.lot_code, t.date_code, sum(r.picked)::int as picked
      from reservation r
      join lot t on t.workshop_id = r.workshop_id and t.id = r.lot_id
      join bin b on b.workshop_id = t.workshop_id and b.id = t.bin_id
      join part p on p.workshop_id = t.workshop_id and p.id = t.part_id
     where r.workshop_id = ${batch.workshopId} and r.batch_id = ${batch.id} and r.picked > 0
     group by r.need_id, t.workshop_id, t.id, p.name, b.retired_at
     order by t.received_at, t.id`);
  return found.rows;
}

/** Locks bins, then the batch's lots; makes the lots that other bins need; gives the movements to enter. */
export async function prepareReturns(
  tx: Tx,
  batch: BatchRow,
  returns: readonly Return[],
  reason: string,
): Promise<Movement[]> {
  const targets: { from: PickedUnits; quantity: number; binId: string }[] = [];
  for (const { from, quantity, binId } of returns) {
    targets.push({
      from,
      quantity,
      binId: binId ?? (from.bin_retired ? await binFor(tx, batch.workshopId, from) : from.bin_id),
    });
  }
  await usableBins(
    tx,
    batch.workshopId,
    targets.map((one) => one.binId),
  );
  await lockLotsOf(tx, batch);
  const movements: Movement[] = [];
  for (const { from, quantity, binId } of targets) {
    let lotId = from.lot_id;
    if (binId !== from.bin_id) {
      lotId = newId();
      await tx.insert(lot).values({
        workshopId: batch.workshopId,
        id: lotId,
        partId: from.part_id,
        binId,
        unitCost: from.unit_cost,
        receivedAt: sql`${from.received_at}::timestamptz`,
        lotCode: from.lot_code,
        dateCode: from.date_code,
      });
    }
    movements.push({
      kind: 'return',
      lotId,
      partId: from.part_id,
      binId,
      quantity,
      referenceType: 'batch',
      referenceId: batch.id,
      reason,
    });
  }
  return movements;
}

async function binFor(tx: Tx, workshopId: string, from: PickedUnits): Promise<string> {
  const found = await tx.execute<{ id: string }>(sql`
    select b.id
      from bin b
      join cabinet k on k.workshop_id = b.workshop_id and k.id = b.cabinet_id
      cross join lateral (select coalesce(sum(t.on_hand), 0) as units, coalesce(sum(t.on_hand) filter (where t.part_id = ${from.part_id}), 0) as same from lot t where t.workshop_id = b.workshop_id and t.bin_id = b.id) x
     where b.workshop_id = ${workshopId} and b.retired_at is null and (x.same > 0 or x.units = 0)
     order by x.same desc, k.walk_order, k.code, b."column", b.row limit 1`);
  const bin = found.rows[0];
  if (!bin)
    throw new Refusal(
      'rule.forbids',
      `${from.part_name} can’t go back: its bin is retired and none is empty. Add a bin first; nothing was changed.`,
    );
  return bin.id;
}
