/** A parts list on its way through the upload store, with the real SDK and the route of the application; and long lists read by a job. */
import { NextRequest } from 'next/server';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import { GET, POST } from '@/app/api/uploadthing/route';
import { closeDatabase, withWorkshop } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { revision, upload } from '@/db/schema/circuits';
import { outbox } from '@/db/schema/records';
import { createCircuit } from '@/lib/circuits/create-circuit';
import { createRevision } from '@/lib/circuits/create-revision';
import { getRevision } from '@/lib/circuits/get-revision';
import { cancelReading, getUpload } from '@/lib/circuits/get-upload';
import { listLines } from '@/lib/circuits/list-lines';
import { originalOfRevision, originalOfUpload } from '@/lib/circuits/original-of-revision';
import { readUpload } from '@/lib/circuits/read-upload';
import { receiveUpload } from '@/lib/circuits/receive-upload';
import { createToken } from '@/lib/workshop/api-tokens';
import { act, makeWorkshop, type TestWorkshop } from '../support/workshop';
import { bodyOf, type Fakes, startApp, startFakes } from './fakes-running';

const LIST = new TextEncoder().encode('Designators,Quantity,Value\nR1 R2,2,4k7\nC1,1,1n\n');

let shop: TestWorkshop;
let other: TestWorkshop;
let fakes: Fakes;
let app: Awaited<ReturnType<typeof startApp>>;
let token: Record<'builder' | 'storekeeper', string>;

beforeAll(async () => {
  [shop, other] = [await makeWorkshop('Uploads'), await makeWorkshop('Uploads elsewhere')];
  app = await startApp(async (request, response) => {
    const headers = new Headers(
      Object.entries(request.headers).flatMap(([name, value]) =>
        typeof value === 'string' ? [[name, value] as [string, string]] : [],
      ),
    );
    const body = request.method === 'POST' ? await bodyOf(request) : undefined;
    const web = new NextRequest(`http://localhost:${app.port}${request.url ?? ''}`, {
      method: request.method ?? 'GET',
      headers,
      ...(body === undefined ? {} : { body }),
    });
    const answer = await (request.method === 'POST' ? POST(web) : GET(web));
    response.writeHead(answer.status, { 'content-type': 'application/json' });
    response.end(await answer.text());
  });
  fakes = await startFakes(app.port, { FAKES_CALLBACK_LIMIT_MS: '5000' });
  const tokenOf = async (role: 'builder' | 'storekeeper') =>
    (await act(createToken, shop.as[role], { name: 'upload', scope: 'write' })).token;
  token = { builder: await tokenOf('builder'), storekeeper: await tokenOf('storekeeper') };
});
afterAll(async () => {
  await fakes.stop();
  await app.stop();
  await closeDatabase();
});

const circuitOf = async (workshop = shop): Promise<string> =>
  (await act(createCircuit, workshop.as.builder, { name: `Circuit ${newId()}` })).id;

function ask(circuitId: string, bearer: string | null, size = LIST.length): Promise<Response> {
  return fetch(`http://localhost:${app.port}/api/uploadthing?actionType=upload&slug=partsList`, {
    method: 'POST',
    headers: {
      'content-type': 'application/json',
      'x-uploadthing-version': '7.7.4',
      'x-uploadthing-package': '@uploadthing/react',
      ...(bearer === null ? {} : { authorization: `Bearer ${bearer}` }),
    },
    body: JSON.stringify({
      input: { circuitId },
      files: [{ name: 'main.csv', size, type: 'text/csv', lastModified: 1_700_000_000_000 }],
    }),
  });
}

async function send(circuitId: string): Promise<{ key: string; uploadId: string }> {
  const [address] = (await (await ask(circuitId, token.builder)).json()) as { url: string; key: string }[];
  if (!address) throw new Error('no address');
  const form = new FormData();
  form.append('file', new Blob([Uint8Array.from(LIST)], { type: 'text/csv' }), 'main.csv');
  const answer = (await (
    await fetch(address.url, {
      method: 'PUT',
      headers: { origin: `http://localhost:${app.port}`, 'x-uploadthing-version': '7.7.4', range: 'bytes=0-' },
      body: form,
    })
  ).json()) as { serverData: { uploadId: string } };
  return { key: address.key, uploadId: answer.serverData.uploadId };
}

