/** The HTTP ground that the stand-ins share: a request as a plain value, an answer as a plain value, bodies with a limit. */
import type { IncomingMessage, ServerResponse } from 'node:http';

export type Answer = {
  status: number;
  headers?: Record<string, string>;
  body?: string | Buffer;
};

export type Call = {
  method: string;
  /** Exactly as it came on the request line: signatures are over this text. */
  rawUrl: string;
  /** Host header, already checked to name this machine. */
  host: string;
  path: string;
  query: URLSearchParams;
  headers: IncomingMessage['headers'];
  /** The body as bytes. Throws TooLarge above the limit and Interrupted (with what came) when the sender goes away. */
  body(limitBytes: number): Promise<Buffer>;
};

export class TooLarge extends Error {}

export class Interrupted extends Error {
  readonly received: Buffer;
  constructor(received: Buffer) {
    super('the sender went away');
    this.received = received;
  }
}

export function callFrom(request: IncomingMessage): Call {
  const rawUrl = request.url ?? '/';
  const at = rawUrl.indexOf('?');
  let taken: Promise<Buffer> | undefined;
  return {
    method: request.method ?? 'GET',
    rawUrl,
    host: request.headers.host ?? '',
    path: at < 0 ? rawUrl : rawUrl.slice(0, at),
    query: new URLSearchParams(at < 0 ? '' : rawUrl.slice(at + 1)),
    headers: request.headers,
    body: (limitBytes) => (taken ??= readBody(request, limitBytes)),
  };
}

function readBody(request: IncomingMessage, limitBytes: number): Promise<Buffer> {
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = [];
    let size = 0;
    request.on('data', (chunk: Buffer) => {
      size += chunk.length;
      if (size <= limitBytes) chunks.push(chunk);
      else reject(new TooLarge(`body above ${limitBytes} bytes`));
    });
    request.on('end', () => resolve(Buffer.concat(chunks)));
    request.on('error', () => reject(new Interrupted(Buffer.concat(chunks))));
    request.on('close', () => {
      if (!request.complete) reject(new Interrupted(Buffer.concat(chunks)));
    });
  });
}

export async function jsonBody(call: Call, limitBytes = 1_000_000): Promise<Record<string, unknown>> {
  const text = (await call.body(limitBytes)).toString('utf8');
  if (text.trim() === '') return {};
  try {
    const value: unknown = JSON.parse(text);
    return isRecord(value) ? value : {};
  } catch {
    throw new BadRequest('the body is not JSON');
  }
}

export class BadRequest extends Error {}

export const isRecord = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

export const json = (status: number, value: unknown, headers: Record<string, string> = {}): Answer => ({
  status,
  headers: { 'content-type': 'application/json', ...headers },
  body: JSON.stringify(value),
});

export const text = (status: number, body: string): Answer => ({
  status,
  headers: { 'content-type': 'text/plain; charset=utf-8' },
  body,
});

/** 303 makes the browser fetch the target with GET whatever the form's method was. */
export const redirect = (location: string): Answer => ({ status: 303, headers: { location } });

const DRAIN_LIMIT_MS = 2_000;

/**
 * Lets the rest of a body come and throws it away, for a while: a sender that is cut off while it writes never reads
 * the answer, and a body left in the connection would be taken for the next request.
 */
export function drained(request: IncomingMessage): Promise<void> {
  if (request.complete || request.destroyed) return Promise.resolve();
  return new Promise((resolve) => {
    const timer = setTimeout(resolve, DRAIN_LIMIT_MS);
    const done = (): void => {
      clearTimeout(timer);
      resolve();
    };
    request.once('end', done);
    request.once('close', done);
    request.resume();
  });
}

export function send(response: ServerResponse, answer: Answer): void {
  if (response.destroyed || response.headersSent) return;
  response.writeHead(answer.status, {
    ...(response.req.complete ? {} : { connection: 'close' }),
    'cache-control': 'no-store',
    'x-content-type-options': 'nosniff',
    'referrer-policy': 'no-referrer',
    ...answer.headers,
    'content-length': String(Buffer.byteLength(answer.body ?? '')),
  });
  response.end(response.req.method === 'HEAD' ? undefined : answer.body);
}
