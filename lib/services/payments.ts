/**
 * Card payments and refunds through Stripe; the only file that imports its SDK. Expected failures are values, never
 * thrown. It decides nothing: the signed event says that an order is paid, and the use case fetches the session again.
 */
import 'server-only';
import Stripe from 'stripe';
import { z } from 'zod';
import { environment } from './environment';

export type PaymentFailure = {
  ok: false;
  /**
   * refused: the provider will never take this request as it is; conflict: the idempotency key belongs to another
   * request; busy: too many requests, try later; unreachable: no answer, the work may or may not be done, repeat with
   * the same key; misconfigured: our key is not accepted; not-found: no such session or payment.
   */
  reason: 'refused' | 'conflict' | 'busy' | 'unreachable' | 'misconfigured' | 'not-found';
  /** The provider's code, such as amount_too_small, where it gave one. */
  code: string | null;
  /** For the log and the lead; may name ids but never a key. */
  message: string;
};

export type Checkout = {
  id: string;
  /** Where the person pays; null once that is over. */
  url: string | null;
  status: 'open' | 'complete' | 'expired';
  isPaid: boolean;
  amountMinor: number;
  /** ISO 4217, upper case. */
  currency: string;
  orderId: string | null;
  attempt: number | null;
  /** Our own ids, as given when it was made. */
  metadata: Readonly<Record<string, string>>;
  /** Null until a card was tried. */
  paymentIntentId: string | null;
  expiresAt: Date;
};

export type CheckoutRequest = {
  orderId: string;
  /** 1 for the first try of an order, counted on when a session expired or was given up. */
  attempt: number;
  amountMinor: number;
  currency: string;
  /** The supplier's connected account, acct_…. */
  supplierAccount: string;
  description: string;
  /** May hold {CHECKOUT_SESSION_ID}. Reaching it proves nothing. */
  successUrl: string;
  cancelUrl: string;
  /** One per order and attempt, so that a double click makes one session. */
  idempotencyKey: string;
  /** Ids of ours that come back with the session and every event about it. */
  metadata?: Readonly<Record<string, string>>;
};

/** Worth pressing again, or trying again from a job with the same key. */
export const isPassing = (failure: PaymentFailure): boolean =>
  failure.reason === 'busy' || failure.reason === 'unreachable';

/** Opens a page where an order is paid by card, the money passed on to the supplier's account. */
export async function createCheckout(
  request: CheckoutRequest,
): Promise<{ ok: true; checkout: Checkout } | PaymentFailure> {
  const about = { ...request.metadata, order_id: request.orderId, attempt: String(request.attempt) };
  return attempt(async (stripe) => {
    const session = await stripe.checkout.sessions.create(
      {
        mode: 'payment',
        line_items: [
          {
            quantity: 1,
            price_data: {
              currency: request.currency.toLowerCase(),
              unit_amount: request.amountMinor,
              product_data: { name: request.description },
            },
          },
        ],
        success_url: request.successUrl,
        cancel_url: request.cancelUrl,
        client_reference_id: request.orderId,
        metadata: about,
        payment_intent_data: {
          description: request.description,
          metadata: about,
          transfer_data: { destination: request.supplierAccount },
        },
      },
      { idempotencyKey: request.idempotencyKey },
    );
    return { ok: true, checkout: checkoutFrom(session) };
  });
}

/** The session as the provider has it now. Fetch it before acting on an event: events come late, twice and out of order. */
export async function retrieveCheckout(id: string): Promise<{ ok: true; checkout: Checkout } | PaymentFailure> {
  return attempt(async (stripe) => ({ ok: true, checkout: checkoutFrom(await stripe.checkout.sessions.retrieve(id)) }));
}

/** Closes an open page so that nobody pays for an order that was withdrawn. `refused` if it is paid or closed already. */
export async function expireCheckout(id: string): Promise<{ ok: true; checkout: Checkout } | PaymentFailure> {
  return attempt(async (stripe) => ({ ok: true, checkout: checkoutFrom(await stripe.checkout.sessions.expire(id)) }));
}

