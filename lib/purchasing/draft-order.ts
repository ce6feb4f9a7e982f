/** Draft orders: lines priced from offers on the server; the totals of an order are never taken from a client. */
import 'server-only';
import { and, eq, inArray, isNull, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { part } from '@/db/schema/catalogue';
import { offer, offerBreak, orderLine, purchaseOrder, supplier } from '@/db/schema/purchasing';
import { id } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { nextNumber } from '@/lib/workshop/next-number';
import { lockOrder, type OrderRow, supplierOf } from './locked-order';
import { type Break, lineTotalMinor, moneyText, orderableQuantity, postageFor, unitPriceAt } from './order-money';

/** Lines of one order; a larger purchase is split by the buyer. */
const MOST_LINES = 500;

export interface WantedLine {
  readonly offerId: string;
  readonly quantity: number;
}

export interface PricedOffer {
  readonly offerId: string;
  readonly partId: string;
  readonly supplierId: string;
  readonly supplierCode: string;
  readonly description: string;
  readonly orderMultiple: number;
  readonly minimumQuantity: number;
  readonly breaks: readonly Break[];
}

/** Offers with their breaks, as they hold now. Refuses an unknown or retired one. */
export async function loadOffers(
  tx: Tx,
  workshopId: string,
  offerIds: readonly string[],
): Promise<Map<string, PricedOffer>> {
  if (offerIds.length === 0) return new Map();
  const rows = await tx
    .select({
      offerId: offer.id,
      partId: offer.partId,
      supplierId: offer.supplierId,
      supplierCode: offer.supplierCode,
      orderMultiple: offer.orderMultiple,
      minimumQuantity: offer.minimumQuantity,
      partName: part.name,
      partNumber: part.partNumber,
      breaks: sql<
        Break[]
      >`(select coalesce(json_agg(json_build_object('fromQuantity', b.from_quantity, 'unitPrice', trim_scale(b.unit_price)::text) order by b.from_quantity), '[]')
        from ${offerBreak} b where b.workshop_id = ${offer.workshopId} and b.offer_id = ${offer.id})`,
    })
    .from(offer)
    .innerJoin(part, and(eq(part.workshopId, offer.workshopId), eq(part.id, offer.partId)))
    .where(and(eq(offer.workshopId, workshopId), inArray(offer.id, [...offerIds]), isNull(offer.retiredAt)));
  return new Map(
    rows.map(({ partName, partNumber, ...row }) => [
      row.offerId,
      {
        ...row,
        description: partNumber === null || partName.includes(partNumber) ? partName : `${partName} (${partNumber})`,
      },
    ]),
  );
}

/** Prices lines by their offers; refuses what the offer's multiple and minimum don't allow, naming the line. */
export function priceLines(
  wanted: readonly WantedLine[],
  offers: ReadonlyMap<string, PricedOffer>,
  forSupplier: { id: string; currency: string },
) {
  return wanted.map((line, index) => {
    const found = offers.get(line.offerId);
    const pointer = `/lines/${index}`;
    if (!found || found.supplierId !== forSupplier.id) {
      throw new Refusal('not-found', `Line ${index + 1} names an offer that this supplier does not make.`, {
        errors: [{ pointer, code: 'offer', detail: 'no such offer of this supplier' }],
      });
    }
    const orderable = orderableQuantity(line.quantity, found);
    if (orderable !== line.quantity) {
      const detail = `${found.description} is sold from ${orderableQuantity(1, found)} in steps of ${found.orderMultiple}; ${orderable} would do.`;
      throw new Refusal('rule.forbids', `Line ${index + 1}: ${detail}`, {
        errors: [{ pointer: `${pointer}/quantity`, code: 'multiple', detail }],
        more: { orderable },
      });
    }
    const unitPrice = unitPriceAt(found.breaks, line.quantity);
    if (unitPrice === null)
      throw new Refusal('rule.forbids', `Line ${index + 1}: ${found.description} has no price from this supplier.`);
    return {
      position: index + 1,
      partId: found.partId,
      offerId: found.offerId,
      supplierCode: found.supplierCode,
      description: found.description,
      quantity: line.quantity,
      unitPrice,
      totalMinor: lineTotalMinor(line.quantity, unitPrice, forSupplier.currency),
    };
  });
}

/** Writes the lines of a draft anew and its totals with them. */
async function writeLines(
  tx: Tx,
  order: OrderRow,
  wanted: readonly WantedLine[],
): Promise<{ goodsMinor: number; totalMinor: number; version: number }> {
  const from = await supplierOf(tx, order.workshopId, order.supplierId);
  const offers = await loadOffers(
    tx,
    order.workshopId,
    wanted.map((line) => line.offerId),
  );
  const lines = priceLines(wanted, offers, { id: from.id, currency: order.currency });
  await tx.delete(orderLine).where(and(eq(orderLine.workshopId, order.workshopId), eq(orderLine.orderId, order.id)));
  if (lines.length > 0)
    await tx
      .insert(orderLine)
      .values(lines.map((line) => ({ ...line, workshopId: order.workshopId, orderId: order.id })));
  const goodsMinor = lines.reduce((sum, line) => sum + line.totalMinor, 0);
  const postageMinor = lines.length === 0 ? 0 : postageFor(goodsMinor, from);
  const [changed] = await tx
    .update(purchaseOrder)
    .set({
      goodsMinor,
      postageMinor,
      totalMinor: goodsMinor + postageMinor,
      version: sql`${purchaseOrder.version} + 1`,
    })
    .where(and(eq(purchaseOrder.workshopId, order.workshopId), eq(purchaseOrder.id, order.id)))
    .returning({ totalMinor: purchaseOrder.totalMinor, version: purchaseOrder.version });
  if (!changed) throw new Error('the draft vanished under its lock');
  return { goodsMinor, ...changed };
}

/** Makes a draft; the caller's transaction also holds what led to it. */
export async function makeDraft(
  tx: Tx,
  by: { workshopId: string; personId: string },
  supplierId: string,
  wanted: readonly WantedLine[],
  note = '',
): Promise<{ id: string; number: string; totalMinor: number; currency: string }> {
  const from = await supplierOf(tx, by.workshopId, supplierId);
  if (from.retiredAt !== null)
    throw new Refusal('rule.forbids', `${from.name} is retired; nothing can be ordered there.`);
  const number = await nextNumber(tx, by.workshopId, 'order');
  const [row] = await tx
    .insert(purchaseOrder)
    .values({ workshopId: by.workshopId, number, supplierId, currency: from.currency, createdBy: by.personId, note })
    .returning();
  if (!row) throw new Error('the insert returned no row');
  const { totalMinor } = await writeLines(tx, { ...row, state: 'draft' }, wanted);
  return { id: row.id, number, totalMinor, currency: from.currency };
}

const wantedLines = z
  .array(z.strictObject({ offerId: id(), quantity: z.number().int().min(1).max(10_000_000) }))
  .max(MOST_LINES)
  .refine(
    (lines) => new Set(lines.map((line) => line.offerId)).size === lines.length,
    'names one offer twice; put the quantities together',
  );

export const createOrder = command({
  name: 'orders.create',
  http: 'POST /orders',
  summary: 'Start a draft order at one supplier, from offers and quantities.',
  roles: ['buyer', 'lead'],
  input: z.strictObject({ supplierId: id(), lines: wantedLines, note: z.string().trim().max(1_000).default('') }),
  output: z.object({ id: id(), number: z.string(), totalMinor: z.number().int(), currency: z.string() }),
  async run({ tx, actor, input, record }) {
    const made = await makeDraft(tx, actor, input.supplierId, input.lines, input.note);
    record(made.id, { number: made.number, totalMinor: made.totalMinor, currency: made.currency });
    return made;
  },
});

export const changeOrderLines = command({
  name: 'orders.change-lines',
  http: 'PUT /orders/{orderId}/lines',
  summary: 'Set the lines of a draft order; they are priced anew from the offers.',
  roles: ['buyer', 'lead'],
  input: z.strictObject({ orderId: id(), version: z.number().int(), lines: wantedLines }),
  output: z.object({ id: id(), totalMinor: z.number().int(), version: z.number().int() }),
  async run({ tx, actor, input, record }) {
    const order = await lockOrder(tx, actor.workshopId, input.orderId);
    if (order.state !== 'draft')
      throw new Refusal(
        'state.refused',
        `Order ${order.number} is ${order.state}; only a draft’s lines can change. Take it back to draft first.`,
      );
    refuseStale(order, input.version);
    const { totalMinor, version } = await writeLines(tx, order, input.lines);
    record(order.id, { totalMinor });
    return { id: order.id, totalMinor, version };
  },
});

/** 412 with the current version where somebody else changed the order since it was looked at. */
export function refuseStale(order: OrderRow, version: number): void {
  if (order.version === version) return;
  throw new Refusal(
    'version.stale',
    `Somebody changed order ${order.number} since you looked. It stands at ${moneyText(order.totalMinor, order.currency)} now.`,
    {
      more: { version: order.version, state: order.state, totalMinor: order.totalMinor },
    },
  );
}

/** Prices may have changed since the draft was made: what is submitted is what the offers say at that moment. */
export async function repriceDraft(tx: Tx, order: OrderRow): Promise<{ goodsMinor: number; totalMinor: number }> {
  const lines = await tx
    .select({ offerId: orderLine.offerId, quantity: orderLine.quantity, position: orderLine.position })
    .from(orderLine)
    .where(and(eq(orderLine.workshopId, order.workshopId), eq(orderLine.orderId, order.id)))
    .orderBy(orderLine.position);
  if (lines.length === 0) throw new Refusal('rule.forbids', `Order ${order.number} has no lines.`);
  return writeLines(tx, order, lines);
}

/** A minimum is on goods, before postage. */
export async function refuseBelowMinimum(tx: Tx, order: OrderRow, goodsMinor: number): Promise<void> {
  const [from] = await tx
    .select({ name: supplier.name, minimum: supplier.minimumOrderMinor })
    .from(supplier)
    .where(and(eq(supplier.workshopId, order.workshopId), eq(supplier.id, order.supplierId)));
  if (!from) throw notFound('supplier');
  if (goodsMinor < from.minimum) {
    throw new Refusal(
      'rule.forbids',
      `${from.name} takes orders from ${moneyText(from.minimum, order.currency)}; this one has ${moneyText(goodsMinor, order.currency)} of goods.`,
    );
  }
}
