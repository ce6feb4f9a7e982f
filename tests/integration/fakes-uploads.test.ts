/**
 * Sending a parts list to the store, as the browser's client does it (requests read in uploadthing 7.7.4, client/index.js),
 * with the real server SDK on the application's side.
 */
import { createHash, createHmac } from 'node:crypto';
import { connect } from 'node:net';
import { NextRequest } from 'next/server';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { type StoredUpload, type UploadCalls, deleteUpload, fetchUpload, uploadHandlers } from '@/lib/services/uploads';
import { type Fakes, UPLOAD_APP, UPLOAD_KEY, bodyOf, startApp, startFakes } from './fakes-running';

type Presigned = { url: string; key: string; name: string };

const LIST = new TextEncoder().encode('designator,value\nR1,4k7\nR2,100k\nC1,1n\n');
const CIRCUIT = '0198c0de-0000-7000-8000-000000000001';

let fakes: Fakes;
let app: Awaited<ReturnType<typeof startApp>>;
let completed: StoredUpload[] = [];
let failures: { message: string; key: string | null }[] = [];
let authorise: UploadCalls['authorise'];
let complete: UploadCalls['complete'];

beforeAll(async () => {
  let handlers: ReturnType<typeof uploadHandlers> | undefined;
  app = await startApp(async (request, response) => {
    handlers ??= uploadHandlers({
      authorise: (...given) => authorise(...given),
      complete: (file) => complete(file),
      failed: (error, key) => failures.push({ message: error instanceof Error ? error.message : String(error), key }),
    });
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
    const answer = await (request.method === 'POST' ? handlers.POST(web) : handlers.GET(web));
    response.writeHead(answer.status, { 'content-type': 'application/json' });
    response.end(await answer.text());
  });
  fakes = await startFakes(app.port, { FAKES_CALLBACK_LIMIT_MS: '5000' });
});

afterAll(async () => {
  await fakes.stop();
  await app.stop();
});

beforeEach(async () => {
  await fakes.control('reset');
  completed = [];
  failures = [];
  authorise = async () => ({ ok: true, owner: { workshopId: 'fernhollow', personId: 'builder' } });
  complete = async (file) => {
    completed.push(file);
    return { uploadId: `noted-${file.key}` };
  };
});

function ask(
  files: { name: string; size: number; type: string }[],
  input: unknown = { circuitId: CIRCUIT },
): Promise<Response> {
  return fetch(`http://localhost:${app.port}/api/uploadthing?actionType=upload&slug=partsList`, {
    method: 'POST',
    headers: {
      'content-type': 'application/json',
      'x-uploadthing-version': '7.7.4',
      'x-uploadthing-package': '@uploadthing/react',
    },
    body: JSON.stringify({ input, files: files.map((file) => ({ ...file, lastModified: 1_700_000_000_000 })) }),
  });
}

async function presigned(size = LIST.length, name = 'clock divider ± 1%.csv'): Promise<Presigned> {
  const response = await ask([{ name, size, type: 'text/csv' }]);
  expect(response.status).toBe(200);
  const [first] = (await response.json()) as Presigned[];
  if (!first) throw new Error('no address');
  return first;
}

const browser = () => ({ origin: `http://localhost:${app.port}`, 'x-uploadthing-version': '7.7.4' });

function put(url: string, bytes: Uint8Array, from = 0): Promise<Response> {
  const form = new FormData();
  form.append('file', new Blob([Uint8Array.from(bytes)], { type: 'text/csv' }), 'list.csv');
  return fetch(url, { method: 'PUT', headers: { ...browser(), range: `bytes=${from}-` }, body: form });
}

const head = (url: string) => fetch(url, { method: 'HEAD', headers: browser() });

async function uploaded(): Promise<Presigned> {
  const address = await presigned();
  expect(await (await put(address.url, LIST)).json()).not.toHaveProperty('error');
  return address;
}