export type RefundRequest = {
  paymentIntentId: string;
  /** At least 1; all refunds of a payment together may not exceed it. */
  amountMinor: number;
  /** One per decision to refund: a repeat with it gives money back once. */
  idempotencyKey: string;
  /** Takes the money back from the supplier's account instead of ours. */
  reverseTransfer: boolean;
};

export type Refund = {
  id: string;
  amountMinor: number;
  currency: string;
  status: 'pending' | 'requires_action' | 'succeeded' | 'failed' | 'canceled';
};

/** Gives back part or all of a payment: a short delivery, a cancelled line. */
export async function refund(request: RefundRequest): Promise<{ ok: true; refund: Refund } | PaymentFailure> {
  return attempt(async (stripe) => {
    const made = await stripe.refunds.create(
      {
        payment_intent: request.paymentIntentId,
        amount: request.amountMinor,
        reverse_transfer: request.reverseTransfer,
      },
      { idempotencyKey: request.idempotencyKey },
    );
    return {
      ok: true,
      refund: {
        id: made.id,
        amountMinor: made.amount,
        currency: made.currency.toUpperCase(),
        status: refundStatus.parse(made.status),
      },
    };
  });
}

export type PaymentEvent = {
  /** Store it first, under a unique key: the same event comes more than once. */
  id: string;
  type: string;
  createdAt: Date;
  /** The ids the event is about, where it is about such. */
  checkoutId: string | null;
  paymentIntentId: string | null;
  /** The whole event for the inbox. */
  body: Record<string, unknown>;
};

export type WebhookRefusal = {
  ok: false;
  reason: 'unsigned' | 'forged' | 'stale' | 'from-the-future' | 'unreadable' | 'wrong-mode';
  message: string;
};

/**
 * Believes a webhook or says why not; answer 400 for every refusal. `rawBody` is the text as it came (req.text()):
 * parsed and written again it no longer fits its signature.
 */
export function verifyWebhook(
  rawBody: string,
  signature: string | null,
): { ok: true; event: PaymentEvent } | WebhookRefusal {
  if (!signature) return webhookRefusal('unsigned', 'no stripe-signature header');
  const { secretKey, webhookSecret } = environment().payments;
  let believed: unknown;
  try {
    believed = client().webhooks.constructEvent(rawBody, signature, webhookSecret, TOLERANCE_SECONDS);
  } catch (error) {
    // An empty v1= makes the SDK throw a plain Error, so nothing is told apart by class.
    const message = messageOf(error).split('\n')[0] ?? '';
    if (message.includes('tolerance')) return webhookRefusal('stale', message);
    return error instanceof SyntaxError ? webhookRefusal('unreadable', message) : webhookRefusal('forged', message);
  }
  // The SDK refuses an old time but takes any later one, which would let a captured message be kept for years.
  const seconds = Number(/(?:^|,)\s*t=(\d{1,12})/.exec(signature)?.[1] ?? Number.NaN);
  if (!(seconds <= Date.now() / 1000 + CLOCK_SKEW_SECONDS))
    return webhookRefusal('from-the-future', `signed for ${seconds}`);
  const parsed = eventShape.safeParse(believed);
  if (!parsed.success) return webhookRefusal('unreadable', 'the body is not an event');
  const { data, ...event } = parsed.data;
  if (event.livemode !== LIVE_KEY.test(secretKey)) return webhookRefusal('wrong-mode', `livemode ${event.livemode}`);
  const { object } = data;
  return {
    ok: true,
    event: {
      id: event.id,
      type: event.type,
      createdAt: new Date(event.created * 1000),
      checkoutId: object.object === 'checkout.session' ? (object.id ?? null) : null,
      paymentIntentId: object.object === 'payment_intent' ? (object.id ?? null) : (object.payment_intent ?? null),
      body: parsed.data,
    },
  };
}

const TOLERANCE_SECONDS = 300;
const CLOCK_SKEW_SECONDS = 60;
const REQUEST_LIMIT_MS = 15_000;
// The SDK repeats a dropped connection and 5xx by itself, but not 429.
const SDK_RETRIES = 2;
const BUSY_DELAYS_MS = [250, 500, 1_000, 2_000];
const LONGEST_ASKED_DELAY_MS = 5_000;
const LIVE_KEY = /^[sr]k_live_/;

