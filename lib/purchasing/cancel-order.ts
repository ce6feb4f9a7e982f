/** Ending what will not come: a whole order, or what is missing of one. Where it was paid by card, the money goes back. */
import 'server-only';
import { and, eq, inArray, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { orderLine, payment, refund } from '@/db/schema/purchasing';
import { id } from '@/lib/api/fields';
import { Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { lockOrder, moveOrder, orderLinesOf, stateAfter } from './locked-order';
import { moneyText, refundForMissing } from './order-money';
import { ORDER_STATES } from './order-states';
import { refusePaymentUnderWay } from './payment-under-way';
import { askForRefund } from './settle-payment';

const settled = z.object({
  id: id(),
  number: z.string(),
  state: z.enum(ORDER_STATES),
  refundMinor: z.number().int(),
  currency: z.string(),
});

/** The paid payment of an order and what is still left of it after refunds asked for or done. */
async function paidPayment(
  tx: Tx,
  workshopId: string,
  orderId: string,
): Promise<{ id: string; leftMinor: number } | null> {
  const [row] = await tx
    .select({
      id: payment.id,
      leftMinor: sql<string>`${payment.amountMinor} - coalesce((select sum(r.amount_minor) from ${refund} r where r.workshop_id = ${payment.workshopId} and r.payment_id = ${payment.id} and r.state <> 'failed'), 0)`,
    })
    .from(payment)
    .where(and(eq(payment.workshopId, workshopId), eq(payment.orderId, orderId), eq(payment.state, 'paid')))
    .orderBy(payment.attempt)
    .limit(1);
  return row ? { id: row.id, leftMinor: Number(row.leftMinor) } : null;
}

export const cancelOrder = command({
  name: 'orders.cancel',
  http: 'POST /orders/{orderId}/cancel',
  summary: 'Cancel an order of which nothing came yet; a card payment goes back whole.',
  roles: ['buyer', 'lead'],
  input: z.strictObject({ orderId: id(), reason: z.string().trim().min(1, 'say why').max(500) }),
  output: settled,
  async run({ tx, actor, input, record }) {
    const order = await lockOrder(tx, actor.workshopId, input.orderId);
    const next = stateAfter(order, 'cancel');
    await refusePaymentUnderWay(tx, order.workshopId, order.id, order.number);
    const paid = await paidPayment(tx, order.workshopId, order.id);
    if (paid && paid.leftMinor > 0) {
      await askForRefund(tx, {
        workshopId: order.workshopId,
        paymentId: paid.id,
        amountMinor: paid.leftMinor,
        reason: `order cancelled: ${input.reason}`,
        createdBy: actor.personId,
      });
    }
    const cancelled = await moveOrder(tx, order, next);
    const refundMinor = paid?.leftMinor ?? 0;
    record(order.id, { reason: input.reason, refundMinor });
    return { ...cancelled, refundMinor };
  },
});

export const settleShortOrder = command({
  name: 'orders.settle-short',
  http: 'POST /orders/{orderId}/settle-short',
  summary: 'Give up what did not come: the missing units are not owed any more and their price goes back to the card.',
  roles: ['buyer', 'lead'],
  input: z.strictObject({
    orderId: id(),
    reason: z.string().trim().min(1, 'say why').max(500),
    lineIds: z.array(id()).max(500).optional(),
  }),
  output: settled,
  async run({ tx, actor, input, record }) {
    const order = await lockOrder(tx, actor.workshopId, input.orderId);
    const next = stateAfter(order, 'settle-short');
    const lines = await orderLinesOf(tx, order.workshopId, order.id);
    const open = lines.filter((line) => line.quantity - line.cancelled - line.received > 0);
    const chosen = input.lineIds === undefined ? open : open.filter((line) => input.lineIds?.includes(line.id));
    if (chosen.length === 0)
      throw new Refusal('rule.forbids', `Nothing of order ${order.number} is missing on those lines.`);
    let refundMinor = 0;
    for (const line of chosen) {
      refundMinor += refundForMissing({
        ...line,
        currency: order.currency,
        cancelledBefore: line.cancelled,
        cancelledNow: line.quantity - line.cancelled - line.received,
      });
    }
    const paid = await paidPayment(tx, order.workshopId, order.id);
    if (paid && refundMinor > paid.leftMinor) {
      throw new Refusal(
        'rule.forbids',
        `Only ${moneyText(paid.leftMinor, order.currency)} of the payment is left; ${moneyText(refundMinor, order.currency)} can’t go back.`,
      );
    }
    await tx
      .update(orderLine)
      .set({ cancelled: sql`${orderLine.quantity} - ${orderLine.received}` })
      .where(
        and(
          eq(orderLine.workshopId, order.workshopId),
          inArray(
            orderLine.id,
            chosen.map((line) => line.id),
          ),
        ),
      );
    if (paid && refundMinor > 0)
      await askForRefund(tx, {
        workshopId: order.workshopId,
        paymentId: paid.id,
        amountMinor: refundMinor,
        reason: `short delivery: ${input.reason}`,
        createdBy: actor.personId,
      });
    const stillOpen = open.length > chosen.length;
    const after = stillOpen ? order : await moveOrder(tx, order, next);
    record(order.id, { reason: input.reason, refundMinor: paid ? refundMinor : 0, lines: chosen.length });
    return {
      id: order.id,
      number: order.number,
      state: after.state,
      currency: order.currency,
      refundMinor: paid ? refundMinor : 0,
    };
  },
});
