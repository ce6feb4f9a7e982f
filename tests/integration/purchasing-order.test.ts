import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closeDatabase } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { approveOrder, returnOrderToDraft, submitOrder } from '@/lib/purchasing/approve-order';
import { cancelOrder, settleShortOrder } from '@/lib/purchasing/cancel-order';
import { changeOrderLines, createOrder } from '@/lib/purchasing/draft-order';
import { getOrder } from '@/lib/purchasing/get-order';
import { orderShortfalls } from '@/lib/purchasing/order-shortfalls';
import { closeOrder, payOrder } from '@/lib/purchasing/pay-order';
import { orderAsCsv, orderAsPdf, sendOrder } from '@/lib/purchasing/send-order';
import { listShortfalls } from '@/lib/purchasing/shortfalls';
import { createSupplier, setOffer } from '@/lib/purchasing/suppliers';
import { createBatch } from '@/lib/stores/create-batch';
import { receiptProposal } from '@/lib/stores/receipt-proposal';
import { receiveDelivery } from '@/lib/stores/receive-delivery';
import { reserveBatch } from '@/lib/stores/reserve-batch';
import { type Bins, expectLedgerHolds, makeBins, makePart, makeRevision, stock } from '../support/shelf';
import { act, makeWorkshop, type TestWorkshop } from '../support/workshop';

let shop: TestWorkshop;
let bins: Bins;
beforeAll(async () => {
  shop = await makeWorkshop('Buying');
  bins = await makeBins(shop);
});
afterAll(closeDatabase);

const supplierNamed = async (name: string, more: object = {}) =>
  (
    await act(createSupplier, shop.as.buyer, {
      name,
      email: 'orders@example.invalid',
      currency: 'EUR',
      postageMinor: 490,
      ...more,
    })
  ).id;
const offerOf = async (
  supplierId: string,
  partId: string,
  breaks: { fromQuantity: number; unitPrice: string }[],
  more: object = {},
) =>
  (await act(setOffer, shop.as.buyer, { supplierId, partId, supplierCode: `C-${newId().slice(-8)}`, breaks, ...more }))
    .id;

