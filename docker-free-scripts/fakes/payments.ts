/**
 * The payment provider's HTTP interface: authentication, version, form-encoded parameters, idempotency keys, and the
 * few resources that an order paid by card needs. What a payment does is in payment-rules.ts.
 */
import { createHash, randomBytes } from 'node:crypto';
import type { Configuration } from './configuration';
import { type Answer, type Call, json } from './http';
import { type Form, formFrom } from './payment-form';
import { readRefund, readSession } from './payment-parameters';
import { type Origin, PaymentRefusal, type PaymentRules, missing } from './payment-rules';
import { API_VERSION, chargeShape, intentShape, listShape, refundShape, sessionShape } from './payment-shapes';

export type Remembered = {
  fingerprint: string;
  atMs: number;
  originalRequest: string;
  answer: { status: number; body: string } | null;
};

const MOST_BODY_BYTES = 100_000;
// The provider forgets a key after at least a day.
const KEY_LIFE_MS = 24 * 3_600_000;
const MOST_KEYS = 10_000;
const MOST_KEY_CHARACTERS = 255;

export class Payments {
  private readonly configuration: Configuration;
  private readonly rules: PaymentRules;
  private keys: Map<string, Remembered>;
  private readonly changed: () => void;

  constructor(
    configuration: Configuration,
    rules: PaymentRules,
    savedKeys: Record<string, Remembered>,
    changed: () => void,
  ) {
    this.configuration = configuration;
    this.rules = rules;
    // A request that was under way when the process died did nothing that lasts: its key is free again.
    this.keys = new Map(Object.entries(savedKeys).filter(([, remembered]) => remembered.answer));
    this.changed = changed;
  }

  savedKeys(): Record<string, Remembered> {
    return Object.fromEntries(this.keys);
  }

  forgetKeys(): void {
    this.keys.clear();
  }

  /** Answers /v1/…; `trouble` runs after the key is claimed and may delay, and a non-null result is answered instead of the work. */
  async handle(call: Call, trouble: () => Promise<Answer | null>): Promise<Answer> {
    const requestId = `req_${randomBytes(8).toString('hex')}`;
    try {
      const answer =
        call.method === 'POST' ? await this.post(call, requestId, trouble) : ((await trouble()) ?? this.get(call));
      return { ...answer, headers: { 'request-id': requestId, 'stripe-version': API_VERSION, ...answer.headers } };
    } catch (error) {
      if (!(error instanceof PaymentRefusal)) throw error;
      return { ...refusal(error), headers: { 'content-type': 'application/json', 'request-id': requestId } };
    }
  }

  private admit(call: Call): void {
    const given = /^Bearer (.+)$/.exec(call.headers.authorization ?? '')?.[1];
    if (!given)
      throw new PaymentRefusal(
        401,
        'You did not provide an API key. You need to provide your API key in the Authorization header, using Bearer auth.',
      );
    if (!given.startsWith('sk_test_fake_'))
      throw new PaymentRefusal(
        401,
        'This is a local stand-in and refuses keys that look real. If that key is real, replace it: it has been sent in the clear.',
      );
    if (given !== this.configuration.paymentKey) throw new PaymentRefusal(401, 'Invalid API Key provided.');
    const version = call.headers['stripe-version'];
    if (version !== undefined && version !== API_VERSION)
      throw new PaymentRefusal(
        400,
        `Invalid Stripe API version: ${String(version)}. The stand-in speaks ${API_VERSION}.`,
      );
  }

  private get(call: Call): Answer {
    this.admit(call);
    const expand = new Set([...call.query].filter(([name]) => /^expand\[\d*\]$/.test(name)).map(([, value]) => value));
    const [, , resource, second, third, fourth] = call.path.split('/');
    if (fourth !== undefined) throw unknownUrl(call);
    if (resource === 'checkout' && second === 'sessions' && third) {
      const session = this.rules.getSession(third);
      const intent =
        session.intentId && expand.has('payment_intent')
          ? intentShape(this.rules.getIntent(session.intentId), session)
          : null;
      return json(200, sessionShape(session, intent));
    }
    if (third !== undefined) throw unknownUrl(call);
    if (resource === 'payment_intents' && second) return json(200, this.intent(second, expand.has('latest_charge')));
    if (resource === 'charges' && second) return json(200, this.charge(second));
    if (resource === 'refunds' && second) return json(200, this.refund(second));
    if (resource === 'refunds')
      return json(200, this.list('/v1/refunds', this.refundsOf(call.query.get('payment_intent')), call.query));
    if (resource === 'events' && second) return json(200, { ...this.rules.getEvent(second) });
    if (resource === 'events') {
      const type = call.query.get('type');
      const events = Object.values(this.rules.state.events).filter((event) => type === null || event.type === type);
      return json(
        200,
        this.list(
          '/v1/events',
          events.toReversed().map((event) => ({ ...event })),
          call.query,
        ),
      );
    }
    throw unknownUrl(call);
  }

