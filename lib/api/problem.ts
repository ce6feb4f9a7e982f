/**
 * Refusals and how they leave the server: RFC 9457 problem details. Every expected failure has a code of one closed
 * union; the table below gives each its status and title, so a code without them doesn't compile.
 */

const PROBLEMS = {
  'input.unreadable': { status: 400, title: 'The request can’t be read' },
  'input.invalid': { status: 400, title: 'Something in the input is not right' },
  'signed-out': { status: 401, title: 'Sign in first' },
  'not-allowed': { status: 403, title: 'Your roles don’t allow this' },
  'not-found': { status: 404, title: 'There is no such thing here' },
  'method-unknown': { status: 405, title: 'This address does not take that method' },
  conflict: { status: 409, title: 'Something changed in between' },
  'state.refused': { status: 409, title: 'It is not in a state for that' },
  'request.running': { status: 409, title: 'The same request is still running' },
  'version.stale': { status: 412, title: 'Somebody changed it since you looked' },
  'too-large': { status: 413, title: 'Too large' },
  'key.reused': { status: 422, title: 'This idempotency key was used for another request' },
  'rule.forbids': { status: 422, title: 'A rule forbids this' },
  'list.unreadable': { status: 422, title: 'The parts list can’t be read' },
  'list.unsettled': { status: 422, title: 'The parts list has open questions' },
  'stock.short': { status: 422, title: 'There is not enough on the shelf' },
  'name.taken': { status: 409, title: 'That name is taken' },
  'payment.refused': { status: 422, title: 'The payment was not accepted' },
  'service.away': { status: 503, title: 'A service we need does not answer' },
  'database.away': { status: 503, title: 'The database does not answer' },
  'too-many': { status: 429, title: 'Too many tries' },
  bug: { status: 500, title: 'Our mistake' },
} as const satisfies Record<string, { status: number; title: string }>;

export type ProblemCode = keyof typeof PROBLEMS;

export interface FieldProblem {
  /** JSON pointer into the input, or a place in a file such as `row 7, column C`. */
  readonly pointer: string;
  readonly code: string;
  readonly detail: string;
}

export interface ProblemDetails {
  readonly type: string;
  readonly title: string;
  readonly status: number;
  readonly detail: string;
  readonly instance: string;
  readonly code: ProblemCode;
  readonly requestId: string;
  readonly errors?: readonly FieldProblem[];
  /** More about it for a program: the current version, the shortfalls, the row and cure. */
  readonly more?: unknown;
}

/** An expected refusal. `detail` is a sentence a storekeeper understands; the inner message is for the log. */
export class Refusal extends Error {
  readonly code: ProblemCode;
  readonly detail: string;
  readonly errors: readonly FieldProblem[] | undefined;
  readonly more: unknown;

  constructor(
    code: ProblemCode,
    detail: string,
    options: { errors?: readonly FieldProblem[]; more?: unknown; cause?: unknown; inner?: string } = {},
  ) {
    super(options.inner ?? `${code}: ${detail}`, { cause: options.cause });
    this.name = 'Refusal';
    this.code = code;
    this.detail = detail;
    this.errors = options.errors;
    this.more = options.more;
  }
}

/** Absent and not-yours read the same, so that ids can't be probed. */
export function notFound(what: string): Refusal {
  return new Refusal('not-found', `There is no such ${what} in this workshop.`);
}

export function problemDetails(refusal: Refusal, requestId: string, instance: string): ProblemDetails {
  const { status, title } = PROBLEMS[refusal.code];
  return {
    type: `/problems/${refusal.code.replaceAll('.', '-')}`,
    title,
    status,
    detail: refusal.detail,
    instance,
    code: refusal.code,
    requestId,
    ...(refusal.errors ? { errors: refusal.errors } : {}),
    ...(refusal.more === undefined ? {} : { more: refusal.more }),
  };
}

export function problemResponse(refusal: Refusal, requestId: string, instance: string): Response {
  const details = problemDetails(refusal, requestId, instance);
  const headers = new Headers({
    'content-type': 'application/problem+json',
    'cache-control': 'no-store',
    'x-request-id': requestId,
  });
  if (details.status === 503) headers.set('retry-after', '5');
  if (details.status === 429) headers.set('retry-after', '60');
  return new Response(JSON.stringify(details), { status: details.status, headers });
}
