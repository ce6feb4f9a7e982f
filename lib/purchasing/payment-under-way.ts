/** A checkout that may still be paid. While one is open, the order's total must not change under it. */
import 'server-only';
import { and, eq, inArray } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { payment } from '@/db/schema/purchasing';
import { Refusal } from '@/lib/api/problem';

const UNDER_WAY = ['started', 'open', 'declined'];

export async function refusePaymentUnderWay(
  tx: Tx,
  workshopId: string,
  orderId: string,
  number: string,
): Promise<void> {
  const [row] = await tx
    .select({ id: payment.id })
    .from(payment)
    .where(and(eq(payment.workshopId, workshopId), eq(payment.orderId, orderId), inArray(payment.state, UNDER_WAY)))
    .limit(1);
  if (row) throw new Refusal('state.refused', `A card payment of order ${number} is open. Pay it or give it up first.`);
}