const refundStatus = z.enum(['pending', 'requires_action', 'succeeded', 'failed', 'canceled']);
const checkoutStatus = z.enum(['open', 'complete', 'expired']);
const idOrObject = z.union([z.string(), z.object({ id: z.string() }).transform((value) => value.id)]).nullish();
const eventShape = z.looseObject({
  id: z.string().startsWith('evt_'),
  type: z.string().min(1),
  created: z.number().int(),
  livemode: z.boolean(),
  data: z.looseObject({
    object: z.looseObject({ id: z.string().optional(), object: z.string(), payment_intent: idOrObject }),
  }),
});

let made: Stripe | undefined;

function client(): Stripe {
  if (made) return made;
  const { secretKey, api } = environment().payments;
  made = new Stripe(secretKey, {
    ...(api ?? {}),
    // Telemetry would be kept in the home folder.
    telemetry: false,
    maxNetworkRetries: SDK_RETRIES,
    timeout: REQUEST_LIMIT_MS,
  });
  return made;
}

/** Runs one request; waits and repeats a bounded number of times while the provider says it is busy. */
async function attempt<Success extends { ok: true }>(
  request: (stripe: Stripe) => Promise<Success>,
): Promise<Success | PaymentFailure> {
  for (const delayMs of [...BUSY_DELAYS_MS, null]) {
    try {
      return await request(client());
    } catch (error) {
      const failure = failureFrom(error);
      if (failure.reason !== 'busy' || delayMs === null) return failure;
      await new Promise((resolve) => setTimeout(resolve, delayBefore(error, delayMs)));
    }
  }
  return { ok: false, reason: 'busy', code: null, message: 'the provider stayed busy' };
}

// Jitter keeps two processes that were refused together from coming back together.
function delayBefore(error: unknown, delayMs: number): number {
  const asked =
    error instanceof Stripe.errors.StripeError
      ? Number(error.headers?.['retry-after'] ?? Number.NaN) * 1000
      : Number.NaN;
  const leastMs = Number.isFinite(asked) ? Math.min(LONGEST_ASKED_DELAY_MS, Math.max(0, asked)) : 0;
  return Math.max(leastMs, delayMs / 2 + Math.random() * (delayMs / 2));
}

/** Anything that is not the provider's error is a bug of ours and goes on being thrown. */
function failureFrom(error: unknown): PaymentFailure {
  if (!(error instanceof Stripe.errors.StripeError)) throw error;
  return { ok: false, reason: reasonOf(error), code: error.code ?? null, message: error.message };
}

function reasonOf(error: Stripe.errors.StripeError): PaymentFailure['reason'] {
  const { errors } = Stripe;
  if (error instanceof errors.StripeRateLimitError) return 'busy';
  if (error instanceof errors.StripeIdempotencyError) return 'conflict';
  if (error instanceof errors.StripeAuthenticationError || error instanceof errors.StripePermissionError)
    return 'misconfigured';
  if (error.code === 'resource_missing' && error.statusCode === 404) return 'not-found';
  if (error instanceof errors.StripeConnectionError || error instanceof errors.StripeAPIError) return 'unreachable';
  return 'refused';
}

function checkoutFrom(session: Stripe.Checkout.Session): Checkout {
  const attemptText = session.metadata?.attempt;
  return {
    id: session.id,
    url: session.url,
    status: checkoutStatus.parse(session.status),
    isPaid: session.payment_status === 'paid',
    amountMinor: session.amount_total ?? 0,
    currency: (session.currency ?? '').toUpperCase(),
    orderId: session.client_reference_id,
    attempt: attemptText === undefined ? null : Number(attemptText),
    metadata: { ...session.metadata },
    paymentIntentId:
      typeof session.payment_intent === 'string' ? session.payment_intent : (session.payment_intent?.id ?? null),
    expiresAt: new Date(session.expires_at * 1000),
  };
}

function webhookRefusal(reason: WebhookRefusal['reason'], message: string): WebhookRefusal {
  return { ok: false, reason, message };
}

const messageOf = (error: unknown): string => (error instanceof Error ? error.message : String(error));
