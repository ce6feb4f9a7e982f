/** What picking and "not there" share: the movement of a pick, what is still open, and when a kit is whole. */
import 'server-only';
import { sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import type { BatchState } from '@/lib/circuits/batch-states';
import { type BatchRow, batchAfter } from './locked-batch';
import type { Movement } from './record-movements';

export const pickFrom = (
  batch: BatchRow,
  from: { readonly lot_id: string; readonly part_id: string; readonly bin_id: string },
  quantity: number,
): Movement => ({
  kind: 'pick',
  lotId: from.lot_id,
  partId: from.part_id,
  binId: from.bin_id,
  quantity: -quantity,
  referenceType: 'batch',
  referenceId: batch.id,
});

/** Kitted when every need is picked in full; otherwise it is being picked. */
export async function stateAfterPick(tx: Tx, batch: BatchRow): Promise<BatchState> {
  const open = await tx.execute<{ open: number }>(sql`
    select count(*)::int as open from batch_need n
     where n.workshop_id = ${batch.workshopId} and n.batch_id = ${batch.id}
       and n.quantity > coalesce((select sum(r.picked) from reservation r where r.workshop_id = n.workshop_id and r.need_id = n.id), 0)`);
  return open.rows[0]?.open === 0 ? batchAfter(batch, 'complete-kit') : batchAfter(batch, 'pick');
}

/** Units reserved for the batch that nobody has taken yet. */
export async function openUnits(tx: Tx, batch: BatchRow): Promise<number> {
  const found = await tx.execute<{ units: number }>(sql`
    select coalesce(sum(r.open), 0)::int as units from reservation r where r.workshop_id = ${batch.workshopId} and r.batch_id = ${batch.id}`);
  return found.rows[0]?.units ?? 0;
}

/** Gives every open promise of the batch up: the units are free for others at once. Lock its lots first. */
export async function releaseOpen(tx: Tx, batch: BatchRow): Promise<number> {
  const released = await tx.execute<{ reservations: number }>(sql`
    with freed as (
      update reservation set released = quantity - picked
       where workshop_id = ${batch.workshopId} and batch_id = ${batch.id} and quantity - picked - released > 0
      returning 1)
    select count(*)::int as reservations from freed`);
  return released.rows[0]?.reservations ?? 0;
}

/** Every lot the batch has to do with, locked in the fixed order and in one pass. */
export async function lockLotsOf(tx: Tx, batch: BatchRow): Promise<void> {
  await tx.execute(sql`
    select t.id from lot t
     where t.workshop_id = ${batch.workshopId} and t.id in (select r.lot_id from reservation r where r.workshop_id = ${batch.workshopId} and r.batch_id = ${batch.id})
     order by t.part_id, t.id for update`);
}
