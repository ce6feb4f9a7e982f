/**
 * Paying an approved order: by card through a hosted checkout, or on the supplier's account.
 * The checkout is made between two transactions: the attempt is written first, so that a crash leaves a trace to
 * settle, and the service is asked under a key of its own per attempt, so that asking again finds the same checkout.
 * Nothing here makes an order paid; only the payment service's event does (settle-payment.ts).
 */
import 'server-only';
import { and, desc, eq, inArray } from 'drizzle-orm';
import { z } from 'zod';
import { payment } from '@/db/schema/purchasing';
import { id } from '@/lib/api/fields';
import { Refusal } from '@/lib/api/problem';
import { command, errand } from '@/lib/api/use-case';
import { ownUrl } from '@/lib/auth/auth-mail';
import { createCheckout, expireCheckout, isPassing } from '@/lib/services/payments';
import { lockOrder, moveOrder, stateAfter, supplierOf } from './locked-order';
import { ORDER_STATES } from './order-states';
import { refusePaymentUnderWay } from './payment-under-way';

export const payOrder = errand({
  name: 'orders.pay',
  http: 'POST /orders/{orderId}/pay',
  summary:
    'Pay an approved order: `card` answers the address of a checkout, `on-account` books it on the supplier’s account.',
  roles: ['buyer', 'lead'],
  input: z.strictObject({ orderId: id(), way: z.enum(['card', 'on-account']) }),
  output: z.object({ id: id(), number: z.string(), state: z.enum(ORDER_STATES), checkoutUrl: z.string().nullable() }),
  async run({ actor, input, step }) {
    if (input.way === 'on-account') {
      const order = await step(async ({ tx, record }) => {
        const locked = await lockOrder(tx, actor.workshopId, input.orderId);
        const next = stateAfter(locked, 'put-on-account');
        await refusePaymentUnderWay(tx, locked.workshopId, locked.id, locked.number);
        record(locked.id, { way: 'on-account' });
        return moveOrder(tx, locked, next);
      });
      return { id: order.id, number: order.number, state: order.state, checkoutUrl: null };
    }

    const attempt = await step(async ({ tx, record }) => {
      const order = await lockOrder(tx, actor.workshopId, input.orderId);
      stateAfter(order, 'pay');
      const from = await supplierOf(tx, actor.workshopId, order.supplierId);
      if (from.paymentAccount === null)
        throw new Refusal('rule.forbids', `${from.name} takes no cards; put the order on account.`);
      const [last] = await tx
        .select()
        .from(payment)
        .where(and(eq(payment.workshopId, order.workshopId), eq(payment.orderId, order.id)))
        .orderBy(desc(payment.attempt))
        .limit(1);
      // An open checkout is gone on with: two open ones could both be paid.
      if (last && (last.state === 'open' || last.state === 'declined' || last.state === 'started'))
        return { order, supplier: from, row: last };
      const [row] = await tx
        .insert(payment)
        .values({
          workshopId: order.workshopId,
          orderId: order.id,
          attempt: (last?.attempt ?? 0) + 1,
          amountMinor: order.totalMinor,
          currency: order.currency,
          createdBy: actor.personId,
        })
        .returning();
      if (!row) throw new Error('the insert returned no row');
      record(order.id, { attempt: row.attempt, amountMinor: row.amountMinor });
      return { order, supplier: from, row };
    });

    const { order, row } = attempt;
    if (row.checkoutUrl !== null)
      return { id: order.id, number: order.number, state: order.state, checkoutUrl: row.checkoutUrl };
    const made = await createCheckout({
      orderId: order.id,
      metadata: { workshop_id: order.workshopId, payment_id: row.id },
      attempt: row.attempt,
      amountMinor: row.amountMinor,
      currency: row.currency,
      supplierAccount: attempt.supplier.paymentAccount ?? '',
      description: `Order ${order.number} at ${attempt.supplier.name}`,
      successUrl: ownUrl(`/orders/${order.id}?checkout=done`),
      cancelUrl: ownUrl(`/orders/${order.id}?checkout=left`),
      idempotencyKey: `checkout:${row.id}`,
    });
    if (!made.ok) {
      await step(async ({ tx }) => {
        await tx
          .update(payment)
          .set({ lastProblem: made.message, ...(isPassing(made) ? {} : { state: 'failed' }) })
          .where(and(eq(payment.workshopId, order.workshopId), eq(payment.id, row.id)));
      });
      throw new Refusal(
        isPassing(made) ? 'service.away' : 'payment.refused',
        isPassing(made)
          ? 'The payment service does not answer right now. Nothing was paid; press again in a moment.'
          : `The payment service refused: ${made.message}`,
      );
    }
    await step(async ({ tx }) => {
      await tx
        .update(payment)
        .set({ checkoutSessionId: made.checkout.id, checkoutUrl: made.checkout.url, state: 'open', lastProblem: null })
        .where(
          and(eq(payment.workshopId, order.workshopId), eq(payment.id, row.id), inArray(payment.state, ['started'])),
        );
    });
    return { id: order.id, number: order.number, state: order.state, checkoutUrl: made.checkout.url };
  },
});

export const giveUpPayment = errand({
  name: 'orders.give-up-payment',
  http: 'POST /orders/{orderId}/give-up-payment',
  summary: 'Close an open checkout, so that the order can be changed, cancelled or paid another way.',
  roles: ['buyer', 'lead'],
  input: z.strictObject({ orderId: id() }),
  output: z.object({ id: id(), givenUp: z.boolean() }),
  async run({ actor, input, step }) {
    const row = await step(async ({ tx }) => {
      const order = await lockOrder(tx, actor.workshopId, input.orderId);
      const [found] = await tx
        .select()
        .from(payment)
        .where(
          and(
            eq(payment.workshopId, order.workshopId),
            eq(payment.orderId, order.id),
            inArray(payment.state, ['started', 'open', 'declined']),
          ),
        )
        .orderBy(desc(payment.attempt))
        .limit(1);
      if (!found) throw new Refusal('state.refused', `Order ${order.number} has no open payment.`);
      return found;
    });
    if (row.checkoutSessionId !== null) {
      // The service decides the race with somebody who is just paying: an already paid session can't be closed.
      const closed = await expireCheckout(row.checkoutSessionId);
      if (!closed.ok)
        throw new Refusal(
          isPassing(closed) ? 'service.away' : 'state.refused',
          isPassing(closed)
            ? 'The payment service does not answer right now; press again in a moment.'
            : 'This checkout can’t be closed any more: it was paid or is closed already.',
        );
    }
    await step(async ({ tx, record }) => {
      await tx
        .update(payment)
        .set({ state: 'abandoned' })
        .where(
          and(
            eq(payment.workshopId, actor.workshopId),
            eq(payment.id, row.id),
            inArray(payment.state, ['started', 'open', 'declined']),
          ),
        );
      record(input.orderId, { attempt: row.attempt });
    });
    return { id: input.orderId, givenUp: true };
  },
});

export const closeOrder = command({
  name: 'orders.close',
  http: 'POST /orders/{orderId}/close',
  summary: 'Close an order that is received and settled.',
  roles: ['buyer', 'lead'],
  input: z.strictObject({ orderId: id() }),
  output: z.object({ id: id(), number: z.string(), state: z.enum(ORDER_STATES) }),
  async run({ tx, actor, input, record }) {
    const order = await lockOrder(tx, actor.workshopId, input.orderId);
    const closed = await moveOrder(tx, order, stateAfter(order, 'close'));
    record(order.id);
    return closed;
  },
});