describe('buying what is short', () => {
  it('a shortfall becomes a draft at the cheapest offer, is sent on account, received in two deliveries, and the batch can reserve', async () => {
    const part = await makePart(shop, 'CD4093BE');
    await stock(shop, part, bins['A-01-1'], 2);
    const { revisionId } = await makeRevision(shop, [{ partId: part, quantity: 3 }]);
    const batch = await act(createBatch, shop.as.builder, { revisionId, units: 4 });
    const dear = await supplierNamed('Dear');
    const cheap = await supplierNamed('Cheap', { postageMinor: 390 });
    await offerOf(dear, part, [{ fromQuantity: 1, unitPrice: '0.60' }]);
    // 10 wanted; 25 at the break cost less than 10 at the single price.
    await offerOf(
      cheap,
      part,
      [
        { fromQuantity: 1, unitPrice: '0.55' },
        { fromQuantity: 25, unitPrice: '0.20' },
      ],
      { orderMultiple: 5 },
    );
    const { shortfalls } = await act(listShortfalls, shop.as.buyer, {});
    const short = shortfalls.find((one) => one.partId === part);
    expect(short).toMatchObject({ short: 10, needed: 12, free: 2, because: 'batch' });
    expect(short?.waiting.map((one) => one.number)).toEqual([batch.number]);
    expect(short?.purchases[0]).toMatchObject({ quantity: 25, unitPrice: '0.2', totalMinor: 500 });

    const raised = await act(orderShortfalls, shop.as.buyer, { parts: [{ partId: part }] });
    expect(raised.orders).toMatchObject([{ supplierName: 'Cheap', totalMinor: 890, currency: 'EUR' }]);
    const orderId = raised.orders[0]?.id ?? '';
    // What a draft covers is not short any more, so nothing is ordered twice.
    expect(
      (await act(listShortfalls, shop.as.buyer, {})).shortfalls.find((one) => one.partId === part),
    ).toBeUndefined();

    expect(await act(submitOrder, shop.as.buyer, { orderId })).toMatchObject({ state: 'approved' });
    await expect(act(sendOrder, shop.as.buyer, { orderId })).rejects.toMatchObject({ code: 'state.refused' });
    await expect(act(payOrder, shop.as.buyer, { orderId, way: 'card' })).rejects.toMatchObject({
      code: 'rule.forbids',
    });
    expect(await act(payOrder, shop.as.buyer, { orderId, way: 'on-account' })).toMatchObject({ state: 'on-account' });
    expect(await act(sendOrder, shop.as.buyer, { orderId })).toMatchObject({ state: 'sent' });

    const { lines } = await act(receiptProposal, shop.as.storekeeper, { orderId });
    expect(lines[0]).toMatchObject({ missing: 25, bins: [{ code: 'A-01-1', onHand: 2 }], waiting: [batch.number] });
    const bag = {
      orderLineId: lines[0]?.orderLineId ?? '',
      partId: part,
      binId: bins['A-01-1'] ?? '',
      lotCode: 'K7Q2',
      dateCode: '2638',
    };
    const first = await act(receiveDelivery, shop.as.storekeeper, { orderId, lines: [{ ...bag, quantity: 8 }] });
    expect(first).toMatchObject({
      order: { state: 'part-received', missing: 17 },
      waitingBatches: [{ number: batch.number }],
    });
    const second = await act(receiveDelivery, shop.as.storekeeper, { orderId, lines: [{ ...bag, quantity: 17 }] });
    expect(second.order).toMatchObject({ state: 'received', missing: 0 });
    expect(await act(reserveBatch, shop.as.builder, { batchId: batch.id })).toMatchObject({
      state: 'reserved',
      shortfalls: [],
    });
    expect(await act(closeOrder, shop.as.buyer, { orderId })).toMatchObject({ state: 'closed' });
    await expectLedgerHolds(shop);
  });

  it('above the limit an order waits for a lead who did not submit it', async () => {
    const part = await makePart(shop, 'LM13700N');
    const supplier = await supplierNamed('Large');
    const offerId = await offerOf(supplier, part, [{ fromQuantity: 1, unitPrice: '2.499999' }]);
    const { id: orderId, totalMinor } = await act(createOrder, shop.as.lead, {
      supplierId: supplier,
      lines: [{ offerId, quantity: 120 }],
    });
    // 120 × 2.499999 = 299.99988, half up to the cent, and postage once.
    expect(totalMinor).toBe(30_000 + 490);
    expect(await act(submitOrder, shop.as.lead, { orderId })).toMatchObject({ state: 'submitted' });
    await expect(act(approveOrder, shop.as.buyer, { orderId })).rejects.toMatchObject({ code: 'not-allowed' });
    await expect(act(approveOrder, shop.as.lead, { orderId })).rejects.toMatchObject({ code: 'rule.forbids' });
    expect(await act(returnOrderToDraft, shop.as.buyer, { orderId, reason: 'other buyer submits' })).toMatchObject({
      state: 'draft',
    });
    await act(submitOrder, shop.as.buyer, { orderId });
    expect(await act(approveOrder, shop.as.lead, { orderId })).toMatchObject({ state: 'approved' });
  });

  it('refuses what the offer does not allow, with the line, and what somebody else changed', async () => {
    const part = await makePart(shop, '1N4148');
    const supplier = await supplierNamed('Strict', { minimumOrderMinor: 1_000 });
    const offerId = await offerOf(supplier, part, [{ fromQuantity: 100, unitPrice: '0.012' }], { orderMultiple: 50 });
    await expect(
      act(createOrder, shop.as.buyer, { supplierId: supplier, lines: [{ offerId, quantity: 120 }] }),
    ).rejects.toMatchObject({
      code: 'rule.forbids',
      errors: [{ pointer: '/lines/0/quantity' }],
      more: { orderable: 150 },
    });
    const { id: orderId } = await act(createOrder, shop.as.buyer, {
      supplierId: supplier,
      lines: [{ offerId, quantity: 150 }],
    });
    await expect(act(submitOrder, shop.as.buyer, { orderId })).rejects.toMatchObject({ code: 'rule.forbids' });
    const { version } = await act(getOrder, shop.as.buyer, { orderId });
    await act(changeOrderLines, shop.as.buyer, { orderId, version, lines: [{ offerId, quantity: 1_000 }] });
    await expect(
      act(changeOrderLines, shop.as.lead, { orderId, version, lines: [{ offerId, quantity: 500 }] }),
    ).rejects.toMatchObject({ code: 'version.stale' });
  });

  it('a cancelled order receives nothing; a short delivery is settled and the rest is not owed', async () => {
    const part = await makePart(shop, '2N3904');
    const supplier = await supplierNamed('Short');
    const offerId = await offerOf(supplier, part, [{ fromQuantity: 1, unitPrice: '0.05' }]);
    const sent = async () => {
      const { id: orderId } = await act(createOrder, shop.as.buyer, {
        supplierId: supplier,
        lines: [{ offerId, quantity: 40 }],
      });
      await act(submitOrder, shop.as.buyer, { orderId });
      await act(payOrder, shop.as.buyer, { orderId, way: 'on-account' });
      await act(sendOrder, shop.as.buyer, { orderId });
      const order = await act(getOrder, shop.as.buyer, { orderId });
      return { orderId, bag: { orderLineId: order.lines[0]?.id ?? '', partId: part, binId: bins['A-02-2'] ?? '' } };
    };
    const gone = await sent();
    expect(await act(cancelOrder, shop.as.buyer, { orderId: gone.orderId, reason: 'not needed' })).toMatchObject({
      state: 'cancelled',
      refundMinor: 0,
    });
    await expect(
      act(receiveDelivery, shop.as.storekeeper, { orderId: gone.orderId, lines: [{ ...gone.bag, quantity: 1 }] }),
    ).rejects.toMatchObject({ code: 'state.refused' });
    const short = await sent();
    await expect(
      act(receiveDelivery, shop.as.storekeeper, { orderId: short.orderId, lines: [{ ...short.bag, quantity: 45 }] }),
    ).rejects.toMatchObject({ code: 'rule.forbids' });
    await act(receiveDelivery, shop.as.storekeeper, {
      orderId: short.orderId,
      lines: [{ ...short.bag, quantity: 30 }],
    });
    expect(await act(settleShortOrder, shop.as.buyer, { orderId: short.orderId, reason: 'sold out' })).toMatchObject({
      state: 'received',
    });
    expect((await act(getOrder, shop.as.buyer, { orderId: short.orderId })).lines[0]).toMatchObject({
      received: 30,
      cancelled: 10,
    });
    await expectLedgerHolds(shop);
  });

  it('the order on paper is a PDF, and its CSV runs no formula', async () => {
    const part = await makePart(shop, 'TL074CN');
    const supplier = await supplierNamed('Paper');
    const offerId = await offerOf(supplier, part, [{ fromQuantity: 1, unitPrice: '0.4' }], {
      supplierCode: '=cmd|calc',
    });
    const { id: orderId } = await act(createOrder, shop.as.buyer, {
      supplierId: supplier,
      lines: [{ offerId, quantity: 10 }],
    });
    const pdf = Buffer.from(await (await act(orderAsPdf, shop.as.buyer, { orderId })).arrayBuffer());
    expect(pdf.subarray(0, 5).toString()).toBe('%PDF-');
    expect(await (await act(orderAsCsv, shop.as.buyer, { orderId })).text()).toContain("'=cmd|calc");
  });
});
