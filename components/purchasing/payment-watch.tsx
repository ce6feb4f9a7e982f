'use client';
/**
 * A payment under way: back from the checkout page it waits for the payment service's word, tells a declined card plainly,
 * and lets the buyer go on or give it up. Client: it asks the server until the order has moved.
 */
import { useRouter } from 'next/navigation';
import { useEffect, useState } from 'react';
import { Button, ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Act } from '@/components/workshop/act';
import { useAnswer } from '@/lib/api/client';
import type { getOrder } from '@/lib/purchasing/get-order';
import type { giveUpPayment } from '@/lib/purchasing/pay-order';

const ASK_EVERY_MS = 1500;
const WAIT_AT_MOST_MS = 60_000;

interface Payment {
  readonly state: string;
  readonly checkoutUrl: string | null;
  readonly lastProblem: string | null;
}

export function PaymentWatch({
  orderId,
  payment,
  checkout,
}: {
  readonly orderId: string;
  readonly payment: Payment | null;
  /** How the buyer came back from the checkout page; null where they did not. */
  readonly checkout: 'done' | 'left' | null;
}) {
  const router = useRouter();
  const [waiting, setWaiting] = useState(checkout === 'done');
  const { data } = useAnswer<typeof getOrder>(
    'GET /orders/{orderId}',
    { orderId },
    { enabled: waiting, refetchIntervalMs: ASK_EVERY_MS },
  );
  const state = data?.state;
  useEffect(() => {
    if (state !== undefined && state !== 'approved') router.replace(`/orders/${orderId}`);
  }, [state, orderId, router]);
  useEffect(() => {
    const timer = setTimeout(() => setWaiting(false), WAIT_AT_MOST_MS);
    return () => clearTimeout(timer);
  }, []);

  const latest = data?.payments.find((one) => ['started', 'open', 'declined'].includes(one.state)) ?? payment;
  if (waiting && latest?.state !== 'declined') {
    return (
      <div className="mb-4">
        <Notice tone="plain" announce title="Waiting for the payment service">
          The money is on its way; this page moves on by itself when the payment is confirmed.
        </Notice>
      </div>
    );
  }
  if (latest === null) return null;
  const declined = latest.state === 'declined';
  return (
    <div className="mb-4">
      <Notice
        tone={declined ? 'stop' : 'look'}
        announce
        title={
          declined
            ? 'The card was declined'
            : checkout === 'left'
              ? 'The checkout was left without paying'
              : 'A payment is under way'
        }
        actions={
          <>
            {latest.checkoutUrl === null ? null : (
              <ButtonLink kind="primary" href={latest.checkoutUrl}>
                {declined ? 'Try another card' : 'Go on paying'}
              </ButtonLink>
            )}
            <Act<typeof giveUpPayment>
              endpoint="POST /orders/{orderId}/give-up-payment"
              input={{ orderId }}
              word="Give this payment up"
              busyWord="Giving up …"
              go={`/orders/${orderId}`}
            />
            {waiting ? null : <Button onClick={() => router.refresh()}>Look again</Button>}
          </>
        }
      >
        {latest.lastProblem ?? 'Nothing was paid yet. The order stays approved until it is.'}
      </Notice>
    </div>
  );
}
