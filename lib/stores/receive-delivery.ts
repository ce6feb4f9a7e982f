/**
 * Bags into bins: each bag becomes a lot of its own with a receipt movement, the order's lines and state follow, and
 * the answer says which batches can now reserve.
 */
import 'server-only';
import { and, eq, inArray, sql } from 'drizzle-orm';
import { z } from 'zod';
import { part } from '@/db/schema/catalogue';
import { newId } from '@/db/schema/new-id';
import { orderLine, receipt, receiptLine } from '@/db/schema/purchasing';
import { bin, lot } from '@/db/schema/stores';
import { id, words } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { lockOrder, moveOrder, orderLinesOf, stateAfter } from '@/lib/purchasing/locked-order';
import { ORDER_STATES } from '@/lib/purchasing/order-states';
import { nextNumber } from '@/lib/workshop/next-number';
import { recordMovements } from './record-movements';

const MOST_BAGS = 500;

/** Year and week, YYWW, as makers print it. */
export const dateCode = z.string().regex(/^\d{2}(?:0[1-9]|[1-4]\d|5[0-3])$/, 'is year and week, such as 2638');
/** Cost of one unit in the workshop's currency. */
export const unitCost = z.string().regex(/^\d{1,9}(\.\d{1,6})?$/, 'is a price with at most six places');

const bag = z.strictObject({
  /** The order's line; left out for a part that nobody ordered. */
  orderLineId: id().optional(),
  partId: id(),
  binId: id(),
  quantity: z.number().int('must be a whole number').min(1, 'must be at least 1').max(10_000_000),
  lotCode: words(60).optional(),
  dateCode: dateCode.optional(),
  /** Of an ordered line the order's price counts. */
  unitCost: unitCost.optional(),
});

export const receiveDelivery = command({
  name: 'receipts.create',
  http: 'POST /receipts',
  summary: 'Receive bags into bins: of an order, in one or several deliveries, or without one.',
  roles: ['storekeeper', 'buyer', 'lead'],
  input: z.strictObject({
    orderId: id().optional(),
    supplierId: id().optional(),
    deliveryNote: z.string().trim().max(200).default(''),
    lines: z.array(bag).min(1).max(MOST_BAGS),
  }),
  output: z.object({
    id: id(),
    number: z.string(),
    lots: z.array(z.object({ lotId: id(), partId: id(), binId: id(), quantity: z.number().int() })),
    order: z
      .object({ id: id(), number: z.string(), state: z.enum(ORDER_STATES), missing: z.number().int() })
      .nullable(),
    waitingBatches: z.array(z.object({ id: id(), number: z.string(), circuit: z.string() })),
  }),
  async run(context) {
    const { tx, actor, input, record } = context;
    const order = input.orderId === undefined ? null : await lockOrder(tx, actor.workshopId, input.orderId);
    // Refuses an order that is cancelled, closed or not yet sent before anything else is looked at.
    if (order) stateAfter(order, 'receive-part');
    const ordered = order ? await orderLinesOf(tx, actor.workshopId, order.id) : [];
    const prices = new Map<number, string>();
    input.lines.forEach((line, index) => {
      if (line.orderLineId === undefined) return;
      const wanted = ordered.find((one) => one.id === line.orderLineId);
      const refuse = (detail: string) =>
        new Refusal('rule.forbids', `Bag ${index + 1}: ${detail}`, {
          errors: [{ pointer: `/lines/${index}`, code: 'order-line', detail }],
        });
      if (!order || !wanted) throw refuse('that line is not on this order.');
      if (wanted.partId !== line.partId)
        throw refuse(`the order asks for ${wanted.description} there. Another part is received without its line.`);
      prices.set(index, wanted.unitPrice);
    });
    await refuseUnknown(tx, actor.workshopId, input.lines);

    const number = await nextNumber(tx, actor.workshopId, 'receipt');
    const receiptId = newId();
    await tx.insert(receipt).values({
      workshopId: actor.workshopId,
      id: receiptId,
      number,
      orderId: order?.id ?? null,
      supplierId: order?.supplierId ?? input.supplierId ?? null,
      deliveryNote: input.deliveryNote,
      receivedBy: actor.personId,
    });
    const bags = input.lines.map((line, index) => ({
      ...line,
      lotId: newId(),
      receiptLineId: newId(),
      unitCost: prices.get(index) ?? line.unitCost ?? '0',
    }));
    await tx.insert(lot).values(
      bags.map((one) => ({
        workshopId: actor.workshopId,
        id: one.lotId,
        partId: one.partId,
        binId: one.binId,
        unitCost: one.unitCost,
        lotCode: one.lotCode ?? null,
        dateCode: one.dateCode ?? null,
      })),
    );
    await tx.insert(receiptLine).values(
      bags.map((one) => ({
        workshopId: actor.workshopId,
        id: one.receiptLineId,
        receiptId,
        orderLineId: one.orderLineId ?? null,
        partId: one.partId,
        binId: one.binId,
        lotId: one.lotId,
        quantity: one.quantity,
      })),
    );
    await recordMovements(
      context,
      bags.map((one) => ({
        kind: 'receipt',
        lotId: one.lotId,
        partId: one.partId,
        binId: one.binId,
        quantity: one.quantity,
        referenceType: 'receipt-line',
        referenceId: one.receiptLineId,
      })),
    );

    let after = null;
    if (order) {
      for (const line of ordered) {
        const came = bags.filter((one) => one.orderLineId === line.id).reduce((sum, one) => sum + one.quantity, 0);
        // The trigger behind this refuses more than ordered and allowed.
        if (came > 0) {
          await tx
            .update(orderLine)
            .set({ received: sql`${orderLine.received} + ${came}` })
            .where(and(eq(orderLine.workshopId, actor.workshopId), eq(orderLine.id, line.id)));
          line.received += came;
        }
      }
      const missing = ordered.reduce(
        (sum, line) => sum + Math.max(0, line.quantity - line.cancelled - line.received),
        0,
      );
      const moved = await moveOrder(tx, order, stateAfter(order, missing === 0 ? 'receive-all' : 'receive-part'));
      after = { id: moved.id, number: moved.number, state: moved.state, missing };
    }
    record(receiptId, { number, order: order?.number ?? null, bags: bags.length });
    return {
      id: receiptId,
      number,
      lots: bags.map(({ lotId, partId, binId, quantity }) => ({ lotId, partId, binId, quantity })),
      order: after,
      waitingBatches: await waitingFor(
        tx,
        actor.workshopId,
        bags.map((one) => one.partId),
      ),
    };
  },
});

