/**
 * The upload store: takes files at addresses that the application signed, tells the application, serves and deletes
 * them. The wire protocol is that of the uploadthing SDK 7.7, read in its sources.
 */
import { createHash, createHmac } from 'node:crypto';
import { type Configuration, isLoopbackAddress } from './configuration';
import { type Answer, BadRequest, type Call, Interrupted, TooLarge, json, jsonBody, text } from './http';
import { filePart } from './multipart';
import type { Storage } from './storage';
import { claimedFile, refuseSignature, sameText } from './upload-address';
import { withCors } from './upload-cors';
import type { Registration, StoredFile, UploadState } from './upload-state';

const MULTIPART_ROOM_BYTES = 64 * 1024;
const REGISTRATION_WAIT_MS = 3_000;

type Waiting = { answer: (result: { data: unknown } | { error: string }) => void };

export class Uploads {
  readonly state: UploadState;
  private readonly configuration: Configuration;
  private readonly storage: Storage;
  private readonly waiting = new Map<string, Waiting>();
  private readonly awaitingRegistration = new Map<string, (() => void)[]>();
  private callbacksToLose = 0;

  constructor(configuration: Configuration, storage: Storage, state: UploadState) {
    this.configuration = configuration;
    this.storage = storage;
    this.state = state;
  }

  /** Answers /ingest/…, /files-api/… and /a/…. */
  async handle(call: Call): Promise<Answer> {
    if (call.path.startsWith('/ingest/'))
      return withCors(call, await this.ingest(call, call.path.slice('/ingest/'.length)));
    if (call.path.startsWith('/files-api/')) return this.filesApi(call);
    if (call.method === 'OPTIONS') return withCors(call, { status: 204 });
    return withCors(call, this.download(call));
  }

  loseNextCallbacks(count: number): void {
    this.callbacksToLose += count;
  }

  /** Calls back again for a file that is here, as a store does that is not sure of the first time. */
  async callBackAgain(key: string): Promise<{ status: number | null }> {
    const file = this.state.files[key];
    const registration = this.state.registrations[key];
    if (!file?.fileHash || !registration) throw new BadRequest(`no uploaded file ${key} with a callback`);
    return {
      status: await this.postCallback(
        registration,
        'callback',
        this.callbackBody(file, registration, `http://localhost:${this.configuration.port}`),
      ),
    };
  }

  /** A callback with a signature that is not ours; the application must refuse it. */
  async forgeCallback(key: string): Promise<{ status: number | null }> {
    const file = this.state.files[key];
    const registration = this.state.registrations[key];
    if (!file || !registration) throw new BadRequest(`no file ${key} with a callback`);
    const body = this.callbackBody(file, registration, `http://localhost:${this.configuration.port}`);
    return { status: await this.postCallback(registration, 'callback', body, 'sk_fake_somebodyelses') };
  }

  clear(): void {
    for (const key of Object.keys(this.state.files)) this.forget(key);
    this.state.registrations = {};
    this.callbacksToLose = 0;
    for (const waiting of this.waiting.values()) waiting.answer({ error: 'The store was reset.' });
    this.waiting.clear();
    this.storage.changed();
  }

  bytesOf(key: string): Buffer | null {
    return this.storage.findBytes(`file:${key}`);
  }

  private async ingest(call: Call, key: string): Promise<Answer> {
    if (call.method === 'OPTIONS') return { status: 204 };
    if (call.method === 'POST' && key === 'route-metadata') return this.register(call);
    if (call.method === 'POST' && key === 'callback-result') return this.takeCallbackResult(call);
    if (call.method !== 'HEAD' && call.method !== 'PUT') return json(405, { error: 'Use HEAD or PUT.' });
    const refused = this.refuseAddress(call);
    if (refused) return refused;
    if (!/^[\w-]{1,300}$/.test(key)) return json(400, { error: 'Invalid file key.' });
    const claimed = claimedFile(call, key);
    if (!claimed) return json(400, { error: 'The address lacks a file name, a type or a size that is possible.' });
    const file = (this.state.files[key] ??= claimed);
    if (call.method === 'HEAD')
      return { status: 200, headers: { 'x-ut-range-start': String(file.fileHash ? 0 : file.received) } };
    return this.take(call, file);
  }