describe('a parts list sent to the store', () => {
  it('arrives whole, is noted for the person who sent it, and reads back byte for byte', async () => {
    const address = await presigned();
    const start = await head(address.url);
    expect([
      start.status,
      start.headers.get('x-ut-range-start'),
      start.headers.get('access-control-expose-headers'),
    ]).toEqual([200, '0', 'x-ut-range-start']);
    const answer = await put(address.url, LIST);
    expect(answer.status).toBe(200);
    expect(answer.headers.get('access-control-allow-origin')).toBe(`http://localhost:${app.port}`);
    expect(await answer.json()).toMatchObject({
      serverData: { ok: true, uploadId: `noted-${address.key}` },
      fileHash: createHash('md5').update(LIST).digest('hex'),
    });
    expect(completed).toEqual([
      {
        key: address.key,
        name: 'clock divider ± 1%.csv',
        size: LIST.length,
        claimedType: 'text/csv',
        hash: createHash('md5').update(LIST).digest('hex'),
        owner: { workshopId: 'fernhollow', personId: 'builder' },
        circuitId: CIRCUIT,
      },
    ]);
    const fetched = await fetchUpload(address.key);
    expect(fetched.ok && Buffer.from(fetched.bytes).equals(Buffer.from(LIST))).toBe(true);
    expect(failures).toEqual([]);
  });

  it('is asked for beforehand by the browser, and the store allows it', async () => {
    const { url } = await presigned();
    const answer = await fetch(url, {
      method: 'OPTIONS',
      headers: {
        origin: browser().origin,
        'access-control-request-method': 'PUT',
        'access-control-request-headers': 'b3,range,traceparent,x-uploadthing-version',
      },
    });
    expect(answer.status).toBe(204);
    const allowed = answer.headers.get('access-control-allow-headers') ?? '';
    for (const name of ['range', 'x-uploadthing-version', 'b3', 'traceparent']) expect(allowed).toContain(name);
    expect(answer.headers.get('access-control-allow-methods')).toContain('PUT');
  });

  it('goes on where a broken connection left it', async () => {
    const bytes = new Uint8Array(200_000).map((_, at) => at % 251);
    const address = await presigned(bytes.length);
    await sendPartOf(address.url, bytes, 150_000);
    // The store hears of the break a moment later than this side.
    await expect
      .poll(async () => Number((await head(address.url)).headers.get('x-ut-range-start')), {
        timeout: 5_000,
        interval: 20,
      })
      .toBeGreaterThan(100_000);
    const from = Number((await head(address.url)).headers.get('x-ut-range-start'));
    expect(await (await put(address.url, bytes.subarray(from), from)).json()).toMatchObject({
      serverData: { ok: true },
    });
    const fetched = await fetchUpload(address.key);
    expect(fetched.ok && Buffer.from(fetched.bytes).equals(Buffer.from(bytes))).toBe(true);
  });
});

describe('an address of the store', () => {
  const changes: [string, (url: string) => string][] = [
    ['another size', (url) => url.replace(/x-ut-file-size=\d+/, 'x-ut-file-size=9999')],
    ['another route', (url) => url.replace('x-ut-slug=partsList', 'x-ut-slug=other')],
    ['a later time', (url) => url.replace(/expires=\d+/, 'expires=9999999999999')],
    ['public access', (url) => url.replace('x-ut-acl=private', 'x-ut-acl=public-read')],
    ['another file', (url) => url.replace(/\/ingest\/[\w-]+/, '/ingest/otherkey')],
    ['another host name', (url) => url.replace('//localhost:', '//127.0.0.1:')],
    ['an encoding less', (url) => url.replace('%2520', '%20')],
    ['a changed signature', (url) => url.replace(/.$/, (last) => (last === '0' ? '1' : '0'))],
    ['no signature', (url) => url.replace(/&signature=.*$/, '')],
  ];
  it.each(changes)('is refused with %s, and nothing is kept', async (_, change) => {
    const { url } = await presigned();
    const changed = change(url);
    expect(changed).not.toBe(url);
    expect((await head(changed)).status).toBe(403);
    expect((await put(changed, LIST)).status).toBe(403);
    expect(await fakes.read('/__/uploads')).toEqual([]);
    expect(completed).toEqual([]);
  });

  it('is refused after its time', async () => {
    const unsigned = `${fakes.origin}/ingest/somekey?expires=${Date.now() - 1}&x-ut-identifier=${UPLOAD_APP}&x-ut-file-name=a.csv&x-ut-file-size=1&x-ut-file-type=text%252Fcsv`;
    const url = `${unsigned}&signature=hmac-sha256%3D${createHmac('sha256', UPLOAD_KEY).update(unsigned).digest('hex')}`;
    expect(await (await put(url, LIST)).json()).toEqual({ error: 'The address has expired.' });
  });

  it('opens a private file only while signed', async () => {
    const { key } = await uploaded();
    const plain = `${fakes.origin}/a/${UPLOAD_APP}/${key}`;
    expect((await fetch(plain)).status).toBe(403);
    expect(
      (await fetch(`${plain}?expires=${Date.now() + 60_000}&signature=hmac-sha256%3D${'0'.repeat(64)}`)).status,
    ).toBe(403);
  });
});

