/**
 * The stand-in for the payment provider, without HTTP: checkout sessions, intents, charges, refunds and the events that
 * tell of them. Error texts follow the provider's public API reference; amounts are in minor units throughout.
 */
import { randomBytes } from 'node:crypto';
import {
  type Charge,
  type Decline,
  type Intent,
  type PaymentEvent,
  type PaymentState,
  type Refund,
  type Session,
} from './payment-records';
import { API_VERSION, chargeShape, intentShape, refundShape, sessionShape } from './payment-shapes';

/** An error in the provider's shape. */
export class PaymentRefusal extends Error {
  readonly status: number;
  readonly detail: { type: string; code?: string; param?: string };
  constructor(status: number, message: string, detail: { type?: string; code?: string; param?: string } = {}) {
    super(message);
    this.status = status;
    this.detail = { type: 'invalid_request_error', ...detail };
  }
}

export const missing = (kind: string, id: string, param = 'id'): PaymentRefusal =>
  new PaymentRefusal(404, `No such ${kind}: '${id}'`, { code: 'resource_missing', param });

export type CardOutcome = { ok: true } | { ok: false; message: string };

// Published test numbers of the provider ("Testing", card declines).
const TEST_CARDS = new Map<string, Decline | null>([
  ['4242424242424242', null],
  ['5555555555554444', null],
  ['4000000000000002', { code: 'card_declined', declineCode: 'generic_decline', message: 'Your card was declined.' }],
  [
    '4000000000009995',
    { code: 'card_declined', declineCode: 'insufficient_funds', message: 'Your card has insufficient funds.' },
  ],
  ['4000000000000069', { code: 'expired_card', declineCode: null, message: 'Your card has expired.' }],
  [
    '4000000000000127',
    { code: 'incorrect_cvc', declineCode: null, message: "Your card's security code is incorrect." },
  ],
  [
    '4000000000000119',
    {
      code: 'processing_error',
      declineCode: null,
      message: 'An error occurred while processing your card. Try again in a little bit.',
    },
  ],
]);

const newId = (prefix: string): string => `${prefix}${randomBytes(16).toString('hex')}`;
const nowSeconds = (): number => Math.floor(Date.now() / 1000);

export type Origin = { requestId: string | null; idempotencyKey: string | null };
const FROM_PAGE: Origin = { requestId: null, idempotencyKey: null };

export class PaymentRules {
  readonly state: PaymentState;
  private readonly tell: (event: PaymentEvent) => void;

  /** `tell` is called once for every event, in order, after the change it tells of. */
  constructor(state: PaymentState, tell: (event: PaymentEvent) => void) {
    this.state = state;
    this.tell = tell;
  }

  createSession(
    given: Omit<Session, 'id' | 'status' | 'paid' | 'url' | 'intentId' | 'createdSeconds'>,
    pageOrigin: string,
  ): Session {
    const id = newId('cs_test_');
    const session: Session = {
      ...given,
      id,
      status: 'open',
      paid: false,
      url: `${pageOrigin}/checkout/${id}`,
      intentId: null,
      createdSeconds: nowSeconds(),
    };
    this.state.sessions[id] = session;
    return session;
  }

  /** The session, expired first if its time is over. */
  getSession(id: string): Session {
    const session = this.state.sessions[id];
    if (!session) throw missing('checkout.session', id, 'session');
    if (session.status === 'open' && session.expiresSeconds <= nowSeconds()) this.close(session, FROM_PAGE);
    return session;
  }

  expireSession(id: string, origin: Origin): Session {
    const session = this.getSession(id);
    if (session.status !== 'open') {
      throw new PaymentRefusal(
        400,
        `Only Checkout Sessions with a status in ["open"] can be expired. This Session has a status of ${session.status}.`,
      );
    }
    this.close(session, origin);
    return session;
  }

