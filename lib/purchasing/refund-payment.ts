/** Carries out one refund at the payment service. The refund's id is its idempotency key, so a repeat gives money back once. */
import 'server-only';
import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import { withWorkshop } from '@/db/client';
import { payment, refund } from '@/db/schema/purchasing';
import type { HandledJob } from '@/lib/services/jobs';
import { isPassing, refund as refundAtService } from '@/lib/services/payments';

export async function refundPayment(job: HandledJob): Promise<void> {
  const { refundId } = z.object({ refundId: z.uuid() }).parse(job.payload);
  const wish = await withWorkshop(job.workshopId, async (tx) => {
    const [row] = await tx
      .select({ state: refund.state, amountMinor: refund.amountMinor, paymentIntentId: payment.paymentIntentId })
      .from(refund)
      .innerJoin(payment, and(eq(payment.workshopId, refund.workshopId), eq(payment.id, refund.paymentId)))
      .where(and(eq(refund.workshopId, job.workshopId), eq(refund.id, refundId)));
    return row ?? null;
  });
  if (!wish || wish.state !== 'asked') return;
  if (wish.paymentIntentId === null) throw new Error(`refund ${refundId} has no payment intent`);
  const done = await refundAtService({
    paymentIntentId: wish.paymentIntentId,
    amountMinor: wish.amountMinor,
    idempotencyKey: `refund:${refundId}`,
    reverseTransfer: true,
  });
  if (!done.ok && isPassing(done)) throw new Error(`the payment service does not answer: ${done.message}`);
  await withWorkshop(job.workshopId, (tx) =>
    tx
      .update(refund)
      .set(
        done.ok
          ? { state: 'done', providerId: done.refund.id, lastProblem: null }
          : { state: 'failed', lastProblem: done.message },
      )
      .where(and(eq(refund.workshopId, job.workshopId), eq(refund.id, refundId), eq(refund.state, 'asked'))),
  );
}
