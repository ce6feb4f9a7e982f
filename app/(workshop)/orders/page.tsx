import type { Metadata } from 'next';
import Link from 'next/link';
import { ExpectedOn } from '@/components/purchasing/expected-on';
import { money } from '@/components/purchasing/money';
import { PURCHASING_LINKS } from '@/components/purchasing/purchasing-links';
import { AreaLinks } from '@/components/shell/area-links';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { Pages } from '@/components/ui/pager';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { dayText } from '@/components/workshop/clock-time';
import { StateWord } from '@/components/workshop/state-word';
import { ask } from '@/lib/api/ask';
import { listOrders } from '@/lib/purchasing/get-order';
import { ORDER_STATES } from '@/lib/purchasing/order-states';

export const metadata: Metadata = { title: 'Orders' };

const SIZE = 50;

export default async function OrdersPage({
  searchParams,
}: {
  readonly searchParams: Promise<{ page?: string; state?: string }>;
}) {
  const asked = await searchParams;
  const page = Math.max(1, Number(asked.page) || 1);
  const state = ORDER_STATES.find((one) => one === asked.state);
  const { rows, total, byState } = await ask(listOrders, {
    page,
    size: SIZE,
    ...(state === undefined ? {} : { state: [state] }),
  });
  const address = (to: number) => `/orders?page=${to}${state === undefined ? '' : `&state=${state}`}`;
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Purchasing" links={PURCHASING_LINKS} />}
        title="Orders"
        facts={[
          <>
            <Strong mono>{byState.reduce((sum, one) => sum + one.count, 0)}</Strong> in all
          </>,
        ]}
        actions={<ButtonLink href="/shortfalls">From the shortfalls</ButtonLink>}
      />
      <nav aria-label="Orders by state" className="mb-3.5">
        <ul className="flex flex-wrap gap-x-1">
          <li>
            <StateLink href="/orders" current={state === undefined}>
              all
            </StateLink>
          </li>
          {ORDER_STATES.flatMap((one) => {
            const count = byState.find((row) => row.state === one)?.count ?? 0;
            return count === 0
              ? []
              : [
                  <li key={one}>
                    <StateLink href={`/orders?state=${one}`} current={state === one}>
                      <StateWord state={one} /> <span className="font-mono">{count}</span>
                    </StateLink>
                  </li>,
                ];
          })}
        </ul>
      </nav>
      {rows.length === 0 ? (
        <EmptyState title="No order here" actions={<ButtonLink href="/shortfalls">See what is short</ButtonLink>}>
          Orders are raised from what is short, one for each supplier.
        </EmptyState>
      ) : (
        <Table label="Orders" stacked>
          <TableHead>
            <HeadCell>Order</HeadCell>
            <HeadCell>Supplier</HeadCell>
            <HeadCell>State</HeadCell>
            <HeadCell>Expected</HeadCell>
            <HeadCell number>Lines</HeadCell>
            <HeadCell number>Total</HeadCell>
            <HeadCell>Raised</HeadCell>
          </TableHead>
          <TableBody>
            {rows.map((one) => (
              <TableRow key={one.id}>
                <Cell label="Order" mono>
                  <Link href={`/orders/${one.id}`} className="font-semibold text-copper hover:underline">
                    {one.number}
                  </Link>
                </Cell>
                <Cell label="Supplier">{one.supplierName}</Cell>
                <Cell label="State">
                  <StateWord state={one.state} />
                </Cell>
                <Cell label="Expected">
                  <ExpectedOn day={one.expectedOn} late={one.late} />
                </Cell>
                <Cell label="Lines" number>
                  {one.lines}
                </Cell>
                <Cell label="Total" number>
                  {money(one.totalMinor, one.currency)}
                </Cell>
                <Cell label="Raised">
                  {one.createdBy}, {dayText(one.createdAt)}
                </Cell>
              </TableRow>
            ))}
          </TableBody>
        </Table>
      )}
      <Pages page={page} size={SIZE} total={total} what="orders" hrefOf={address} />
    </>
  );
}

function StateLink({
  href,
  current,
  children,
}: {
  readonly href: string;
  readonly current: boolean;
  readonly children: React.ReactNode;
}) {
  return (
    <Link
      href={href}
      aria-current={current ? 'page' : undefined}
      className={`inline-flex min-h-8 items-baseline gap-1.5 px-2 py-1 text-small max-sm:min-h-11 ${current ? 'border-b-2 border-copper font-semibold' : 'hover:bg-copper-wash'}`}
    >
      {children}
    </Link>
  );
}
