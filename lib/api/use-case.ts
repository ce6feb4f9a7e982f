/**
 * The one definition per verb. A use case says who may do it, with what input, and how; the route, authorisation,
 * validation, idempotency, audit, OpenAPI entry, client hook and authorisation-matrix test all follow from it.
 *
 * query    reads, in one read-only transaction
 * command  changes, in one transaction that also holds the idempotency key, the audit row and the outbox rows
 * open     before anybody signed in (links, invitations)
 * errand   a command that must call a service between transactions (payments, uploads); each step is its own
 *          transaction, the key is claimed before the first and answered after the last
 */
import type { z } from 'zod';
import type { Tx } from '@/db/client';
import type { Actor, Role } from '@/lib/auth/actor';

export type HttpMethod = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
/** Method and path below /api/v1, such as `POST /batches/{batchId}/reserve`. */
export type Endpoint = `${HttpMethod} /${string}`;

/** `everyone`: any signed-in member of the workshop. */
export type Policy = readonly Role[] | 'everyone';

/** Queues of the job process; `queue` names one and its payload is checked there. */
export interface Job {
  readonly queue:
    | 'send-mail'
    | 'match-revision'
    | 'match-stock-changed'
    | 'read-upload'
    | 'payment-event'
    | 'send-order'
    | 'refund-payment';
  readonly payload: Record<string, unknown>;
  readonly runAfter?: Date;
}

export interface QueryContext<Input> {
  readonly tx: Tx;
  readonly actor: Actor;
  readonly input: Input;
}

export interface CommandContext<Input> extends QueryContext<Input> {
  readonly requestId: string;
  /** Names this request for everything it writes once: command, then idempotency key or request id. */
  readonly requestKey: string;
  /** Writes a job to the outbox in this transaction. */
  enqueue(job: Job): Promise<void>;
  /** What the audit row says beside actor and command. */
  record(subjectId: string, detail?: Record<string, unknown>): void;
}

export interface ErrandContext<Input> {
  readonly actor: Actor;
  readonly input: Input;
  readonly requestId: string;
  readonly requestKey: string;
  /** One short transaction; call services only outside of it. */
  step<T>(run: (context: CommandContext<Input>) => Promise<T>): Promise<T>;
}

interface Definition<Name extends string, At extends Endpoint, In extends z.ZodType, Out extends z.ZodType> {
  /** `area.verb`, as in the audit log. */
  readonly name: Name;
  readonly http: At;
  /** One sentence for the API reference. */
  readonly summary: string;
  readonly roles: Policy;
  readonly input: In;
  readonly output: Out;
  /** Also takes multipart/form-data: files reach the input as {name, bytes}. Largest body in bytes; JSON is 1 MiB otherwise. */
  readonly multipartLimitBytes?: number;
}

export interface Query<
  Name extends string = string,
  At extends Endpoint = Endpoint,
  In extends z.ZodType = z.ZodType,
  Out extends z.ZodType = z.ZodType,
> extends Definition<Name, At, In, Out> {
  readonly type: 'query';
  run(context: QueryContext<z.output<In>>): Promise<z.input<Out>>;
}

export interface Command<
  Name extends string = string,
  At extends Endpoint = Endpoint,
  In extends z.ZodType = z.ZodType,
  Out extends z.ZodType = z.ZodType,
> extends Definition<Name, At, In, Out> {
  readonly type: 'command';
  run(context: CommandContext<z.output<In>>): Promise<z.input<Out>>;
}

export interface Errand<
  Name extends string = string,
  At extends Endpoint = Endpoint,
  In extends z.ZodType = z.ZodType,
  Out extends z.ZodType = z.ZodType,
> extends Definition<Name, At, In, Out> {
  readonly type: 'errand';
  run(context: ErrandContext<z.output<In>>): Promise<z.input<Out>>;
}

/** What a person may do before signing in: ask for a link, accept an invitation. No workshop is known; `run` opens the auth scope itself. */
export interface Open<
  Name extends string = string,
  At extends Endpoint = Endpoint,
  In extends z.ZodType = z.ZodType,
  Out extends z.ZodType = z.ZodType,
> extends Omit<Definition<Name, At, In, Out>, 'roles'> {
  readonly type: 'open';
  readonly roles: 'anyone';
  run(context: {
    readonly input: z.output<In>;
    readonly requestId: string;
    readonly address: string;
  }): Promise<z.input<Out>>;
}

export type UseCase = Query | Command | Errand | Open;

type Body<T> = Omit<T, 'type'>;

export function query<Name extends string, At extends Endpoint, In extends z.ZodType, Out extends z.ZodType>(
  definition: Body<Query<Name, At, In, Out>>,
): Query<Name, At, In, Out> {
  return { ...definition, type: 'query' };
}

export function command<Name extends string, At extends Endpoint, In extends z.ZodType, Out extends z.ZodType>(
  definition: Body<Command<Name, At, In, Out>>,
): Command<Name, At, In, Out> {
  return { ...definition, type: 'command' };
}

export function errand<Name extends string, At extends Endpoint, In extends z.ZodType, Out extends z.ZodType>(
  definition: Body<Errand<Name, At, In, Out>>,
): Errand<Name, At, In, Out> {
  return { ...definition, type: 'errand' };
}

export function open<Name extends string, At extends Endpoint, In extends z.ZodType, Out extends z.ZodType>(
  definition: Omit<Open<Name, At, In, Out>, 'type' | 'roles'>,
): Open<Name, At, In, Out> {
  return { ...definition, type: 'open', roles: 'anyone' };
}