  /** One try with a card. A decline leaves the session open; a session that is paid or expired takes no card. */
  payWithCard(sessionId: string, number: string): CardOutcome {
    const session = this.getSession(sessionId);
    if (session.status === 'complete') return { ok: true };
    if (session.status === 'expired')
      return { ok: false, message: 'This page has expired. Go back to the order and start the payment again.' };
    const digits = number.replace(/[\s-]/g, '');
    if (!/^\d{12,19}$/.test(digits) || !passesLuhn(digits))
      return { ok: false, message: 'Your card number is incorrect.' };
    const known = TEST_CARDS.get(digits);
    // Nothing of a number that could be somebody's is kept, not even its last digits.
    const decline =
      known === undefined
        ? {
            code: 'card_declined',
            declineCode: 'test_mode_live_card',
            message: 'Only the test numbers below are taken here. Never type a real card number into a stand-in.',
          }
        : known;
    const lastFour = known === undefined ? '0000' : digits.slice(-4);

    const intent = this.intentOf(session);
    const charge: Charge = {
      id: newId('ch_'),
      intentId: intent.id,
      amountMinor: session.amountMinor,
      refundedMinor: 0,
      failed: decline,
      lastFour,
      transferId: null,
      reversedMinor: 0,
      createdSeconds: nowSeconds(),
    };
    this.state.charges[charge.id] = charge;
    intent.latestChargeId = charge.id;
    if (decline) {
      intent.lastError = { ...decline, chargeId: charge.id };
      this.event('charge.failed', chargeShape(charge, intent, session), FROM_PAGE);
      this.event('payment_intent.payment_failed', intentShape(intent, session), FROM_PAGE);
      return { ok: false, message: decline.message };
    }
    if (session.destination) charge.transferId = newId('tr_');
    intent.status = 'succeeded';
    intent.lastError = null;
    session.status = 'complete';
    session.paid = true;
    this.event('charge.succeeded', chargeShape(charge, intent, session), FROM_PAGE);
    this.event('payment_intent.succeeded', intentShape(intent, session), FROM_PAGE);
    this.event('checkout.session.completed', sessionShape(session), FROM_PAGE);
    return { ok: true };
  }

  /** Gives back part or all of a charge; the parts together never exceed it. */
  refund(
    given: {
      intentId: string | null;
      chargeId: string | null;
      amountMinor: number | null;
      reason: string | null;
      reverseTransfer: boolean;
      metadata: Record<string, string>;
    },
    origin: Origin,
  ): Refund {
    const charge = this.chargeToRefund(given);
    const intent = this.getIntent(charge.intentId);
    const session = this.getSession(intent.sessionId);
    const leftMinor = charge.amountMinor - charge.refundedMinor;
    if (leftMinor === 0)
      throw new PaymentRefusal(400, `Charge ${charge.id} has already been refunded.`, {
        code: 'charge_already_refunded',
      });
    const amountMinor = given.amountMinor ?? leftMinor;
    if (amountMinor > leftMinor) {
      const scale = minorDigits(session.currency);
      const shown = (minor: number) => `${(minor / 10 ** scale).toFixed(scale)} ${session.currency.toUpperCase()}`;
      throw new PaymentRefusal(
        400,
        `Refund amount (${shown(amountMinor)}) is greater than unrefunded amount on charge (${shown(leftMinor)})`,
        { param: 'amount' },
      );
    }
    if (given.reverseTransfer && !charge.transferId)
      throw new PaymentRefusal(400, 'Cannot reverse transfer: the charge has no associated transfer.', {
        param: 'reverse_transfer',
      });

    charge.refundedMinor += amountMinor;
    if (given.reverseTransfer) charge.reversedMinor += amountMinor;
    const refund: Refund = {
      id: newId('re_'),
      chargeId: charge.id,
      amountMinor,
      reason: given.reason,
      metadata: given.metadata,
      transferReversalId: given.reverseTransfer ? newId('trr_') : null,
      createdSeconds: nowSeconds(),
    };
    this.state.refunds[refund.id] = refund;
    this.event('refund.created', refundShape(refund, intent, session), origin);
    this.event('charge.refunded', chargeShape(charge, intent, session), origin);
    return refund;
  }

