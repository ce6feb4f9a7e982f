/** The lots of some parts under their row locks, in the one order everybody locks them in: part id, then lot id. */
import 'server-only';
import { sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import type { ChosenLot, LotOnShelf } from '@/lib/planning/choose-lots';

/** Locks every lot of the parts that has something, and tells what is free on each, by part. */
export async function lockShelf(
  tx: Tx,
  workshopId: string,
  partIds: readonly string[],
): Promise<Map<string, LotOnShelf[]>> {
  const shelf = new Map<string, LotOnShelf[]>();
  if (partIds.length === 0) return shelf;
  const lots = await tx.execute<{
    part_id: string;
    id: string;
    bin_id: string;
    free: number;
    received_ms: string;
    doubtful: boolean;
  }>(sql`
    select t.part_id, t.id, t.bin_id, t.on_hand - t.reserved as free, extract(epoch from t.received_at) * 1000 as received_ms, b.doubtful
      from lot t join bin b on b.workshop_id = t.workshop_id and b.id = t.bin_id
     where t.workshop_id = ${workshopId} and t.part_id in (${sql.join(
       [...new Set(partIds)].map((one) => sql`${one}::uuid`),
       sql`, `,
     )}) and t.on_hand > 0
     order by t.part_id, t.id
       for update of t`);
  for (const lot of lots.rows) {
    const list = shelf.get(lot.part_id) ?? [];
    list.push({
      lotId: lot.id,
      binId: lot.bin_id,
      free: lot.free,
      receivedAtMs: Number(lot.received_ms),
      doubtful: lot.doubtful,
    });
    shelf.set(lot.part_id, list);
  }
  return shelf;
}

/** The shelf in memory less what was chosen, so that the next need of the same part sees what is left. */
export function takeOff(shelf: readonly LotOnShelf[], chosen: readonly ChosenLot[]): LotOnShelf[] {
  const taken = new Map(chosen.map((one) => [one.lotId, one.quantity]));
  return shelf.map((lot) => ({ ...lot, free: lot.free - (taken.get(lot.lotId) ?? 0) }));
}
