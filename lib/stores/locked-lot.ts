/** One lot under its row lock, and the refusal to take more of it than is free. */
import 'server-only';
import { and, eq } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { lot } from '@/db/schema/stores';
import { notFound, Refusal } from '@/lib/api/problem';

export async function lockLot(tx: Tx, workshopId: string, lotId: string): Promise<typeof lot.$inferSelect> {
  const [row] = await tx
    .select()
    .from(lot)
    .where(and(eq(lot.workshopId, workshopId), eq(lot.id, lotId)))
    .for('update');
  if (!row) throw notFound('lot');
  return row;
}

export function refuseMoreThanFree(
  row: { readonly onHand: number; readonly reserved: number },
  quantity: number,
): void {
  const free = row.onHand - row.reserved;
  if (quantity <= free) return;
  const promised = row.reserved > 0 ? ` (${row.reserved} more are promised to batches)` : '';
  throw new Refusal('stock.short', `Only ${free} are free in that lot${promised}. Nothing was changed.`, {
    errors: [{ pointer: '/quantity', code: 'more-than-free', detail: `${free} free` }],
  });
}
