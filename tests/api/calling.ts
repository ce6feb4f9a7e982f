/** The running application over HTTP, as a program with a bearer token sees it. */
import { execFile } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { promisify } from 'node:util';

export const BASE = process.env.TEST_BASE_URL ?? 'http://127.0.0.1:4600';

const tokens = new Map<string, Promise<string>>();

/** The command that the README names. */
export function tokenOf(role: string): Promise<string> {
  const known = tokens.get(role);
  if (known) return known;
  const made = promisify(execFile)('npm', ['run', '-s', 'token', '--', '--email', `${role}@fernhollow.example`]).then(
    ({ stdout }) => stdout.trim(),
  );
  tokens.set(role, made);
  return made;
}

export interface Answer {
  readonly status: number;
  readonly type: string;
  /** Each test says what it expects of it; a wrong shape fails there. */
  readonly body: ReturnType<typeof JSON.parse>;
  readonly headers: Headers;
}

export async function call(
  role: string | null,
  method: string,
  path: string,
  body?: unknown,
  key: string | null = randomUUID(),
): Promise<Answer> {
  const headers = new Headers();
  if (role !== null) headers.set('authorization', `Bearer ${await tokenOf(role)}`);
  if (method !== 'GET' && key !== null) headers.set('idempotency-key', key);
  let payload: BodyInit | undefined;
  if (body instanceof FormData) payload = body;
  else if (body !== undefined) {
    headers.set('content-type', 'application/json');
    payload = JSON.stringify(body);
  }
  const response = await fetch(`${BASE}/api/v1${path}`, {
    method,
    headers,
    ...(payload === undefined ? {} : { body: payload }),
  });
  const text = await response.text();
  const type = response.headers.get('content-type') ?? '';
  return {
    status: response.status,
    type,
    body: type.includes('json') ? JSON.parse(text) : text,
    headers: response.headers,
  };
}

export async function done(role: string, method: string, path: string, body?: unknown): Promise<Answer['body']> {
  const answer = await call(role, method, path, body);
  if (answer.status !== 200) throw new Error(`${method} ${path}: ${answer.status} ${JSON.stringify(answer.body)}`);
  return answer.body;
}

export function listForm(circuitId: string, name: string, bytes: Uint8Array | string, fileName: string): FormData {
  const form = new FormData();
  form.set('circuitId', circuitId);
  form.set('name', name);
  form.set('file', new File([typeof bytes === 'string' ? bytes : new Uint8Array(bytes)], fileName));
  return form;
}
