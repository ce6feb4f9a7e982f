/** What was ordered, paid, paid back and received, side by side. */
import type { ReactNode } from 'react';
import { Facts } from '@/components/ui/facts';
import { dayText } from '@/components/workshop/clock-time';
import { money } from './money';
import type { OrderFacts } from './order-facts';

const PAYMENTS: Readonly<Record<string, string>> = {
  started: 'being started',
  open: 'waits at the checkout',
  declined: 'card declined',
  paid: 'paid',
  abandoned: 'given up',
  failed: 'failed',
};

export function OrderMoney({ order }: { readonly order: OrderFacts }) {
  const amount = (minor: number) => money(minor, order.currency);
  return (
    <div className="grid gap-x-10 gap-y-6 lg:grid-cols-3">
      <Column title="Ordered">
        <Facts
          facts={[
            { name: 'Goods', value: amount(order.goodsMinor), mono: true },
            { name: 'Postage', value: amount(order.postageMinor), mono: true },
            { name: 'Total', value: amount(order.totalMinor), mono: true },
          ]}
        />
      </Column>
      <Column title="Paid">
        {order.payments.length === 0 && order.refunds.length === 0 ? (
          <p className="text-soft">
            {order.state === 'on-account' || order.sentAt !== null
              ? 'On account: the supplier’s invoice follows.'
              : 'Nothing yet.'}
          </p>
        ) : (
          <Facts
            facts={[
              ...order.payments.map((one) => ({
                name: `Payment ${one.attempt}, ${PAYMENTS[one.state] ?? one.state}`,
                value: amount(one.amountMinor),
                mono: true,
                ...(one.paidAt === null ? {} : { basis: dayText(one.paidAt) }),
              })),
              ...order.refunds.map((one) => ({
                name: `Paid back, ${one.state}`,
                value: `−${amount(one.amountMinor)}`,
                mono: true,
                basis: one.reason,
              })),
            ]}
          />
        )}
      </Column>
      <Column title="Received">
        {order.receipts.length === 0 ? (
          <p className="text-soft">Nothing yet.</p>
        ) : (
          <Facts
            facts={order.receipts.map((one) => ({
              name: `${one.number}, ${dayText(one.receivedAt)}`,
              value: `${one.units} units`,
              basis: `${one.receivedBy}${one.deliveryNote === '' ? '' : `, note ${one.deliveryNote}`}`,
            }))}
          />
        )}
      </Column>
    </div>
  );
}

function Column({ title, children }: { readonly title: string; readonly children: ReactNode }) {
  return (
    <div>
      <h3 className="mb-1 border-b border-ink pb-1 font-bold">{title}</h3>
      {children}
    </div>
  );
}
