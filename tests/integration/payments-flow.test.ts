/**
 * Orders paid by card from end to end: the real SDK against the local payment service, its signed events into our own
 * webhook route, and the jobs that act on them. Each ends in the right state, however the events come.
 */
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { POST as webhook } from '@/app/api/webhooks/stripe/route';
import { closeDatabase } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { jobHandlers } from '@/lib/jobs';
import { submitOrder } from '@/lib/purchasing/approve-order';
import { cancelOrder, settleShortOrder } from '@/lib/purchasing/cancel-order';
import { createOrder } from '@/lib/purchasing/draft-order';
import { getOrder } from '@/lib/purchasing/get-order';
import { giveUpPayment, payOrder } from '@/lib/purchasing/pay-order';
import { sendOrder } from '@/lib/purchasing/send-order';
import { createSupplier, setOffer } from '@/lib/purchasing/suppliers';
import { startJobs } from '@/lib/services/jobs';
import { receiptProposal } from '@/lib/stores/receipt-proposal';
import { receiveDelivery } from '@/lib/stores/receive-delivery';
import { type Bins, expectLedgerHolds, makeBins, makePart } from '../support/shelf';
import { act, makeWorkshop, type TestWorkshop } from '../support/workshop';
import { bodyOf, type Fakes, startApp, startFakes } from './fakes-running';

/** Numbers that the payment provider publishes for testing. */
const PAID = '4242 4242 4242 4242';
const DECLINED = '4000 0000 0000 0002';

let fakes: Fakes;
let app: Awaited<ReturnType<typeof startApp>>;
let jobs: Awaited<ReturnType<typeof startJobs>>;
let shop: TestWorkshop;
let bins: Bins;
let supplierId: string;
let offerId: string;

beforeAll(async () => {
  const url = process.env.DATABASE_URL ?? '';
  app = await startApp(async (request, response) => {
    const header = request.headers['stripe-signature'];
    const body = await bodyOf(request);
    const answer = await webhook(
      new Request('http://localhost/api/webhooks/stripe', {
        method: 'POST',
        body,
        headers: typeof header === 'string' ? { 'stripe-signature': header } : {},
      }),
    );
    response.statusCode = answer.status;
    response.end(await answer.text());
  });
  fakes = await startFakes(app.port);
  process.env.DATABASE_URL = url;
  jobs = await startJobs(url, jobHandlers);
  shop = await makeWorkshop('Paying');
  bins = await makeBins(shop);
  const partId = await makePart(shop, 'LM13700N');
  supplierId = (
    await act(createSupplier, shop.as.buyer, {
      name: 'Card Taker',
      email: 'orders@example.invalid',
      currency: 'EUR',
      postageMinor: 490,
      paymentAccount: 'acct_fakecardtaker1',
    })
  ).id;
  offerId = (
    await act(setOffer, shop.as.buyer, {
      supplierId,
      partId,
      supplierCode: 'LM13',
      breaks: [{ fromQuantity: 1, unitPrice: '1.15' }],
    })
  ).id;
});

afterEach(async () => {
  await fakes.control('reset');
});

afterAll(async () => {
  await jobs.stop();
  await fakes.stop();
  await app.stop();
  await closeDatabase();
});

/** An approved order over ten pieces: 11.50 for the goods, 4.90 postage. */
async function approved(): Promise<string> {
  const { id } = await act(createOrder, shop.as.buyer, { supplierId, lines: [{ offerId, quantity: 10 }] });
  await act(submitOrder, shop.as.buyer, { orderId: id });
  return id;
}

