/**
 * What an event of the payment service does to an order. Events are stored by their id first and queued once; here the
 * checkout is fetched again, so that only its present state counts and neither the order nor the number of events does.
 */
import 'server-only';
import { and, eq, ne } from 'drizzle-orm';
import { z } from 'zod';
import { type Tx, withScope, withWorkshop } from '@/db/client';
import { payment, refund } from '@/db/schema/purchasing';
import { auditEvent, outbox, paymentEvent } from '@/db/schema/records';
import { log } from '@/lib/api/log';
import type { HandledJob } from '@/lib/services/jobs';
import { type Checkout, isPassing, retrieveCheckout } from '@/lib/services/payments';
import { lockOrder, moveOrder } from './locked-order';
import { moneyText } from './order-money';
import { orderStateAfter } from './order-states';
import { tellBuyer } from './tell-buyer';

const checkoutEvent = z.object({
  id: z.string(),
  type: z.string(),
  data: z.object({
    object: z.object({
      id: z.string(),
      object: z.string(),
      metadata: z.object({ workshop_id: z.uuid().optional(), payment_id: z.uuid().optional() }).nullish(),
    }),
  }),
});

/** Stores a verified event and queues it, once however often it comes. `repeat` where it was there already. */
export async function acceptPaymentEvent(event: unknown): Promise<'queued' | 'repeat' | 'not-ours'> {
  const parsed = checkoutEvent.safeParse(event);
  if (!parsed.success) return 'not-ours';
  const { id, type, data } = parsed.data;
  const workshopId = data.object.metadata?.workshop_id;
  return withScope('inbox', async (tx) => {
    const made = await tx
      .insert(paymentEvent)
      .values({ id, type, payload: event })
      .onConflictDoNothing()
      .returning({ id: paymentEvent.id });
    if (made.length === 0) return 'repeat';
    if (workshopId === undefined) {
      await tx
        .update(paymentEvent)
        .set({ processedAt: new Date(), outcome: 'not ours: no workshop in its metadata' })
        .where(eq(paymentEvent.id, id));
      return 'not-ours';
    }
    await tx.insert(outbox).values({ workshopId, queue: 'payment-event', payload: { eventId: id } });
    return 'queued';
  });
}

export async function handlePaymentEvent(job: HandledJob): Promise<void> {
  const { eventId } = z.object({ eventId: z.string() }).parse(job.payload);
  const stored = await withScope('inbox', async (tx) => {
    const [row] = await tx.select().from(paymentEvent).where(eq(paymentEvent.id, eventId));
    return row ?? null;
  });
  if (!stored || stored.processedAt !== null) return;
  const event = checkoutEvent.parse(stored.payload);
  const outcome = await outcomeOf(event, job.workshopId);
  await withScope('inbox', (tx) =>
    tx.update(paymentEvent).set({ processedAt: new Date(), outcome }).where(eq(paymentEvent.id, eventId)),
  );
}

async function outcomeOf(event: z.infer<typeof checkoutEvent>, workshopId: string): Promise<string> {
  const { object } = event.data;
  if (event.type.startsWith('checkout.session.')) return settleCheckout(workshopId, object.id);
  const paymentId = object.metadata?.payment_id;
  if (event.type === 'payment_intent.payment_failed' && paymentId !== undefined)
    return noteDecline(workshopId, paymentId);
  return `nothing to do for ${event.type}`;
}

/** Brings a payment and its order to what the service says of the checkout now. Bears any number of calls. */
export async function settleCheckout(workshopId: string, sessionId: string): Promise<string> {
  const fetched = await retrieveCheckout(sessionId);
  if (!fetched.ok) {
    if (isPassing(fetched)) throw new Error(`the payment service does not answer: ${fetched.message}`);
    return `the service does not know ${sessionId}: ${fetched.message}`;
  }
  const now = fetched.checkout;
  const paymentId = z.uuid().safeParse(now.metadata.payment_id);
  if (!paymentId.success) return `no payment of ours for ${sessionId}`;
  return withWorkshop(workshopId, async (tx) => {
    const [seen] = await tx
      .select()
      .from(payment)
      .where(and(eq(payment.workshopId, workshopId), eq(payment.id, paymentId.data)));
    if (!seen) return `no payment of ours for ${sessionId}`;
    // The order's lock first, as everywhere; then the payment as it is under it.
    const order = await lockOrder(tx, workshopId, seen.orderId);
    const [row] = await tx
      .select()
      .from(payment)
      .where(and(eq(payment.workshopId, workshopId), eq(payment.id, seen.id)))
      .for('update');
    if (!row || row.state === 'paid') return 'known already';
    if (now.isPaid) return bookPaid(tx, order, row, now);
    if (now.status === 'expired' && row.state !== 'abandoned') {
      await tx
        .update(payment)
        .set({ state: 'abandoned', checkoutSessionId: sessionId })
        .where(and(eq(payment.workshopId, workshopId), eq(payment.id, row.id)));
      return 'the checkout expired unpaid';
    }
    return `still ${now.status}`;
  });
}

