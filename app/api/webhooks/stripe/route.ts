import { newRequestId } from '@/lib/api/perform';
import { respondTo } from '@/lib/api/route';
import { acceptPaymentEvent } from '@/lib/purchasing/settle-payment';
import { verifyWebhook } from '@/lib/services/payments';

export const dynamic = 'force-dynamic';
/** An event is a few kilobytes; more is not read. */
const LIMIT_BYTES = 256 * 1024;

/** Stores a signed event and answers at once; what it means is done by a job. 400 without a valid signature. */
export async function POST(request: Request): Promise<Response> {
  const requestId = newRequestId();
  try {
    if (Number(request.headers.get('content-length') ?? 0) > LIMIT_BYTES)
      return new Response('too large', { status: 413 });
    const verified = verifyWebhook(await request.text(), request.headers.get('stripe-signature') ?? '');
    if (!verified.ok) return new Response('not signed by the payment service', { status: 400 });
    return Response.json({ received: await acceptPaymentEvent(verified.event.body) });
  } catch (error) {
    return respondTo(error, requestId, '/api/webhooks/stripe', 'webhooks.stripe');
  }
}