describe('what the store does not take', () => {
  it.each([
    ['more bytes than announced', new Uint8Array(LIST.length + 1)],
    ['fewer bytes than announced', LIST.subarray(0, 5)],
  ])('%s: nothing is noted, and the application hears of it', async (_, bytes) => {
    const { url, key } = await presigned();
    expect((await put(url, bytes)).status).toBe(400);
    expect(completed).toEqual([]);
    expect(failures.map((failure) => failure.key)).toEqual([key]);
    expect(await fetchUpload(key)).toMatchObject({ ok: false, reason: 'not-found' });
  });

  it.each([
    ['an empty file', [{ name: 'a.csv', size: 0, type: 'text/csv' }], 400, 'The file is empty.'],
    ['an impossible size', [{ name: 'a.csv', size: -5, type: 'text/csv' }], 400, 'The file is empty.'],
    ['no file at all', [], 400, 'Send one file at a time.'],
    [
      'two files',
      [
        { name: 'a.csv', size: 1, type: '' },
        { name: 'b.csv', size: 1, type: '' },
      ],
      400,
      'Send one file at a time.',
    ],
    [
      'more than 64 MB',
      [{ name: 'a.csv', size: 64 * 1024 * 1024 + 1, type: 'text/csv' }],
      400,
      'The file is larger than 64 MB.',
    ],
  ])('%s is refused with a sentence for the person', async (_, files, status, message) => {
    const answer = await ask(files);
    expect([answer.status, await answer.json()]).toEqual([status, { message }]);
  });

  it('a person who may not gets no address', async () => {
    authorise = async () => ({ ok: false, message: 'Only builders import parts lists.' });
    const answer = await ask([{ name: 'a.csv', size: 1, type: 'text/csv' }]);
    expect([answer.status, await answer.json()]).toEqual([403, { message: 'Only builders import parts lists.' }]);
  });

  it('a fault of ours shows no inner message', async () => {
    authorise = async () => {
      throw new Error('relation "person" does not exist');
    };
    const answer = await ask([{ name: 'a.csv', size: 1, type: 'text/csv' }]);
    expect([answer.status, await answer.json()]).toEqual([
      500,
      { message: 'The upload could not be started. Try again.' },
    ]);
    expect(failures).toEqual([{ message: 'relation "person" does not exist', key: null }]);
  });
});

describe('the store calling back', () => {
  it('is not believed with a signature that is not its own', async () => {
    const { key } = await uploaded();
    completed = [];
    expect(await fakes.control('uploads/forge-callback', { key })).toEqual({ status: 400 });
    expect(completed).toEqual([]);
  });

  it('calls again with the same key, so that a file is noted once', async () => {
    const { key } = await uploaded();
    expect(await fakes.control('uploads/call-again', { key })).toEqual({ status: 200 });
    expect(completed.map((file) => file.key)).toEqual([key, key]);
  });

  it('may be lost: the person is told, and a later call brings the file', async () => {
    await fakes.control('uploads/lose-callback');
    const { url, key } = await presigned();
    const answer = await put(url, LIST);
    expect([answer.status, await answer.json()]).toEqual([
      200,
      { error: 'The application could not be told of the file.' },
    ]);
    expect(completed).toEqual([]);
    expect(await fakes.control('uploads/call-again', { key })).toEqual({ status: 200 });
    expect(completed.map((file) => file.key)).toEqual([key]);
  });

  it('does not leave the person waiting when the file can not be noted', async () => {
    complete = async () => {
      throw new Error('the database is away');
    };
    const { url, key } = await presigned();
    expect(await (await put(url, LIST)).json()).toMatchObject({ serverData: { ok: false } });
    expect(failures).toEqual([{ message: 'the database is away', key }]);
  });
});

describe('reading and removing', () => {
  it('stops at the limit of bytes', async () => {
    const { key } = await uploaded();
    expect(await fetchUpload(key, LIST.length - 1)).toMatchObject({ ok: false, reason: 'too-large' });
    expect(await fetchUpload(key, LIST.length)).toMatchObject({ ok: true });
  });

  it('says that the store is away', async () => {
    const { key } = await uploaded();
    await fakes.control('next', { service: 'uploads', match: `GET /a/`, status: 500 });
    expect(await fetchUpload(key)).toMatchObject({ ok: false, reason: 'unreachable' });
    await fakes.control('next', { service: 'uploads', match: `GET /a/`, drop: 'before' });
    expect(await fetchUpload(key)).toMatchObject({ ok: false, reason: 'unreachable' });
    await fakes.control('next', { service: 'uploads', match: 'deleteFiles', status: 500 });
    expect(await deleteUpload(key)).toMatchObject({ ok: false, reason: 'unreachable' });
  });

  it('removes a file once and for all', async () => {
    const { key } = await uploaded();
    expect(await deleteUpload(key)).toEqual({ ok: true });
    expect(await fetchUpload(key)).toMatchObject({ ok: false, reason: 'not-found' });
    expect(await deleteUpload(key)).toEqual({ ok: true });
  });
});

/** Sends the head and the first bytes of an upload, then breaks the connection. */
function sendPartOf(address: string, bytes: Uint8Array, count: number): Promise<void> {
  const url = new URL(address);
  const boundary = 'break-here';
  const opening = `--${boundary}\r\ncontent-disposition: form-data; name="file"; filename="list.csv"\r\ncontent-type: text/csv\r\n\r\n`;
  const closing = `\r\n--${boundary}--\r\n`;
  const length = opening.length + bytes.length + closing.length;
  return new Promise((resolve, reject) => {
    const socket = connect(Number(url.port), '127.0.0.1', () => {
      socket.write(
        `PUT ${url.pathname}${url.search} HTTP/1.1\r\nhost: ${url.host}\r\nrange: bytes=0-\r\ncontent-type: multipart/form-data; boundary=${boundary}\r\ncontent-length: ${length}\r\n\r\n${opening}`,
      );
      // Half-closed rather than reset, so that the bytes written are not thrown away on their way.
      socket.end(Buffer.from(bytes.subarray(0, count)));
    });
    socket.on('error', reject);
    socket.on('close', () => resolve());
    socket.resume();
  });
}
