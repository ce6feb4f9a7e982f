/**
 * Runs a use case, always in this order: parse → begin → who acts, and may they → claim the idempotency key → run →
 * audit row and outbox rows → store the answer → commit. It is the one path to the data: routes, server components and
 * jobs all come through here.
 */
import 'server-only';
import { createHash } from 'node:crypto';
import { and, eq, sql } from 'drizzle-orm';
import type { z } from 'zod';
import { type Tx, withWorkshop } from '@/db/client';
import { auditEvent, idempotencyKey, outbox } from '@/db/schema/records';
import { newId } from '@/db/schema/new-id';
import { type Credentials, loadActor } from '@/lib/auth/load-actor';
import type { Actor } from '@/lib/auth/actor';
import { type FieldProblem, Refusal } from './problem';
import { refusalFrom } from './refusal-from-fault';
import type { Command, CommandContext, Errand, Open, Query, UseCase } from './use-case';

export interface Request {
  readonly credentials: Credentials | null;
  readonly input: unknown;
  readonly requestId: string;
  readonly idempotencyKey: string | null;
  /** Where it came from, for the rate limits of what needs no sign-in. */
  readonly address?: string;
}

export interface Performed<T> {
  readonly output: T;
  /** The stored answer of an earlier request with the same key. */
  readonly replayed: boolean;
}

/** An errand's key is held this long; after a crash another attempt may take it over. */
const LEASE_MS = 60_000;

export function perform<U extends UseCase>(useCase: U, request: Request): Promise<Performed<z.output<U['output']>>>;
export async function perform(useCase: UseCase, request: Request): Promise<Performed<unknown>> {
  try {
    if (useCase.type === 'open') {
      const output = await useCase.run({
        input: parseInput(useCase, request.input),
        requestId: request.requestId,
        address: request.address ?? 'unknown',
      });
      return { output, replayed: false };
    }
    if (!request.credentials) throw new Refusal('signed-out', 'Sign in, or send a bearer token.');
    const input = parseInput(useCase, request.input);
    switch (useCase.type) {
      case 'query':
        return { output: await runQuery(useCase, request.credentials, input), replayed: false };
      case 'command':
        return await runCommand(useCase, request.credentials, input, request);
      case 'errand':
        return await runErrand(useCase, request.credentials, input, request);
    }
  } catch (error) {
    throw refusalFrom(error) ?? error;
  }
}

function parseInput(useCase: UseCase, raw: unknown): unknown {
  const parsed = useCase.input.safeParse(raw);
  if (parsed.success) return parsed.data;
  const errors: FieldProblem[] = parsed.error.issues.slice(0, 50).map((issue) => ({
    pointer: issue.path.length ? `/${issue.path.map(String).join('/')}` : '',
    code: issue.code,
    detail: issue.message,
  }));
  const first = errors[0];
  const where = first?.pointer ? `${first.pointer.slice(1)}: ` : '';
  throw new Refusal('input.invalid', first ? `${where}${first.detail}` : 'The input is not as described.', { errors });
}

function authorise(useCase: Exclude<UseCase, Open>, actor: Actor): void {
  if (useCase.type !== 'query' && !actor.mayWrite) {
    throw new Refusal('not-allowed', 'This API token may only read.');
  }
  const { roles } = useCase;
  if (roles !== 'everyone' && !roles.some((role) => actor.roles.includes(role))) {
    throw new Refusal('not-allowed', `This needs the role ${roles.join(' or ')}; you are ${actor.roles.join(', ')}.`);
  }
}

function runQuery(useCase: Query, credentials: Credentials, input: unknown): Promise<unknown> {
  return withWorkshop(
    credentials.workshopId,
    async (tx) => {
      const actor = await loadActor(tx, credentials);
      authorise(useCase, actor);
      return useCase.run({ tx, actor, input });
    },
    { readOnly: true },
  );
}

/** What a command gathers while it runs; written in the same transaction right after. */
function commandContext(tx: Tx, actor: Actor, input: unknown, requestId: string, requestKey: string) {
  const records: { subjectId: string; detail: Record<string, unknown> }[] = [];
  const context: CommandContext<unknown> = {
    tx,
    actor,
    input,
    requestId,
    requestKey,
    record: (subjectId, detail = {}) => void records.push({ subjectId, detail }),
    enqueue: async (job) => {
      await tx.insert(outbox).values({
        workshopId: actor.workshopId,
        queue: job.queue,
        payload: job.payload,
        ...(job.runAfter ? { runAfter: job.runAfter } : {}),
      });
    },
  };
  const writeAudit = async (command: string): Promise<void> => {
    const rows = records.length ? records : [{ subjectId: null, detail: {} }];
    await tx.insert(auditEvent).values(
      rows.map((row) => ({
        workshopId: actor.workshopId,
        personId: actor.personId,
        command,
        subjectId: row.subjectId,
        detail: row.detail,
        requestId,
      })),
    );
  };
  return { context, writeAudit };
}

function requestKeyOf(useCase: UseCase, actor: Actor, request: Request): string {
  return request.idempotencyKey === null
    ? `${useCase.name}:${request.requestId}`
    : `${useCase.name}:${actor.personId}:${request.idempotencyKey}`;
}

