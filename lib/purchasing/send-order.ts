/** Sending a paid order (or one on account) to its supplier: the state moves with the press, the mail follows by a job. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { type Tx, withWorkshop } from '@/db/client';
import { person, workshop } from '@/db/schema/people';
import { offer, orderLine, orderMail, payment, purchaseOrder } from '@/db/schema/purchasing';
import { id } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { command, query } from '@/lib/api/use-case';
import type { HandledJob } from '@/lib/services/jobs';
import { sendMail } from '@/lib/services/mail';
import { lockOrder, moveOrder, orderLinesOf, stateAfter, supplierOf } from './locked-order';
import { type OrderDocument, orderCsv, orderPdf } from './order-document';
import { ORDER_STATES } from './order-states';

export const sendOrder = command({
  name: 'orders.send',
  http: 'POST /orders/{orderId}/send',
  summary: 'Send the order to its supplier by e-mail, with a PDF and a CSV.',
  roles: ['buyer', 'lead'],
  input: z.strictObject({ orderId: id() }),
  output: z.object({ id: id(), number: z.string(), state: z.enum(ORDER_STATES), expectedOn: z.string() }),
  async run({ tx, actor, input, enqueue, record }) {
    const order = await lockOrder(tx, actor.workshopId, input.orderId);
    const next = stateAfter(order, 'send');
    const from = await supplierOf(tx, actor.workshopId, order.supplierId);
    // The slowest line tells when the order is whole.
    const [slowest] = await tx
      .select({ days: sql<number | null>`max(${offer.leadTimeDays})` })
      .from(orderLine)
      .innerJoin(offer, and(eq(offer.workshopId, orderLine.workshopId), eq(offer.id, orderLine.offerId)))
      .where(and(eq(orderLine.workshopId, order.workshopId), eq(orderLine.orderId, order.id)));
    const days = Math.max(from.leadTimeDays, slowest?.days ?? 0);
    const now = new Date();
    const expectedOn = new Date(now.getTime() + days * 86_400_000).toISOString().slice(0, 10);
    const sent = await moveOrder(tx, order, next, { sentAt: now, expectedOn });
    const subject = `Order ${order.number} from ${actor.workshopName}`;
    await tx.insert(orderMail).values({
      workshopId: order.workshopId,
      orderId: order.id,
      messageId: `order:${order.id}`,
      to: from.email,
      subject,
      detail: { attachments: [`order-${order.number}.pdf`, `order-${order.number}.csv`] },
    });
    await enqueue({ queue: 'send-order', payload: { orderId: order.id } });
    record(order.id, { to: from.email, expectedOn });
    return { id: sent.id, number: sent.number, state: sent.state, expectedOn };
  },
});

/** The order as its paper shows it. */
export async function documentOf(tx: Tx, workshopId: string, orderId: string): Promise<OrderDocument> {
  const [order] = await tx
    .select()
    .from(purchaseOrder)
    .where(and(eq(purchaseOrder.workshopId, workshopId), eq(purchaseOrder.id, orderId)));
  if (!order) throw notFound('order');
  const from = await supplierOf(tx, workshopId, order.supplierId);
  const [house] = await tx
    .select({ name: workshop.name, letterhead: workshop.letterhead })
    .from(workshop)
    .where(eq(workshop.id, workshopId));
  const [buyer] = await tx
    .select({ name: person.name })
    .from(person)
    .where(eq(person.id, order.submittedBy ?? order.createdBy));
  const [paid] = await tx
    .select({ id: payment.id })
    .from(payment)
    .where(and(eq(payment.workshopId, workshopId), eq(payment.orderId, orderId), eq(payment.state, 'paid')))
    .limit(1);
  const lines = await orderLinesOf(tx, workshopId, orderId);
  return {
    number: order.number,
    workshopName: house?.name ?? '',
    letterhead: house?.letterhead ?? '',
    supplierName: from.name,
    supplierAddress: from.address,
    currency: order.currency,
    orderedOn: (order.sentAt ?? order.createdAt).toISOString().slice(0, 10),
    expectedOn: order.expectedOn,
    buyerName: buyer?.name ?? '',
    paid: paid !== undefined,
    note: order.note,
    goodsMinor: order.goodsMinor,
    postageMinor: order.postageMinor,
    totalMinor: order.totalMinor,
    lines: lines.map((line) => ({ ...line, unitPrice: line.unitPrice.replace(/(\.\d\d\d*?)0+$/, '$1') })),
  };
}

export async function mailOrder(job: HandledJob): Promise<void> {
  const { orderId } = z.object({ orderId: z.uuid() }).parse(job.payload);
  const found = await withWorkshop(job.workshopId, async (tx) => {
    const [mail] = await tx
      .select()
      .from(orderMail)
      .where(and(eq(orderMail.workshopId, job.workshopId), eq(orderMail.messageId, `order:${orderId}`)));
    return mail ? { mail, order: await documentOf(tx, job.workshopId, orderId) } : null;
  });
  if (!found || found.mail.sentAt !== null) return;
  const { mail, order } = found;
  const sent = await sendMail({
    to: mail.to,
    subject: mail.subject,
    text: `Dear ${order.supplierName},\n\nplease find our order ${order.number} attached, as PDF and as CSV: ${order.lines.length} lines, ${order.paid ? 'paid by card' : 'to be put on our account'}.\n\n${order.buyerName}\n${order.workshopName}\n${order.letterhead}`,
    attachments: [
      { filename: `order-${order.number}.pdf`, content: await orderPdf(order), contentType: 'application/pdf' },
      { filename: `order-${order.number}.csv`, content: Buffer.from(orderCsv(order), 'utf8'), contentType: 'text/csv' },
    ],
    messageIdFrom: mail.messageId,
  });
  if (!sent.ok) throw new Error(`the mail server did not take order ${order.number}: ${sent.message}`);
  await withWorkshop(job.workshopId, (tx) =>
    tx
      .update(orderMail)
      .set({ sentAt: new Date() })
      .where(and(eq(orderMail.workshopId, job.workshopId), eq(orderMail.id, mail.id))),
  );
}

const asFile = (bytes: Buffer | string, type: string, name: string): Response =>
  new Response(typeof bytes === 'string' ? bytes : new Uint8Array(bytes), {
    headers: {
      'content-type': type,
      'content-disposition': `attachment; filename="${name}"`,
      'cache-control': 'no-store',
    },
  });

export const orderAsPdf = query({
  name: 'orders.as-pdf',
  http: 'GET /orders/{orderId}/pdf',
  summary: 'The order as the supplier gets it, as PDF.',
  roles: 'everyone',
  input: z.strictObject({ orderId: id() }),
  output: z.instanceof(Response),
  async run({ tx, actor, input }) {
    const order = await documentOf(tx, actor.workshopId, input.orderId);
    return asFile(await orderPdf(order), 'application/pdf', `order-${order.number}.pdf`);
  },
});

export const orderAsCsv = query({
  name: 'orders.as-csv',
  http: 'GET /orders/{orderId}/csv',
  summary: 'The order as the supplier gets it, as CSV.',
  roles: 'everyone',
  input: z.strictObject({ orderId: id() }),
  output: z.instanceof(Response),
  async run({ tx, actor, input }) {
    const order = await documentOf(tx, actor.workshopId, input.orderId);
    return asFile(orderCsv(order), 'text/csv; charset=utf-8', `order-${order.number}.csv`);
  },
});
