import type { Metadata } from 'next';
import Link from 'next/link';
import { money } from '@/components/purchasing/money';
import { OrderActs } from '@/components/purchasing/order-acts';
import { OrderLife } from '@/components/purchasing/order-life';
import { OrderLines } from '@/components/purchasing/order-lines';
import { OrderMoney } from '@/components/purchasing/order-money';
import { PaymentWatch } from '@/components/purchasing/payment-watch';
import { PURCHASING_LINKS } from '@/components/purchasing/purchasing-links';
import { AreaLinks } from '@/components/shell/area-links';
import { ButtonLink } from '@/components/ui/button';
import { Glyph } from '@/components/ui/glyph';
import { Notice } from '@/components/ui/notice';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { Section } from '@/components/ui/section';
import { dayText } from '@/components/workshop/clock-time';
import { ask } from '@/lib/api/ask';
import { getOrder } from '@/lib/purchasing/get-order';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Order' };

export default async function OrderPage({
  params,
  searchParams,
}: {
  readonly params: Promise<{ orderId: string }>;
  readonly searchParams: Promise<{ checkout?: string }>;
}) {
  const { orderId } = await params;
  const { checkout } = await searchParams;
  const [order, me] = await Promise.all([ask(getOrder, { orderId }), ask(whoAmI, {})]);
  const buys = me.roles.some((role) => role === 'buyer' || role === 'lead');
  const receives = me.roles.some((role) => role !== 'builder');
  const underWay = order.payments.find((one) => ['started', 'open', 'declined'].includes(one.state)) ?? null;
  const coming = order.state === 'sent' || order.state === 'part-received';
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Purchasing" links={PURCHASING_LINKS} />}
        title={`Order ${order.number}`}
        remainder={order.supplier.name}
        facts={[
          <>
            <Strong mono>{money(order.totalMinor, order.currency)}</Strong>
          </>,
          <>
            raised by {order.createdBy}, {dayText(order.createdAt)}
          </>,
          order.approvedBy === null ? null : <>approved by {order.approvedBy}</>,
          order.expectedOn === null ? null : order.late ? (
            <span className="inline-flex items-baseline gap-1.5 text-oxide">
              <Glyph name="look" size={14} className="translate-y-[2px]" />
              was expected {dayText(order.expectedOn)}
            </span>
          ) : (
            <>expected {dayText(order.expectedOn)}</>
          ),
        ]}
        actions={
          <>
            <ButtonLink kind="quiet" href={`/api/v1/orders/${orderId}/pdf`} download>
              PDF
            </ButtonLink>
            <ButtonLink kind="quiet" href={`/api/v1/orders/${orderId}/csv`} download>
              CSV
            </ButtonLink>
            {buys ? (
              <OrderActs order={order} isLead={me.roles.includes('lead')} paymentUnderWay={underWay !== null} />
            ) : null}
            {coming && receives ? (
              <ButtonLink kind="primary" href={`/receive/${orderId}`}>
                Receive
              </ButtonLink>
            ) : null}
          </>
        }
      />
      <OrderLife state={order.state} />
      {order.state === 'approved' && buys && (underWay !== null || checkout !== undefined) ? (
        <PaymentWatch
          orderId={orderId}
          payment={underWay}
          checkout={checkout === 'done' ? 'done' : checkout === 'left' ? 'left' : null}
        />
      ) : null}
      {order.state === 'submitted' ? (
        <div className="mb-4">
          <Notice tone="look" title="Waits for a lead">
            It is above the workshop’s limit, so{' '}
            {order.submittedByYou ? 'somebody else than you' : 'a lead who did not submit it'} has to approve it.
          </Notice>
        </div>
      ) : null}
      {order.note === '' ? null : <p className="mb-4 max-w-prose">{order.note}</p>}
      <Section title="Lines">
        <OrderLines order={order} mayChange={buys && order.state === 'draft'} />
      </Section>
      <Section title="Money and bags" remainder="side by side">
        <OrderMoney order={order} />
      </Section>
      {order.mails.length > 0 ? (
        <Section title="Sent by e-mail">
          <ul className="border-t border-rule">
            {order.mails.map((mail, index) => (
              <li key={index} className="border-b border-hair py-2">
                {mail.subject}
                <span className="block text-small text-soft">
                  to <span className="font-mono break-all">{mail.to}</span>
                  {mail.sentAt === null ? ', on its way' : `, ${dayText(mail.sentAt)}`}
                </span>
              </li>
            ))}
          </ul>
        </Section>
      ) : null}
      <p className="mt-6 text-small">
        <Link href={`/suppliers/${order.supplier.id}`} className="text-copper hover:underline">
          About {order.supplier.name}
        </Link>
      </p>
    </>
  );
}