function runCommand(
  useCase: Command,
  credentials: Credentials,
  input: unknown,
  request: Request,
): Promise<Performed<unknown>> {
  return withWorkshop(credentials.workshopId, async (tx) => {
    const actor = await loadActor(tx, credentials);
    authorise(useCase, actor);
    if (request.idempotencyKey !== null) {
      const claimed = await claim(tx, useCase, actor, request.idempotencyKey, bodyHash(request.input));
      if (claimed.state === 'done') return { output: claimed.answer, replayed: true };
    }
    const { context, writeAudit } = commandContext(
      tx,
      actor,
      input,
      request.requestId,
      requestKeyOf(useCase, actor, request),
    );
    const output = await useCase.run(context);
    await writeAudit(useCase.name);
    if (request.idempotencyKey !== null) await answer(tx, useCase, actor, request.idempotencyKey, output);
    return { output, replayed: false };
  });
}

async function runErrand(
  useCase: Errand,
  credentials: Credentials,
  input: unknown,
  request: Request,
): Promise<Performed<unknown>> {
  const key = request.idempotencyKey;
  const { actor, claimed } = await withWorkshop(credentials.workshopId, async (tx) => {
    const loaded = await loadActor(tx, credentials);
    authorise(useCase, loaded);
    return {
      actor: loaded,
      claimed: key === null ? null : await claim(tx, useCase, loaded, key, bodyHash(request.input)),
    };
  });
  if (claimed?.state === 'done') return { output: claimed.answer, replayed: true };
  const requestKey = requestKeyOf(useCase, actor, request);
  let steps = 0;
  try {
    const output = await useCase.run({
      actor,
      input,
      requestId: request.requestId,
      requestKey,
      step: (run) => {
        steps += 1;
        const stepKey = `${requestKey}#${steps}`;
        return withWorkshop(actor.workshopId, async (tx) => {
          const { context, writeAudit } = commandContext(tx, actor, input, request.requestId, stepKey);
          const result = await run(context);
          await writeAudit(useCase.name);
          return result;
        });
      },
    });
    if (key !== null) await withWorkshop(actor.workshopId, (tx) => answer(tx, useCase, actor, key, output));
    return { output, replayed: false };
  } catch (error) {
    // A refused errand frees its key, so that the person may mend the cause and press again.
    if (key !== null) {
      await withWorkshop(actor.workshopId, (tx) => tx.delete(idempotencyKey).where(keyIs(useCase, actor, key)));
    }
    throw error;
  }
}

function keyIs(useCase: UseCase, actor: Actor, key: string) {
  return and(
    eq(idempotencyKey.workshopId, actor.workshopId),
    eq(idempotencyKey.personId, actor.personId),
    eq(idempotencyKey.command, useCase.name),
    eq(idempotencyKey.key, key),
  );
}

type Claim = { state: 'mine' } | { state: 'done'; answer: unknown };

/** Same key and body: the first answer again. Same key, other body: 422. Still running: 409. (IETF draft on the Idempotency-Key header.) */
async function claim(tx: Tx, useCase: UseCase, actor: Actor, key: string, hash: string): Promise<Claim> {
  if (key.length < 1 || key.length > 200)
    throw new Refusal('input.invalid', 'Idempotency-Key must have 1 to 200 characters.');
  const lockName = `${actor.workshopId}:${actor.personId}:${useCase.name}:${key}`;
  // Held to the end of the transaction: a second request with this key doesn't wait, it is told.
  const lock = await tx.execute<{ taken: boolean }>(
    sql`select pg_try_advisory_xact_lock(hashtextextended(${lockName}, 0)) as taken`,
  );
  if (!lock.rows[0]?.taken)
    throw new Refusal('request.running', 'The same request is still running; ask again in a moment.');
  const leaseUntil = new Date(Date.now() + LEASE_MS);
  const made = await tx
    .insert(idempotencyKey)
    .values({
      workshopId: actor.workshopId,
      personId: actor.personId,
      command: useCase.name,
      key,
      bodyHash: hash,
      state: 'running',
      leaseUntil,
    })
    .onConflictDoNothing()
    .returning({ key: idempotencyKey.key });
  if (made.length) return { state: 'mine' };
  const [held] = await tx
    .select()
    .from(idempotencyKey)
    .where(keyIs(useCase, actor, key));
  if (!held) return { state: 'mine' };
  if (held.bodyHash !== hash)
    throw new Refusal('key.reused', 'This Idempotency-Key was used for another request. Nothing was changed.');
  if (held.state === 'done') return { state: 'done', answer: held.answer };
  if (held.leaseUntil.getTime() > Date.now())
    throw new Refusal('request.running', 'The same request is still running; ask again in a moment.');
  await tx
    .update(idempotencyKey)
    .set({ leaseUntil })
    .where(keyIs(useCase, actor, key));
  return { state: 'mine' };
}

async function answer(tx: Tx, useCase: UseCase, actor: Actor, key: string, output: unknown): Promise<void> {
  await tx
    .update(idempotencyKey)
    .set({ state: 'done', answer: output === undefined ? null : output })
    .where(keyIs(useCase, actor, key));
}

function bodyHash(input: unknown): string {
  const hash = createHash('sha256');
  const feed = (value: unknown): void => {
    if (value instanceof Uint8Array) hash.update('bytes:').update(value);
    else if (Array.isArray(value)) {
      hash.update('[');
      for (const item of value) feed(item);
      hash.update(']');
    } else if (value !== null && typeof value === 'object') {
      hash.update('{');
      for (const [name, item] of Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1))) {
        hash.update(`${name}:`);
        feed(item);
      }
      hash.update('}');
    } else hash.update(`${JSON.stringify(value) ?? 'undefined'},`);
  };
  feed(input);
  return hash.digest('hex');
}

/** For log lines and idempotency of work that has no request of its own. */
export const newRequestId = (): string => newId();