  private async take(call: Call, file: StoredFile): Promise<Answer> {
    const start = /^bytes=(\d{1,12})-$/.exec(String(call.headers.range ?? 'bytes=0-'))?.[1];
    if (start === undefined) return json(416, { error: 'Expected Range: bytes=N-' });
    const from = Number(start);
    if (from !== 0 && from !== file.received) return json(416, { error: `Expected the bytes from ${file.received}.` });
    const before = from === 0 ? Buffer.alloc(0) : (this.bytesOf(file.key) ?? Buffer.alloc(0));
    let body: Buffer;
    try {
      body = await call.body(file.size - from + MULTIPART_ROOM_BYTES);
    } catch (error) {
      if (error instanceof TooLarge)
        return this.fail(file, 413, `The file is larger than the ${file.size} bytes announced.`);
      if (error instanceof Interrupted) this.keepWhatCame(file, before, error.received, call.headers['content-type']);
      throw error;
    }
    const part = filePart(body, call.headers['content-type']);
    const bytes = Buffer.concat([before, part.bytes]);
    if (!part.complete || bytes.length !== file.size)
      return this.fail(file, 400, `Received ${bytes.length} bytes where ${file.size} were announced.`);

    this.storage.putBytes(`file:${file.key}`, bytes);
    file.received = bytes.length;
    file.fileHash = createHash('md5').update(bytes).digest('hex');
    file.uploadedAtMs = Date.now();
    this.storage.changed();
    const origin = `http://${call.host}`;
    const slug = call.query.get('x-ut-slug');
    // A file that the server itself puts here has no route, and nobody to call.
    if (slug === null) return json(200, { ...this.addresses(file, origin), serverData: null });
    const registration = await this.registrationOf(file.key);
    if (!registration) return this.fail(file, 200, 'The application never registered this upload.');
    return this.callBack(file, registration, origin);
  }

  /** Calls the application and answers the PUT with what it made of the file. */
  private async callBack(file: StoredFile, registration: Registration, origin: string): Promise<Answer> {
    const body = this.callbackBody(file, registration, origin);
    if (this.callbacksToLose > 0) {
      this.callbacksToLose -= 1;
      file.callback = 'lost';
      this.storage.changed();
      return json(200, { error: 'The application could not be told of the file.' });
    }
    file.callback = 'waiting';
    let timer: NodeJS.Timeout | undefined;
    const result = new Promise<{ data: unknown } | { error: string }>((resolve) => {
      timer = setTimeout(
        () => resolve({ error: 'The application did not take note of the file in time.' }),
        this.configuration.callbackLimitMs,
      );
      this.waiting.set(file.key, { answer: resolve });
    });
    const sent = this.postCallback(registration, 'callback', body).then((status) => {
      if (status === null || status >= 400)
        this.waiting
          .get(file.key)
          ?.answer({ error: `The application answered ${status ?? 'nothing'} to the callback.` });
    });
    if (!registration.awaitServerData) {
      clearTimeout(timer);
      this.waiting.delete(file.key);
      void sent;
      return json(200, { ...this.addresses(file, origin), serverData: null });
    }
    const outcome = await result;
    clearTimeout(timer);
    this.waiting.delete(file.key);
    file.callback = 'error' in outcome ? 'failed' : 'answered';
    this.storage.changed();
    if ('error' in outcome) return json(200, { error: outcome.error });
    return json(200, { ...this.addresses(file, origin), serverData: outcome.data });
  }

  private callbackBody(file: StoredFile, registration: Registration, origin: string): string {
    return JSON.stringify({
      status: 'uploaded',
      metadata: registration.metadata,
      origin: `${origin}/ingest`,
      file: {
        key: file.key,
        name: file.name,
        size: file.size,
        type: file.type,
        customId: file.customId,
        ...this.addresses(file, origin),
      },
    });
  }

