/** What the payment stand-in keeps: sessions, intents, charges, refunds, events. Amounts are in minor units throughout. */

export type LineItem = { name: string; unitAmountMinor: number; quantity: number };

export type Session = {
  id: string;
  amountMinor: number;
  currency: string;
  status: 'open' | 'complete' | 'expired';
  paid: boolean;
  url: string;
  successUrl: string;
  cancelUrl: string | null;
  clientReference: string | null;
  customerEmail: string | null;
  description: string | null;
  metadata: Record<string, string>;
  intentMetadata: Record<string, string>;
  items: LineItem[];
  destination: string | null;
  feeMinor: number | null;
  intentId: string | null;
  createdSeconds: number;
  expiresSeconds: number;
};

export type Decline = { code: string; declineCode: string | null; message: string };

export type Intent = {
  id: string;
  sessionId: string;
  status: 'requires_payment_method' | 'succeeded' | 'canceled';
  lastError: (Decline & { chargeId: string }) | null;
  latestChargeId: string | null;
  createdSeconds: number;
};

export type Charge = {
  id: string;
  intentId: string;
  amountMinor: number;
  refundedMinor: number;
  failed: Decline | null;
  lastFour: string;
  transferId: string | null;
  reversedMinor: number;
  createdSeconds: number;
};

export type Refund = {
  id: string;
  chargeId: string;
  amountMinor: number;
  reason: string | null;
  metadata: Record<string, string>;
  transferReversalId: string | null;
  createdSeconds: number;
};

export type PaymentEvent = {
  id: string;
  object: 'event';
  api_version: string;
  created: number;
  type: string;
  livemode: false;
  data: { object: Record<string, unknown> };
  request: { id: string | null; idempotency_key: string | null };
};

export type PaymentState = {
  sessions: Record<string, Session>;
  intents: Record<string, Intent>;
  charges: Record<string, Charge>;
  refunds: Record<string, Refund>;
  events: Record<string, PaymentEvent>;
};

export const emptyPayments = (): PaymentState => ({ sessions: {}, intents: {}, charges: {}, refunds: {}, events: {} });