type Tx = Parameters<typeof lockOrder>[0];

async function refuseUnknown(tx: Tx, workshopId: string, lines: readonly z.output<typeof bag>[]): Promise<void> {
  const partIds = [...new Set(lines.map((line) => line.partId))];
  const binIds = [...new Set(lines.map((line) => line.binId))];
  const parts = await tx
    .select({ id: part.id })
    .from(part)
    .where(and(eq(part.workshopId, workshopId), inArray(part.id, partIds)));
  if (parts.length !== partIds.length) throw notFound('part');
  const bins = await tx
    .select({ id: bin.id, code: bin.code, retiredAt: bin.retiredAt })
    .from(bin)
    .where(and(eq(bin.workshopId, workshopId), inArray(bin.id, binIds)))
    .for('share');
  if (bins.length !== binIds.length) throw notFound('bin');
  const retired = bins.find((one) => one.retiredAt !== null);
  if (retired) throw new Refusal('rule.forbids', `Bin ${retired.code} is retired. Choose another; nothing was booked.`);
}

/** Batches under way that still lack one of these parts. */
async function waitingFor(tx: Tx, workshopId: string, partIds: readonly string[]) {
  const found = await tx.execute<{ id: string; number: string; circuit: string }>(sql`
    select distinct b.id, b.number, c.name as circuit
      from batch b
      join batch_need n on n.workshop_id = b.workshop_id and n.batch_id = b.id
      join revision v on v.workshop_id = b.workshop_id and v.id = b.revision_id
      join circuit c on c.workshop_id = v.workshop_id and c.id = v.circuit_id
     where b.workshop_id = ${workshopId} and b.state in ('planned', 'reserved', 'picking')
       and n.part_id in (${sql.join(
         [...new Set(partIds)].map((one) => sql`${one}::uuid`),
         sql`, `,
       )})
       and n.quantity > coalesce((select sum(r.quantity - r.released) from reservation r where r.workshop_id = n.workshop_id and r.need_id = n.id), 0)
     order by b.number limit 100`);
  return found.rows;
}
