import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { sql } from 'drizzle-orm';
import { closeDatabase, withWorkshop } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { createBatch } from '@/lib/stores/create-batch';
import { cancelBatch } from '@/lib/stores/cancel-batch';
import { finishBatch } from '@/lib/stores/finish-batch';
import { missingAtPick } from '@/lib/stores/missing-at-pick';
import { pickBatch } from '@/lib/stores/pick-batch';
import { getBatch } from '@/lib/stores/get-batch';
import { pickList } from '@/lib/stores/pick-list';
import { listMovements } from '@/lib/stores/list-movements';
import { getPart } from '@/lib/stores/get-part';
import { listBins } from '@/lib/stores/list-bins';
import { reserveBatch } from '@/lib/stores/reserve-batch';
import { type Bins, expectLedgerHolds, makeBins, makePart, makeRevision, stock } from '../support/shelf';
import { act, makeWorkshop, type TestWorkshop } from '../support/workshop';

let shop: TestWorkshop;
let bins: Bins;
beforeAll(async () => {
  shop = await makeWorkshop('Batches');
  bins = await makeBins(shop);
});
afterAll(closeDatabase);

const freeOf = async (partId: string) => (await act(getPart, shop.as.storekeeper, { partId })).free;

async function batchOf(wants: { partId: string | null; quantity: number }[], units: number) {
  const { revisionId } = await makeRevision(shop, wants);
  return act(createBatch, shop.as.builder, { revisionId, units });
}