  /** The application's status, or null where it could not be reached. */
  private async postCallback(
    registration: Registration,
    hook: 'callback' | 'error',
    body: string,
    key = this.configuration.uploadKey,
  ): Promise<number | null> {
    const url = new URL(registration.callbackUrl);
    url.searchParams.set('slug', registration.slug);
    try {
      const response = await fetch(url, {
        method: 'POST',
        headers: {
          'content-type': 'application/json',
          'uploadthing-hook': hook,
          'x-uploadthing-signature': `hmac-sha256=${createHmac('sha256', key).update(body).digest('hex')}`,
        },
        body,
        redirect: 'manual',
        signal: AbortSignal.timeout(this.configuration.callbackLimitMs),
      });
      await response.arrayBuffer();
      return response.status;
    } catch {
      return null;
    }
  }

  private async fail(file: StoredFile, status: number, error: string): Promise<Answer> {
    this.storage.dropBytes(`file:${file.key}`);
    file.received = 0;
    file.fileHash = null;
    file.callback = 'failed';
    this.storage.changed();
    const registration = this.state.registrations[file.key];
    if (registration) await this.postCallback(registration, 'error', JSON.stringify({ fileKey: file.key, error }));
    return json(status, { error });
  }

  private keepWhatCame(file: StoredFile, before: Buffer, received: Buffer, contentType: string | undefined): void {
    try {
      const bytes = Buffer.concat([before, filePart(received, contentType).bytes]).subarray(0, file.size);
      this.storage.putBytes(`file:${file.key}`, bytes);
      file.received = bytes.length;
    } catch (error) {
      // Cut before the part's own header: there is nothing to go on from.
      if (!(error instanceof BadRequest)) throw error;
      file.received = before.length;
    }
    this.storage.changed();
  }

  private async register(call: Call): Promise<Answer> {
    const refused = this.refuseKey(call);
    if (refused) return refused;
    const given = await jsonBody(call);
    const { fileKeys, callbackUrl, callbackSlug } = given;
    if (!Array.isArray(fileKeys) || typeof callbackUrl !== 'string' || typeof callbackSlug !== 'string')
      return json(400, { error: 'Expected fileKeys, callbackUrl and callbackSlug.' });
    if (!isLoopbackAddress(callbackUrl)) return json(400, { error: 'The stand-in calls back to this machine only.' });
    for (const key of fileKeys) {
      if (typeof key !== 'string') return json(400, { error: 'File keys are text.' });
      this.state.registrations[key] = {
        key,
        slug: callbackSlug,
        callbackUrl,
        metadata: given.metadata ?? {},
        awaitServerData: given.awaitServerData !== false,
        atMs: Date.now(),
      };
      for (const tell of this.awaitingRegistration.get(key) ?? []) tell();
    }
    this.storage.changed();
    return json(200, { ok: true });
  }

  private async takeCallbackResult(call: Call): Promise<Answer> {
    const refused = this.refuseKey(call);
    if (refused) return refused;
    const given = await jsonBody(call);
    if (typeof given.fileKey !== 'string') return json(400, { error: 'Expected a fileKey.' });
    const result = typeof given.error === 'string' ? { error: given.error } : { data: given.callbackData ?? null };
    this.waiting.get(given.fileKey)?.answer(result);
    const file = this.state.files[given.fileKey];
    if (file) file.callback = 'error' in result ? 'failed' : 'answered';
    this.storage.changed();
    return json(200, { ok: true });
  }

  // The application registers an upload while the browser may already be sending it.
  private async registrationOf(key: string): Promise<Registration | null> {
    if (!this.state.registrations[key]) {
      await new Promise<void>((resolve) => {
        const timer = setTimeout(resolve, REGISTRATION_WAIT_MS);
        this.awaitingRegistration.set(key, [
          ...(this.awaitingRegistration.get(key) ?? []),
          () => {
            clearTimeout(timer);
            resolve();
          },
        ]);
      });
      this.awaitingRegistration.delete(key);
    }
    return this.state.registrations[key] ?? null;
  }