async function bookPaid(
  tx: Tx,
  order: Awaited<ReturnType<typeof lockOrder>>,
  row: typeof payment.$inferSelect,
  now: Checkout,
): Promise<string> {
  const { workshopId } = order;
  await tx
    .update(payment)
    .set({
      state: 'paid',
      paidAt: new Date(),
      checkoutSessionId: now.id,
      paymentIntentId: now.paymentIntentId,
      lastProblem: null,
    })
    .where(and(eq(payment.workshopId, workshopId), eq(payment.id, row.id)));
  const others = await tx
    .select({ id: payment.id })
    .from(payment)
    .where(
      and(
        eq(payment.workshopId, workshopId),
        eq(payment.orderId, order.id),
        eq(payment.state, 'paid'),
        ne(payment.id, row.id),
      ),
    )
    .limit(1);
  const next = orderStateAfter(order.state, 'pay');
  const amountRight = now.amountMinor === order.totalMinor && now.currency === order.currency;
  if (next !== null && others.length === 0 && amountRight) {
    await moveOrder(tx, order, next);
    await tx.insert(auditEvent).values({
      workshopId,
      command: 'payments.settle',
      subjectId: order.id,
      detail: { attempt: row.attempt, amountMinor: now.amountMinor },
      requestId: row.id,
    });
    await tellBuyer(
      tx,
      order,
      `Order ${order.number} is paid`,
      [`${moneyText(now.amountMinor, now.currency)} were paid by card.`, 'It can be sent to the supplier now.'],
      `paid:${row.id}`,
    );
    return 'the order is paid';
  }
  // Paid, but not wanted: paid twice, or after the order was cancelled or went on account. The money goes back whole.
  const why =
    others.length > 0
      ? 'it was paid twice'
      : amountRight
        ? `the order was ${order.state} already`
        : 'the amount is not the order’s';
  log.warn({ order: order.id, attempt: row.attempt, why }, 'a payment goes back');
  await askForRefund(tx, { workshopId, paymentId: row.id, amountMinor: now.amountMinor, reason: why, createdBy: null });
  await tellBuyer(
    tx,
    order,
    `A payment for order ${order.number} goes back`,
    [`${moneyText(now.amountMinor, now.currency)} go back to the card, because ${why}.`],
    `paid-back:${row.id}`,
  );
  return `refunded: ${why}`;
}

async function noteDecline(workshopId: string, paymentId: string): Promise<string> {
  return withWorkshop(workshopId, async (tx) => {
    const [seen] = await tx
      .select({ orderId: payment.orderId })
      .from(payment)
      .where(and(eq(payment.workshopId, workshopId), eq(payment.id, paymentId)));
    if (!seen) return 'no payment of ours';
    const order = await lockOrder(tx, workshopId, seen.orderId);
    const changed = await tx
      .update(payment)
      .set({ state: 'declined', lastProblem: 'The card was declined. The checkout stays open for another card.' })
      .where(and(eq(payment.workshopId, workshopId), eq(payment.id, paymentId), eq(payment.state, 'open')))
      .returning({ attempt: payment.attempt });
    if (changed.length === 0) return 'nothing open to decline';
    await tellBuyer(
      tx,
      order,
      `The card for order ${order.number} was declined`,
      ['Nothing was paid. The checkout stays open: try another card, or give the payment up and choose another way.'],
      `declined:${paymentId}:${changed[0]?.attempt ?? 0}`,
    );
    return 'declined';
  });
}

/** Writes a refund and its job; the sum of all refunds of a payment never exceeds it (checked under the order's lock). */
export async function askForRefund(
  tx: Tx,
  wish: { workshopId: string; paymentId: string; amountMinor: number; reason: string; createdBy: string | null },
): Promise<string> {
  const [row] = await tx.insert(refund).values(wish).returning({ id: refund.id });
  if (!row) throw new Error('the insert returned no row');
  await tx
    .insert(outbox)
    .values({ workshopId: wish.workshopId, queue: 'refund-payment', payload: { refundId: row.id } });
  return row.id;
}
