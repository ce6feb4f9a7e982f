/** The provider's JSON objects, as far as an SDK of API version 2026-10-28.endive looks at them in payment mode. */
import type { Charge, Intent, Refund, Session } from './payment-records';

export const API_VERSION = '2026-10-28.endive';

export function sessionShape(session: Session, intent: Record<string, unknown> | null = null): Record<string, unknown> {
  return {
    id: session.id,
    object: 'checkout.session',
    amount_subtotal: session.amountMinor,
    amount_total: session.amountMinor,
    cancel_url: session.cancelUrl,
    client_reference_id: session.clientReference,
    created: session.createdSeconds,
    currency: session.currency,
    customer: null,
    customer_email: session.customerEmail,
    expires_at: session.expiresSeconds,
    livemode: false,
    metadata: session.metadata,
    mode: 'payment',
    payment_intent: intent ?? session.intentId,
    payment_method_types: ['card'],
    payment_status: session.paid ? 'paid' : 'unpaid',
    status: session.status,
    success_url: session.successUrl,
    ui_mode: 'hosted_page',
    // The provider gives the page's address only while it can be used.
    url: session.status === 'open' ? session.url : null,
  };
}

export function intentShape(
  intent: Intent,
  session: Session,
  charge: Record<string, unknown> | null = null,
): Record<string, unknown> {
  return {
    id: intent.id,
    object: 'payment_intent',
    amount: session.amountMinor,
    amount_capturable: 0,
    amount_received: intent.status === 'succeeded' ? session.amountMinor : 0,
    application_fee_amount: session.feeMinor,
    capture_method: 'automatic_async',
    created: intent.createdSeconds,
    currency: session.currency,
    description: session.description,
    last_payment_error: intent.lastError
      ? {
          type: 'card_error',
          code: intent.lastError.code,
          decline_code: intent.lastError.declineCode,
          message: intent.lastError.message,
          charge: intent.lastError.chargeId,
        }
      : null,
    latest_charge: charge ?? intent.latestChargeId,
    livemode: false,
    metadata: session.intentMetadata,
    payment_method_types: ['card'],
    status: intent.status,
    transfer_data: session.destination ? { destination: session.destination } : null,
  };
}

export function chargeShape(charge: Charge, intent: Intent, session: Session): Record<string, unknown> {
  return {
    id: charge.id,
    object: 'charge',
    amount: charge.amountMinor,
    amount_captured: charge.failed ? 0 : charge.amountMinor,
    amount_refunded: charge.refundedMinor,
    captured: !charge.failed,
    created: charge.createdSeconds,
    currency: session.currency,
    description: session.description,
    destination: session.destination,
    failure_code: charge.failed?.code ?? null,
    failure_message: charge.failed?.message ?? null,
    livemode: false,
    metadata: session.intentMetadata,
    paid: !charge.failed,
    payment_intent: intent.id,
    payment_method_details: { type: 'card', card: { last4: charge.lastFour } },
    refunded: charge.refundedMinor === charge.amountMinor,
    status: charge.failed ? 'failed' : 'succeeded',
    transfer: charge.transferId,
    transfer_data: session.destination ? { amount: null, destination: session.destination } : null,
  };
}

export function refundShape(refund: Refund, intent: Intent, session: Session): Record<string, unknown> {
  return {
    id: refund.id,
    object: 'refund',
    amount: refund.amountMinor,
    charge: refund.chargeId,
    created: refund.createdSeconds,
    currency: session.currency,
    metadata: refund.metadata,
    payment_intent: intent.id,
    reason: refund.reason,
    status: 'succeeded',
    transfer_reversal: refund.transferReversalId,
  };
}

export const listShape = (
  url: string,
  data: readonly Record<string, unknown>[],
  hasMore: boolean,
): Record<string, unknown> => ({ object: 'list', url, has_more: hasMore, data });