async function checkout(orderId: string): Promise<string> {
  const { checkoutUrl } = await act(payOrder, shop.as.buyer, { orderId, way: 'card' });
  return /\/checkout\/([^/?#]+)/.exec(checkoutUrl ?? '')?.[1] ?? '';
}

const orderNow = (orderId: string) => act(getOrder, shop.as.buyer, { orderId });

async function until(what: () => Promise<boolean>): Promise<void> {
  for (let attempt = 0; attempt < 80; attempt += 1) {
    if (await what()) return;
    await new Promise((resume) => setTimeout(resume, 150));
  }
  throw new Error('it did not come to that within 12 s');
}

const isPaid = (orderId: string) => until(async () => (await orderNow(orderId)).state === 'paid');

describe('a card payment', () => {
  it('goes through the checkout and the signed event, and the order is paid to the cent', async () => {
    const orderId = await approved();
    await fakes.control('payments/pay', { session: await checkout(orderId), card: PAID });
    await isPaid(orderId);
    const order = await orderNow(orderId);
    expect(order.goodsMinor + order.postageMinor).toBe(order.totalMinor);
    expect(order.payments).toMatchObject([{ state: 'paid', amountMinor: 1640 }]);
  });

  it('that is declined leaves the order approved and says so; another card pays it once', async () => {
    const orderId = await approved();
    const session = await checkout(orderId);
    await fakes.control('payments/pay', { session, card: DECLINED });
    await until(async () => (await orderNow(orderId)).payments[0]?.state === 'declined');
    expect(await orderNow(orderId)).toMatchObject({ state: 'approved' });
    expect((await orderNow(orderId)).payments[0]?.lastProblem).toMatch(/declined/);
    await fakes.control('payments/pay', { session, card: PAID });
    await isPaid(orderId);
    expect((await orderNow(orderId)).payments.filter((one) => one.state === 'paid')).toHaveLength(1);
  });

  it('whose event comes twice is booked once', async () => {
    const orderId = await approved();
    await fakes.control('payments/pay', { session: await checkout(orderId), card: PAID });
    await isPaid(orderId);
    const event = /"(evt_[^"]+)"/.exec(JSON.stringify(await fakes.read('/__/webhooks')))?.[1] ?? '';
    await fakes.control('webhooks/duplicate', { event, times: 3 });
    await fetch(`${fakes.origin}/__/settled?limitMs=8000`);
    const order = await orderNow(orderId);
    expect(order).toMatchObject({ state: 'paid' });
    expect(order.payments).toHaveLength(1);
    expect(order.refunds).toEqual([]);
  });

  it.each(['wrong-secret', 'changed-body', 'empty-signature', 'no-header', 'stale'])(
    'event that is forged (%s) is answered 400 and changes nothing',
    async (how) => {
      const orderId = await approved();
      const session = await checkout(orderId);
      const told = await fakes.control('webhooks/forge', {
        how,
        type: 'checkout.session.completed',
        object: {
          id: session,
          object: 'checkout.session',
          payment_status: 'paid',
          amount_total: 1640,
          currency: 'eur',
        },
      });
      expect(told).toMatchObject({ status: 400 });
      await new Promise((resume) => setTimeout(resume, 700));
      expect(await orderNow(orderId)).toMatchObject({ state: 'approved' });
    },
  );

  it('that was made before the buyer gave it up wins, though its event comes late: nothing is lost, nothing paid twice', async () => {
    const orderId = await approved();
    const session = await checkout(orderId);
    await fakes.control('webhooks/hold');
    await fakes.control('payments/pay', { session, card: PAID });
    await act(giveUpPayment, shop.as.buyer, { orderId }).catch((error: unknown) => error);
    await fakes.control('webhooks/release', { order: 'given' });
    await isPaid(orderId);
    const order = await orderNow(orderId);
    expect(order.payments.filter((one) => one.state === 'paid').map((one) => one.amountMinor)).toEqual([1640]);
    expect(order.refunds).toEqual([]);
  });

  it('that is given up before it was made leaves the order approved, to be paid another way', async () => {
    const orderId = await approved();
    await checkout(orderId);
    expect(await act(giveUpPayment, shop.as.buyer, { orderId })).toMatchObject({ givenUp: true });
    expect(await act(payOrder, shop.as.buyer, { orderId, way: 'on-account' })).toMatchObject({ state: 'on-account' });
  });

  it('while the payment service is away is refused with that reason; the order stays, and can be paid later', async () => {
    const orderId = await approved();
    await fakes.control('next', { service: 'payments', match: '/v1/checkout/sessions', status: 503, times: 6 });
    await expect(act(payOrder, shop.as.buyer, { orderId, way: 'card' })).rejects.toMatchObject({
      code: 'service.away',
    });
    expect(await orderNow(orderId)).toMatchObject({ state: 'approved' });
    await fakes.control('reset');
    await fakes.control('payments/pay', { session: await checkout(orderId), card: PAID });
    await isPaid(orderId);
  });
});

describe('money back', () => {
  it('a short delivery is settled by paying back what did not come, and only that', async () => {
    const orderId = await approved();
    await fakes.control('payments/pay', { session: await checkout(orderId), card: PAID });
    await isPaid(orderId);
    await act(sendOrder, shop.as.buyer, { orderId });
    const { lines } = await act(receiptProposal, shop.as.storekeeper, { orderId });
    const [line] = lines;
    await act(receiveDelivery, shop.as.storekeeper, {
      orderId,
      lines: [
        {
          orderLineId: line?.orderLineId ?? newId(),
          partId: line?.part.id ?? newId(),
          binId: bins['A-01-1'] ?? newId(),
          quantity: 7,
        },
      ],
    });
    await act(settleShortOrder, shop.as.buyer, { orderId, reason: 'three were missing' });
    await until(async () => (await orderNow(orderId)).refunds.some((one) => one.state === 'done'));
    const order = await orderNow(orderId);
    expect(order.state).toBe('received');
    expect(order.refunds.map((one) => one.amountMinor)).toEqual([345]);
    await expectLedgerHolds(shop);
  });

  it('a paid order that is cancelled is paid back whole', async () => {
    const orderId = await approved();
    await fakes.control('payments/pay', { session: await checkout(orderId), card: PAID });
    await isPaid(orderId);
    await act(cancelOrder, shop.as.buyer, { orderId, reason: 'not needed any more' });
    await until(async () => (await orderNow(orderId)).refunds.length > 0);
    const order = await orderNow(orderId);
    expect(order.state).toBe('cancelled');
    expect(order.refunds.reduce((sum, one) => sum + one.amountMinor, 0)).toBe(order.totalMinor);
  });
});
