/** Three invented suppliers, their offers, and orders in every state. */
import { and, eq } from 'drizzle-orm';
import { withWorkshop } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { payment, purchaseOrder } from '@/db/schema/purchasing';
import { demoParts } from '@/db/seed/catalogue';
import { approveOrder, submitOrder } from '@/lib/purchasing/approve-order';
import { cancelOrder } from '@/lib/purchasing/cancel-order';
import { createOrder } from '@/lib/purchasing/draft-order';
import { closeOrder, payOrder } from '@/lib/purchasing/pay-order';
import { sendOrder } from '@/lib/purchasing/send-order';
import { createSupplier, setOffer } from '@/lib/purchasing/suppliers';
import { listBins } from '@/lib/stores/list-bins';
import { receiptProposal } from '@/lib/stores/receipt-proposal';
import { receiveDelivery } from '@/lib/stores/receive-delivery';
import { as, type People } from './acting';

export interface Suppliers {
  readonly quillfern: string;
  readonly brasskettle: string;
  readonly ostler: string;
}

export async function makeSuppliers(people: People): Promise<Suppliers> {
  const make = async (fields: Parameters<typeof as<typeof createSupplier>>[2]) =>
    (await as(people.buyer, createSupplier, fields)).id;
  return {
    quillfern: await make({
      name: 'Quillfern Parts',
      email: 'orders@quillfern.example',
      address: '4 Mill Lane\nQuillfern',
      currency: 'EUR',
      paymentAccount: 'acct_fakequillfern1',
      postageMinor: 490,
      postageFreeFromMinor: 6_000,
      leadTimeDays: 4,
    }),
    brasskettle: await make({
      name: 'Brasskettle Electronics',
      email: 'sales@brasskettle.example',
      address: 'Unit 9, Kettle Wharf',
      currency: 'EUR',
      paymentAccount: 'acct_fakebrasskettle1',
      postageMinor: 750,
      postageFreeFromMinor: 15_000,
      minimumOrderMinor: 1_000,
      leadTimeDays: 9,
    }),
    ostler: await make({
      name: 'Ostler & Wick',
      email: 'desk@ostlerwick.example',
      address: 'Ostler & Wick, Long Row',
      currency: 'EUR',
      postageMinor: 0,
      leadTimeDays: 14,
    }),
  };
}

const priced = (price: number, factor: number): string => Math.max(0.002, price * factor).toFixed(4);

/** Every part at one supplier at least; breaks that fall with quantity. Answers the offer of a part at a supplier. */
export async function makeOffers(
  people: People,
  suppliers: Suppliers,
  parts: ReadonlyMap<string, string>,
): Promise<Map<string, string>> {
  const offers = new Map<string, string>();
  const set = async (
    supplierId: string,
    prefix: string,
    index: number,
    name: string,
    price: number,
    factor: number,
    multiple: number,
  ) => {
    const { id } = await as(people.buyer, setOffer, {
      supplierId,
      partId: parts.get(name) ?? '',
      supplierCode: `${prefix}${String(1000 + index)}`,
      orderMultiple: multiple,
      minimumQuantity: multiple,
      breaks: [
        { fromQuantity: 1, unitPrice: priced(price, factor) },
        { fromQuantity: multiple * 5 + 5, unitPrice: priced(price, factor * 0.8) },
        { fromQuantity: multiple * 20 + 80, unitPrice: priced(price, factor * 0.6) },
      ],
    });
    offers.set(`${supplierId} ${name}`, id);
  };
  for (const [index, one] of demoParts.entries()) {
    const price = Number(one.price);
    const small = ['resistor', 'diode', 'hardware'].includes(one.kind);
    if (one.kind !== 'pcb') await set(suppliers.quillfern, 'QF-', index, one.name, price, 1.05, small ? 10 : 1);
    if (index % 2 === 0 && one.kind !== 'pcb')
      await set(suppliers.brasskettle, 'BK', index, one.name, price, 0.92, small ? 50 : 5);
    if (index % 5 === 0 || one.kind === 'pcb')
      await set(suppliers.ostler, 'OW/', index, one.name, price, one.kind === 'pcb' ? 1 : 0.98, small ? 100 : 1);
  }
  return offers;
}

