'use client';
/** What can be done with an order now, the next step last and in copper. Client: paying leaves for the checkout page. */
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { useSay } from '@/components/ui/status-line';
import { Act } from '@/components/workshop/act';
import { useCommand } from '@/lib/api/client';
import type { approveOrder, returnOrderToDraft, submitOrder } from '@/lib/purchasing/approve-order';
import type { cancelOrder, settleShortOrder } from '@/lib/purchasing/cancel-order';
import type { closeOrder, payOrder } from '@/lib/purchasing/pay-order';
import type { sendOrder } from '@/lib/purchasing/send-order';
import { money } from './money';
import type { OrderFacts } from './order-facts';

export function OrderActs({
  order,
  isLead,
  paymentUnderWay,
}: {
  readonly order: OrderFacts;
  readonly isLead: boolean;
  readonly paymentUnderWay: boolean;
}) {
  const may = (act: OrderFacts['acts'][number]) => order.acts.includes(act);
  const input = { orderId: order.id };
  const arrived = order.lines.some((line) => line.received > 0);
  const reason = { field: 'reason', label: 'Why' } as const;
  return (
    <>
      {may('cancel') && !arrived ? (
        <Act<typeof cancelOrder>
          endpoint="POST /orders/{orderId}/cancel"
          input={input}
          word="Cancel"
          busyWord="Cancelling …"
          kind="danger"
          title={`Cancel order ${order.number}`}
          text="What was paid by card is paid back; a supplier who has it already is written to."
          questions={[reason]}
          said={`Order ${order.number} is cancelled`}
        />
      ) : null}
      {may('return-to-draft') && !paymentUnderWay ? (
        <Act<typeof returnOrderToDraft>
          endpoint="POST /orders/{orderId}/return-to-draft"
          input={input}
          word="Back to draft"
          questions={[reason]}
          said="It is a draft again"
        />
      ) : null}
      {may('settle-short') ? (
        <Act<typeof settleShortOrder>
          endpoint="POST /orders/{orderId}/settle-short"
          input={input}
          word="Settle what did not come"
          busyWord="Settling …"
          title="The rest will not come"
          text="What is missing is taken off the order; what was paid for it by card is paid back."
          questions={[reason]}
          said="The order is settled with what came"
        />
      ) : null}
      {may('submit') ? (
        <Act<typeof submitOrder>
          endpoint="POST /orders/{orderId}/submit"
          input={{ ...input, version: order.version }}
          word={`Submit ${money(order.totalMinor, order.currency)}`}
          busyWord="Submitting …"
          kind="primary"
        />
      ) : null}
      {may('approve') && isLead && !order.submittedByYou ? (
        <Act<typeof approveOrder>
          endpoint="POST /orders/{orderId}/approve"
          input={{ ...input, version: order.version }}
          word="Approve"
          busyWord="Approving …"
          kind="primary"
          said={`Order ${order.number} is approved`}
        />
      ) : null}
      {may('pay') && !paymentUnderWay ? <PayActs order={order} /> : null}
      {may('send') ? (
        <Act<typeof sendOrder>
          endpoint="POST /orders/{orderId}/send"
          input={input}
          word={`Send to ${order.supplier.name}`}
          busyWord="Sending …"
          kind="primary"
          said={`Order ${order.number} goes to ${order.supplier.email}`}
        />
      ) : null}
      {may('close') ? (
        <Act<typeof closeOrder>
          endpoint="POST /orders/{orderId}/close"
          input={input}
          word="Close the order"
          busyWord="Closing …"
          kind="primary"
          said={`Order ${order.number} is closed`}
        />
      ) : null}
    </>
  );
}

function PayActs({ order }: { readonly order: OrderFacts }) {
  const router = useRouter();
  const say = useSay();
  const pay = useCommand<typeof payOrder>('POST /orders/{orderId}/pay');
  function send(way: 'card' | 'on-account') {
    pay.mutate(
      { orderId: order.id, way },
      {
        onSuccess: ({ checkoutUrl }) => {
          if (checkoutUrl !== null) window.location.assign(checkoutUrl);
          else {
            say('It goes on account');
            router.refresh();
          }
        },
      },
    );
  }
  return (
    <>
      <Button
        kind={order.supplier.takesCards ? 'secondary' : 'primary'}
        busy={pay.isPending}
        onClick={() => send('on-account')}
      >
        Pay on account
      </Button>
      {order.supplier.takesCards ? (
        <Button kind="primary" busy={pay.isPending} busyWord="To the checkout …" onClick={() => send('card')}>
          Pay {money(order.totalMinor, order.currency)} by card
        </Button>
      ) : null}
      {pay.error ? (
        <div className="basis-full">
          <Notice tone="stop" announce title={pay.error.details.title}>
            {pay.error.details.detail}
          </Notice>
        </div>
      ) : null}
    </>
  );
}
