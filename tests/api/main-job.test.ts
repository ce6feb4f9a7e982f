/** The main job by the API alone, from a file to a finished kit and a received order, and what a program may rely on. */
import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { BASE, call, done, listForm } from './calling';

let circuitId: string;

beforeAll(async () => {
  circuitId = (
    await done('builder', 'POST', '/circuits', { name: `By API ${randomUUID().slice(0, 8)}`, railsVolts: [12, -12] })
  ).id;
});

describe('the API', () => {
  it('is healthy outside of /api/v1, and describes every path with its roles and its key', async () => {
    const health = await fetch(`${BASE}/api/health`);
    expect(health.status).toBe(200);
    expect(await health.json()).toMatchObject({ database: true, jobs: true });
    const described = (await (await fetch(`${BASE}/api/openapi.json`)).json()) as {
      openapi: string;
      paths: Record<string, Record<string, { parameters?: { name: string }[] }>>;
    };
    expect(described.openapi).toMatch(/^3\.1/);
    const paths = Object.keys(described.paths).map((one) => one.replace('/api/v1', ''));
    for (const path of [
      '/revisions',
      '/revisions/{revisionId}/lines',
      '/lines/{lineId}/decision',
      '/batches',
      '/batches/{batchId}/reserve',
      '/batches/{batchId}/pick',
      '/batches/{batchId}/finish',
      '/batches/{batchId}/cancel',
      '/shortfalls',
      '/orders',
      '/orders/{orderId}/submit',
      '/orders/{orderId}/approve',
      '/orders/{orderId}/pay',
      '/orders/{orderId}/send',
      '/orders/{orderId}/cancel',
      '/receipts',
      '/counts',
      '/counts/{countId}/entries',
      '/counts/{countId}/post',
      '/parts',
      '/bins',
      '/lots',
      '/ledger',
    ]) {
      expect(paths).toContain(path);
    }
    expect(JSON.stringify(described.paths).toLowerCase()).toContain('idempotency-key');
  });

  it('reads a list, matches it, decides, reserves, picks and finishes', async () => {
    const list = 'Ref,Qty,Value\n"R1,R2",2,10k\nU1,1,TL072CP\nC1,1,100n X7R\n';
    const revision = await done(
      'builder',
      'POST',
      '/revisions',
      (() => {
        const form = listForm(circuitId, 'A', list, 'list.csv');
        form.set('freeze', 'true');
        return form;
      })(),
    );
    expect(revision).toMatchObject({ state: 'frozen', lines: 3, openQuestions: 0 });
    const lines = await done('builder', 'GET', `/revisions/${revision.id}/lines`);
    expect(lines.rows.map((one: { verdict: string }) => one.verdict)).toEqual(['same', 'same', 'same']);
    const [line] = lines.rows;
    expect(
      await done('builder', 'POST', `/lines/${line.id}/decision`, { partId: line.chosen.part.id, reason: 'as listed' }),
    ).toMatchObject({ verdict: 'same' });
    const batch = await done('builder', 'POST', '/batches', { revisionId: revision.id, units: 2 });
    const reserved = await done('builder', 'POST', `/batches/${batch.id}/reserve`, {});
    expect(reserved).toMatchObject({ state: 'reserved', shortfalls: [] });
    expect((await done('storekeeper', 'POST', `/batches/${batch.id}/pick`, {})).state).toBe('kitted');
    expect(await done('builder', 'POST', `/batches/${batch.id}/finish`, {})).toMatchObject({ state: 'finished' });
    const ledger = await done('lead', 'GET', `/ledger?batchId=${batch.id}`);
    expect(ledger.rows.length).toBeGreaterThanOrEqual(3);
    expect((await call('builder', 'POST', `/batches/${batch.id}/cancel`, {})).status).toBe(409);
  });

  it('buys on account, receives in part, and counts blind', async () => {
    const suppliers = await done('buyer', 'GET', '/suppliers');
    const open = suppliers.rows.find((one: { minimumOrderMinor: number }) => one.minimumOrderMinor === 0);
    const { rows: offers } = await done('buyer', 'GET', `/offers?size=1&supplierId=${open.id}`);
    const [offer] = offers;
    const quantity = offer.minimumQuantity * 4;
    const order = await done('buyer', 'POST', '/orders', {
      supplierId: offer.supplierId,
      lines: [{ offerId: offer.id, quantity }],
    });
    await done('buyer', 'POST', `/orders/${order.id}/submit`, {});
    await done('buyer', 'POST', `/orders/${order.id}/pay`, { way: 'on-account' });
    expect(await done('buyer', 'POST', `/orders/${order.id}/send`, {})).toMatchObject({ state: 'sent' });
    const expected = await done('storekeeper', 'GET', `/orders/${order.id}/expected`);
    const [wanted] = expected.lines;
    const receipt = await done('storekeeper', 'POST', '/receipts', {
      orderId: order.id,
      lines: [{ orderLineId: wanted.orderLineId, partId: wanted.part.id, binId: wanted.bins[0].binId, quantity: 1 }],
    });
    expect(receipt.order).toMatchObject({ state: 'part-received' });
    const count = await done('storekeeper', 'POST', '/counts', {
      binIds: [wanted.bins[0].binId],
      reason: 'by the API',
    });
    const blind = await done('storekeeper', 'GET', `/counts/${count.id}`);
    for (const entry of blind.entryList)
      expect([entry.ledger, entry.counted, entry.variance]).toEqual([null, null, null]);
    const entries = blind.entryList.map((one: { binId: string; part: { id: string } }) => ({
      binId: one.binId,
      partId: one.part.id,
      counted: 3,
    }));
    const entered = await done('storekeeper', 'POST', `/counts/${count.id}/entries`, { entries });
    expect(entered.state).toBe('counted');
    expect(await done('storekeeper', 'POST', `/counts/${count.id}/post`, {})).toMatchObject({ state: 'posted' });
    expect((await done('storekeeper', 'GET', `/lots?binId=${wanted.bins[0].binId}`)).rows.length).toBeGreaterThan(0);
  });
});

describe('what a program may rely on', () => {
  it('the same key and body give the first answer again; another body under it is refused', async () => {
    const key = randomUUID();
    const name = `Once ${key.slice(0, 8)}`;
    const first = await call('builder', 'POST', '/circuits', { name }, key);
    const again = await call('builder', 'POST', '/circuits', { name }, key);
    expect(again.body).toEqual(first.body);
    expect(again.headers.get('idempotent-replayed')).toBe('true');
    const other = await call('builder', 'POST', '/circuits', { name: `${name} other` }, key);
    expect(other).toMatchObject({ status: 422, body: { code: 'key.reused' } });
  });

  it.each([
    [null, 'GET', '/parts', 401, 'signed-out'],
    ['storekeeper', 'POST', '/orders', 422, 'input.invalid'],
    ['builder', 'POST', '/orders/00000000-0000-7000-8000-000000000000/approve', 403, 'not-allowed'],
    ['builder', 'GET', '/batches/00000000-0000-7000-8000-000000000000', 404, 'not-found'],
  ])('%s %s %s is answered %d as a problem', async (role, method, path, status, code) => {
    const answer = await call(role, method, path, method === 'GET' ? undefined : {});
    expect(answer.type).toContain('application/problem+json');
    expect([status, 400]).toContain(answer.status);
    expect(answer.body).toMatchObject({ code, status: answer.status });
    expect(answer.body.detail).toMatch(/\S/);
  });
});