/** One order in each state, so that every screen has something to show. */
export async function makeOrders(
  workshopId: string,
  people: People,
  suppliers: Suppliers,
  offers: ReadonlyMap<string, string>,
): Promise<void> {
  const draft = async (
    supplierId: string,
    wants: readonly (readonly [name: string, quantity: number])[],
    note = '',
  ) => {
    const lines = wants.map(([name, quantity]) => ({ offerId: offers.get(`${supplierId} ${name}`) ?? '', quantity }));
    return (await as(people.buyer, createOrder, { supplierId, lines, note })).id;
  };
  const submitted = async (...wish: Parameters<typeof draft>) => {
    const orderId = await draft(...wish);
    await as(people.buyer, submitOrder, { orderId });
    return orderId;
  };
  const sent = async (...wish: Parameters<typeof draft>) => {
    const orderId = await submitted(...wish);
    await as(people.buyer, payOrder, { orderId, way: 'on-account' });
    await as(people.buyer, sendOrder, { orderId });
    return orderId;
  };
  const receive = async (orderId: string, share: number) => {
    const [{ lines }, { rows: bins }] = await Promise.all([
      as(people.storekeeper, receiptProposal, { orderId }),
      as(people.storekeeper, listBins, { empty: 'true', size: 20 }),
    ]);
    const bags = lines.flatMap((line, index) => {
      const quantity = Math.floor(line.missing * share);
      const binId = line.bins[0]?.binId ?? bins[index]?.id;
      return quantity > 0 && binId
        ? [
            {
              orderLineId: line.orderLineId,
              partId: line.part.id,
              binId,
              quantity,
              lotCode: `K${7_100 + index}`,
              dateCode: '2638',
            },
          ]
        : [];
    });
    await as(people.storekeeper, receiveDelivery, { orderId, deliveryNote: `DN ${bags.length}`, lines: bags });
  };

  const closed = await sent(suppliers.quillfern, [
    ['10k 1 %', 200],
    ['100n X7R', 100],
  ]);
  await receive(closed, 1);
  await as(people.buyer, closeOrder, { orderId: closed });
  await receive(
    await sent(suppliers.quillfern, [
      ['TL072CP', 20],
      ['1N4148', 200],
    ]),
    1,
  );
  await receive(
    await sent(suppliers.quillfern, [
      ['BC547B', 60],
      ['jack mono switched', 40],
    ]),
    0.5,
  );
  const late = await sent(suppliers.ostler, [['slope pair board', 10]]);
  await withWorkshop(workshopId, (tx) =>
    tx
      .update(purchaseOrder)
      .set({
        expectedOn: new Date(Date.now() - 3 * 86_400_000).toISOString().slice(0, 10),
        sentAt: new Date(Date.now() - 17 * 86_400_000),
      })
      .where(and(eq(purchaseOrder.workshopId, workshopId), eq(purchaseOrder.id, late))),
  );
  const onAccount = await submitted(suppliers.ostler, [['wave folder board', 5]]);
  await as(people.buyer, payOrder, { orderId: onAccount, way: 'on-account' });
  const paid = await submitted(suppliers.quillfern, [['knob 13 mm', 60]]);
  await markPaid(workshopId, paid, people.buyer.personId);
  await submitted(suppliers.quillfern, [
    ['B100k pot', 20],
    ['A100k pot', 10],
  ]);
  await submitted(suppliers.brasskettle, [['AS3320', 160]], 'for the spring run');
  const second = await submitted(suppliers.brasskettle, [['AS3320', 120]]);
  await as(people.lead, approveOrder, { orderId: second });
  await as(people.buyer, cancelOrder, { orderId: second, reason: 'ordered twice' });
  await draft(suppliers.quillfern, [['LED green 3 mm', 50]]);
}

/** A payment as the payment service would have confirmed it: the demo is written before any service runs. */
async function markPaid(workshopId: string, orderId: string, personId: string): Promise<void> {
  await withWorkshop(workshopId, async (tx) => {
    const [order] = await tx
      .select()
      .from(purchaseOrder)
      .where(and(eq(purchaseOrder.workshopId, workshopId), eq(purchaseOrder.id, orderId)));
    if (!order) throw new Error('no such order');
    await tx.insert(payment).values({
      workshopId,
      id: newId(),
      orderId,
      attempt: 1,
      state: 'paid',
      amountMinor: order.totalMinor,
      currency: order.currency,
      checkoutSessionId: `cs_demo_${orderId}`,
      paymentIntentId: `pi_demo_${orderId}`,
      paidAt: new Date(),
      createdBy: personId,
    });
    await tx
      .update(purchaseOrder)
      .set({ state: 'paid' })
      .where(and(eq(purchaseOrder.workshopId, workshopId), eq(purchaseOrder.id, orderId)));
  });
}