const uploadsOf = (circuitId: string) =>
  withWorkshop(shop.id, (tx) => tx.select().from(upload).where(eq(upload.circuitId, circuitId)));

describe('a list sent through the upload store', () => {
  it('is noted for its workshop, becomes a revision by its key, and comes back byte for byte', async () => {
    const circuitId = await circuitOf();
    const sent = await send(circuitId);
    expect(await act(getUpload, shop.as.builder, { uploadId: sent.uploadId })).toMatchObject({
      fileName: 'main.csv',
      state: 'received',
      circuitId,
      revisionId: null,
    });
    const made = await act(createRevision, shop.as.builder, { circuitId, name: 'A', uploadKey: sent.key });
    expect(made).toMatchObject({ lines: 2, uploadId: sent.uploadId });
    const original = await act(originalOfRevision, shop.as.builder, { revisionId: made.id });
    expect(new Uint8Array(await original.arrayBuffer())).toEqual(LIST);
    await expect(
      act(createRevision, shop.as.builder, { circuitId, name: 'B', uploadKey: sent.key }),
    ).rejects.toMatchObject({ code: 'state.refused' });
  });

  it('the store calling back twice makes one upload', async () => {
    const circuitId = await circuitOf();
    const file = {
      key: `key-${newId()}`,
      name: 'a.csv',
      size: 10,
      claimedType: 'text/csv',
      hash: '',
      circuitId,
      owner: { workshopId: shop.id, personId: shop.as.builder.personId },
    };
    const calls = await Promise.all([receiveUpload(file), receiveUpload(file), receiveUpload(file)]);
    expect(new Set(calls.map((one) => one.uploadId)).size).toBe(1);
    expect(await uploadsOf(circuitId)).toHaveLength(1);
  });

  it('is refused before it starts for a stranger, a storekeeper, another workshop’s circuit and a file above 50 MB', async () => {
    const circuitId = await circuitOf();
    const refused = async (answer: Promise<Response>) => ({
      status: (await answer).status,
      text: await (await answer).text(),
    });
    expect(await refused(ask(circuitId, null))).toMatchObject({
      status: 403,
      text: expect.stringContaining('Sign in first'),
    });
    expect(await refused(ask(circuitId, token.storekeeper))).toMatchObject({
      status: 403,
      text: expect.stringContaining('builder or lead'),
    });
    expect(await refused(ask(await circuitOf(other), token.builder))).toMatchObject({
      status: 403,
      text: expect.stringContaining('no such circuit'),
    });
    expect(await refused(ask(circuitId, token.builder, 51 * 1024 * 1024))).toMatchObject({
      status: 403,
      text: expect.stringContaining('50 MB'),
    });
    expect(await uploadsOf(circuitId)).toEqual([]);
  });

  it('another workshop can’t use its key', async () => {
    const circuitId = await circuitOf();
    const sent = await send(circuitId);
    await expect(
      act(createRevision, other.as.builder, { circuitId: await circuitOf(other), name: 'A', uploadKey: sent.key }),
    ).rejects.toMatchObject({ code: 'not-found' });
  });

  it('a store that is away loses nothing: the same upload is read when it is back', async () => {
    const circuitId = await circuitOf();
    const away = await act(createRevision, shop.as.builder, {
      circuitId,
      name: 'A',
      uploadId: (
        await receiveUpload({
          key: `gone-${newId()}`,
          name: 'a.csv',
          size: 10,
          claimedType: 'text/csv',
          hash: '',
          circuitId,
          owner: { workshopId: shop.id, personId: shop.as.builder.personId },
        })
      ).uploadId,
    }).catch((error: unknown) => error);
    expect(away).toMatchObject({ code: expect.stringMatching(/not-found|service\.away/) });
    const sent = await send(circuitId);
    expect(await act(createRevision, shop.as.builder, { circuitId, name: 'A', uploadId: sent.uploadId })).toMatchObject(
      { lines: 2 },
    );
  });
});

