import type { Metadata } from 'next';
import Link from 'next/link';
import { ExpectedOn } from '@/components/purchasing/expected-on';
import { ReceiveForm } from '@/components/stores/receive-form';
import { STORES_LINKS } from '@/components/stores/stores-links';
import { AreaLinks } from '@/components/shell/area-links';
import { EmptyState } from '@/components/ui/empty-state';
import { ButtonLink } from '@/components/ui/button';
import { PageTitle } from '@/components/ui/page-title';
import { Section } from '@/components/ui/section';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { dayText } from '@/components/workshop/clock-time';
import { StateWord } from '@/components/workshop/state-word';
import { ask } from '@/lib/api/ask';
import { listOrders } from '@/lib/purchasing/get-order';
import { listReceipts } from '@/lib/stores/list-receipts';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Receive' };

export default async function ReceivePage() {
  const [orders, receipts, me] = await Promise.all([
    ask(listOrders, { state: ['sent', 'part-received'], size: 100 }),
    ask(listReceipts, { size: 20 }),
    ask(whoAmI, {}),
  ]);
  const coming = [...orders.rows].sort((a, b) => (a.expectedOn ?? '9999').localeCompare(b.expectedOn ?? '9999'));
  const mayReceive = me.roles.some((role) => role !== 'builder');
  return (
    <>
      <PageTitle above={<AreaLinks label="Stores" links={STORES_LINKS} />} title="Receive" />
      <Section title="On its way">
        {coming.length === 0 ? (
          <EmptyState title="No delivery is expected">
            Orders that were sent stand here until all their bags are in.
          </EmptyState>
        ) : (
          <Table label="Orders on their way" stacked>
            <TableHead>
              <HeadCell>Order</HeadCell>
              <HeadCell>From</HeadCell>
              <HeadCell>Expected</HeadCell>
              <HeadCell>State</HeadCell>
              <HeadCell number>Lines</HeadCell>
              <HeadCell hideLabel>Receive</HeadCell>
            </TableHead>
            <TableBody>
              {coming.map((one) => (
                <TableRow key={one.id}>
                  <Cell label="Order" mono>
                    <Link href={`/orders/${one.id}`} className="text-copper hover:underline">
                      {one.number}
                    </Link>
                  </Cell>
                  <Cell label="From">{one.supplierName}</Cell>
                  <Cell label="Expected">
                    <ExpectedOn day={one.expectedOn} late={one.late} />
                  </Cell>
                  <Cell label="State">
                    <StateWord state={one.state} />
                  </Cell>
                  <Cell label="Lines" number>
                    {one.lines}
                  </Cell>
                  <Cell>
                    {mayReceive ? (
                      <ButtonLink size="small" href={`/receive/${one.id}`}>
                        Receive<span className="sr-only"> order {one.number}</span>
                      </ButtonLink>
                    ) : null}
                  </Cell>
                </TableRow>
              ))}
            </TableBody>
          </Table>
        )}
      </Section>
      {mayReceive ? (
        <Section title="Without an order" remainder="what somebody brought along">
          <ReceiveForm orderId={null} expected={[]} />
        </Section>
      ) : null}
      {receipts.rows.length > 0 ? (
        <Section title="Lately received">
          <ul className="border-t border-rule">
            {receipts.rows.map((one) => (
              <li key={one.id} className="flex flex-wrap justify-between gap-x-4 border-b border-hair py-1.5">
                <span>
                  <span className="font-mono">{one.number}</span>
                  {one.supplierName === null ? '' : ` from ${one.supplierName}`}
                  {one.orderId === null ? null : (
                    <>
                      , order{' '}
                      <Link href={`/orders/${one.orderId}`} className="font-mono text-copper hover:underline">
                        {one.orderNumber}
                      </Link>
                    </>
                  )}
                </span>
                <span className="text-soft">
                  {one.receivedBy}, {dayText(one.receivedAt)}
                </span>
              </li>
            ))}
          </ul>
        </Section>
      ) : null}
    </>
  );
}