  private async filesApi(call: Call): Promise<Answer> {
    const refused = this.refuseKey(call);
    if (refused) return refused;
    const given = await jsonBody(call);
    const keysOf = (): string[] => {
      const { fileKeys, customIds } = given;
      if (Array.isArray(fileKeys)) return fileKeys.filter((key) => typeof key === 'string');
      if (Array.isArray(customIds))
        return Object.values(this.state.files).flatMap((file) => (customIds.includes(file.customId) ? [file.key] : []));
      throw new BadRequest('expected fileKeys or customIds');
    };
    if (call.method === 'POST' && call.path === '/files-api/v6/deleteFiles') {
      const here = keysOf().filter((key) => this.state.files[key]);
      for (const key of here) this.forget(key);
      this.storage.changed();
      return json(200, { success: true, deletedCount: here.length });
    }
    if (call.method === 'POST' && call.path === '/files-api/v6/listFiles') {
      const limit = typeof given.limit === 'number' ? Math.min(500, Math.max(1, Math.floor(given.limit))) : 500;
      const offset = typeof given.offset === 'number' ? Math.max(0, Math.floor(given.offset)) : 0;
      const all = Object.values(this.state.files);
      const files = all.slice(offset, offset + limit).map((file) => ({
        id: file.key,
        customId: file.customId,
        key: file.key,
        name: file.name,
        size: file.size,
        status: file.fileHash ? 'Uploaded' : 'Uploading',
        uploadedAt: file.uploadedAtMs ?? 0,
      }));
      return json(200, { hasMore: all.length > offset + limit, files });
    }
    return json(404, { error: 'The stand-in knows deleteFiles and listFiles.' });
  }

  private download(call: Call): Answer {
    const [, , appId, key = ''] = call.path.split('/');
    if (call.method !== 'GET' && call.method !== 'HEAD') return text(405, 'Use GET.');
    const file = appId === this.configuration.uploadAppId ? this.state.files[key] : undefined;
    const bytes = file?.fileHash ? this.bytesOf(key) : null;
    if (!file || !bytes) return text(404, 'No such file.');
    const isSigned = call.query.has('signature') && refuseSignature(call, this.configuration.uploadKey) === null;
    if (file.isPrivate && !isSigned) return text(403, 'This file is private: its address must be signed and in time.');
    return {
      status: 200,
      headers: {
        'content-type': file.type || 'application/octet-stream',
        'content-disposition': `${file.disposition}; filename*=UTF-8''${encodeURIComponent(file.name)}`,
        // Whatever a file contains, it runs nothing on this origin.
        'content-security-policy': "sandbox; default-src 'none'; style-src 'unsafe-inline'; img-src data:",
        etag: `"${file.fileHash}"`,
      },
      body: bytes,
    };
  }

  private refuseAddress(call: Call): Answer | null {
    const refused = refuseSignature(call, this.configuration.uploadKey);
    if (refused) return refused;
    return call.query.get('x-ut-identifier') === this.configuration.uploadAppId
      ? null
      : json(403, { error: 'The address is of another application.' });
  }

  private refuseKey(call: Call): Answer | null {
    const given = call.headers['x-uploadthing-api-key'];
    if (typeof given !== 'string') return json(401, { error: 'Missing API key.' });
    if (!given.startsWith('sk_fake_'))
      return json(401, { error: 'This is a local stand-in and refuses keys that look real.' });
    return sameText(given, this.configuration.uploadKey) ? null : json(401, { error: 'Invalid API key.' });
  }

  private addresses(
    file: StoredFile,
    origin: string,
  ): { url: string; appUrl: string; ufsUrl: string; fileHash: string } {
    const address = `${origin}/a/${this.configuration.uploadAppId}/${file.key}`;
    return { url: address, appUrl: address, ufsUrl: address, fileHash: file.fileHash ?? '' };
  }

  private forget(key: string): void {
    this.storage.dropBytes(`file:${key}`);
    delete this.state.files[key];
    delete this.state.registrations[key];
  }
}
