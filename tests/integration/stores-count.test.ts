/** A count from opening to posting: blind, while the shelf is being used, and with what it gives up. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closeDatabase } from '@/db/client';
import { abandonCount } from '@/lib/stores/abandon-count';
import { createBatch } from '@/lib/stores/create-batch';
import { enterCounts } from '@/lib/stores/enter-counts';
import { getBin } from '@/lib/stores/get-bin';
import { getCount } from '@/lib/stores/get-count';
import { getPart } from '@/lib/stores/get-part';
import { listMovements } from '@/lib/stores/list-movements';
import { openCount } from '@/lib/stores/open-count';
import { pickBatch } from '@/lib/stores/pick-batch';
import { postCount } from '@/lib/stores/post-count';
import { recountEntries } from '@/lib/stores/recount-entries';
import { reserveBatch } from '@/lib/stores/reserve-batch';
import { retireBin } from '@/lib/stores/retire-bin';
import { type Bins, expectLedgerHolds, makeBins, makePart, makeRevision, stock } from '../support/shelf';
import { act, makeWorkshop, type TestWorkshop } from '../support/workshop';

let shop: TestWorkshop;
let bins: Bins;

beforeAll(async () => {
  shop = await makeWorkshop('Counting');
  bins = await makeBins(shop);
});
afterAll(closeDatabase);

const binOf = (code: string): string => {
  const found = bins[code];
  if (found === undefined) throw new Error(`no bin ${code}`);
  return found;
};
const open = (...codes: string[]) => act(openCount, shop.as.storekeeper, { binIds: codes.map(binOf), reason: 'test' });
const enter = (countId: string, code: string, partId: string, counted: number) =>
  act(enterCounts, shop.as.storekeeper, { countId, entries: [{ binId: binOf(code), partId, counted }] });
const onHand = async (partId: string) => (await act(getPart, shop.as.lead, { partId })).onHand;

describe('a count', () => {
  it('is blind until everything is counted, then shows variances, and posts them as movements with their reason', async () => {
    const part = await makePart(shop, '1k 1%');
    // A figure that no time or id is likely to hold.
    await stock(shop, part, bins['A-01-1'], 79_199);
    const { id } = await open('A-01-1', 'A-01-2');
    const blind = await act(getCount, shop.as.storekeeper, { countId: id });
    expect(blind.entryList.map((one) => [one.ledger, one.counted, one.variance])).toEqual([[null, null, null]]);
    expect(JSON.stringify(blind)).not.toContain('79199');
    expect(await enter(id, 'A-01-1', part, 79_196)).toMatchObject({ state: 'open', binsOpen: 1 });
    expect((await act(getCount, shop.as.storekeeper, { countId: id })).entryList[0]?.counted).toBeNull();
    await act(enterCounts, shop.as.storekeeper, { countId: id, emptyBinIds: [binOf('A-01-2')] });
    const counted = await act(getCount, shop.as.storekeeper, { countId: id });
    expect(counted).toMatchObject({ state: 'counted', entryList: [{ counted: 79_196, ledger: 79_199, variance: -3 }] });
    const entryId = counted.entryList[0]?.id ?? '';
    const posted = await act(postCount, shop.as.storekeeper, {
      countId: id,
      reasons: [{ entryId, reason: 'lost under the bench' }],
    });
    expect(posted).toMatchObject({ movements: 1, correctedUnits: 3, released: [] });
    expect(await onHand(part)).toBe(79_196);
    const { rows } = await act(listMovements, shop.as.lead, { partId: part, kind: ['count'] });
    expect(rows[0]).toMatchObject({ quantity: -3, balanceAfter: 79_196 });
    expect(rows[0]?.reason).toMatch(/lost under the bench/);
    await expect(act(postCount, shop.as.storekeeper, { countId: id })).rejects.toMatchObject({ code: 'state.refused' });
    await expectLedgerHolds(shop);
  });

  it('takes up a part that the ledger does not know there', async () => {
    const part = await makePart(shop, '2k2 1%');
    const { id } = await open('A-02-1');
    await enter(id, 'A-02-1', part, 6);
    const { entryList } = await act(getCount, shop.as.storekeeper, { countId: id });
    expect(entryList.find((one) => one.part.id === part)).toMatchObject({
      found: true,
      counted: 6,
      ledger: 0,
      variance: 6,
    });
    await act(postCount, shop.as.storekeeper, { countId: id });
    expect(await onHand(part)).toBe(6);
    await expectLedgerHolds(shop);
  });

  it('books the variance of the moment of counting, though picks go on until it is posted', async () => {
    const part = await makePart(shop, '3k3 1%');
    await stock(shop, part, bins['A-02-2'], 30);
    const { revisionId } = await makeRevision(shop, [{ partId: part, quantity: 10 }]);
    const batch = await act(createBatch, shop.as.builder, { revisionId, units: 1 });
    await act(reserveBatch, shop.as.builder, { batchId: batch.id });
    const { id } = await open('A-02-2');
    await enter(id, 'A-02-2', part, 28);
    await act(pickBatch, shop.as.storekeeper, { batchId: batch.id });
    expect(await onHand(part)).toBe(20);
    await act(postCount, shop.as.storekeeper, { countId: id });
    expect(await onHand(part)).toBe(18);
    await expectLedgerHolds(shop);
  });

  it('gives up the youngest promise of units that are not there, and says whose', async () => {
    const part = await makePart(shop, '4k7 5%');
    await stock(shop, part, bins['A-03-1'], 10);
    const { revisionId } = await makeRevision(shop, [{ partId: part, quantity: 5 }]);
    const first = await act(createBatch, shop.as.builder, { revisionId, units: 1 });
    const second = await act(createBatch, shop.as.builder, { revisionId, units: 1 });
    await act(reserveBatch, shop.as.builder, { batchId: first.id });
    await act(reserveBatch, shop.as.builder, { batchId: second.id });
    const { id } = await open('A-03-1');
    await enter(id, 'A-03-1', part, 7);
    const posted = await act(postCount, shop.as.storekeeper, { countId: id });
    expect(posted.released).toMatchObject([{ number: second.number, quantity: 3 }]);
    expect(await onHand(part)).toBe(7);
    await expectLedgerHolds(shop);
  });

  it('asks for one figure again, blind again', async () => {
    const part = await makePart(shop, '6k8 1%');
    await stock(shop, part, bins['A-03-2'], 12);
    const { id } = await open('A-03-2');
    await enter(id, 'A-03-2', part, 2);
    const { entryList } = await act(getCount, shop.as.storekeeper, { countId: id });
    await act(recountEntries, shop.as.storekeeper, { countId: id, entryIds: entryList.map((one) => one.id) });
    const again = await act(getCount, shop.as.storekeeper, { countId: id });
    expect(again).toMatchObject({ state: 'recount', entryList: [{ counted: null, ledger: null, attempt: 1 }] });
    await enter(id, 'A-03-2', part, 12);
    await act(postCount, shop.as.storekeeper, { countId: id });
    expect(await onHand(part)).toBe(12);
  });

  it('that is abandoned books nothing; a negative or broken figure, a foreign bin and a retired one are refused', async () => {
    const part = await makePart(shop, '8k2 1%');
    await stock(shop, part, bins['A-04-1'], 9);
    const { id } = await open('A-04-1');
    await expect(enter(id, 'A-04-1', part, -1)).rejects.toMatchObject({ code: 'input.invalid' });
    await expect(enter(id, 'A-04-1', part, 1.5)).rejects.toMatchObject({ code: 'input.invalid' });
    await expect(enter(id, 'A-04-2', part, 1)).rejects.toMatchObject({ code: 'rule.forbids' });
    await act(abandonCount, shop.as.storekeeper, { countId: id });
    await expect(enter(id, 'A-04-1', part, 1)).rejects.toMatchObject({ code: 'state.refused' });
    expect(await onHand(part)).toBe(9);
    await act(retireBin, shop.as.storekeeper, { binId: binOf('A-04-3') });
    await expect(open('A-04-3')).rejects.toMatchObject({ code: 'rule.forbids' });
    expect(await act(getBin, shop.as.storekeeper, { binId: binOf('A-04-3') })).toMatchObject({ retired: true });
    await expectLedgerHolds(shop);
  });
});