  private async post(call: Call, requestId: string, trouble: () => Promise<Answer | null>): Promise<Answer> {
    this.admit(call);
    const body = (await call.body(MOST_BODY_BYTES)).toString('utf8');
    const key = call.headers['idempotency-key'];
    if (typeof key !== 'string' || key === '')
      return (await trouble()) ?? this.change(call, formFrom(body), { requestId, idempotencyKey: null });
    if (key.length > MOST_KEY_CHARACTERS)
      throw new PaymentRefusal(400, `Idempotency keys may have at most ${MOST_KEY_CHARACTERS} characters.`, {
        type: 'idempotency_error',
      });

    const fingerprint = createHash('sha256').update(`${call.path}\n${body}`).digest('hex');
    this.dropOldKeys();
    const before = this.keys.get(key);
    if (before) {
      if (before.fingerprint !== fingerprint) {
        throw new PaymentRefusal(
          400,
          `Keys for idempotent requests can only be used with the same parameters they were first used with. Try using a key other than '${key}' if you meant to execute a different request.`,
          { type: 'idempotency_error' },
        );
      }
      if (!before.answer) {
        throw new PaymentRefusal(
          409,
          `There is currently another in-progress request using this Idempotency Key (${key}).`,
          { type: 'idempotency_error', code: 'idempotency_key_in_use' },
        );
      }
      return {
        ...before.answer,
        headers: {
          'content-type': 'application/json',
          'idempotency-key': key,
          'idempotent-replayed': 'true',
          'original-request': before.originalRequest,
        },
      };
    }
    const claim: Remembered = { fingerprint, atMs: Date.now(), originalRequest: requestId, answer: null };
    this.keys.set(key, claim);
    try {
      const troubled = await trouble();
      if (troubled) {
        // Trouble before the work leaves nothing to replay, so that the same key succeeds later.
        this.keys.delete(key);
        return troubled;
      }
      const answer = this.change(call, formFrom(body), { requestId, idempotencyKey: key });
      claim.answer = { status: answer.status, body: String(answer.body) };
      this.changed();
      return { ...answer, headers: { ...answer.headers, 'idempotency-key': key } };
    } catch (error) {
      // A request whose parameters were refused, or whose connection was cut before the work, keeps no result either.
      this.keys.delete(key);
      throw error;
    }
  }

  private change(call: Call, form: Form, origin: Origin): Answer {
    const parts = call.path.split('/').slice(2);
    const answer = this.changeOf(parts, call, form, origin);
    this.changed();
    return answer;
  }

  private changeOf(parts: string[], call: Call, form: Form, origin: Origin): Answer {
    const [resource, second, third, fourth] = parts;
    if (resource === 'checkout' && second === 'sessions' && third === undefined) {
      return json(200, sessionShape(this.rules.createSession(readSession(form), `http://${call.host}`)));
    }
    if (resource === 'checkout' && second === 'sessions' && third && fourth === 'expire' && parts.length === 4)
      return json(200, sessionShape(this.rules.expireSession(third, origin)));
    if (resource === 'refunds' && second === undefined) {
      const refund = this.rules.refund(readRefund(form), origin);
      return json(200, this.refund(refund.id));
    }
    throw unknownUrl(call);
  }

  private intent(id: string, withCharge: boolean): Record<string, unknown> {
    const intent = this.rules.getIntent(id);
    const session = this.rules.getSession(intent.sessionId);
    const charge = withCharge && intent.latestChargeId ? this.charge(intent.latestChargeId) : null;
    return intentShape(intent, session, charge);
  }

  private charge(id: string): Record<string, unknown> {
    const charge = this.rules.getCharge(id);
    const intent = this.rules.getIntent(charge.intentId);
    return chargeShape(charge, intent, this.rules.getSession(intent.sessionId));
  }

  private refund(id: string): Record<string, unknown> {
    const refund = this.rules.getRefund(id);
    const intent = this.rules.getIntent(this.rules.getCharge(refund.chargeId).intentId);
    return refundShape(refund, intent, this.rules.getSession(intent.sessionId));
  }

  private refundsOf(intentId: string | null): Record<string, unknown>[] {
    const refunds = Object.values(this.rules.state.refunds).filter(
      (refund) => intentId === null || this.rules.getCharge(refund.chargeId).intentId === intentId,
    );
    return refunds.toReversed().map((refund) => this.refund(refund.id));
  }

  // Newest first, continued with starting_after, as the provider's lists are.
  private list(url: string, all: Record<string, unknown>[], query: URLSearchParams): Record<string, unknown> {
    const limit = Number(query.get('limit') ?? 10);
    if (!Number.isInteger(limit) || limit < 1 || limit > 100)
      throw new PaymentRefusal(400, 'limit must be from 1 to 100', { param: 'limit' });
    const after = query.get('starting_after');
    const from = after === null ? 0 : all.findIndex((item) => item.id === after) + 1;
    if (after !== null && from === 0) throw missing('object', after, 'starting_after');
    return listShape(url, all.slice(from, from + limit), all.length > from + limit);
  }

  private dropOldKeys(): void {
    const oldest = Date.now() - KEY_LIFE_MS;
    for (const [key, remembered] of this.keys) {
      if (remembered.atMs >= oldest && this.keys.size <= MOST_KEYS) break;
      this.keys.delete(key);
    }
  }
}

/** Trouble as the provider words it. */
export function paymentTrouble(status: number): Answer {
  if (status === 429)
    return json(
      429,
      { error: { type: 'invalid_request_error', code: 'rate_limit', message: 'Request rate limit exceeded.' } },
      { 'retry-after': '0' },
    );
  return json(status, { error: { type: 'api_error', message: 'Something went wrong on our end.' } });
}

function refusal(error: PaymentRefusal): Answer {
  return json(error.status, { error: { ...error.detail, message: error.message } });
}

function unknownUrl(call: Call): PaymentRefusal {
  return new PaymentRefusal(
    404,
    `Unrecognized request URL (${call.method}: ${call.path}). The stand-in knows checkout sessions, payment intents, charges, refunds and events.`,
  );
}
