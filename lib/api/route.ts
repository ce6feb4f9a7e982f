/** A use case as a Next.js route handler: `export const POST = route(reserveBatch)`. */
import 'server-only';
import type { NextRequest } from 'next/server';
import { credentialsOf } from '@/lib/auth/credentials';
import { log } from './log';
import { newRequestId, perform } from './perform';
import { Refusal, problemResponse } from './problem';
import { refusalFrom } from './refusal-from-fault';
import type { UseCase } from './use-case';

const JSON_LIMIT_BYTES = 1 << 20;
type Parameters = Record<string, string | string[] | undefined>;
type Handler = (request: NextRequest, context: { params: Promise<Parameters> }) => Promise<Response>;

export function route(useCase: UseCase): Handler {
  return async (request, { params }) => {
    const requestId = newRequestId();
    const instance = request.nextUrl.pathname;
    try {
      refuseForeignOrigin(request, useCase);
      const credentials = useCase.type === 'open' ? null : await credentialsOf(request);
      // Before the body is read: a stranger's megabytes are not worth parsing.
      if (!credentials && useCase.type !== 'open') throw new Refusal('signed-out', 'Sign in, or send a bearer token.');
      const input = { ...(await readInput(request, useCase)), ...(await params) };
      const { output, replayed } = await perform(useCase, {
        credentials,
        input,
        requestId,
        idempotencyKey: request.headers.get('idempotency-key'),
        address: addressOf(request),
      });
      if (output instanceof Response) return output;
      const headers = new Headers({
        'content-type': 'application/json',
        'cache-control': 'no-store',
        'x-request-id': requestId,
      });
      if (replayed) headers.set('idempotent-replayed', 'true');
      return new Response(JSON.stringify(output ?? null), { status: 200, headers });
    } catch (error) {
      return respondTo(error, requestId, instance, useCase.name);
    }
  };
}

/** Logs once and answers; a bug never shows more than its request id. */
export function respondTo(error: unknown, requestId: string, instance: string, what: string): Response {
  const refusal = refusalFrom(error);
  if (!refusal) {
    log.error({ requestId, what, err: error }, 'bug');
    return problemResponse(
      new Refusal('bug', `Something went wrong on our side. It is logged as ${requestId}.`),
      requestId,
      instance,
    );
  }
  if (refusal.code === 'database.away' || refusal.code === 'service.away')
    log.warn({ requestId, what, code: refusal.code, err: refusal.cause }, 'away');
  else log.debug({ requestId, what, code: refusal.code }, 'refused');
  return problemResponse(refusal, requestId, instance);
}

/** The address as the nearest proxy tells it (next start fills it in itself); only for rate limits, so a forged one harms nobody but its limit. */
function addressOf(request: NextRequest): string {
  return request.headers.get('x-forwarded-for')?.split(',').at(-1)?.trim() ?? 'unknown';
}

/** Cross-site requests can't ride on a session cookie: browsers name the origin of every write (OWASP ASVS 4.2.2). */
function refuseForeignOrigin(request: NextRequest, useCase: UseCase): void {
  if (useCase.type === 'query' || request.headers.has('authorization')) return;
  const origin = request.headers.get('origin');
  const site = request.headers.get('sec-fetch-site');
  if (site !== null && site !== 'same-origin' && site !== 'none')
    throw new Refusal('not-allowed', 'This request came from another site.');
  if (origin === null) return;
  const own = new URL(process.env.NEXTAUTH_URL ?? request.url).origin;
  if (origin !== own) throw new Refusal('not-allowed', 'This request came from another site.');
}

async function readInput(request: NextRequest, useCase: UseCase): Promise<Record<string, unknown>> {
  const input: Record<string, unknown> = {};
  for (const name of new Set(request.nextUrl.searchParams.keys())) {
    const values = request.nextUrl.searchParams.getAll(name);
    input[name] = values.length > 1 ? values : values[0];
  }
  if (request.method === 'GET' || request.method === 'DELETE') return input;
  const type = request.headers.get('content-type') ?? '';
  if (type.startsWith('multipart/form-data') && useCase.multipartLimitBytes !== undefined) {
    return { ...input, ...(await readForm(request, useCase.multipartLimitBytes)) };
  }
  const body = await readBounded(request, JSON_LIMIT_BYTES);
  if (body.length === 0) return withVersion(request, input);
  if (!type.startsWith('application/json'))
    throw new Refusal('input.unreadable', 'Send JSON (content-type: application/json).');
  let parsed: unknown;
  try {
    parsed = JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(body));
  } catch (cause) {
    throw new Refusal('input.unreadable', 'The body is not readable JSON.', { cause });
  }
  if (parsed === null || typeof parsed !== 'object' || Array.isArray(parsed))
    throw new Refusal('input.unreadable', 'The body must be a JSON object.');
  return withVersion(request, { ...input, ...parsed });
}

/** `If-Match: "7"` stands for `version: 7` in commands that ask for one. */
function withVersion(request: NextRequest, input: Record<string, unknown>): Record<string, unknown> {
  const match = /^(?:W\/)?"?(\d{1,9})"?$/.exec(request.headers.get('if-match') ?? '')?.[1];
  return match === undefined || 'version' in input ? input : { ...input, version: Number(match) };
}

async function readForm(request: NextRequest, limitBytes: number): Promise<Record<string, unknown>> {
  const body = await readBounded(request, limitBytes);
  let form: FormData;
  try {
    form = await new Response(body as BodyInit, {
      headers: { 'content-type': request.headers.get('content-type') ?? '' },
    }).formData();
  } catch (cause) {
    throw new Refusal('input.unreadable', 'The form can’t be read.', { cause });
  }
  const input: Record<string, unknown> = {};
  for (const [name, value] of form.entries()) {
    const read =
      typeof value === 'string' ? value : { name: value.name, bytes: new Uint8Array(await value.arrayBuffer()) };
    const earlier = input[name];
    input[name] = earlier === undefined ? read : Array.isArray(earlier) ? [...earlier, read] : [earlier, read];
  }
  return input;
}

async function readBounded(request: NextRequest, limitBytes: number): Promise<Uint8Array> {
  const tooLarge = () =>
    new Refusal('too-large', `The body is larger than ${Math.floor(limitBytes / 1024)} KiB. Nothing was read.`);
  if (Number(request.headers.get('content-length') ?? 0) > limitBytes) throw tooLarge();
  if (!request.body) return new Uint8Array();
  const chunks: Uint8Array[] = [];
  let size = 0;
  const reader = request.body.getReader();
  for (;;) {
    const { done, value } = await reader.read();
    if (done) break;
    size += value.length;
    if (size > limitBytes) {
      await reader.cancel();
      throw tooLarge();
    }
    chunks.push(value);
  }
  return Buffer.concat(chunks);
}