  getIntent(id: string): Intent {
    const intent = this.state.intents[id];
    if (!intent) throw missing('payment_intent', id, 'intent');
    return intent;
  }

  getCharge(id: string): Charge {
    const charge = this.state.charges[id];
    if (!charge) throw missing('charge', id);
    return charge;
  }

  getRefund(id: string): Refund {
    const refund = this.state.refunds[id];
    if (!refund) throw missing('refund', id);
    return refund;
  }

  getEvent(id: string): PaymentEvent {
    const event = this.state.events[id];
    if (!event) throw missing('event', id);
    return event;
  }

  /** An event that never happened, for a test that forges one. It is not stored and can't be fetched. */
  inventEvent(type: string, object: Record<string, unknown>): PaymentEvent {
    return {
      id: newId('evt_'),
      object: 'event',
      api_version: API_VERSION,
      created: nowSeconds(),
      type,
      livemode: false,
      data: { object },
      request: { id: null, idempotency_key: null },
    };
  }

  private close(session: Session, origin: Origin): void {
    session.status = 'expired';
    const intent = session.intentId ? this.getIntent(session.intentId) : null;
    if (intent) {
      intent.status = 'canceled';
      this.event('payment_intent.canceled', intentShape(intent, session), origin);
    }
    this.event('checkout.session.expired', sessionShape(session), origin);
  }

  // The provider makes the intent at the first try with a card, not with the session.
  private intentOf(session: Session): Intent {
    if (session.intentId) return this.getIntent(session.intentId);
    const intent: Intent = {
      id: newId('pi_'),
      sessionId: session.id,
      status: 'requires_payment_method',
      lastError: null,
      latestChargeId: null,
      createdSeconds: nowSeconds(),
    };
    this.state.intents[intent.id] = intent;
    session.intentId = intent.id;
    this.event('payment_intent.created', intentShape(intent, session), FROM_PAGE);
    return intent;
  }

  private chargeToRefund(given: { intentId: string | null; chargeId: string | null }): Charge {
    if (given.chargeId) {
      const charge = this.state.charges[given.chargeId];
      if (!charge) throw missing('charge', given.chargeId, 'charge');
      if (charge.failed) throw new PaymentRefusal(400, `Charge ${charge.id} failed and cannot be refunded.`);
      return charge;
    }
    const intent = this.state.intents[given.intentId ?? ''];
    if (!intent) throw missing('payment_intent', given.intentId ?? '', 'payment_intent');
    if (intent.status !== 'succeeded' || !intent.latestChargeId)
      throw new PaymentRefusal(400, `This PaymentIntent (${intent.id}) does not have a successful charge to refund.`, {
        code: 'payment_intent_unexpected_state',
      });
    return this.getCharge(intent.latestChargeId);
  }

  private event(type: string, object: Record<string, unknown>, origin: Origin): void {
    const event: PaymentEvent = {
      ...this.inventEvent(type, object),
      request: { id: origin.requestId, idempotency_key: origin.idempotencyKey },
    };
    this.state.events[event.id] = event;
    this.tell(event);
  }
}

/** Digits after the point in a currency (2 for EUR, 0 for JPY). */
export function minorDigits(currency: string): number {
  return new Intl.NumberFormat('en', { style: 'currency', currency }).resolvedOptions().maximumFractionDigits ?? 2;
}

/** The check digit of ISO/IEC 7812-1, annex B. */
function passesLuhn(digits: string): boolean {
  let sum = 0;
  for (let at = 0; at < digits.length; at += 1) {
    const digit = Number(digits[digits.length - 1 - at]);
    const doubled = at % 2 === 1 ? digit * 2 : digit;
    sum += doubled > 9 ? doubled - 9 : doubled;
  }
  return sum % 10 === 0;
}