describe('a long list', () => {
  const ROWS = 12_000;
  const long = (last = '') =>
    new TextEncoder().encode(
      `Designators,Quantity,Value\n${Array.from({ length: ROWS }, (_, n) => `R${n + 1},1,${(n % 900) + 100}k`).join('\n')}\n${last}`,
    );
  const jobOf = async (uploadId: string) => {
    const rows = await withWorkshop(shop.id, (tx) =>
      tx
        .select()
        .from(outbox)
        .where(and(eq(outbox.workshopId, shop.id), eq(outbox.queue, 'read-upload'))),
    );
    const row = rows.find((one) => z.object({ uploadId: z.string() }).parse(one.payload).uploadId === uploadId);
    if (!row) throw new Error('no job was written');
    return { id: row.id, workshopId: shop.id, payload: z.record(z.string(), z.unknown()).parse(row.payload) };
  };
  const start = async (bytes: Uint8Array, freeze = false) => {
    const circuitId = await circuitOf();
    const made = await act(createRevision, shop.as.builder, {
      circuitId,
      name: 'A',
      file: { name: 'long.csv', bytes: new Uint8Array(bytes) },
      freeze,
    });
    return { circuitId, made };
  };

  it('is read by a job, with progress, and frozen where that was asked; the job may come twice', async () => {
    const { made } = await start(long(), true);
    expect(made).toMatchObject({ reading: 'queued', lines: 0, state: 'draft' });
    expect((await act(getUpload, shop.as.builder, { uploadId: made.uploadId })).progress).toMatchObject({
      state: 'running',
      done: 0,
    });
    const job = await jobOf(made.uploadId);
    await readUpload(job);
    await readUpload(job);
    expect(await act(getRevision, shop.as.builder, { revisionId: made.id })).toMatchObject({
      lines: ROWS,
      state: 'frozen',
    });
    const upload = await act(getUpload, shop.as.builder, { uploadId: made.uploadId });
    expect(upload).toMatchObject({ state: 'frozen', revisionId: made.id, progress: { state: 'done' } });
    expect(upload.progress?.done).toBe(upload.progress?.total);
    expect(
      (await act(listLines, shop.as.builder, { revisionId: made.id, page: 60, size: 200 })).rows.at(-1)?.designators,
    ).toEqual([`R${ROWS}`]);
  });

  it('that is wrong near its end leaves no revision, says where, and keeps the file', async () => {
    const { circuitId, made } = await start(long('R99999,-1,1k\n'));
    await readUpload(await jobOf(made.uploadId));
    expect(await act(getUpload, shop.as.builder, { uploadId: made.uploadId })).toMatchObject({
      state: 'rejected',
      progress: { state: 'failed' },
      problem: { code: 'list.unreadable', more: { row: ROWS + 2 } },
    });
    expect(
      await withWorkshop(shop.id, (tx) => tx.select().from(revision).where(eq(revision.circuitId, circuitId))),
    ).toEqual([]);
    expect(
      (await (await act(originalOfUpload, shop.as.builder, { uploadId: made.uploadId })).arrayBuffer()).byteLength,
    ).toBeGreaterThan(100_000);
  });

  it('may be stopped: the file is kept, the unread revision goes', async () => {
    const { circuitId, made } = await start(long());
    await act(cancelReading, shop.as.builder, { uploadId: made.uploadId });
    await readUpload(await jobOf(made.uploadId));
    expect(await act(getUpload, shop.as.builder, { uploadId: made.uploadId })).toMatchObject({
      state: 'rejected',
      progress: { state: 'cancelled' },
    });
    expect(
      await withWorkshop(shop.id, (tx) => tx.select().from(revision).where(eq(revision.circuitId, circuitId))),
    ).toEqual([]);
    await expect(act(cancelReading, shop.as.builder, { uploadId: made.uploadId })).rejects.toMatchObject({
      code: 'state.refused',
    });
  });
});