describe('a batch', () => {
  it('reserves whole lines from the oldest lots, is picked in walking order, kitted, and finished with leftovers back', async () => {
    const resistor = await makePart(shop, '4k7 1%');
    const chip = await makePart(shop, 'TL072CP');
    await stock(shop, resistor, bins['A-03-2'], 40);
    await stock(shop, chip, bins['A-01-1'], 5);
    const batch = await batchOf(
      [
        { partId: resistor, quantity: 4 },
        { partId: chip, quantity: 1 },
      ],
      3,
    );
    const reserved = await act(reserveBatch, shop.as.builder, { batchId: batch.id });
    expect(reserved).toMatchObject({ state: 'reserved', shortfalls: [] });
    expect(await freeOf(resistor)).toBe(28);

    const list = await act(pickList, shop.as.storekeeper, { batchId: batch.id });
    expect(list.stops.map((stop) => [stop.binCode, stop.take])).toEqual([
      ['A-01-1', 3],
      ['A-03-2', 12],
    ]);
    const half = await act(pickBatch, shop.as.storekeeper, {
      batchId: batch.id,
      picks: [{ reservationId: list.stops[0]?.lines[0]?.reservationId ?? '', quantity: 3 }],
    });
    expect(half).toMatchObject({ state: 'picking', openUnits: 12 });
    expect(await act(pickBatch, shop.as.storekeeper, { batchId: batch.id })).toMatchObject({
      state: 'kitted',
      openUnits: 0,
    });

    const { needsList } = await act(getBatch, shop.as.builder, { batchId: batch.id });
    const need = needsList.find((one) => one.part?.id === resistor);
    const finished = await act(finishBatch, shop.as.builder, {
      batchId: batch.id,
      returns: [{ needId: need?.needId ?? '', quantity: 2 }],
    });
    expect(finished).toMatchObject({ state: 'finished', returnedUnits: 2 });
    expect(await freeOf(resistor)).toBe(30);
    const ledger = await act(listMovements, shop.as.lead, { partId: resistor });
    expect(ledger.rows.map((row) => [row.kind, row.quantity, row.balanceAfter])).toEqual([
      ['return', 2, 30],
      ['pick', -12, 28],
      ['opening', 40, 40],
    ]);
    await expectLedgerHolds(shop);
  });

  it('reserves nothing of a short line unless a part of it is accepted, and lists what is short', async () => {
    const part = await makePart(shop, '100n X7R 50V');
    await stock(shop, part, bins['A-02-1'], 7);
    const batch = await batchOf(
      [
        { partId: part, quantity: 5 },
        { partId: null, quantity: 1 },
      ],
      2,
    );
    const whole = await act(reserveBatch, shop.as.builder, { batchId: batch.id });
    expect(whole).toMatchObject({ state: 'planned', reserved: [] });
    expect(whole.shortfalls.map((one) => [one.partId, one.short])).toEqual([
      [part, 10],
      [null, 2],
    ]);
    expect(await freeOf(part)).toBe(7);
    const some = await act(reserveBatch, shop.as.builder, { batchId: batch.id, allowPart: true });
    expect(some.shortfalls.map((one) => one.short)).toEqual([3, 2]);
    expect(await freeOf(part)).toBe(0);
    await stock(shop, part, bins['A-02-2'], 3);
    expect(
      (await act(reserveBatch, shop.as.builder, { batchId: batch.id })).shortfalls.map((one) => one.short),
    ).toEqual([2]);
    const cancelled = await act(cancelBatch, shop.as.builder, { batchId: batch.id });
    expect(cancelled).toMatchObject({ state: 'cancelled', releasedReservations: 2 });
    expect(await freeOf(part)).toBe(10);
  });

  it('never takes more than is reserved, and changes nothing when asked to', async () => {
    const part = await makePart(shop, '22k 1%');
    await stock(shop, part, bins['A-02-3'], 9);
    const batch = await batchOf([{ partId: part, quantity: 3 }], 1);
    const { reserved } = await act(reserveBatch, shop.as.builder, { batchId: batch.id });
    const reservationId = reserved[0]?.reservationId ?? '';
    await expect(
      act(pickBatch, shop.as.storekeeper, { batchId: batch.id, picks: [{ reservationId, quantity: 4 }] }),
    ).rejects.toMatchObject({ code: 'rule.forbids', errors: [{ pointer: '/picks/0/quantity' }] });
    const key = newId();
    const first = await act(
      pickBatch,
      shop.as.storekeeper,
      { batchId: batch.id, picks: [{ reservationId, quantity: 2 }] },
      key,
    );
    expect(
      await act(pickBatch, shop.as.storekeeper, { batchId: batch.id, picks: [{ reservationId, quantity: 2 }] }, key),
    ).toEqual(first);
    expect((await act(getPart, shop.as.storekeeper, { partId: part })).onHand).toBe(7);
    await expectLedgerHolds(shop);
  });

  it('flags the bin when something is not there, and offers the next lot', async () => {
    const part = await makePart(shop, 'BC547B');
    await stock(shop, part, bins['A-04-1'], 6);
    const batch = await batchOf([{ partId: part, quantity: 6 }], 1);
    const { reserved } = await act(reserveBatch, shop.as.builder, { batchId: batch.id });
    await stock(shop, part, bins['A-04-2'], 3);
    const told = await act(missingAtPick, shop.as.storekeeper, {
      batchId: batch.id,
      reservationId: reserved[0]?.reservationId ?? '',
      found: 2,
    });
    expect(told).toMatchObject({ binCode: 'A-04-1', pickedUnits: 2, reservedInstead: 3, stillShort: 1 });
    const due = await act(listBins, shop.as.storekeeper, { due: 'true' });
    expect(due.rows.map((row) => row.code)).toContain('A-04-1');
    await expectLedgerHolds(shop);
  });

  it('promises no unit twice when twelve builders reserve the same parts at once', async () => {
    const parts = await Promise.all(['1k 1%', '2k2 1%', '3k3 1%'].map((text) => makePart(shop, text)));
    for (const [index, part] of parts.entries()) await stock(shop, part, bins[`A-01-${index + 1}`], 50);
    const batches = [];
    for (let n = 0; n < 12; n += 1)
      batches.push(
        await batchOf(
          parts.map((partId) => ({ partId, quantity: 7 })),
          1,
        ),
      );
    const answers = await Promise.all(
      batches.map((batch) => act(reserveBatch, shop.as.builder, { batchId: batch.id })),
    );
    // 50 units serve seven batches of 7 whole lines; the others get none of that line.
    for (const part of parts) expect(await freeOf(part)).toBe(1);
    expect(answers.flatMap((answer) => answer.reserved).reduce((sum, one) => sum + one.quantity, 0)).toBe(3 * 49);
    await expectLedgerHolds(shop);
  });

  it('two people picking the same list at once take everything exactly once', async () => {
    const part = await makePart(shop, '47k 1%');
    await stock(shop, part, bins['A-03-1'], 20);
    const batch = await batchOf([{ partId: part, quantity: 8 }], 1);
    await act(reserveBatch, shop.as.builder, { batchId: batch.id });
    const both = await Promise.allSettled([
      act(pickBatch, shop.as.storekeeper, { batchId: batch.id }),
      act(pickBatch, shop.as.builder, { batchId: batch.id }),
    ]);
    expect(both.filter((one) => one.status === 'fulfilled')).toHaveLength(1);
    expect((await act(getPart, shop.as.storekeeper, { partId: part })).onHand).toBe(12);
  });

  it('the ledger and the figures of a lot can’t be changed by hand', async () => {
    const tries = [
      sql`update movement set quantity = 1`,
      sql`delete from movement`,
      sql`update lot set on_hand = on_hand + 1`,
      sql`update lot set reserved = 0 where reserved > 0`,
    ];
    for (const attempt of tries) await expect(withWorkshop(shop.id, (tx) => tx.execute(attempt))).rejects.toThrow();
    await expectLedgerHolds(shop);
  });
});
