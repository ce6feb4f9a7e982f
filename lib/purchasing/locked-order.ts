/** An order under its row lock, and the conditional change of its state: where every order command starts and ends. */
import 'server-only';
import { and, asc, eq, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { orderLine, purchaseOrder, supplier } from '@/db/schema/purchasing';
import { notFound, Refusal } from '@/lib/api/problem';
import { ORDER_STATES, type OrderAct, type OrderState, orderStateAfter } from './order-states';

export type OrderRow = Omit<typeof purchaseOrder.$inferSelect, 'state'> & { readonly state: OrderState };

function toState(text: string): OrderState {
  const state = ORDER_STATES.find((one) => one === text);
  if (!state) throw new Error(`unknown order state ${text}`);
  return state;
}

export async function lockOrder(tx: Tx, workshopId: string, orderId: string): Promise<OrderRow> {
  const [row] = await tx
    .select()
    .from(purchaseOrder)
    .where(and(eq(purchaseOrder.workshopId, workshopId), eq(purchaseOrder.id, orderId)))
    .for('update');
  if (!row) throw notFound('order');
  return { ...row, state: toState(row.state) };
}

export const orderLinesOf = (tx: Tx, workshopId: string, orderId: string) =>
  tx
    .select()
    .from(orderLine)
    .where(and(eq(orderLine.workshopId, workshopId), eq(orderLine.orderId, orderId)))
    .orderBy(asc(orderLine.position));

export async function supplierOf(
  tx: Tx,
  workshopId: string,
  supplierId: string,
): Promise<typeof supplier.$inferSelect> {
  const [row] = await tx
    .select()
    .from(supplier)
    .where(and(eq(supplier.workshopId, workshopId), eq(supplier.id, supplierId)));
  if (!row) throw notFound('supplier');
  return row;
}

const ACT_WORDS: Record<OrderAct, string> = {
  submit: 'submitted',
  approve: 'approved',
  'return-to-draft': 'taken back to draft',
  pay: 'paid',
  'put-on-account': 'put on account',
  send: 'sent',
  'receive-part': 'received',
  'receive-all': 'received',
  'settle-short': 'settled',
  close: 'closed',
  cancel: 'cancelled',
};

/** The state the act leads to; refuses with the state it is in. */
export function stateAfter(order: OrderRow, act: OrderAct): OrderState {
  const next = orderStateAfter(order.state, act);
  if (next === null) {
    throw new Refusal('state.refused', `Order ${order.number} is ${order.state}; it can’t be ${ACT_WORDS[act]} now.`, {
      more: { state: order.state, version: order.version },
    });
  }
  return next;
}

/** Writes the new state and what goes with it. The row is locked, so a miss is a bug, not a race. */
export async function moveOrder(
  tx: Tx,
  order: OrderRow,
  state: OrderState,
  changes: Partial<typeof purchaseOrder.$inferInsert> = {},
): Promise<OrderRow> {
  const [row] = await tx
    .update(purchaseOrder)
    .set({ ...changes, state, version: sql`${purchaseOrder.version} + 1` })
    .where(
      and(
        eq(purchaseOrder.workshopId, order.workshopId),
        eq(purchaseOrder.id, order.id),
        eq(purchaseOrder.state, order.state),
      ),
    )
    .returning();
  if (!row) throw new Error(`order ${order.id} changed state under its lock`);
  return { ...row, state: toState(row.state) };
}
